import { NotConverged } from '../errors.ts';

/** Value and slope of a function at a point; `slope` may be 0 where it is not known. */
export type Evaluated = { value: number; slope: number };

/**
 * Root of a function between `low` and `high`, where its values have opposite signs (a zero at an
 * end counts): Newton steps while they stay inside the bracket and shrink it, bisection otherwise.
 *
 * `f(x, out)` writes value and slope. `tolerance` is relative to |x| with `floor` as the least |x|.
 * Throws NotConverged when the signs at the ends agree or 200 steps do not suffice.
 */
export function bracketedRoot(
  f: (x: number, out: Evaluated) => void,
  low: number,
  high: number,
  { start = 0.5 * (low + high), tolerance = 1e-14, floor = 0, name = 'bracketedRoot' } = {},
): number {
  const out: Evaluated = { value: 0, slope: 0 };
  f(low, out);
  const atLow = out.value;
  if (atLow === 0) return low;
  f(high, out);
  const atHigh = out.value;
  if (atHigh === 0) return high;
  if (!(atLow * atHigh < 0)) throw new NotConverged(name, { low, high, atLow, atHigh });
  const rising = atLow < 0;
  let x = start > low && start < high ? start : 0.5 * (low + high);
  let width = high - low;
  for (let i = 0; i < 200; i++) {
    f(x, out);
    const { value, slope } = out;
    if (value === 0) return x;
    if (value < 0 === rising) low = x;
    else high = x;
    let next = x - value / slope;
    const step = Math.abs(next - x);
    // A Newton step is taken only inside the bracket and when the bracket or the step keeps halving.
    if (!(next > low && next < high) || step > 0.5 * width) {
      next = 0.5 * (low + high);
      width = 0.5 * (high - low);
    } else width = step;
    if (Math.abs(next - x) <= tolerance * Math.max(Math.abs(next), floor)) return next;
    x = next;
  }
  throw new NotConverged(name, { low, high });
}
