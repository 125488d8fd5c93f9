import { describe, expect, it } from 'vitest';
import { captionText, cautionText, pageOf, type, wrap } from '../../../app/figure/page.ts';
import { measure } from '../../../app/figure/type/measure.ts';
import { en } from '../../../app/words/en.ts';
import { sheetOf } from './figures.ts';
import { waterSheet, resultsOf } from '../../core/sheet/sheets.ts';

const text =
  'Lines are equilibrium: liquids can superheat and bump, and supercool before they freeze.';

describe('wrap', () => {
  it.each([20, 40, 80, 200])(
    'wrap(…) to %d mm keeps within, loses nothing and fills its lines',
    (width) => {
      const lines = wrap(text, 7, width);
      expect(lines.join(' ')).toBe(text);
      lines.forEach((line, i) => {
        expect(measure([{ text: line }], 7)).toBeLessThanOrEqual(width);
        const [next] = lines[i + 1]?.split(' ') ?? [];
        if (next) expect(measure([{ text: `${line} ${next}` }], 7)).toBeGreaterThan(width);
      });
    },
  );
  it('wrap(…) leaves a word longer than the line whole', () => {
    expect(wrap('a immeasurable b', 7, 3)).toEqual(['a', 'immeasurable', 'b']);
  });
  it('wrap(…) of nothing is nothing', () => expect(wrap('', 7, 50)).toEqual([]));
});

describe('pageOf', () => {
  const [view] = sheetOf(waterSheet([])).views;
  it('gives the frame what caption and margins leave, and the caption the foot of the page', () => {
    const short = pageOf(view!, { cautions: 'One.', sources: 'Two.' });
    const long = pageOf(view!, { cautions: text.repeat(5), sources: text });
    expect([short.width, short.height]).toEqual([190, 130]);
    expect(short.frame.width).toBe(long.frame.width);
    expect(long.frame.height).toBeLessThan(short.frame.height);
    for (const page of [short, long]) {
      expect(page.caption.at(-1)!.y).toBeLessThan(page.height);
      expect(page.caption[0]!.y - type.caption * 0.3528).toBeGreaterThan(
        page.frame.y + page.frame.height + 10,
      );
    }
  });
  it('has cautions before sources', () => {
    const weights = pageOf(view!, { cautions: text, sources: text }).caption.map(
      ({ weight }) => weight,
    );
    expect(weights.toSorted()).toEqual(weights);
    expect(new Set(weights).size).toBe(2);
  });
  it('leaves room for a second scale at the right', () => {
    const second = { ...view!, second: { unit: 'bar', kind: 'gauge' as const } };
    const about = { cautions: text, sources: text };
    expect(pageOf(second, about).frame.width).toBeLessThan(pageOf(view!, about).frame.width - 8);
  });
});

describe('captionText', () => {
  const data = waterSheet(
    [{ T: '121 °C', p: '2 bar(g)' }],
    [{ altitude: '1480 m', name: 'Quillmere' }],
  );
  const said = captionText(sheetOf(data).views[0]!, sheetOf(data), resultsOf(data), en);
  it('says the cautions of the run first and that lines are equilibrium last', () => {
    expect(said.cautions.startsWith(en.caution['pressure vessel'])).toBe(true);
    expect(said.cautions).toContain(en.caution.scald);
    expect(said.cautions.endsWith(en.caution['equilibrium lines'])).toBe(true);
  });
  it('names formulations and the air of the site used', () => {
    expect(said.sources).toContain('IAPWS R6-95(2018)');
    // 84.76 kPa at 1480 m: ISO 2533, computed.
    expect(said.sources).toContain('Quillmere: local atmosphere 84.76');
  });
  it('cautionText(…) says each caution of the language', () => {
    expect(
      cautionText(
        [
          { code: 'vacuum', at: ['a'], numbers: {} },
          { code: 'equilibrium lines', at: [], numbers: {} },
        ],
        en,
      ),
    ).toBe(`${en.caution.vacuum} ${en.caution['equilibrium lines']}`);
  });
});
