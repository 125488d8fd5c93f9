import { readFileSync, readdirSync } from 'node:fs';
import fc from 'fast-check';
import { afterEach, describe, expect, it } from 'vitest';
import { openText } from '../../../app/export/openText.ts';
import { sheetAsText, sheetLimit } from '../../../app/export/sheetInSvg.ts';

const demos = readdirSync('public/demos')
  .filter((name) => name.endsWith('.json'))
  .map((name): [string, string] => [name, readFileSync(`public/demos/${name}`, 'utf8')]);
const [, retort] = demos.find(([name]) => name === 'retort.json')!;
const sheet = JSON.parse(retort) as Record<string, unknown>;
const wrapped = (text: string): string =>
  `<svg xmlns="http://www.w3.org/2000/svg"><metadata><simmerline-sheet>${text}</simmerline-sheet></metadata></svg>`;

const codes = (text: string): readonly string[] => {
  const opened = openText(text);
  if (opened.ok) return ['read'];
  expect(opened.issues.length).toBeGreaterThan(0);
  return opened.issues.map(({ code }) => code);
};

/** What a text would do if any of it ran. */
const hostile = {
  toString: 'globalThis.simmerlineHit = 1',
  constructor: { prototype: { polluted: true } },
  markup: '<img src=x onerror="globalThis.simmerlineHit=1">',
};

afterEach(() => {
  expect('simmerlineHit' in globalThis).toBe(false);
  expect('polluted' in {}).toBe(false);
  expect(Object.getOwnPropertyNames(Object.prototype)).not.toContain('version');
});

describe('openText of what it should read', () => {
  it.each(demos)('%s, as a file and inside a figure, is the same sheet', (_, text) => {
    const read = openText(text);
    expect(read).toEqual({ ok: true, sheet: JSON.parse(text) as unknown });
    expect(openText(wrapped(sheetAsText(JSON.parse(text))))).toEqual(read);
  });

  it('a title of markup is a title', () => {
    for (const title of [
      hostile.markup,
      '</simmerline-sheet><script>1</script>',
      '&lt;b&gt;',
      ']]>',
    ])
      for (const text of [
        JSON.stringify({ ...sheet, title }),
        wrapped(sheetAsText({ ...sheet, title })),
      ]) {
        const opened = openText(text);
        expect(opened.ok && opened.sheet.title).toBe(title);
      }
  });

  it('a figure with a script, handlers and a document type gives its sheet and no more', () => {
    const text = sheetAsText(sheet);
    const opened = openText(
      `<?xml version="1.0"?><!DOCTYPE svg [<!ENTITY x "globalThis.simmerlineHit=1">]>
<svg xmlns="http://www.w3.org/2000/svg" onload="globalThis.simmerlineHit=1"><script>globalThis.simmerlineHit=1</script>
<foreignObject><body onload="globalThis.simmerlineHit=1"/></foreignObject><image href="http://elsewhere.invalid/x.png"/>
<metadata><simmerline-sheet>${text}</simmerline-sheet></metadata></svg>`,
    );
    expect(opened).toEqual({ ok: true, sheet });
  });
});

describe('openText of what it should not read', () => {
  const nested = (open: string, close: string, n: number): string =>
    open.repeat(n) + close.repeat(n);
  const laughs = Array.from(
    { length: 9 },
    (_, i) => `<!ENTITY l${i + 1} "${`&l${i};`.repeat(10)}">`,
  ).join('');
  it.each<[string, string, readonly string[]]>([
    ['nothing', '', ['notASheet']],
    ['white space', ' \n\t', ['notASheet']],
    ['a byte order mark alone', '\ufeff', ['notASheet']],
    ['a picture of zeros', '\0'.repeat(5000), ['notASheet']],
    ['half a sheet', retort.slice(0, retort.length / 2), ['notASheet']],
    ['a list', '[1, 2]', ['notASheet']],
    ['a web page', '<!doctype html><html><body><p>hello</body></html>', ['notASheet']],
    ['another SVG', '<svg xmlns="http://www.w3.org/2000/svg"><rect/></svg>', ['notASheet']],
    ['lists nested a million deep', nested('[', ']', 1e6), ['notASheet']],
    ['objects nested deep', nested('{"a":', '}', 1e5).replace('{}', '{"a":1}'), ['notASheet']],
    ['elements nested a million deep', nested('<g>', '</g>', 1e6), ['notASheet']],
    [
      'entities that grow',
      `<!DOCTYPE svg [<!ENTITY l0 "ha">${laughs}]>${wrapped('{"version":&l9;}')}`,
      ['notASheet'],
    ],
    [
      'an entity from a file',
      `<!DOCTYPE svg [<!ENTITY f SYSTEM "file:///etc/passwd">]>${wrapped('"&f;"')}`,
      ['notASheet'],
    ],
    ['a script for a sheet', wrapped('<script>globalThis.simmerlineHit=1</script>'), ['notASheet']],
    ['code for a sheet', 'globalThis.simmerlineHit = 1', ['notASheet']],
    ['a newer sheet', '{"version": 2}', ['newerVersion']],
    ['more than a sheet may be', ' '.repeat(sheetLimit + 1), ['tooLarge']],
    ['a figure larger than may be', `<svg>${' '.repeat(sheetLimit)}</svg>`, ['tooLarge']],
    [
      'a title of a million letters',
      JSON.stringify({ ...sheet, title: 'x'.repeat(1e6) }),
      ['shape'],
    ],
    [
      'a reading of a million digits',
      JSON.stringify(sheet).replace('22 °C', `${'2'.repeat(1e6)} °C`),
      ['shape'],
    ],
  ])('%s', (_, text, wanted) => {
    const start = performance.now();
    expect(codes(text)).toEqual(wanted);
    expect(performance.now() - start).toBeLessThan(3000);
  });

  it('a hundred thousand items are refused in bounded time, with a bounded list of issues', () => {
    const items = Array.from({ length: 1e5 }, () => ({ kind: 'spell' }));
    const start = performance.now();
    const opened = openText(JSON.stringify({ ...sheet, items }));
    expect(performance.now() - start).toBeLessThan(5000);
    expect(!opened.ok && opened.issues.length).toBeLessThanOrEqual(20);
  });

  it('keys of every object’s own are no way in', () => {
    const into = (key: string): string =>
      retort.replace('{', `{ "${key}": { "polluted": true, "version": 1 },`);
    expect(codes(into('constructor'))).toEqual(['shape']);
    expect(codes(into('toString'))).toEqual(['shape']);
    // The one key that JSON sets and objects do not have.
    const opened = openText(into('__proto__'));
    if (opened.ok) {
      expect(opened.sheet).toEqual(sheet);
      expect(Object.getPrototypeOf(opened.sheet)).toBe(Object.prototype);
    }
    for (const place of ['labelOffsets', 'formulations', 'data']) {
      const inner = openText(
        retort.replace(`"${place}": {}`, `"${place}": {"__proto__": {"polluted": true}}`),
      );
      if (inner.ok) expect(JSON.stringify(inner.sheet)).not.toContain('polluted');
    }
  });
});

describe('openText of anything', () => {
  it('any text gives a sheet or issues, quickly', () => {
    fc.assert(
      fc.property(
        fc.oneof(
          fc.string({ unit: 'binary', maxLength: 300 }),
          fc.json(),
          fc.string({ maxLength: 100 }).map((s) => `<svg>${s}</svg>`),
          fc.string({ maxLength: 100 }).map((s) => wrapped(s)),
        ),
        (text) => void codes(text),
      ),
      { numRuns: 1500 },
    );
  });

  it('any cut, doubled or swapped part of a sheet or figure gives a sheet or issues', () => {
    const texts = [retort, wrapped(sheetAsText(sheet))];
    const place = fc.double({ min: 0, max: 1, noNaN: true });
    const piece = fc.constantFrom(
      ...['"', '{', '}', '[', ']', ',', ':', '\\', '<', '>', '&', '\ud800', '\u2028', '\0'],
      ...['<script>', '<!--', '<![CDATA[', '&#x0;', '__proto__', '1e999', '-0', 'null', '\\u0000'],
    );
    let taken = 0;
    fc.assert(
      fc.property(
        fc.constantFrom(...texts),
        fc.array(fc.tuple(place, place, piece), { minLength: 1, maxLength: 4 }),
        (text, changes) => {
          let made = text;
          for (const [from, length, put] of changes) {
            const at = Math.floor(from * made.length);
            made = made.slice(0, at) + put + made.slice(at + Math.floor(length ** 8 * 40));
          }
          if (codes(made)[0] === 'read') taken++;
        },
      ),
      { numRuns: 1500, seed: 7 },
    );
    expect(taken).toBeGreaterThan(0);
  });

  it('any JSON value at any place of a sheet gives a sheet or issues', () => {
    const places = (at: unknown, path: readonly string[]): readonly (readonly string[])[] =>
      typeof at === 'object' && at !== null
        ? [path, ...Object.entries(at).flatMap(([key, inner]) => places(inner, [...path, key]))]
        : [path];
    const all = places(sheet, []).filter((path) => path.length > 0);
    fc.assert(
      fc.property(
        fc.constantFrom(...all),
        fc.oneof(
          fc.jsonValue(),
          fc.constant(hostile),
          fc.constantFrom('constructor', '__proto__', 'x'.repeat(1e5), hostile.markup),
        ),
        (path, value) => {
          const whole = structuredClone(sheet);
          let at = whole;
          for (const key of path.slice(0, -1)) at = at[key] as Record<string, unknown>;
          at[path.at(-1)!] = value;
          void codes(JSON.stringify(whole));
          void codes(wrapped(sheetAsText(whole)));
        },
      ),
      { numRuns: 800 },
    );
  });
});
