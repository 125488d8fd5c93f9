import { describe, expect, it } from 'vitest';
import { printColours } from '../../../app/figure/colours.ts';
import { contrast, deficiencyNames, difference, rgb, seen } from './contrast.ts';

const entries = Object.entries(printColours);
const white = rgb('#ffffff');

describe('the measures of colour', () => {
  it('contrast(…) is 21 for black on white and 4.54 for #767676 (WCAG 2.2, recalled)', () => {
    expect(contrast(rgb('#000000'), white)).toBeCloseTo(21, 10);
    expect(contrast(rgb('#767676'), white)).toBeCloseTo(4.54, 2);
  });
  it('difference(…) is 100 from black to white, and 0 to itself', () => {
    expect(difference(rgb('#000000'), white)).toBeCloseTo(100, 3);
    expect(difference(rgb('#b3401f'), rgb('#b3401f'))).toBe(0);
  });
  it('seen(…) leaves greys as they are and brings red and green together', () => {
    for (const name of deficiencyNames)
      expect(difference(seen(rgb('#808080'), name), rgb('#808080'))).toBeLessThan(0.5);
    const [red, green] = [rgb('#a04020'), rgb('#608020')];
    expect(difference(seen(red, 'deuteranopia'), seen(green, 'deuteranopia'))).toBeLessThan(
      difference(red, green) / 2,
    );
  });
});

describe.each(entries)('printColours.%s', (name, colours) => {
  const fields = (['faint', 'full'] as const).flatMap((kind) =>
    Object.values(colours.fields[kind]).filter((tint) => tint !== null),
  );
  const grounds = [colours.paper, ...fields].map(rgb);

  it('can be read on paper and on every field: 4.5:1 for text', () => {
    for (const colour of [colours.ink, colours.muted, ...colours.own])
      for (const ground of grounds)
        expect(contrast(rgb(colour), ground), colour).toBeGreaterThanOrEqual(4.5);
  });

  it('carries white letters on tags of its own colours: 4.5:1', () => {
    for (const colour of colours.own)
      expect(contrast(rgb(colour), rgb(colours.paper))).toBeGreaterThanOrEqual(4.5);
  });

  it('keeps fields so pale that lines stand on them', () => {
    for (const ground of grounds) expect(contrast(ground, white)).toBeLessThan(1.4);
  });

  if (name === 'colour')
    it.each(['none', ...deficiencyNames] as const)(
      'tells its own colours apart with the deficiency %s: CIE76 ΔE of 15',
      (deficiency) => {
        const shown = colours.own.map((colour) =>
          deficiency === 'none' ? rgb(colour) : seen(rgb(colour), deficiency),
        );
        shown.forEach((a, i) =>
          shown.slice(i + 1).forEach((b, j) => {
            const pair = `${colours.own[i]} and ${colours.own[i + 1 + j]}`;
            expect(difference(a, b), pair).toBeGreaterThanOrEqual(15);
          }),
        );
      },
    );
  else
    it('has no hue: its colours print on one ink', () => {
      for (const colour of [colours.ink, colours.muted, colours.grid, ...colours.own]) {
        const [r, g, b] = rgb(colour);
        expect([g, b]).toEqual([r, r]);
      }
    });
});

it('the first two colours of the user are those of the look', () => {
  expect(printColours.colour.own.slice(0, 2)).toEqual(['#b3401f', '#0b5d86']);
});
