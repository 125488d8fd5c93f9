declare global {
  /** Put there by a benchmark to gather times; never there otherwise. */
  var simmerlineTimes: { name: string; ms: number }[] | undefined;
}

/** Tells a benchmark, where one listens, that a piece of work took so many milliseconds. */
export function took(name: string, ms: number): void {
  globalThis.simmerlineTimes?.push({ name, ms });
}

/** Does the work and tells a benchmark what it took. */
export function timed<T>(name: string, work: () => T): T {
  const start = performance.now();
  const made = work();
  took(name, performance.now() - start);
  return made;
}

/** Tells a benchmark what passes until the page has drawn all that now changes. */
export function tookUntilIdle(name: string): void {
  if (!globalThis.simmerlineTimes) return;
  const start = performance.now();
  setTimeout(() => took(name, performance.now() - start));
}
