import type { Medium } from '../equilibrium/medium.ts';
import type { Plane } from '../map/plane.ts';
import { traceTolerance } from '../map/trace.ts';
import { stateOn, wayOf, type KeptLine } from './keptLine.ts';
import type { Place } from './meetings.ts';
import type { Leg } from './problem.ts';

/**
 * The vertices of a leg on which a property is kept, each solved on the line, halved until the middle
 * of every chord lies within `tolerance` mm of it; at least eight chords, so that no bend hides.
 */
export function keptTrack(
  m: Medium,
  { from, to }: Leg,
  line: KeptLine,
  plane: Plane,
  tolerance = traceTolerance,
): readonly Place[] {
  const way = wayOf(line);
  const [a, b] = [from[way], to[way]];
  if (a === b) return [from, to];
  // Pressures go evenly in their logarithm.
  const at = (k: number): Place => {
    const { T, p } = stateOn(m, line, way === 'p' ? a * (b / a) ** k : a + k * (b - a));
    return { T, p };
  };
  const points: Place[] = [from];
  const refine = (A: Place, ka: number, B: Place, kb: number, depth: number): void => {
    const k = 0.5 * (ka + kb);
    const middle = at(k);
    const [[x0, y0], [x, y], [x1, y1]] = [A, middle, B].map((s) => plane.project(s)!) as [
      readonly [number, number],
      readonly [number, number],
      readonly [number, number],
    ];
    const length = Math.hypot(x1 - x0, y1 - y0);
    const off =
      length === 0
        ? Math.hypot(x - x0, y - y0)
        : Math.abs((x1 - x0) * (y - y0) - (y1 - y0) * (x - x0)) / length;
    if (depth > 1 && (off <= tolerance || depth > 12)) {
      points.push(middle, B);
      return;
    }
    refine(A, ka, middle, k, depth + 1);
    refine(middle, k, B, kb, depth + 1);
  };
  refine(from, 0, to, 1, 0);
  return points;
}
