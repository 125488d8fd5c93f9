import type { AuxiliaryEquation } from '../substances/substance.ts';

/**
 * Value of a published auxiliary equation of the saturation line at T (K), in the unit of its
 * reducing value (Pa or kg/m³).
 *
 * Domain: T > 0; at or above T* the value at T* is returned. Meant for first guesses and checks.
 * Source: the equation's own, e.g. IAPWS SR1-86(1992), equations 1 to 3.
 */
export function auxiliary(equation: AuxiliaryEquation, T: number): number {
  const { kind, reducing, a, t } = equation;
  const x = Math.max(0, 1 - T / reducing.T);
  let sum = 0;
  for (let i = 0; i < a.length; i++) sum += a[i]! * x ** t[i]!;
  if (kind === 'sum') return reducing.y * (1 + sum);
  if (kind === 'plain sum') return reducing.y * sum;
  return reducing.y * Math.exp(kind === 'exponential' ? sum : (sum * reducing.T) / T);
}
