import { describe, expect, it } from 'vitest';
import { densityAt } from '../../../core/equilibrium/density.ts';
import { medium } from '../../../core/equilibrium/medium.ts';
import { saturationAt } from '../../../core/equilibrium/saturation.ts';
import { onBoundary, stablePhase, type PhaseState } from '../../../core/equilibrium/phase.ts';
import { pressure } from '../../../core/models/fluidProperties.ts';
import { NotConverged, Undetermined } from '../../../core/errors.ts';
import { water } from '../../../core/substances/water.ts';
import { random } from '../../random.ts';
import { media } from '../../laws/substances.ts';

describe.each(media)('densityAt, $substance.id', (m) => {
  const { critical } = m;

  it('at the saturation pressure gives the saturated densities on both branches', () => {
    for (let i = 0; i <= 40; i++) {
      const T = m.triple.T + ((critical.T - 0.5 - m.triple.T) * i) / 40;
      const { p, rhoL, rhoV } = saturationAt(m, T);
      // A pressure of given digits fixes a liquid's density only so far near the critical point.
      const near = 1e-9 + 1e-10 / (1 - T / critical.T);
      expect(Math.abs(densityAt(m, T, p, 'liquid') / rhoL - 1)).toBeLessThan(near);
      expect(Math.abs(densityAt(m, T, p, 'vapour') / rhoV - 1)).toBeLessThan(near);
    }
  });

  it('does not depend on the start, however bad', () => {
    const r = random(5);
    for (let i = 0; i < 300; i++) {
      const T = m.triple.T * (1.001 + r());
      const p = m.triple.p * (1.01 + 10 ** (5 * r() - 2));
      if (p > m.substance.fluid.validity.pmax) continue;
      const { phase, rho, solid } = stablePhase(m, T, p);
      if (phase === 'solid' || solid) continue;
      const branch = phase === 'vapour' ? 'vapour' : 'liquid';
      for (const start of [1e-9, 1, critical.rho, 3 * critical.rho, 1e5, NaN, -1])
        expect(Math.abs(densityAt(m, T, p, branch, start) / rho! - 1)).toBeLessThan(2e-8);
    }
  });

  // Within 1e-4 K of the critical temperature, a hair off the critical pressure, the isotherm is flat
  // to the last digits, and which side of the critical density answers is up to rounding.
  it('answers next to the critical point', () => {
    for (const gap of [9e-5, 3e-5, 1e-6, 1e-8, 0])
      for (const share of [1e-3, 1e-6, 1e-8, 1e-10, 0, -1e-10, -1e-8, -1e-6, -1e-3]) {
        const T = critical.T - gap;
        const p = critical.p * (1 - share);
        const off = T < critical.T ? Math.abs(p / saturationAt(m, T).p - 1) : Infinity;
        let found: PhaseState;
        try {
          found = stablePhase(m, T, p);
        } catch (error) {
          // Refused only on the line: 1e-9 in T is up to 8e-9 in p here.
          expect(error).toBeInstanceOf(Undetermined);
          expect(off).toBeLessThan(10 * onBoundary);
          continue;
        }
        // Above the critical pressure there is no line to be on.
        if (p < critical.p) expect(off).toBeGreaterThanOrEqual(onBoundary);
        m.fluid.evaluate(T, found.rho!);
        expect(Math.abs(pressure(m.fluid) - p)).toBeLessThan(1e-9 * p);
      }
  });
});

describe('densityAt, water', () => {
  const m = medium(water);

  it('keeps to the supercooled liquid down to 235 K and never finds the root inside the dome', () => {
    // The isotherm crosses 0.1 MPa near 322 kg/m³ too. IAPWS R6-95 at 235.15 K: 967.99 kg/m³,
    // computed from the equation.
    expect(Math.abs(densityAt(m, 235.15, 101325, 'liquid') - 967.99)).toBeLessThan(0.01);
    for (let T = 235; T < 640; T += 5) expect(densityAt(m, T, 22e6, 'liquid')).toBeGreaterThan(322);
  });

  it('throws NotConverged where the liquid branch has ended', () => {
    expect(() => densityAt(m, 225, 101325, 'liquid')).toThrow(NotConverged);
  });
});
