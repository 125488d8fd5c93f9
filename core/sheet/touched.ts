import type { Margin } from '../map/margins.ts';

/** The boundary inside the limits of error, if any. */
export function touched(
  met: readonly Margin[],
  error: { readonly T: number; readonly p: number },
): string | null {
  for (const margin of met) {
    if (margin.boundary === null) continue;
    const thermal = margin.direction === 'warmer' || margin.direction === 'colder';
    if (margin.distance <= (thermal ? error.T : error.p)) return margin.boundary;
  }
  return null;
}
