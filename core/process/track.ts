import type { Boundary } from '../map/boundary.ts';
import type { Plane } from '../map/plane.ts';
import { traceTolerance } from '../map/trace.ts';
import type { Place } from './meetings.ts';
import type { Leg } from './problem.ts';

/**
 * The vertices of a leg on a plane, within `tolerance` mm of it: a leg straight in T and p is bent by
 * logarithmic and reciprocal axes and is halved until its chords fit; a leg along a boundary takes
 * the points at which the boundary itself was traced inside the frame.
 */
export function trackOf(
  leg: Leg,
  plane: Plane,
  traced: readonly Boundary[],
  tolerance = traceTolerance,
): readonly Place[] {
  const { from, to } = leg;
  if (leg.along !== null) {
    const line = traced.find(({ id }) => id === leg.along)?.points ?? [];
    const key = Math.abs(Math.log(to.p / from.p)) > 0 ? 'p' : 'T';
    const low = Math.min(from[key], to[key]);
    const high = Math.max(from[key], to[key]);
    const between = line
      .filter((point) => point[key] > low && point[key] < high)
      .map(({ T, p }) => ({ T, p }))
      .sort((a, b) => (to[key] > from[key] ? a[key] - b[key] : b[key] - a[key]));
    return [from, ...between, to];
  }
  const at = (k: number): Place => ({
    T: from.T + k * (to.T - from.T),
    p: from.p + k * (to.p - from.p),
  });
  const points: Place[] = [from];
  const refine = (a: Place, ka: number, b: Place, kb: number, depth: number): void => {
    const k = 0.5 * (ka + kb);
    const middle = at(k);
    const [A, M, B] = [a, middle, b].map((s) => plane.project(s)!) as [
      readonly [number, number],
      readonly [number, number],
      readonly [number, number],
    ];
    const length = Math.hypot(B[0] - A[0], B[1] - A[1]);
    const off =
      length === 0
        ? 0
        : Math.abs((B[0] - A[0]) * (M[1] - A[1]) - (B[1] - A[1]) * (M[0] - A[0])) / length;
    if (off <= tolerance || depth > 14) {
      points.push(b);
      return;
    }
    refine(a, ka, middle, k, depth + 1);
    refine(middle, k, b, kb, depth + 1);
  };
  refine(from, 0, to, 1, 0);
  return points;
}
