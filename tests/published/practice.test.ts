import { describe, expect, it } from 'vitest';
import { medium } from '../../core/equilibrium/medium.ts';
import { stablePhase } from '../../core/equilibrium/phase.ts';
import { saturationAt, saturationAtPressure } from '../../core/equilibrium/saturation.ts';
import {
  meltingPoint,
  meltingPointAtPressure,
  sublimationPoint,
  sublimationPointAtPressure,
} from '../../core/equilibrium/solidLines.ts';
import { pressure, pressureSlope } from '../../core/models/fluidProperties.ts';
import { catalogue } from '../../core/substances/catalogue.ts';
import { carbonDioxide } from '../../core/substances/carbon-dioxide.ts';
import { water } from '../../core/substances/water.ts';

const celsius = (t: number): number => t + 273.15;

describe('what every plant knows (common practice, no source)', () => {
  const steam = medium(water);
  const gas = medium(carbonDioxide);

  it('water boils at about 100 °C at 101 kPa', () => {
    expect(Math.abs(saturationAtPressure(steam, 101e3).T - celsius(100))).toBeLessThan(0.2);
  });
  it('water freezes at about 0 °C at 101 kPa', () => {
    const { T } = meltingPointAtPressure(steam, water.melting[0]!, 101e3);
    expect(Math.abs(T - celsius(0))).toBeLessThan(0.01);
  });
  it('saturated steam of about 200 kPa has about 120 °C', () => {
    expect(Math.abs(saturationAt(steam, celsius(120)).p - 200e3)).toBeLessThan(2e3);
    expect(Math.abs(saturationAtPressure(steam, 200e3).T - celsius(120))).toBeLessThan(0.5);
  });
  it('a litre of water weighs about a kilogram; ice floats', () => {
    expect(stablePhase(steam, celsius(20), 101e3)).toMatchObject({ phase: 'liquid' });
    expect(Math.abs(stablePhase(steam, celsius(20), 101e3).rho! - 998)).toBeLessThan(1);
    expect(Math.abs(stablePhase(steam, celsius(-5), 101e3).rho! - 917)).toBeLessThan(2);
  });
  it('steam at 150 °C and 101 kPa is vapour, water at 150 °C and 10 bar liquid', () => {
    expect(stablePhase(steam, celsius(150), 101e3).phase).toBe('vapour');
    expect(stablePhase(steam, celsius(150), 10e5).phase).toBe('liquid');
  });
  it('carbon dioxide is a gas at 1 bar and 25 °C, liquid at 70 bar and 20 °C, dry ice at −90 °C', () => {
    expect(stablePhase(gas, celsius(25), 1e5).phase).toBe('vapour');
    expect(stablePhase(gas, celsius(20), 70e5).phase).toBe('liquid');
    expect(stablePhase(gas, celsius(-90), 1e5)).toMatchObject({ phase: 'solid', solid: 'dry ice' });
    expect(stablePhase(gas, celsius(40), 100e5).phase).toBe('supercritical');
  });
  it('dry ice sublimes at about −78.5 °C at atmospheric pressure', () => {
    const { T } = sublimationPointAtPressure(gas, carbonDioxide.sublimation[0]!, 101325);
    expect(Math.abs(T - celsius(-78.5))).toBeLessThan(0.1);
  });
  it('a cylinder of carbon dioxide at 20 °C stands at about 57 bar', () => {
    expect(Math.abs(saturationAt(gas, celsius(20)).p - 57e5)).toBeLessThan(0.5e5);
  });
});

describe('fixed points of every substance', async () => {
  const all = await Promise.all(catalogue.map(async ({ load }) => medium(await load())));
  it.each(all.map((m) => [m.substance.id, m] as const))(
    '%s: triple, normal and critical point are the published ones',
    (id, m) => {
      const { substance, triple, critical } = m;
      // The butanes' papers print the pressure of their auxiliary equations, 4.5 % and 1.9 % off.
      const within = { isobutane: 0.046, 'n-butane': 0.02 }[id] ?? 3e-3;
      expect(Math.abs(triple.p / substance.triplePoints[0].p - 1)).toBeLessThan(within);
      expect(triple.T).toBe(substance.triplePoints[0].T);

      const { normalPoint } = substance;
      const T =
        normalPoint.kind === 'boiling'
          ? saturationAtPressure(m, 101325).T
          : sublimationPointAtPressure(m, substance.sublimation[0]!, 101325).T;
      // Millikelvins but for dry ice, whose solid is solved from another paper's equation.
      expect(Math.abs(T - normalPoint.T)).toBeLessThan(
        normalPoint.kind === 'boiling' ? 2e-3 : 0.03,
      );

      // Where the equation's own critical point is not the published one, by how much.
      const apart = { oxygen: [2e-4, 0.022], 'ammonia-1993': [3e-4, 3e-3] }[id] ?? [1e-5, 2e-4];
      expect(Math.abs(critical.T / substance.critical.T - 1)).toBeLessThan(apart[0]!);
      expect(Math.abs(critical.rho / substance.critical.rho - 1)).toBeLessThan(apart[1]!);
      m.fluid.evaluate(critical.T, critical.rho);
      expect(Math.abs(pressureSlope(m.fluid)) / (m.fluid.R * critical.T)).toBeLessThan(1e-5);
      expect(Math.abs(pressure(m.fluid) / critical.p - 1)).toBeLessThan(1e-7);
    },
  );

  it.each(all.map((m) => [m.substance.id, m] as const))(
    '%s: lines about the triple point meet in it without a gap',
    (_, m) => {
      const { melting, sublimation } = m.substance;
      if (melting.length === 0) return expect(m.substance.absent).not.toEqual([]);
      const meets = (p: number): void => expect(Math.abs(p / m.triple.p - 1)).toBeLessThan(1e-9);
      meets(meltingPoint(m, melting[0]!, m.triple.T).p);
      meets(sublimationPoint(m, sublimation.at(-1)!, m.triple.T).p);
      sublimation.slice(1).forEach((line, i) => {
        const [a, b] = [sublimation[i]!, line];
        const T = b.range.Tmin;
        expect(a.range.Tmax).toBe(T);
        expect(sublimationPoint(m, a, T).p / sublimationPoint(m, b, T).p).toBeCloseTo(1, 8);
      });
    },
  );
});

describe('fixed points', () => {
  it.each([
    // Guildner, Johnson, Jones 1976; the fluid equation itself has 611.654771 Pa (recalled).
    { substance: water, T: 273.16, p: 611.657, within: 4e-6 },
    // Span, Wagner 1996, five digits.
    { substance: carbonDioxide, T: 216.592, p: 517950, within: 3e-5 },
  ])('$substance.id: the triple point is $T K, $p Pa', ({ substance, T, p, within }) => {
    const { triple } = medium(substance);
    expect(triple.T).toBe(T);
    expect(Math.abs(triple.p / p - 1)).toBeLessThan(within);
  });

  it.each([
    // IAPWS R2-83(1992), five digits in p.
    { substance: water, T: 647.096, p: 22.064e6, rho: 322 },
    // Span, Wagner 1996, five digits in p.
    { substance: carbonDioxide, T: 304.1282, p: 7.3773e6, rho: 467.6 },
  ])('$substance.id: the critical point is $T K, $p Pa, $rho kg/m³', ({ substance, T, p, rho }) => {
    const m = medium(substance);
    expect(m.critical).toMatchObject({ T, rho });
    m.fluid.evaluate(T, rho);
    expect(Math.abs(pressure(m.fluid) / p - 1)).toBeLessThan(1e-6);
    // ∂p/∂ρ vanishes there: against the ideal gas's RT.
    expect(Math.abs(pressureSlope(m.fluid)) / (m.fluid.R * T)).toBeLessThan(1e-5);
    expect(Math.abs(m.critical.p / pressure(m.fluid) - 1)).toBeLessThan(1e-7);
  });

  it('the normal boiling point of water is 373.1243 K (IAPWS SR1-86(1992), at 101.325 kPa)', () => {
    // The fluid equation differs from the auxiliary equation by a millikelvin.
    const { T } = saturationAtPressure(medium(water), 101325);
    expect(Math.abs(T - water.normalPoint.T)).toBeLessThan(2e-3);
  });

  it('the normal sublimation point of carbon dioxide is near 194.6855 K (Span, Wagner 1996)', () => {
    // Equal Gibbs energies have 194.658 K.
    const m = medium(carbonDioxide);
    const { T } = sublimationPointAtPressure(m, carbonDioxide.sublimation[0]!, 101325);
    expect(Math.abs(T - carbonDioxide.normalPoint.T)).toBeLessThan(0.03);
  });
});
