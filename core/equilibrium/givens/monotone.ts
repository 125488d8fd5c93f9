import { bracketedRoot } from '../root.ts';
import type { State } from '../state.ts';

/** Places at which the sign of a slope is looked at on a stretch. */
const looks = 48;

/**
 * Ends of the parts of [low, high] on which a quantity only rises or only falls, told by its slope: the
 * sign is looked at in 48 places, and where it turns the zero is solved. Liquid water about its
 * densest point and very cold ice turn once.
 */
export function monotoneParts(
  slope: (x: number) => number,
  low: number,
  high: number,
): readonly number[] {
  const cuts = [low];
  let before = slope(low);
  let at = low;
  for (let i = 1; i <= looks; i++) {
    const x = i === looks ? high : low + (i / looks) * (high - low);
    const here = slope(x);
    if (before * here < 0)
      cuts.push(
        bracketedRoot(
          (y, out) => {
            out.value = slope(y);
            out.slope = 0;
          },
          at,
          x,
          { tolerance: 1e-13, name: 'turning point' },
        ),
      );
    if (here !== 0) before = here;
    at = x;
  }
  cuts.push(high);
  return cuts;
}

/** Whether a value lies between the least and the largest, or within `slack` of one of them. */
export const between = (value: number, all: readonly number[], slack: (x: number) => number) =>
  value >= Math.min(...all) - slack(Math.min(...all)) &&
  value <= Math.max(...all) + slack(Math.max(...all));

/**
 * Every x from `low` to `high` at which a function, monotone between the cuts, has the value; an end
 * within `slack` of it counts.
 */
export function everyRoot(
  value: (x: number) => number,
  slope: (x: number) => number,
  cuts: readonly number[],
  wanted: number,
  slack: number,
): readonly number[] {
  const found: number[] = [];
  const add = (x: number): void => {
    if (found.at(-1) !== x) found.push(x);
  };
  for (let i = 0; i + 1 < cuts.length; i++) {
    const [a, b] = [cuts[i]!, cuts[i + 1]!];
    const [fa, fb] = [value(a) - wanted, value(b) - wanted];
    if (Math.abs(fa) <= slack) add(a);
    if (Math.abs(fa) > slack && Math.abs(fb) > slack && fa * fb < 0)
      add(
        bracketedRoot(
          (x, out) => {
            out.value = value(x) - wanted;
            out.slope = slope(x);
          },
          a,
          b,
          { tolerance: 4e-16, name: 'one of several states' },
        ),
      );
    if (Math.abs(fb) <= slack) add(b);
  }
  return found;
}

/** Adds a state that is not among the answers yet: a boundary and the phase beside it meet in one. */
export function addState(found: State[], state: State): void {
  const same = (a: number, b: number): boolean => Math.abs(a - b) <= 1e-9 * Math.abs(b);
  if (!found.some(({ T, p }) => same(T, state.T) && same(p, state.p))) found.push(state);
}
