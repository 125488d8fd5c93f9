import type { Medium } from '../equilibrium/medium.ts';
import { boundaryCurves } from '../map/boundary.ts';
import type { Margin } from '../map/margins.ts';

/**
 * How far a margin may be off, in its own unit (K or Pa), given limits of error of the state in K and
 * Pa: the error read directly and the other one turned by the boundary's own slope, added, as limits
 * of one instrument set do not average out. Null for an absent margin.
 */
export function marginError(
  m: Medium,
  at: { readonly T: number; readonly p: number },
  margin: Margin,
  error: { readonly T: number; readonly p: number },
): number | null {
  if (margin.boundary === null) return null;
  const curve = boundaryCurves(m).find(({ id }) => id === margin.boundary);
  if (!curve) return null;
  const held = (value: number, [low, high]: readonly [number, number]): number =>
    Math.min(high, Math.max(low, value));
  const thermal = margin.direction === 'warmer' || margin.direction === 'colder';
  const key = thermal ? 'p' : 'T';
  const ends = [-1, 1].map((sign) => held(at[key] + sign * error[key], curve[key]));
  const shift = thermal
    ? ends.map((p) => curve.atPressure(p).T - margin.T)
    : ends.map((T) => curve.atTemperature(T).p - margin.p);
  return error[thermal ? 'T' : 'p'] + Math.max(...shift.map(Math.abs));
}
