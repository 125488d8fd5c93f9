import { describe, expect, it } from 'vitest';
import { OutOfRange } from '../../../core/errors.ts';
import { auxiliary } from '../../../core/models/auxiliary.ts';
import {
  industrialSaturationPressure,
  industrialSaturationTemperature,
} from '../../../core/models/industrialSaturation.ts';
import { meltingPressure } from '../../../core/models/meltingPressure.ts';
import { saturationCaloric } from '../../../core/models/saturationCaloric.ts';
import { sublimationPressure } from '../../../core/models/sublimationPressure.ts';
import { carbonDioxide } from '../../../core/substances/carbon-dioxide.ts';
import type { MeltingEquation, SublimationEquation } from '../../../core/substances/substance.ts';
import { water } from '../../../core/substances/water.ts';
import { difference } from '../../laws/difference.ts';

const common = {
  source: 'invented',
  range: { Tmin: 100, Tmax: 400 },
  reducing: { T: 200, p: 1000 },
} as const;

describe('meltingPressure', () => {
  // At twice the reducing temperature, by hand.
  it.each<[MeltingEquation, number]>([
    [{ ...common, kind: 'powers', a: [2, -1], b: [1, 2] }, 1000 * (1 + 2 * -1 - -3)],
    [{ ...common, kind: 'logarithm of powers', a: [-1, 0.5], b: [1, -1] }, 1000 * Math.exp(1.25)],
    [{ ...common, kind: 'polynomial', a: [2, 3, 4] }, 1000 * (1 + 2 + 3 + 4)],
    [{ ...common, kind: 'scaled powers', scale: 10, a: [2, 1], b: [1, 3] }, 1000 + 10 * 9],
  ])('of $kind gives what the formula gives', (curve, p) => {
    expect(Math.abs(meltingPressure(curve, 400) / p - 1)).toBeLessThan(1e-14);
    const atStar = curve.reducing.p;
    expect(meltingPressure(curve, 200)).toBe(atStar);
  });

  it('refuses what lies outside its range, ends included, NaN too', () => {
    const curve: MeltingEquation = { ...common, kind: 'polynomial', a: [2] };
    for (const T of [100, 400]) expect(meltingPressure(curve, T)).toBeTypeOf('number');
    for (const T of [99.999, 400.001, NaN, Infinity])
      expect(() => meltingPressure(curve, T)).toThrow(OutOfRange);
  });
});

describe('sublimationPressure', () => {
  // At half the reducing temperature, by hand.
  it.each<[SublimationEquation, number]>([
    [{ ...common, kind: 'powers', a: [1, -1], b: [1, 2] }, 1000 * Math.exp(0.25 * 2)],
    [{ ...common, kind: 'reduced', a: [-3, 1], b: [1, 2] }, 1000 * Math.exp(-1.25 * 2)],
    [
      { ...common, kind: 'inverse powers', a: [1, -200, 1e4], factor: 2 },
      2000 * Math.exp(1 - 2 + 1),
    ],
    [{ ...common, kind: 'Clausius–Clapeyron', L: 1e5, R: 500 }, 1000 * Math.exp(-1)],
  ])('of $kind gives what the formula gives', (curve, p) => {
    expect(Math.abs(sublimationPressure(curve, 100) / p - 1)).toBeLessThan(1e-14);
  });

  it('serves below its range as a guess, and refuses what lies above, 0 K and NaN', () => {
    const curve: SublimationEquation = { ...common, kind: 'reduced', a: [-3], b: [1] };
    expect(sublimationPressure(curve, 50)).toBeGreaterThan(0);
    for (const T of [400.001, 0, -1, NaN])
      expect(() => sublimationPressure(curve, T)).toThrow(OutOfRange);
  });
});

describe('auxiliary', () => {
  it('gives the reducing value at and above the critical temperature', () => {
    for (const { saturation } of [water, carbonDioxide])
      for (const e of [saturation.pressure, saturation.liquidDensity, saturation.vapourDensity])
        for (const T of [e.reducing.T, 2 * e.reducing.T])
          expect(auxiliary(e, T)).toBe(e.reducing.y);
  });
});

describe('saturationCaloric', () => {
  it('obeys dα/dT = T dφ/dT, which ties its two equations together', () => {
    for (let T = 280; T < 640; T += 20) {
      const over = (f: 'alpha' | 'phi') =>
        difference((x) => saturationCaloric(water.saturation, x)![f], T, 0.5);
      expect(Math.abs(over('alpha') / (T * over('phi')) - 1)).toBeLessThan(1e-8);
    }
  });

  it('has the slope of the auxiliary vapour pressure', () => {
    for (let T = 280; T < 640; T += 20) {
      const slope = difference((x) => auxiliary(water.saturation.pressure, x), T, 0.1);
      const { dpdT } = saturationCaloric(water.saturation, T)!;
      expect(Math.abs(dpdT / slope - 1)).toBeLessThan(1e-9);
    }
  });

  it('is null where the substance has no such equations and refuses what lies outside', () => {
    expect(saturationCaloric(carbonDioxide.saturation, 250)).toBeNull();
    for (const T of [273.15, 647.1, NaN])
      expect(() => saturationCaloric(water.saturation, T)).toThrow(OutOfRange);
  });
});

describe('industrialSaturation', () => {
  it('refuses what lies outside its range', () => {
    const e = water.saturation.industrial!;
    for (const T of [273.1, 647.1, NaN])
      expect(() => industrialSaturationPressure(e, T)).toThrow(OutOfRange);
    for (const p of [611, 22.1e6, NaN])
      expect(() => industrialSaturationTemperature(e, p)).toThrow(OutOfRange);
  });
});
