import { describe, expect, it } from 'vitest';
import type { StateRecord } from '../../../app/cli/state.ts';
import { given, ran } from './ran.ts';

const keys = ['T', 'p', 'phase', 'rho', 'h', 's', 'u', 'cp', 'cv', 'w'];

/*
 * Published values, half a unit of the last printed digit:
 * [1] IAPWS R6-95(2018), table 7 (given there at T and ρ; the pressure printed is the given here).
 * [2] W. Wagner, A. Pruß, J. Phys. Chem. Ref. Data 31, 387 (2002), table 13.2.
 * [3] R. Span, W. Wagner, J. Phys. Chem. Ref. Data 25, 1509 (1996), table 35.
 * [4] IAPWS R10-06(2009), table 6.
 */
const published = [
  [
    '[2]',
    'water',
    '370 K',
    '0.1 MPa',
    { rho: [960.591, 5e-4], h: [405891, 0.5], u: [405787, 0.5] },
  ],
  [
    '[2]',
    'water',
    '370 K',
    '0.1 MPa',
    { s: [1271.5, 0.05], cp: [4212.1, 0.05], w: [1545.8, 0.05] },
  ],
  ['[2]', 'water', '430 K', '0.5 MPa', { rho: [2.6297, 5e-5], h: [2760040, 5], w: [497.85, 5e-3] }],
  ['[2]', 'water', '900 K', '30 MPa', { rho: [82.84, 5e-4], h: [3530020, 5], cp: [3040.8, 0.05] }],
  // Printed with nine digits of p: ρ = 0.435, 500 K.
  ['[1]', 'water', '500 K', '99967.9423 Pa', { rho: [0.435, 1e-9], s: [7944.88271, 1e-5] }],
  ['[1]', 'water', '500 K', '99967.9423 Pa', { cv: [1508.17541, 1e-5], w: [548.314253, 1e-6] }],
  ['[3]', 'carbon-dioxide', '290 K', '5 MPa', { rho: [148.41, 5e-3], h: [-81892, 0.5] }],
  ['[3]', 'carbon-dioxide', '290 K', '5 MPa', { s: [-959.59, 5e-3], cp: [2578.3, 0.05] }],
  ['[3]', 'carbon-dioxide', '480 K', '10 MPa', { rho: [119.65, 5e-3], cv: [846.72, 5e-3] }],
  ['[4]', 'water', '100 K', '100 MPa', { rho: [941.678203297, 1e-9], h: [-483491.635676, 1e-5] }],
  ['[4]', 'water', '100 K', '100 MPa', { s: [-2611.95122589, 1e-7], cp: [866.333195517, 1e-8] }],
] as const;

describe('state', () => {
  it.each(published)('%s %s at %s and %s agrees', async (_, substance, T, p, values) => {
    const record = await given<StateRecord>('state', substance, '--T', T, '--p', p);
    for (const [name, [value, tolerance]] of Object.entries(values) as [
      string,
      readonly [number, number],
    ][])
      expect(Math.abs(record[name as 'rho']! - value), name).toBeLessThanOrEqual(tolerance);
  });

  it('--json gives the keys in their order, null where the sources define nothing', async () => {
    const fluid = await given<StateRecord>('state', 'water', '--T', '20 °C', '--p', '1 bar(a)');
    expect(Object.keys(fluid)).toEqual(keys);
    expect(fluid.phase).toBe('liquid');
    const ice = await given<StateRecord>('state', 'water', '--T', '-20 °C', '--p', '1 bar(a)');
    expect(Object.keys(ice)).toEqual([...keys, 'solid']);
    expect(ice).toMatchObject({ phase: 'solid', solid: 'ice Ih', w: null });
  });

  it.each([
    ['water', '120 °C', '1 bar(a)', { phase: 'vapour' }],
    ['water', '400 °C', '30 MPa(a)', { phase: 'supercritical' }],
    ['carbon-dioxide', '-100 °C', '1 bar(a)', { phase: 'solid', solid: 'dry ice' }],
    // Ice VI melts at 632.4 MPa and 273.31 K: IAPWS R14-08(2011).
    ['water', '270 K', '650 MPa', { phase: 'solid', solid: null, rho: null, h: null, u: null }],
  ])('%s at %s and %s has its phase', async (substance, T, p, expected) => {
    expect(await given('state', substance, '--T', T, '--p', p)).toMatchObject(expected);
  });

  it.each(['water', 'Steam', 'H2O', 'h₂o', '7732-18-5', 'R-718', 'r718'])(
    'the substance answers to %s',
    async (word) => {
      const { rho } = await given<StateRecord>('state', word, '--T', '370 K', '--p', '0.1 MPa');
      expect(rho).toBeCloseTo(960.591, 3);
    },
  );

  it.each([
    [['--T', '-20 °C']],
    [['--T=-20C']],
    [['--T', '−20 °C']],
    [['--T', '-4 °F']],
    [['--T', '253.15 K']],
  ])('%j is −20 °C', async (T) => {
    const record = await given<StateRecord>('state', 'water', ...T, '--p', '1 bar(a)');
    expect(record.T).toBeCloseTo(253.15, 10);
  });

  it('a gauge reading counts from the site, else from 101.325 kPa, and says so', async () => {
    const at = ['state', 'water', '--T', '20 °C', '--p'];
    expect(await given(...at, '1 bar(g)')).toMatchObject({ p: 201325, atmosphere: 101325 });
    expect(await given(...at, '1 bar(g)', '--barometer', '84.8 kPa')).toMatchObject({
      p: 184800,
      atmosphere: 84800,
    });
    // ISO 2533:1975 at 1000 m: 89874.6 Pa, recalled.
    const { atmosphere, p } = await given<StateRecord>(...at, '1 bar(g)', '--altitude', '1000 m');
    expect(Math.abs(atmosphere! - 89874.6)).toBeLessThan(0.1);
    expect(p).toBeCloseTo(atmosphere! + 1e5, 6);
    expect(await given(...at, '50 kPa vacuum')).toMatchObject({ p: 51325, atmosphere: 101325 });
    expect((await ran(...at, '1 bar(g)')).out).toContain('101.325 kPa');
    expect((await ran(...at, '1 bar(g)', '--json')).err).toMatch(/^[^\n]*101\.325 kPa[^\n]*\n$/);
    expect((await ran(...at, '1 bar(g)', '--altitude', '1000 m', '--json')).err).toBe('');
  });

  it('a pressure without a kind is absolute and the output says so', async () => {
    const at = ['state', 'water', '--T', '20 °C', '--p'];
    const plain = await ran(...at, '1 bar');
    expect(plain.out).toContain('A pressure without a kind is absolute.');
    expect(plain.err).toBe('');
    const inJson = await ran(...at, '1 bar', '--json');
    expect((JSON.parse(inJson.out) as StateRecord).p).toBe(1e5);
    expect(Object.keys(JSON.parse(inJson.out) as object)).toEqual(keys);
    expect(inJson.err).toBe('A pressure without a kind is absolute.\n');
    expect((await ran(...at, '1 bar(a)')).out).not.toContain('without a kind');
  });

  it('text aligns numbers on their point and carries cautions that the state calls for', async () => {
    const { out } = await ran('state', 'water', '--T', '121.1 °C', '--p', '2.5 bar(g)');
    const numbers = out.split('\n').filter((line) => /^\S.* {2}−?[\d\u2009]+\.\d/.test(line));
    expect(numbers.length).toBeGreaterThan(6);
    expect(new Set(numbers.map((line) => [...line].indexOf('.'))).size).toBe(1);
    expect(out).toContain('makers’ ratings and local code decide');
    expect(out).toContain('steam scald');
    expect(out).not.toContain('Lines are equilibrium');
    const cool = await ran('state', 'water', '--T', '20 °C', '--p', '1 bar(a)');
    expect(cool.out).not.toContain('ratings');
  });

  it.each([
    ['an ambiguous word', ['o', '--T', '300 K', '--p', '1 bar'], /water.*carbon-dioxide/],
    ['half a formula', ['CO', '--T', '300 K', '--p', '1 bar'], /carbon-dioxide \(CO2\)/],
    ['an unknown word', ['mercury', '--T', '300 K', '--p', '1 bar'], /there is water, carbon/],
    ['no substance', ['--T', '300 K', '--p', '1 bar'], /no substance is given/],
    ['a blend', ['R-404A', '--T', '300 K', '--p', '1 bar'], /R-404A.*boils over a range/],
    ['air', ['air', '--T', '300 K', '--p', '1 bar'], /“air” is a blend/],
    ['no pressure', ['water', '--T', '300 K'], /--T and --p/],
    ['no value', ['water', '--T', '--p', '1 bar'], /--T has no value/],
    ['an unknown option', ['water', '--x', '3'], /“--x” is no option here: --T, --p/],
    ['an option twice', ['water', '--T', '1 K', '--T', '2 K'], /--T is given twice/],
    ['a reading without quotes', ['water', '--T', '-20', '°C', '--p', '1 bar'], /“°C”.*quotes/],
    ['a number without unit', ['water', '--T', '20', '--p', '1 bar'], /--T: “20” has no unit/],
    ['another quantity', ['water', '--T', '20 kg', '--p', '1 bar'], /measures mass/],
    ['below 0 K', ['water', '--T', '-300 °C', '--p', '1 bar'], /below absolute zero/],
    ['below no pressure', ['water', '--T', '20 °C', '--p', '-2 bar(g)'], /no such pressure/],
    ['zero pressure', ['water', '--T', '20 °C', '--p', '0 bar'], /above zero/],
    ['two sites', ['water', '--altitude', '1 m', '--barometer', '1 bar'], /not both/],
    ['a barometer in gauge', ['water', '--barometer', '1 bar(g)'], /barometer.*absolute/],
    ['the stratosphere', ['water', '--altitude', '20 km'], /11000 m.*ISO 2533/],
    ['too hot', ['water', '--T', '2000 °C', '--p', '1 bar'], /2\u2009000 °C.*999\.85 °C.*IAPWS/],
    [
      'too much pressure',
      ['water', '--T', '300 K', '--p', '20 kbar'],
      /20 kbar\(a\).*10 kbar\(a\)/,
    ],
    ['a missing file', ['water', '--from', '/nowhere/points.csv'], /no file/],
    ['a line break', ['water\n\u001b[31m', '--T', '1 K', '--p', '1 Pa'], /^[ -~“”]+$/m],
    // IAPWS R6-95(2018), table 8: 0.932203564 MPa at 450 K.
    [
      'the boiling line',
      ['water', '--T', '450 K', '--p', '932203.5642 Pa'],
      /boiling line of water.*vapour fraction/,
    ],
  ])('%s is refused with one line and status 2', async (_, args, message) => {
    const { status, out, err } = await ran('state', ...args);
    expect({ status, out }).toEqual({ status: 2, out: '' });
    expect(err).toMatch(/^simmerline: [^\n]+\n$/);
    expect(err).toMatch(message);
  });
});
