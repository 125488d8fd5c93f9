import { OutOfRange } from '../errors.ts';
import type { IndustrialSaturationEquation } from '../substances/substance.ts';

const unitPressure = 1e6;

/**
 * Saturation pressure (Pa) of the industrial formulation at T (K): a check, never a result.
 *
 * Domain: `e.range`, ends included; elsewhere, NaN included, throws OutOfRange.
 * Source: IAPWS R7-97(2012), equations 29 and 30.
 */
export function industrialSaturationPressure(e: IndustrialSaturationEquation, T: number): number {
  const { Tmin, Tmax } = e.range;
  if (!(T >= Tmin && T <= Tmax))
    throw new OutOfRange('T', T, { min: Tmin, max: Tmax }, e.source, 'K');
  const [n1, n2, n3, n4, n5, n6, n7, n8, n9, n10] = e.n;
  const v = T + n9 / (T - n10);
  const A = v * v + n1 * v + n2;
  const B = n3 * v * v + n4 * v + n5;
  const C = n6 * v * v + n7 * v + n8;
  return unitPressure * ((2 * C) / (-B + Math.sqrt(B * B - 4 * A * C))) ** 4;
}

/**
 * Saturation temperature (K) of the industrial formulation at p (Pa); the exact inverse of
 * `industrialSaturationPressure`.
 *
 * Domain: `e.range`, ends included; elsewhere, NaN included, throws OutOfRange.
 * Source: IAPWS R7-97(2012), equation 31.
 */
export function industrialSaturationTemperature(
  e: IndustrialSaturationEquation,
  p: number,
): number {
  const { pmin, pmax } = e.range;
  if (!(p >= pmin && p <= pmax))
    throw new OutOfRange('p', p, { min: pmin, max: pmax }, e.source, 'Pa');
  const [n1, n2, n3, n4, n5, n6, n7, n8, n9, n10] = e.n;
  const y2 = Math.sqrt(p / unitPressure);
  const y = Math.sqrt(y2);
  const E = y2 + n3 * y + n6;
  const F = n1 * y2 + n4 * y + n7;
  const G = n2 * y2 + n5 * y + n8;
  const D = (2 * G) / (-F - Math.sqrt(F * F - 4 * E * G));
  return (n10 + D - Math.sqrt((n10 + D) ** 2 - 4 * (n9 + n10 * D))) / 2;
}
