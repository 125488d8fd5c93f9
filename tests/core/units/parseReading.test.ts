import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  canonical,
  longestReading,
  parseReading,
  quantities,
  ReadingError,
  readingFromSI,
  toSI,
  type ParseOptions,
  type PressureKind,
  type Quantity,
  type ReadingIssue,
} from '../../../core/units/index.ts';

function issueOf(text: string, quantity: Quantity, options?: ParseOptions): ReadingIssue {
  try {
    const reading = parseReading(text, quantity, options);
    throw new Error(`"${text}" was read as ${reading.text}`);
  } catch (error) {
    if (error instanceof ReadingError) return error.issue;
    throw error;
  }
}

describe('parseReading of pressures', () => {
  // The design's examples and the ways the trade writes them (common practice, no source).
  it.each([
    ['2.5 bar(g)', '2.5 bar(g)'],
    ['2.5 bar (g)', '2.5 bar(g)'],
    ['2.5 bar g', '2.5 bar(g)'],
    ['2.5 barg', '2.5 bar(g)'],
    ['2.5 barG', '2.5 bar(g)'],
    ['2.5 BARG', '2.5 bar(g)'],
    ['2,5 bar gauge', '2.5 bar(g)'],
    ['2.5 bar [g]', '2.5 bar(g)'],
    ['1.2 bar(g)', '1.2 bar(g)'],
    ['35 psig', '35 psi(g)'],
    ['35 PSIG', '35 psi(g)'],
    ['35psi g', '35 psi(g)'],
    ['35 lb/in2 g', '35 psi(g)'],
    ['35 lbf/in² gauge', '35 psi(g)'],
    ['50 psia', '50 psi(a)'],
    ['50 psi(a)', '50 psi(a)'],
    ['100 kPa(a)', '100 kPa(a)'],
    ['100 kPaa', '100 kPa(a)'],
    ['100 kPa abs', '100 kPa(a)'],
    ['100 kPa abs.', '100 kPa(a)'],
    ['100 kPa (abs)', '100 kPa(a)'],
    ['100 kPa absolute', '100 kPa(a)'],
    ['100 kPa gauge', '100 kPa(g)'],
    ['100 kPa', '100 kPa'],
    ['5 Pa a', '5 Pa(a)'],
    ['600 MPa(a)', '600 MPa(a)'],
    ['600 MPaG', '600 MPa(g)'],
    ['600 N/mm2', '600 MPa'],
    ['20 inHg vac', '20 inHg vacuum'],
    ['20 in. Hg vacuum', '20 inHg vacuum'],
    ['20 in Hg vac.', '20 inHg vacuum'],
    ['20" Hg vac', '20 inHg vacuum'],
    ['29.92 inHg a', '29.92 inHg(a)'],
    ['600 mmHg vacuum', '600 mmHg vacuum'],
    ['10 inH2O g', '10 inH₂O(g)'],
    ['10 in WC(g)', '10 inH₂O(g)'],
    ['10 inH₂O', '10 inH₂O'],
    ['2 kgf/cm2 g', '2 kgf/cm²(g)'],
    ['2 kg/cm²(g)', '2 kgf/cm²(g)'],
    ['14.7 psi ga', '14.7 psi(g)'],
    ['5 inHg ga', '5 inHg(g)'],
    ['500 µmHg abs', '500 micron(a)'],
    ['500 μmHg', '500 micron'],
    ['500 microns', '500 micron'],
    ['500 mTorr', '500 mTorr'],
    ['1 atm abs', '1 atm(a)'],
    ['-0.3 bar(g)', '-0.3 bar(g)'],
    ['−0.3 bar(g)', '-0.3 bar(g)'],
    ['– 0,3 bar(g)', '-0.3 bar(g)'],
    ['+0.3 bar(g)', '0.3 bar(g)'],
    ['2.50 bar(g)', '2.50 bar(g)'],
  ])('%s is %s', (text, expected) => {
    expect(parseReading(text, 'pressure').text).toBe(expected);
  });

  it('keeps gauge and vacuum values as bare differences', () => {
    expect(parseReading('2.5 bar(g)', 'pressure')).toEqual({
      quantity: 'pressure',
      value: 250000,
      kind: 'gauge',
      unit: 'bar',
      number: 2.5,
      decimals: 1,
      text: '2.5 bar(g)',
    });
    const vacuum = parseReading('20 inHg vac', 'pressure');
    expect(vacuum.value).toBeCloseTo(67727.77, 2);
    expect(vacuum.kind).toBe('vacuum');
  });

  it('leaves a bare pressure unstated, and lets defaults fill kind and unit', () => {
    expect(parseReading('2 bar', 'pressure').kind).toBe('unstated');
    expect(parseReading('2 bar', 'pressure', { defaultKind: 'gauge' }).text).toBe('2 bar(g)');
    expect(parseReading('2 bara', 'pressure', { defaultKind: 'gauge' }).text).toBe('2 bar(a)');
    expect(parseReading('2', 'pressure', { defaultUnit: 'psi' }).text).toBe('2 psi');
    expect(parseReading('2 (g)', 'pressure', { defaultUnit: 'psi' }).text).toBe('2 psi(g)');
    expect(parseReading('2 vac', 'pressure', { defaultUnit: 'inHg' }).text).toBe('2 inHg vacuum');
    expect(issueOf('35 g', 'pressure', { defaultUnit: 'psi' }).code).toBe('wrongQuantity');
  });

  it('tells MPa from mPa, and mbar from Mbar', () => {
    expect(issueOf('5 mPa', 'pressure').code).toBe('unknownUnit');
    expect(issueOf('5 mpa', 'pressure').code).toBe('unknownUnit');
    expect(issueOf('5 Mbar', 'pressure').code).toBe('unknownUnit');
  });

  it('a difference has no kind', () => {
    expect(parseReading('0.1 bar', 'pressureDifference')).not.toHaveProperty('kind');
    expect(issueOf('0.1 bar(g)', 'pressureDifference')).toMatchObject({
      code: 'wrongQuantity',
      found: ['pressure'],
    });
  });
});

describe('parseReading of other quantities', () => {
  it.each<[Quantity, string, string, number]>([
    ['temperature', '118 °C', '118 °C', 391.15],
    ['temperature', '250F', '250 °F', 394.2611111],
    ['temperature', '250 degF', '250 °F', 394.2611111],
    ['temperature', '121.1 degC', '121.1 °C', 394.25],
    ['temperature', '121.1 deg C', '121.1 °C', 394.25],
    ['temperature', '121,1 C', '121.1 °C', 394.25],
    ['temperature', '121.1º C', '121.1 °C', 394.25],
    ['temperature', '121.1 ℃', '121.1 °C', 394.25],
    ['temperature', '20 degrees Celsius', '20 °C', 293.15],
    ['temperature', '−40 °F', '-40 °F', 233.15],
    ['temperature', '300 k', '300 K', 300],
    ['temperatureDifference', '0.5 K', '0.5 K', 0.5],
    ['temperatureDifference', '9 °F', '9 F°', 5],
    ['temperatureDifference', '9 F°', '9 F°', 5],
    ['temperatureDifference', '5 °C', '5 C°', 5],
    ['density', '958 kg/m3', '958 kg/m³', 958],
    ['density', '958 kg / m^3', '958 kg/m³', 958],
    ['density', '0.95 g/mL', '0.95 g/cm³', 950],
    ['specificEnergy', '2257 kJ/kg', '2257 kJ/kg', 2257e3],
    ['specificEnergy', '970 BTU/lb', '970 Btu/lb', 970 * 2326],
    ['specificEntropy', '7.35 kJ/kg·K', '7.35 kJ/(kg·K)', 7350],
    ['heatCapacity', '1 Btu/(lb °F)', '1 Btu/(lb·°F)', 4186.8],
    ['speed', '20 ft/s', '20 ft/s', 6.096],
    ['time', '18 min', '18 min', 1080],
    ['time', '1.5 hours', '1.5 h', 5400],
    ['temperatureRate', '2 °C/min', '2 C°/min', 2 / 60],
    ['temperatureRate', '9 F/min', '9 F°/min', 5 / 60],
    ['pressureRate', '0.1 bar/min', '0.1 bar/min', 1e4 / 60],
    ['length', '2 "', '2 in', 0.0508],
    ['length', '600 mm', '600 mm', 0.6],
    ['altitude', '5280 ft', '5280 ft', 1609.344],
    ['altitude', '1 600 m a.s.l.', '1600 m', 1600],
    ['fraction', '25 %', '25 %', 0.25],
    ['fraction', '0.25', '0.25', 0.25],
    ['mass', '12 lbs', '12 lb', 5.44310844],
  ])('%s: %s is %s', (quantity, text, expected, value) => {
    const reading = parseReading(text, quantity);
    expect(reading.text).toBe(expected);
    expect(Math.abs(reading.value - value)).toBeLessThanOrEqual(1e-9 * Math.abs(value));
  });
});

describe('parseReading of numbers', () => {
  it.each([
    ['101 325 Pa', 101325, 0],
    ['101\u00a0325 Pa', 101325, 0],
    ['101\u2009325 Pa', 101325, 0],
    ['101\u202f325 Pa', 101325, 0],
    ["101'325 Pa", 101325, 0],
    ['1 013,25 hPa', 1013.25, 2],
    ['1 013.25 hPa', 1013.25, 2],
    ['1.013,25 hPa', 1013.25, 2],
    ['1,013.25 hPa', 1013.25, 2],
    ['1,013,250 Pa', 1013250, 0],
    ['1.013.250 Pa', 1013250, 0],
    ['1 013,250 hPa', 1013.25, 3],
    ['0,125 bar', 0.125, 3],
    ['1013,250 hPa', 1013.25, 3],
    ['1.013 bar', 1.013, 3],
    ['1,01 bar', 1.01, 2],
    ['.5 bar', 0.5, 1],
    ['1e5 Pa', 1e5, -5],
    ['1E+5 Pa', 1e5, -5],
    ['1.2·10^5 Pa', 1.2e5, -4],
    ['1.2 × 10⁵ Pa', 1.2e5, -4],
    ['1,2 x 10^-3 bar', 0.0012, 4],
    ['0.101 325 MPa', 0.101325, 6],
    ['-0 Pa', 0, 0],
    ['0e5 Pa', 0, 0],
  ])('%s is %d with its last digit at %d', (text, number, decimals) => {
    expect(parseReading(text, 'pressure')).toMatchObject({ number, decimals });
  });

  it('1,013 hPa has two meanings, and the error carries both', () => {
    const issue = issueOf('1,013 hPa', 'pressure');
    expect(issue).toMatchObject({
      code: 'ambiguousNumber',
      readings: [
        { number: 1.013, decimals: 3, text: '1.013 hPa' },
        { number: 1013, decimals: 0, value: 101300, kind: 'unstated', text: '1013 hPa' },
      ],
    });
    expect(issueOf('-12,500 ft', 'altitude')).toMatchObject({
      readings: [{ number: -12.5 }, { number: -12500 }],
    });
  });

  it('a stated decimal mark settles it, either way', () => {
    const read = (text: string, decimal: '.' | ',') =>
      parseReading(text, 'pressure', { decimal }).number;
    expect(read('1,013 hPa', ',')).toBe(1.013);
    expect(read('1,013 hPa', '.')).toBe(1013);
    expect(read('1.013 hPa', '.')).toBe(1.013);
    expect(read('1.013 hPa', ',')).toBe(1013);
    expect(read('1.5 bar', ',')).toBe(1.5);
    expect(read('0.125 bar', ',')).toBe(0.125);
  });

  it.each([
    'abc',
    'bar',
    '-',
    '.',
    '1 01 Pa',
    '12 34 Pa',
    '1.01.5 Pa',
    '1,01.5.2 Pa',
    'NaN Pa',
    '∞ Pa',
  ])('%s is not a number', (text) => {
    expect(issueOf(text, 'pressure')).toMatchObject({ code: 'notANumber', text });
  });

  it('refuses more digits and exponents than an instrument gives', () => {
    expect(issueOf('123456789012345678901 Pa', 'pressure').code).toBe('notANumber');
    expect(issueOf('1e31 Pa', 'pressure').code).toBe('notANumber');
    expect(issueOf('1e999 Pa', 'pressure').code).toBe('notANumber');
  });

  it('never takes 5x1000 for a power of ten', () => {
    expect(issueOf('5x1000 Pa', 'pressure').code).toBe('unknownUnit');
  });
});

describe('parseReading errors', () => {
  it('empty text', () => {
    const { units } = quantities.pressure;
    expect(issueOf('', 'pressure')).toMatchObject({ code: 'empty', expected: units });
    expect(issueOf(' \u00a0 ', 'pressure').code).toBe('empty');
  });

  it('a missing unit, with the number that was understood', () => {
    expect(issueOf('2.5', 'pressure')).toEqual({
      code: 'missingUnit',
      text: '2.5',
      quantity: 'pressure',
      number: 2.5,
      expected: quantities.pressure.units,
    });
    expect(issueOf('2.5 (g)', 'pressure')).toMatchObject({ code: 'missingUnit', number: 2.5 });
  });

  it('an unknown unit, with number and unit as understood', () => {
    expect(issueOf('5 furlongs', 'length')).toMatchObject({
      code: 'unknownUnit',
      number: 5,
      unit: 'furlongs',
      expected: quantities.length.units,
    });
    expect(issueOf('2 at', 'pressure').code).toBe('unknownUnit');
    expect(issueOf('5 bar (x)', 'pressure').code).toBe('unknownUnit');
    expect(issueOf('5 bar(constructor)', 'pressure').code).toBe('unknownUnit');
    expect(issueOf('5 constructor', 'pressure').code).toBe('unknownUnit');
  });

  it('a unit of something else, with what it measures', () => {
    expect(issueOf('5 kg', 'pressure')).toMatchObject({
      code: 'wrongQuantity',
      number: 5,
      unit: 'kg',
      found: ['mass'],
    });
    expect(issueOf('5 C°', 'temperature')).toMatchObject({ found: ['temperatureDifference'] });
  });

  it('below 0 K, with value and least value in SI', () => {
    expect(issueOf('-300 °C', 'temperature')).toMatchObject({
      code: 'belowMinimum',
      number: -300,
      unit: '°C',
      minimum: 0,
    });
    expect(parseReading('-273.15 °C', 'temperature').value).toBe(0);
    expect(parseReading('-459.67 °F', 'temperature').value).toBe(0);
    expect(issueOf('-459.68 °F', 'temperature').code).toBe('belowMinimum');
    expect(issueOf('-1 kg', 'mass').code).toBe('belowMinimum');
  });

  it('a vacuum with a minus sign', () => {
    expect(issueOf('-20 inHg vac', 'pressure')).toMatchObject({
      code: 'negativeVacuum',
      number: -20,
      unit: 'inHg',
    });
  });

  it('too long, and does not keep the text', () => {
    const text = '1'.repeat(longestReading + 1);
    const issue = issueOf(text, 'pressure');
    expect(issue).toMatchObject({ code: 'tooLong', limit: 200, length: 201 });
  });

  it('a default unit of another quantity is a slip of the caller', () => {
    expect(() => parseReading('5', 'pressure', { defaultUnit: 'kg' })).toThrow(RangeError);
  });
});

describe('round trips', () => {
  const names = Object.keys(quantities) as Quantity[];
  const kinds: readonly PressureKind[] = ['gauge', 'absolute', 'vacuum', 'unstated'];
  const kindText = { gauge: 'g', absolute: ' abs', vacuum: ' vac', unstated: '' } as const;

  interface Written {
    readonly quantity: Quantity;
    readonly pick: number;
    readonly kind: PressureKind;
    readonly figures: readonly [whole: number, fraction: number, places: number, minus: boolean];
    readonly exponent: number | null;
  }

  const written: fc.Arbitrary<Written> = fc.record({
    quantity: fc.constantFrom(...names),
    pick: fc.nat(),
    kind: fc.constantFrom(...kinds),
    figures: fc.tuple(fc.nat(9_999_999), fc.nat(99_999), fc.nat(5), fc.boolean()),
    exponent: fc.option(fc.integer({ min: -12, max: 12 })),
  });

  function textOf({ quantity, pick, kind, figures, exponent }: Written): string {
    const { units, minimum } = quantities[quantity];
    const unit = units[pick % units.length] ?? quantities[quantity].si;
    const [whole, fraction, places, negative] = figures;
    const forbidsMinus = minimum !== undefined || (quantity === 'pressure' && kind === 'vacuum');
    const sign = negative && !forbidsMinus ? '-' : '';
    const tail = places === 0 ? '' : `.${String(fraction).padStart(5, '0').slice(0, places)}`;
    const power = exponent === null ? '' : `e${exponent}`;
    const suffix = quantity === 'pressure' ? kindText[kind] : '';
    return `${sign}${whole}${tail}${power}${unit === '1' ? '' : ` ${unit}`}${suffix}`;
  }

  it('the canonical string reads back as the same reading', () => {
    fc.assert(
      fc.property(written, (w) => {
        const reading = parseReading(textOf(w), w.quantity);
        expect(canonical(reading)).toBe(reading.text);
        expect(parseReading(reading.text, w.quantity)).toEqual(reading);
      }),
      { numRuns: 2000 },
    );
  });

  it('a written number keeps its value: the canonical one is the same double', () => {
    fc.assert(
      fc.property(fc.double({ min: -1e9, max: 1e9, noNaN: true }), fc.nat(8), (x, places) => {
        const text = x.toFixed(places);
        expect(parseReading(`${text} m`, 'length').number).toBe(Number(text) + 0);
      }),
    );
  });

  it('any text either reads or fails with a ReadingError, and what reads is finite', () => {
    const bits = fc.constantFrom(
      ...'0123456789.,-−+eE \u2009\'"°()[]gabrkPCFKinHvcus·×^10⁵/%'.split(''),
    );
    const text = fc.oneof(fc.string({ maxLength: 220 }), fc.string({ unit: bits, maxLength: 24 }));
    fc.assert(
      fc.property(text, fc.constantFrom(...names), (t, quantity) => {
        try {
          const reading = parseReading(t, quantity);
          expect(Number.isFinite(reading.value)).toBe(true);
          expect(parseReading(reading.text, quantity)).toEqual(reading);
        } catch (error) {
          if (!(error instanceof ReadingError)) throw error;
        }
      }),
      { numRuns: 5000 },
    );
  });

  it('readingFromSI writes what was dragged, to the place asked for', () => {
    const at = (decimals: number) =>
      readingFromSI('pressure', toSI(2.46813, 'bar'), decimals, 'bar', 'gauge').text;
    expect(at(3)).toBe('2.468 bar(g)');
    expect(at(0)).toBe('2 bar(g)');
    expect(at(-1)).toBe('0 bar(g)');
    expect(readingFromSI('pressure', 6.0049e8, -1, 'bar', 'absolute').text).toBe('6.00e3 bar(a)');
    expect(readingFromSI('temperature', 273.1499, 1, '°C').text).toBe('0.0 °C');
    fc.assert(
      fc.property(
        fc.double({ min: 1, max: 2000, noNaN: true }),
        fc.integer({ min: -2, max: 5 }),
        (T, d) => {
          const reading = readingFromSI('temperature', T, d, 'K');
          expect(parseReading(reading.text, 'temperature')).toEqual(reading);
          expect(Math.abs(reading.value - T)).toBeLessThanOrEqual(0.5000001 * 10 ** -d);
        },
      ),
    );
  });
});
