import { existsSync } from 'node:fs';
import { readFile } from 'node:fs/promises';
import { Resvg } from '@resvg/resvg-js';
import { describe, expect, it } from 'vitest';
import { mmPerPoint, type TextRun } from '../../../../app/figure/scene/scene.ts';
import { codePoints, faces } from '../../../../app/figure/type/advances.ts';
import { measure, missing } from '../../../../app/figure/type/measure.ts';
import { metricsOf } from '../../../../app/figure/type/sfnt.ts';
import { lines } from './lines.ts';

const fontFiles = ['Regular', 'Italic', 'Bold'].map((face) => `public/fonts/Inter-${face}.ttf`);

/** Width of the ink of a text at 100 units. */
function ink(text: string, { italic, bold }: TextRun): number {
  const style = `${italic ? 'font-style="italic"' : ''} ${bold ? 'font-weight="bold"' : ''}`;
  const svg = `<svg xmlns="http://www.w3.org/2000/svg" width="9999" height="200"><text x="50" y="120" font-family="Inter" font-size="100" ${style}>${text}</text></svg>`;
  const box = new Resvg(svg, { font: { fontFiles, loadSystemFonts: false } }).innerBBox();
  if (!box) throw new Error(`nothing drawn: ${text}`);
  return box.width;
}

describe('measure', () => {
  it.each(lines.flat())('measure($text) is within 3 % of what a renderer draws', (run) => {
    // Between two stems the advance of the text is all that the ink gains.
    const drawn = ink(`H${run.text}H`, run) - ink('HH', run);
    const expected = measure([run], 100 / mmPerPoint);
    expect(Math.abs(expected / drawn - 1)).toBeLessThan(0.03);
  });

  it.each(['A1', 'B3', 'T', 'p', 'ICE'])(
    'measure(%s) of a short text is at most 5 % off',
    (text) => {
      const run = { text, bold: true };
      const drawn = ink(`H${text}H`, run) - ink('HH', run);
      expect(Math.abs(measure([run], 100 / mmPerPoint) / drawn - 1)).toBeLessThan(0.05);
    },
  );

  it('measure(runs) adds up runs, scales and spacing', () => {
    const one = measure([{ text: 'p' }], 8);
    expect(measure([{ text: 'p' }, { text: 'p', scale: 0.5 }], 8)).toBeCloseTo(1.5 * one, 9);
    expect(measure([{ text: 'pp' }], 8, 0.25)).toBeCloseTo(2 * one + 4 * mmPerPoint, 9);
    expect(measure([], 8)).toBe(0);
  });

  it('measure(runs) tells the faces apart', () => {
    expect(measure([{ text: 'boil', bold: true }], 10)).toBeGreaterThan(
      measure([{ text: 'boil' }], 10),
    );
  });
});

describe('missing', () => {
  it('missing(text) names each sign that the fonts lack, once', () => {
    expect(missing('T₂ ☃ p😀☃')).toEqual(['☃', '😀']);
  });

  it('missing(text) finds nothing in what figures need', () => {
    const needed = '°′″±−×·÷‰–—…≤≥≈≠∞∂√∆Δρλμη₀₁₉⁰⁻¹²³←→↑↓\u00a0\u2009\u200a\u202f\u2007’“”ßÀÿŐő€Ω';
    expect(missing(needed)).toEqual([]);
  });
});

describe('fonts', () => {
  it.each(['Regular', 'Italic', 'Bold'] as const)(
    'Inter-%s agrees with the table',
    async (name) => {
      const face = faces[name.toLowerCase() as 'regular' | 'italic' | 'bold'];
      const metrics = metricsOf(await readFile(`public/fonts/Inter-${name}.ttf`));
      expect(codePoints.map((c) => metrics.advances.get(c))).toEqual(face.advances);
      expect(metrics.capHeight).toBe(face.capHeight);
      expect(existsSync(`public/fonts/Inter-${name}.woff2`)).toBe(true);
    },
  );

  it('the licence lies beside the fonts', async () => {
    expect(await readFile('public/fonts/OFL.txt', 'utf8')).toContain('SIL Open Font License');
  });
});
