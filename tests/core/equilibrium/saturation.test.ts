import { describe, expect, it } from 'vitest';
import { medium } from '../../../core/equilibrium/medium.ts';
import {
  criticalCap,
  saturationAt,
  saturationAtPressure,
  saturationByBracket,
} from '../../../core/equilibrium/saturation.ts';
import { OutOfRange } from '../../../core/errors.ts';
import { media } from '../../laws/substances.ts';

describe.each(media)('$substance.id', (m) => {
  const { triple, critical } = m;
  const top = critical.T - 0.01;

  it('saturationByBracket agrees with Newton from the triple point to 0.01 K below critical', () => {
    for (let i = 0; i <= 60; i++) {
      // Squared, so that half of the places lie in the upper quarter.
      const T = top - (top - triple.T) * (1 - i / 60) ** 2;
      m.lastSaturation = null;
      const slow = saturationByBracket(m, T);
      m.lastSaturation = null;
      const quick = saturationAt(m, T);
      expect(quick).not.toBe(slow);
      expect(Math.abs(slow.p / quick.p - 1)).toBeLessThan(1e-9);
      const near = 1e-9 + 1e-12 / (1 - T / critical.T);
      expect(Math.abs(slow.rhoL / quick.rhoL - 1)).toBeLessThan(near);
      expect(Math.abs(slow.rhoV / quick.rhoV - 1)).toBeLessThan(near);
    }
  });

  it('saturationAt falls back on the bracket from a start that leads Newton astray', () => {
    const T = 0.5 * (triple.T + critical.T);
    const right = saturationAt(m, T);
    for (const start of [
      { ...right, rhoL: 1e6, rhoV: 1e-30 },
      { ...right, rhoL: NaN, rhoV: NaN },
      { ...right, rhoL: right.rhoV, rhoV: right.rhoL },
      { ...right, rhoL: critical.rho * 1.0000001, rhoV: critical.rho * 0.9999999 },
      { ...right, rhoL: right.rhoL * 1.4, rhoV: right.rhoV / 1e6 },
    ]) {
      m.lastSaturation = null;
      const found = saturationAt(m, T, start);
      expect(Math.abs(found.p / right.p - 1)).toBeLessThan(1e-9);
      expect(Math.abs(found.rhoL / right.rhoL - 1)).toBeLessThan(1e-9);
      expect(Math.abs(found.rhoV / right.rhoV - 1)).toBeLessThan(1e-9);
    }
  });

  it('saturationAt closes on the critical point', () => {
    expect(saturationAt(m, critical.T)).toEqual({
      T: critical.T,
      p: critical.p,
      rhoL: critical.rho,
      rhoV: critical.rho,
    });
    let last = Infinity;
    for (const gap of [10, 1, 0.1, 0.01, 0.001, 2e-4]) {
      const s = saturationAt(m, critical.T - gap);
      const width = (s.rhoL - s.rhoV) / critical.rho;
      expect(width).toBeGreaterThan(0);
      expect(width).toBeLessThan(last);
      // The dome narrows with a power between 0.3 and 0.5 of the distance.
      expect(width).toBeLessThan(5 * (gap / critical.T) ** 0.3);
      expect(width).toBeGreaterThan((gap / critical.T) ** 0.5);
      last = width;
    }
  });

  it('saturationAt has no jump of pressure where the critical cap begins', () => {
    const capT = critical.T - criticalCap;
    const [below, above] = [saturationAt(m, capT - 1e-9), saturationAt(m, capT + 1e-9)];
    // The slope itself makes 5e-11 over these two nanokelvins.
    expect(Math.abs(above.p / below.p - 1)).toBeLessThan(1e-10);
    const inside = saturationAt(m, critical.T - 0.5 * criticalCap);
    expect(inside.p).toBeLessThan(critical.p);
    expect(inside.p).toBeGreaterThan(below.p);
  });

  it('saturationAtPressure and saturationAt are one line within the critical cap', () => {
    const T = critical.T - 0.3 * criticalCap;
    expect(Math.abs(saturationAtPressure(m, saturationAt(m, T).p).T - T)).toBeLessThan(1e-9);
  });

  it('saturationAtPressure closes on both ends', () => {
    expect(saturationAtPressure(m, triple.p)).toEqual(triple);
    expect(saturationAtPressure(m, critical.p).T).toBeCloseTo(critical.T, 9);
  });

  it.each([
    ['saturationAt', () => saturationAt(m, critical.T * (1 + 1e-12))],
    ['saturationAt', () => saturationAt(m, 0.5 * triple.T)],
    ['saturationAt', () => saturationAt(m, NaN)],
    ['saturationAtPressure', () => saturationAtPressure(m, critical.p * (1 + 1e-12))],
    ['saturationAtPressure', () => saturationAtPressure(m, triple.p * (1 - 1e-9))],
    ['saturationAtPressure', () => saturationAtPressure(m, NaN)],
  ])('%s outside its range throws OutOfRange', (_, call) => {
    expect(call).toThrow(OutOfRange);
  });
});

describe('medium', () => {
  it('is one object for one substance', () => {
    for (const m of media) expect(medium(m.substance)).toBe(m);
  });
});
