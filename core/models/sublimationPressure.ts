import { OutOfRange } from '../errors.ts';
import type { SublimationEquation } from '../substances/substance.ts';

/**
 * Sublimation pressure (Pa) of the published `curve` at temperature T (K).
 *
 * Domain: 0 K < T ≤ the upper end of `curve.range`; elsewhere, NaN included, throws OutOfRange. Below
 * the lower end the value serves as a first guess only.
 * Source: the curve's own, e.g. IAPWS R14-08(2011), equation 6.
 */
export function sublimationPressure(curve: SublimationEquation, T: number): number {
  const { range, reducing, source } = curve;
  if (!(T > 0 && T <= range.Tmax))
    throw new OutOfRange('T', T, { min: range.Tmin, max: range.Tmax }, source, 'K');
  const theta = T / reducing.T;
  let sum = 0;
  switch (curve.kind) {
    case 'powers':
      curve.a.forEach((a, i) => (sum += a * theta ** curve.b[i]!));
      return reducing.p * Math.exp(sum / theta);
    case 'reduced':
      curve.a.forEach((a, i) => (sum += a * (1 - theta) ** curve.b[i]!));
      return reducing.p * Math.exp(sum / theta);
    case 'inverse powers':
      curve.a.forEach((a, i) => (sum += a / T ** i));
      return curve.factor * reducing.p * Math.exp(sum);
    case 'Clausius–Clapeyron':
      return reducing.p * Math.exp((curve.L / curve.R) * (1 / reducing.T - 1 / T));
  }
}
