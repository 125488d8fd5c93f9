import { describe, expect, it } from 'vitest';
import {
  fromSI,
  parseReading,
  quantities,
  stepSI,
  toSI,
  unitTable,
  type UnitId,
} from '../../../core/units/index.ts';

/*
 * Factors as published, to the digits of the source; `exact` where the source says exact, else the
 * relative tolerance follows from the digits printed. All recalled from the named tables.
 */
const si = 'SI brochure, 9th edition (2019), prefixes and table 8';
const nist = 'NIST SP 811 (2008), appendix B.8';
const iso4 = 'ISO 80000-4:2019';
const printed7 = 1e-6;
const exact = 4e-16;

const factors: readonly (readonly [unit: UnitId, si: number, tolerance: number, source: string])[] =
  [
    ['Pa', 1, exact, si],
    ['hPa', 100, exact, si],
    ['kPa', 1e3, exact, si],
    ['MPa', 1e6, exact, si],
    ['GPa', 1e9, exact, si],
    ['bar', 1e5, exact, `${nist}; ${iso4}`],
    ['mbar', 1e2, exact, nist],
    ['kbar', 1e8, exact, nist],
    ['atm', 101325, exact, `${nist}; ${iso4}`],
    ['Torr', 133.3224, printed7, nist],
    ['mTorr', 0.1333224, printed7, nist],
    ['mmHg', 133.3224, printed7, `${nist}, conventional`],
    ['inHg', 3386.389, printed7, `${nist}, conventional`],
    ['micron', 0.1333224, printed7, `${nist}, micrometre of mercury`],
    ['inH₂O', 249.0889, printed7, `${nist}, conventional`],
    ['psi', 6894.757, printed7, nist],
    ['kgf/cm²', 98066.5, exact, nist],
    ['kg', 1, exact, si],
    ['g', 1e-3, exact, si],
    ['t', 1e3, exact, si],
    ['lb', 0.45359237, exact, nist],
    ['oz', 0.02834952, printed7, nist],
    ['kg/m³', 1, exact, si],
    ['kg/L', 1e3, exact, si],
    ['g/cm³', 1e3, exact, nist],
    ['lb/ft³', 16.01846, printed7, nist],
    ['lb/gal', 119.8264, printed7, nist],
    ['J/kg', 1, exact, 'ISO 80000-5:2019'],
    ['kJ/kg', 1e3, exact, 'ISO 80000-5:2019'],
    ['MJ/kg', 1e6, exact, 'ISO 80000-5:2019'],
    ['Btu/lb', 2326, exact, `${nist}, International Table`],
    ['kcal/kg', 4186.8, exact, `${nist}, International Table`],
    ['J/(kg·K)', 1, exact, 'ISO 80000-5:2019'],
    ['kJ/(kg·K)', 1e3, exact, 'ISO 80000-5:2019'],
    ['Btu/(lb·°F)', 4186.8, exact, `${nist}, International Table`],
    ['kcal/(kg·K)', 4186.8, exact, `${nist}, International Table`],
    ['m', 1, exact, si],
    ['mm', 1e-3, exact, si],
    ['cm', 1e-2, exact, si],
    ['km', 1e3, exact, si],
    ['in', 0.0254, exact, nist],
    ['ft', 0.3048, exact, nist],
    ['m/s', 1, exact, si],
    ['km/h', 0.2777778, printed7, nist],
    ['ft/s', 0.3048, exact, nist],
    ['ft/min', 0.00508, exact, nist],
    ['mph', 0.44704, exact, nist],
    ['s', 1, exact, si],
    ['min', 60, exact, si],
    ['h', 3600, exact, si],
    ['d', 86400, exact, si],
    ['K', 1, exact, si],
    ['C°', 1, exact, si],
    ['F°', 0.5555556, printed7, nist],
    ['1', 1, exact, 'ISO 80000-1:2022'],
    ['%', 0.01, exact, 'ISO 80000-1:2022'],
  ];

describe('unitTable', () => {
  it.each(factors)('toSI(1, %s) is %d within %d (%s)', (unit, factor, tolerance) => {
    expect(Math.abs(toSI(1, unit) / factor - 1)).toBeLessThanOrEqual(tolerance);
  });

  // Products of factors that NIST SP 811 (2008) and ISO 80000-4 give as exact, worked out by hand.
  it.each<[UnitId, number, string]>([
    ['mmHg', 133.322387415, '13595.1 kg/m³ × 9.80665 m/s² × 1 mm'],
    ['inHg', 3386.388640341, '25.4 × 133.322387415 Pa'],
    ['inH₂O', 249.08891, '1000 kg/m³ × 9.80665 m/s² × 25.4 mm'],
    ['psi', (0.45359237 * 9.80665) / 0.0254 ** 2, 'lb × standard gravity / in²'],
    ['Torr', 101325 / 760, 'atm / 760'],
    ['oz', 0.45359237 / 16, 'lb / 16'],
    ['lb/ft³', 0.45359237 / 0.3048 ** 3, 'lb / ft³'],
    ['lb/gal', 0.45359237 / (231 * 0.0254 ** 3), 'lb / 231 in³'],
  ])('toSI(1, %s) is exactly %d: %s', (unit, factor) => {
    expect(Math.abs(toSI(1, unit) / factor - 1)).toBeLessThanOrEqual(exact);
  });

  it('toSI keeps whole relations whole', () => {
    expect(toSI(760, 'Torr')).toBe(101325);
    expect(toSI(760000, 'mTorr')).toBe(101325);
    expect(toSI(25, 'mm')).toBe(0.025);
    expect(toSI(12, 'in')).toBe(toSI(1, 'ft'));
  });

  // SI brochure 2.3.1 and NIST SP 811 B.8: t/°C = T/K − 273.15, T/K = (t/°F + 459.67)/1.8.
  it.each([
    [0, '°C', 273.15],
    [-273.15, '°C', 0],
    [32, '°F', 273.15],
    [212, '°F', 373.15],
    [-459.67, '°F', 0],
    [250, '°F', 394.261111111],
  ] as const)('toSI(%d, %s) is %d K', (t, unit, T) => {
    expect(toSI(t, unit)).toBeCloseTo(T, 9);
  });

  // Each rate is its two units, both checked above.
  it('rates are their step a time', () => {
    for (const q of ['temperatureRate', 'pressureRate', 'speed'] as const)
      for (const id of quantities[q].units) {
        const [over, per] = id.split('/') as [UnitId, UnitId | undefined];
        if (per && over in unitTable)
          expect(Math.abs(stepSI(id) / (stepSI(over) / stepSI(per)) - 1)).toBeLessThan(1e-15);
      }
  });

  it('every unit has a checked factor or is a rate', () => {
    const checked = new Set(factors.map(([id]) => id));
    const rates = new Set([...quantities.temperatureRate.units, ...quantities.pressureRate.units]);
    const open = (Object.keys(unitTable) as UnitId[]).filter(
      (id) => !checked.has(id) && !rates.has(id),
    );
    expect(open).toEqual(['°C', '°F']);
  });

  it('fromSI undoes toSI', () => {
    for (const id of Object.keys(unitTable) as UnitId[])
      for (const value of [-40, 0, 0.037, 1, 118.6, 25000])
        expect(Math.abs(fromSI(toSI(value, id), id) - value)).toBeLessThanOrEqual(
          1e-12 * Math.max(1, Math.abs(value)),
        );
  });
});

describe('quantities', () => {
  it('the SI unit of each has factor 1 and is among its units', () => {
    for (const { si: id, units } of Object.values(quantities)) {
      expect(units).toContain(id);
      expect(toSI(1, id)).toBe(1);
    }
  });

  it('every id and spelling means its own unit, and no two units of a quantity share one', () => {
    for (const [quantity, row] of Object.entries(quantities))
      for (const id of row.units) {
        if (id === '1') continue;
        const own = [id, ...unitTable[id].spellings, ...(row.spellings?.[id] ?? [])];
        for (const spelling of own)
          expect(
            parseReading(`5 ${spelling}`, quantity as keyof typeof quantities).unit,
            `${spelling} as ${quantity}`,
          ).toBe(id);
      }
  });
});
