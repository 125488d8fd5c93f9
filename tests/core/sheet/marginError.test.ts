import { expect, it } from 'vitest';
import { medium } from '../../../core/equilibrium/medium.ts';
import { saturationAtPressure, saturationSlope } from '../../../core/equilibrium/saturation.ts';
import { margins } from '../../../core/map/margins.ts';
import { marginError } from '../../../core/sheet/marginError.ts';
import { water } from '../../../core/substances/water.ts';

const m = medium(water);
const at = { T: 394.25, p: 259.8e3 };
const error = { T: 0.5, p: 11e3 };
const towards = (direction: string) =>
  margins(m, at.T, at.p).find((margin) => margin.direction === direction)!;

it('adds the other instrument’s error by the slope of the line, Clausius and Clapeyron', () => {
  const boils = saturationAtPressure(m, at.p);
  const kelvinPerPascal = 1 / saturationSlope(m, boils);
  const found = marginError(m, at, towards('warmer'), error)!;
  // The line is curved over ± 11 kPa, which the law does not see: 5 % of the turned part.
  const turned = error.p * kelvinPerPascal;
  expect(Math.abs(found - error.T - turned)).toBeLessThan(0.05 * turned);
  // A gauge error alone is not hidden by a good probe.
  expect(found).toBeGreaterThan(1.5);
});

it('is the direct error alone where the other one is nothing, and null without a margin', () => {
  expect(marginError(m, at, towards('warmer'), { T: 0.5, p: 0 })).toBeCloseTo(0.5, 9);
  expect(marginError(m, at, towards('lower pressure'), { T: 0, p: 11e3 })).toBeCloseTo(11e3, 3);
  expect(
    marginError(m, at, { direction: 'warmer', boundary: null, reason: 'none' }, error),
  ).toBeNull();
});
