import { describe, expect, it } from 'vitest';
import { medium } from '../../../core/equilibrium/medium.ts';
import { meltingLineAt, stablePhase } from '../../../core/equilibrium/phase.ts';
import {
  meltingPoint,
  meltingPointAtPressure,
  meltingPressureRange,
  sublimationPoint,
  sublimationPointAtPressure,
} from '../../../core/equilibrium/solidLines.ts';
import { OutOfRange } from '../../../core/errors.ts';
import { carbonDioxide } from '../../../core/substances/carbon-dioxide.ts';
import { media } from '../../laws/substances.ts';

describe.each(media.filter((m) => m.solids.size > 0))('$substance.id', (m) => {
  const melting = m.substance.melting[0]!;
  const sublimation = m.substance.sublimation[0]!;
  const { triple } = m;

  it('all three lines meet in the triple point', () => {
    const point = { T: triple.T, p: triple.p };
    expect(meltingPoint(m, melting, triple.T)).toMatchObject(point);
    expect(sublimationPoint(m, sublimation, triple.T)).toMatchObject(point);
    expect(Math.abs(meltingPointAtPressure(m, melting, triple.p).T - triple.T)).toBeLessThan(1e-8);
    expect(
      Math.abs(sublimationPointAtPressure(m, sublimation, triple.p).T - triple.T),
    ).toBeLessThan(1e-8);
  });

  it('the lines run into the triple point without a jump', () => {
    const [low, high] = meltingPressureRange(m, melting);
    for (const gap of [1e-3, 1e-5, 1e-7]) {
      const solid = sublimationPoint(m, sublimation, triple.T - gap);
      // A solid's vapour pressure changes by some 10 % a kelvin.
      expect(Math.abs(solid.p / triple.p - 1)).toBeLessThan(0.2 * gap);
      const inside = triple.T === melting.range.Tmax ? -gap : gap;
      const { p } = meltingPoint(m, melting, triple.T + inside);
      // Melting lines climb by 5 to 14 MPa a kelvin.
      expect(Math.abs(p - triple.p)).toBeLessThan(2e7 * gap + 0.1);
      expect(p).toBeGreaterThanOrEqual(low - 0.1);
      expect(p).toBeLessThan(high);
    }
  });

  it('outside its range each throws OutOfRange, NaN included', () => {
    const { Tmin, Tmax } = melting.range;
    const [low, high] = meltingPressureRange(m, melting);
    for (const T of [Tmin - 1e-9, Tmax + 1e-9, NaN])
      expect(() => meltingPoint(m, melting, T)).toThrow(OutOfRange);
    for (const p of [low * 0.999, high * 1.001, NaN])
      expect(() => meltingPointAtPressure(m, melting, p)).toThrow(OutOfRange);
    for (const T of [sublimation.range.Tmin - 1e-9, triple.T + 1e-9, NaN])
      expect(() => sublimationPoint(m, sublimation, T)).toThrow(OutOfRange);
    for (const p of [triple.p * 1.001, 1e-60, NaN])
      expect(() => sublimationPointAtPressure(m, sublimation, p)).toThrow(OutOfRange);
  });

  it('a melting point does not depend on the neighbour it starts from, however far', () => {
    const { Tmin, Tmax } = melting.range;
    const ends = [Tmin, Tmax].map((T) => meltingPoint(m, melting, T));
    for (let i = 1; i < 20; i++) {
      const T = Tmin + ((Tmax - Tmin) * i) / 20;
      const alone = meltingPoint(m, melting, T);
      for (const end of ends) {
        expect(Math.abs(meltingPoint(m, melting, T, end).p - alone.p)).toBeLessThan(3e-3);
        const back = meltingPointAtPressure(m, melting, alone.p, end);
        expect(Math.abs(back.T - T)).toBeLessThan(1e-8);
      }
    }
  });
});

describe('meltingLineAt', () => {
  it('gives a pressure to the line that has it, beside the seam of two', () => {
    const m = medium(carbonDioxide);
    const [solved, extrapolated] = carbonDioxide.melting;
    const [begin] = meltingPressureRange(m, extrapolated!);
    const p = begin * (1 + 1e-8);
    expect(meltingLineAt(m, p)).toBe(extrapolated);
    expect(meltingLineAt(m, begin * (1 - 1e-4))).toBe(solved);
    const { T } = meltingPointAtPressure(m, extrapolated!, p);
    expect(stablePhase(m, T * (1 + 5e-8), p).phase).toBe('liquid');
    expect(stablePhase(m, T * (1 - 5e-8), p).phase).toBe('solid');
  });
});
