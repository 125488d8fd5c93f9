import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  digitsFor,
  format,
  formatDifference,
  formatNumber,
  formatReading,
  parseReading,
  quantities,
  toSI,
} from '../../../core/units/index.ts';

const thin = '\u2009';
const nbsp = '\u00a0';

describe('format', () => {
  it('parts thousands with thin spaces from four digits on', () => {
    expect(format(1480, 'm', { decimals: 0 })).toBe(`1${thin}480${nbsp}m`);
    expect(formatNumber(10000, 0)).toBe(`10${thin}000`);
    expect(formatNumber(1000, 0)).toBe(`1${thin}000`);
    expect(formatNumber(999, 0)).toBe('999');
    expect(formatNumber(1234567.891, 2)).toBe(`1${thin}234${thin}567.89`);
  });

  it('writes a true minus, a decimal comma where asked, and never −0', () => {
    expect(format(toSI(-18.5, '°C'), '°C', { decimals: 1 })).toBe(`−18.5${nbsp}°C`);
    expect(format(toSI(-18.5, '°C'), '°C', { decimals: 1, decimal: ',' })).toBe(`−18,5${nbsp}°C`);
    expect(formatNumber(-0, 2)).toBe('0.00');
    expect(formatNumber(-0.004, 2)).toBe('0.00');
    expect(formatNumber(-4, -1)).toBe('0');
  });

  it('names the kind', () => {
    const kinds = (['gauge', 'absolute', 'vacuum', 'unstated'] as const).map((kind) =>
      format(toSI(20, 'inHg'), 'inHg', { kind, decimals: 0 }),
    );
    expect(kinds).toEqual(
      ['20 inHg(g)', '20 inHg(a)', '20 inHg vacuum', '20 inHg'].map((s) => s.replaceAll(' ', nbsp)),
    );
  });

  it('takes significant digits, four if nothing is said', () => {
    expect(format(101325, 'kPa')).toBe(`101.3${nbsp}kPa`);
    expect(format(101325, 'kPa', { digits: 2 })).toBe(`100${nbsp}kPa`);
    expect(format(99.96, 'Pa', { digits: 3 })).toBe(`100${nbsp}Pa`);
    expect(format(0, 'Pa')).toBe(`0${nbsp}Pa`);
    expect(format(0.25, '1', { digits: 2 })).toBe('0.25');
  });

  it('never shows a digit finer than the resolution', () => {
    expect(format(123456, 'bar', { resolution: 100 })).toBe(`1.235${nbsp}bar`);
    expect(format(123456, 'bar', { resolution: 150 })).toBe(`1.23${nbsp}bar`);
    expect(format(123456, 'Pa', { resolution: 100 })).toBe(`123${thin}500${nbsp}Pa`);
    expect(format(toSI(250.06, '°F'), '°F', { resolution: 0.05 })).toBe(`250.1${nbsp}°F`);
  });

  it('digits follow the uncertainty, in the unit shown', () => {
    expect(format(194400, 'kPa', { uncertainty: 1600 })).toBe(`194${nbsp}kPa`);
    expect(format(194400, 'bar', { uncertainty: 1600 })).toBe(`1.94${nbsp}bar`);
    expect(format(394.27, '°F', { uncertainty: 0.5 })).toBe(`250.0${nbsp}°F`);
  });

  it('refuses NaN and infinity', () => {
    expect(() => format(NaN, 'Pa')).toThrow(RangeError);
    expect(() => formatNumber(Infinity, 0)).toThrow(RangeError);
    expect(() => format(1, 'Pa', { resolution: 0 })).toThrow(RangeError);
  });

  it('text shown reads back, within its last digit', () => {
    fc.assert(
      fc.property(
        fc.constantFrom(...quantities.pressure.units),
        fc.double({ min: -1e5, max: 1e9, noNaN: true }),
        fc.integer({ min: -3, max: 6 }),
        fc.constantFrom('.' as const, ',' as const),
        (unit, p, decimals, decimal) => {
          const text = format(p, unit, { decimals, decimal, kind: 'gauge' });
          const read = parseReading(text, 'pressure', { decimal });
          expect(read.kind).toBe('gauge');
          const off = Math.abs(read.value - p) / toSI(1, unit);
          expect(off).toBeLessThanOrEqual(0.5000001 * 10 ** -decimals + 1e-12 * Math.abs(p));
          expect(text).not.toMatch(/^−[0.,]*\s/);
        },
      ),
      { numRuns: 1000 },
    );
  });
});

describe('digitsFor', () => {
  it.each([
    [1.6, 0],
    [1, 0],
    [0.99, 1],
    [0.07, 2],
    [30, -1],
    [0.1 + 0.2 - 0.2, 1],
  ])('an uncertainty of %d deserves its last digit at %d', (uncertainty, decimals) => {
    expect(digitsFor(uncertainty)).toBe(decimals);
  });

  it('the last digit weighs between a tenth and the whole of the uncertainty', () => {
    fc.assert(
      fc.property(fc.double({ min: 1e-6, max: 1e8, noNaN: true }), (u) => {
        const place = 10 ** -digitsFor(u);
        expect(place).toBeGreaterThan((u / 10) * (1 - 1e-9));
        expect(place).toBeLessThanOrEqual(u * (1 + 1e-9));
      }),
    );
  });

  it('refuses zero and NaN', () => {
    expect(() => digitsFor(0)).toThrow(RangeError);
    expect(() => digitsFor(NaN)).toThrow(RangeError);
  });
});

describe('formatReading', () => {
  it('keeps the digits that were written', () => {
    expect(formatReading(parseReading('2.50 barg', 'pressure'))).toBe(`2.50${nbsp}bar(g)`);
    expect(formatReading(parseReading('1013.25 hPa', 'pressure'), ',')).toBe(
      `1${thin}013,25${nbsp}hPa`,
    );
    expect(formatReading(parseReading('1.2e5 Pa', 'pressure'))).toBe(`120${thin}000${nbsp}Pa`);
  });
});

describe('formatDifference', () => {
  it('gives F° to people who read °F, K to all others', () => {
    expect(formatDifference(5, '°F', { decimals: 1 })).toBe(`9.0${nbsp}F°`);
    expect(formatDifference(-5, '°C', { decimals: 1 })).toBe(`−5.0${nbsp}K`);
    expect(formatDifference(5, 'K', { decimals: 0 })).toBe(`5${nbsp}K`);
  });
});
