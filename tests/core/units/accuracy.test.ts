import { describe, expect, it } from 'vitest';
import {
  absoluteError,
  parseReading,
  pressureError,
  probeError,
  ReadingError,
  spanOf,
  toSI,
} from '../../../core/units/index.ts';

const p = (text: string) => parseReading(text, 'pressure');

describe('pressureError', () => {
  // EN 837-1:1996 (recalled): the class is percent of span.
  it('class 1.6 over 0 to 4 bar is ± 6.4 kPa', () => {
    const gauge = { by: 'class', class: 1.6, low: p('0 bar(g)'), high: p('4 bar(g)') } as const;
    expect(pressureError(gauge)).toBeCloseTo(6400, 9);
  });

  it('class 1 over a compound scale counts both sides', () => {
    const gauge = { by: 'class', class: 1, low: p('-1 bar(g)'), high: p('5 bar(g)') } as const;
    expect(pressureError(gauge)).toBeCloseTo(6000, 9);
    expect(spanOf(p('30 inHg vac'), p('60 psig'))).toBeCloseTo(
      toSI(30, 'inHg') + toSI(60, 'psi'),
      6,
    );
  });

  it('refuses a scale with two zeros or none, and ends that are no pressures', () => {
    for (const [low, high] of [
      [p('0 bar(a)'), p('4 bar(g)')],
      [p('4 bar(g)'), p('4 bar(g)')],
    ] as const)
      expect(() => spanOf(low, high)).toThrow(ReadingError);
    expect(() => spanOf(parseReading('0 K', 'temperature'), p('4 bar'))).toThrow(ReadingError);
  });

  it('takes limits of error outright, whatever their sign', () => {
    const plusMinus = parseReading('-0.5 kPa', 'pressureDifference');
    expect(pressureError({ by: 'plusMinus', plusMinus })).toBe(500);
  });
});

describe('probeError', () => {
  it('is the difference in kelvin', () => {
    expect(probeError(parseReading('0.9 °F', 'temperatureDifference'))).toBeCloseTo(0.5, 12);
    expect(() => probeError(parseReading('0.5 K', 'temperature'))).toThrow(ReadingError);
  });
});

describe('absoluteError', () => {
  it('adds the barometer to gauge and vacuum, not to absolute', () => {
    expect(absoluteError('gauge', 6400, 3000)).toBe(9400);
    expect(absoluteError('vacuum', 6400, 3000)).toBe(9400);
    expect(absoluteError('absolute', 6400, 3000)).toBe(6400);
  });

  it('refuses what is no error', () => {
    expect(() => absoluteError('gauge', -1, 0)).toThrow(RangeError);
    expect(() => absoluteError('gauge', 0, NaN)).toThrow(RangeError);
  });
});
