/** What a timed function returns must be used, or the engine may leave the work out. */
let sink = 0;
export const drain = (x: number): void => {
  sink += x;
};
export const drained = (): number => sink;

const once = (f: () => number): number => {
  const begin = performance.now();
  drain(f());
  return performance.now() - begin;
};

export const median = (list: readonly number[]): number =>
  [...list].sort((a, b) => a - b)[list.length >> 1]!;

/** Milliseconds of each of several rounds. */
export const timesOf = (work: () => number, rounds = 25): readonly number[] =>
  Array.from({ length: rounds }, () => once(work));

/**
 * Median over `rounds` of the time of `work` over the time of `yardstick`, both doing the same number
 * of repeats. The two take turns, so that a slow spell of the machine hits both.
 */
export function ratioOf(work: () => number, yardstick: () => number, rounds = 25): number {
  for (let i = 0; i < 5; i++) {
    once(work);
    once(yardstick);
  }
  const ratios: number[] = [];
  for (let i = 0; i < rounds; i++) {
    const a = once(work);
    const b = once(yardstick);
    ratios.push(a / b);
  }
  return median(ratios);
}
