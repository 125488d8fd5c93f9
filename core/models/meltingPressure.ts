import { OutOfRange } from '../errors.ts';
import type { MeltingEquation } from '../substances/substance.ts';

/**
 * Melting pressure (Pa) of the published `curve` at temperature T (K).
 *
 * Domain: `curve.range`, ends included; elsewhere, NaN included, throws OutOfRange.
 * Source: the curve's own, e.g. IAPWS R14-08(2011), equations 1 to 5.
 */
export function meltingPressure(curve: MeltingEquation, T: number): number {
  const { range, reducing, source } = curve;
  if (!(T >= range.Tmin && T <= range.Tmax))
    throw new OutOfRange('T', T, { min: range.Tmin, max: range.Tmax }, source, 'K');
  const theta = T / reducing.T;
  let sum = 0;
  switch (curve.kind) {
    case 'powers':
      curve.a.forEach((a, i) => (sum += a * (1 - theta ** curve.b[i]!)));
      return reducing.p * (1 + sum);
    case 'logarithm of powers':
      curve.a.forEach((a, i) => (sum += a * (1 - theta ** curve.b[i]!)));
      return reducing.p * Math.exp(sum);
    case 'polynomial':
      curve.a.forEach((a, i) => (sum += a * (theta - 1) ** (i + 1)));
      return reducing.p * (1 + sum);
    case 'scaled powers':
      curve.a.forEach((a, i) => (sum += a * (theta ** curve.b[i]! - 1)));
      return reducing.p + curve.scale * sum;
  }
}
