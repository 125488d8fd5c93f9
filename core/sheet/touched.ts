import type { Medium } from '../equilibrium/medium.ts';
import { boundaryCurves } from '../map/boundary.ts';

/**
 * The boundary that crosses the box of a state's limits of error (± K, ± Pa), if any.
 *
 * Every boundary is single-valued in T, so over the box's temperatures it runs between its pressures
 * at their ends; the box is touched where those and the box's pressures overlap.
 */
export function touched(
  m: Medium,
  { T, p }: { readonly T: number; readonly p: number },
  error: { readonly T: number; readonly p: number },
): string | null {
  if (!(error.T > 0 || error.p > 0)) return null;
  for (const curve of boundaryCurves(m)) {
    const cold = Math.max(T - error.T, curve.T[0]);
    const warm = Math.min(T + error.T, curve.T[1]);
    if (cold > warm || p + error.p < curve.p[0] || p - error.p > curve.p[1]) continue;
    const ends = [curve.atTemperature(cold).p, curve.atTemperature(warm).p];
    if (Math.max(...ends) >= p - error.p && Math.min(...ends) <= p + error.p) return curve.id;
  }
  return null;
}
