import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  sheetAsText,
  sheetFromSvg,
  SheetInSvgError,
  sheetLimit,
} from '../../../app/export/sheetInSvg.ts';
import { sceneToSvg } from '../../../app/export/svg.ts';
import { page } from '../figure/draw/scenes.ts';

const awkward = {
  name: ']]> <metadata> </simmerline-sheet> &amp; "double" \'single\'',
  emoji: '😀 𝜌 é ₂',
  separators: 'a\u2028b\u2029c\u0000\u001f\ttab\r\nline   three spaces ',
  lone: '\ud800',
  numbers: [0, -1.5e-300, 1e21, 0.1],
  empty: { list: [], object: {}, text: '', nothing: null, yes: true },
  markup: '<!-- --> <?xml?> <![CDATA[ ]]>',
  __proto__x: 1,
};

const wrapped = (content: string): string =>
  `<svg xmlns="http://www.w3.org/2000/svg"><metadata>${content}</metadata></svg>`;
const codeOf = (svg: string): string => {
  try {
    sheetFromSvg(svg);
    return 'read';
  } catch (error) {
    if (error instanceof SheetInSvgError) return error.code;
    throw error;
  }
};

describe('sheetFromSvg', () => {
  it('sheetFromSvg(sceneToSvg(…)) gives back a sheet with awkward characters', async () => {
    expect(sheetFromSvg(await sceneToSvg(page, { sheet: awkward }))).toEqual(awkward);
  });

  it('sheetFromSvg(…) gives back any JSON', () => {
    fc.assert(
      fc.property(fc.jsonValue({ noUnicodeString: false }), (sheet) => {
        const read = sheetFromSvg(
          wrapped(`<simmerline-sheet>${sheetAsText(sheet)}</simmerline-sheet>`),
        );
        expect(read).toEqual(JSON.parse(JSON.stringify(sheet)));
      }),
    );
  });

  const text = sheetAsText(awkward);
  it.each([
    ['indented', `\n  <simmerline-sheet>\n    ${text}\n  </simmerline-sheet>\n`],
    [
      'wrapped in mid-word',
      `<simmerline-sheet>${text.replace(/(.{40})/g, '$1\n\t')}</simmerline-sheet>`,
    ],
    [
      'with references for quotes',
      `<simmerline-sheet>${text.replaceAll('"', '&quot;')}</simmerline-sheet>`,
    ],
    [
      'with numeric references',
      `<simmerline-sheet>${text.replaceAll('"', '&#34;').replaceAll('{', '&#x7B;')}</simmerline-sheet>`,
    ],
    ['as CDATA', `<simmerline-sheet><![CDATA[${text}]]></simmerline-sheet>`],
    [
      'under a prefix, with attributes',
      `<s:simmerline-sheet xmlns:s='urn:x' id='a>b'>${text}</s:simmerline-sheet>`,
    ],
    [
      'beside other metadata',
      `<rdf:RDF a="x &gt; <"><cc:Work/></rdf:RDF><!-- > --><simmerline-sheet>${text}</simmerline-sheet >`,
    ],
    ['with a comment inside', `<simmerline-sheet><!-- <a> -->${text}</simmerline-sheet>`],
  ])('sheetFromSvg(…) reads a file saved by another program: %s', (_, content) => {
    expect(sheetFromSvg(wrapped(content))).toEqual(awkward);
  });

  it('sheetFromSvg(…) passes over a byte order mark, a declaration and a document type', () => {
    const head =
      '\ufeff<?xml version="1.0"?><!DOCTYPE svg PUBLIC "-//W3C//DTD SVG 1.1//EN" "x>y" [ <!ENTITY a "<b>"> ]>';
    expect(sheetFromSvg(`${head}${wrapped('<simmerline-sheet>[1]</simmerline-sheet>')}`)).toEqual([
      1,
    ]);
  });

  it.each([
    ['another picture', '<svg xmlns="http://www.w3.org/2000/svg"><metadata/></svg>', 'noSheet'],
    ['nothing', '', 'noSheet'],
    [
      'a sheet outside the metadata',
      '<svg><simmerline-sheet>[1]</simmerline-sheet></svg>',
      'noSheet',
    ],
    [
      'a sheet in a comment',
      wrapped('<!-- <simmerline-sheet>[1]</simmerline-sheet> -->'),
      'noSheet',
    ],
    [
      'a sheet in an attribute',
      '<svg a="<metadata><simmerline-sheet>[1]</simmerline-sheet>"></svg>',
      'noSheet',
    ],
    ['no JSON', wrapped('<simmerline-sheet>{"a":</simmerline-sheet>'), 'malformed'],
    ['an empty sheet', wrapped('<simmerline-sheet></simmerline-sheet>'), 'malformed'],
    [
      'an element in the sheet',
      wrapped('<simmerline-sheet>[<script/>1]</simmerline-sheet>'),
      'malformed',
    ],
    ['an entity of its own', wrapped('<simmerline-sheet>[&lol;]</simmerline-sheet>'), 'malformed'],
    [
      'a code point too high',
      wrapped('<simmerline-sheet>[&#x110000;]</simmerline-sheet>'),
      'malformed',
    ],
    ['a cut file', '<svg><metadata><simmerline-sheet>[1', 'malformed'],
    ['a cut tag', '<svg><metadata a="', 'malformed'],
    ['crossed tags', '<svg><metadata></svg></metadata>', 'malformed'],
    ['elements nested too deep', '<g>'.repeat(200), 'malformed'],
    [
      'JSON nested too deep',
      wrapped(`<simmerline-sheet>${'['.repeat(1e5)}${']'.repeat(1e5)}</simmerline-sheet>`),
      'malformed',
    ],
    ['too much', ' '.repeat(sheetLimit + 1), 'tooLarge'],
  ])('sheetFromSvg(%s) says why', (_, svg, code) => {
    expect(codeOf(svg)).toBe(code);
  });

  it('sheetFromSvg(…) throws nothing but its own error on any text', () => {
    const piece = fc.constantFrom(
      '<svg>',
      '<metadata>',
      '<simmerline-sheet>',
      '[1]',
      '&',
      '&#0;',
      '</',
      '>',
      '"',
      "'",
      '<!',
      '<!--',
      ']]>',
      '<![CDATA[',
      '</simmerline-sheet>',
      '[',
    );
    fc.assert(
      fc.property(fc.array(piece, { maxLength: 12 }), (pieces) => {
        expect(['read', 'noSheet', 'malformed']).toContain(codeOf(pieces.join('')));
      }),
      { numRuns: 2000 },
    );
  });
});

describe('sheetAsText', () => {
  it('sheetAsText(sheet) holds no white space, markup or letter beyond ASCII', () => {
    expect(sheetAsText(awkward)).toMatch(/^[!-%'-;=?-~]+$/);
  });

  it('sheetAsText(…) refuses what is no JSON', () => {
    expect(() => sheetAsText(undefined)).toThrow('JSON');
  });
});
