import { describe, expect, it } from 'vitest';
import { carbonEnv, done, K, Pa, run, waterEnv } from './runs.ts';

describe('run of water agrees with published tables', () => {
  // IAPWS R6-95(2018), table 8: p in Pa, h in J/kg; half a unit of the last digit.
  const table8 = [
    { T: 275, p: 698.451167, hL: 7759.72202, hV: 2504289.95 },
    { T: 450, p: 932203.564, hL: 749161.585, hV: 2774410.78 },
    { T: 625, p: 16908269.3, hL: 1686269.76, hV: 2550716.25 },
  ];
  it.each(table8)('boils at $T K with the heat of IAPWS R6-95, table 8', ({ T, p, hL, hV }) => {
    const of = run(
      waterEnv,
      { T: K(T), vapourFraction: '0' },
      { kind: 'hold', end: { vapourFraction: '1' } },
    );
    expect(Math.abs(of.start!.state.p / p - 1)).toBeLessThan(1e-8);
    expect(Math.abs(done(of, 0).heat! - (hV - hL))).toBeLessThan(0.011);
  });

  // W. Wagner, A. Pruß, J. Phys. Chem. Ref. Data 31, 387 (2002), table 13.1: h in J/kg.
  it.each([
    { T: 300, hL: 112565, hV: 2549850, digits: 5.5 },
    { T: 400, hL: 532953, hV: 2715700, digits: 5.5 },
    { T: 500, hL: 975431, hV: 2802480, digits: 5.5 },
    { T: 600, hL: 1505360, hV: 2677810, digits: 10 },
  ])('condenses at $T K with the heat of Wagner and Pruß, table 13.1', ({ T, hL, hV, digits }) => {
    const of = run(
      waterEnv,
      { T: K(T), vapourFraction: '1' },
      { kind: 'hold', end: { vapourFraction: '0' } },
    );
    expect(Math.abs(done(of, 0).heat! - (hL - hV))).toBeLessThan(digits);
  });

  // IAPWS R7-97(2012), table 36: saturation temperature in K. The industrial formulation follows
  // the scientific one to a few mK.
  it.each([
    { p: 1e5, T: 372.755919 },
    { p: 1e6, T: 453.035632 },
    { p: 1e7, T: 584.149488 },
  ])('reaches boiling at $p Pa at the temperature of IAPWS R7-97, table 36', ({ p, T }) => {
    const of = run(
      waterEnv,
      { T: '300 K', p: Pa(p) },
      { kind: 'constantPressure', end: { boundary: 'saturation' } },
    );
    const { end, encounters } = done(of, 0);
    expect(Math.abs(end.state.T - T)).toBeLessThan(0.02);
    expect(end.state.parts.map(({ phase, fraction }) => [phase, fraction])).toEqual([
      ['liquid', 1],
    ]);
    expect(encounters.map(({ code, from }) => [code, from.phase])).toEqual([['reaches', 'liquid']]);
  });

  it('heats from 300 to 500 K at 3 MPa with the enthalpy difference of IAPWS R7-97, table 5', () => {
    // h = 115.331273 and 975.542239 kJ/kg (recalled); the two formulations differ by less than 0.1 kJ/kg.
    const of = run(
      waterEnv,
      { T: '300 K', p: '3 MPa(a)' },
      { kind: 'constantPressure', end: { T: '500 K' } },
    );
    expect(Math.abs(done(of, 0).heat! - (975542.239 - 115331.273))).toBeLessThan(100);
  });

  it('melts at 101 325 Pa with 333 430 J/kg (Feistel and Wagner 2006, recalled)', () => {
    const of = run(
      waterEnv,
      { p: '101325 Pa(a)', solidFraction: '1' },
      { kind: 'hold', end: { solidFraction: '0' } },
    );
    expect(Math.abs(of.start!.state.T - 273.152519)).toBeLessThan(1e-5);
    expect(Math.abs(done(of, 0).heat! - 333430)).toBeLessThan(20);
  });
});

describe('run of carbon dioxide agrees with published tables', () => {
  // R. Span, W. Wagner, J. Phys. Chem. Ref. Data 25, 1509 (1996), table 34: J/kg, two last digits rounded.
  it.each([
    { T: 216.592, hL: -426740, hV: -76364 },
    { T: 240, hL: -379940, hV: -70293 },
    { T: 260, hL: -337340, hV: -70862 },
    { T: 280, hL: -289480, hV: -80840 },
    { T: 300, hL: -223400, hV: -119700 },
  ])('boils at $T K with the heat of Span and Wagner, table 34', ({ T, hL, hV }) => {
    const of = run(
      carbonEnv,
      { T: K(T), vapourFraction: '0' },
      { kind: 'hold', end: { vapourFraction: '1' } },
    );
    expect(Math.abs(done(of, 0).heat! - (hV - hL))).toBeLessThan(11);
  });

  const molarMass = 0.0440098; // kg/mol, Span and Wagner 1996

  it('sublimes at 194.6855 K with 25.23 kJ/mol (Giauque and Egan 1937, recalled)', () => {
    const of = run(
      carbonEnv,
      { T: '194.6855 K', solidFraction: '1' },
      { kind: 'hold', end: { vapourFraction: '1' } },
    );
    expect(of.start!.on).toBe('sublimation');
    expect(Math.abs(done(of, 0).heat! * molarMass - 25230)).toBeLessThan(100);
    expect(done(of, 0).encounters.map(({ code }) => code)).toEqual(['sublimes']);
  });

  it('melts at the triple point with 8875.0 J/mol (Jäger and Span 2012)', () => {
    const of = run(
      carbonEnv,
      { p: Pa(carbonEnv.m.triple.p + 1), solidFraction: '1' },
      { kind: 'hold', end: { solidFraction: '0' } },
    );
    expect(of.start!.on).toBe('melting');
    expect(Math.abs(done(of, 0).heat! * molarMass - 8875)).toBeLessThan(1);
  });
});
