import fc from 'fast-check';
import { expect, it } from 'vitest';
import type { Results } from '../../../core/sheet/results.ts';
import { shared } from '../../../app/shared.ts';
import { changesBetween, withChanges } from '../../../app/worker/messages.ts';

// Small alphabets, so that entries and values return between one result and the next.
const value = fc.oneof(
  fc.constantFrom<unknown>(null, 0, -0, 1, 'a', 'b', true),
  fc.array(fc.integer({ min: 0, max: 2 }), { maxLength: 3 }),
  fc.record({ x: fc.integer({ min: 0, max: 1 }), id: fc.constantFrom('p', 'q') }),
);
const entries = (key: 'id' | 'view' | 'code') =>
  fc.uniqueArray(
    fc
      .tuple(fc.constantFrom('a', 'b', 'c', 'd'), value, value)
      .map(([name, one, two]) => ({ [key]: name, one, two })),
    { selector: (entry) => entry[key], maxLength: 4 },
  );
const results = fc
  .record({
    sites: entries('id'),
    states: entries('id'),
    paths: entries('id'),
    maps: entries('view'),
    cautions: entries('code'),
    formulations: fc.dictionary(
      fc.constantFrom('water', 'ice'),
      fc.array(fc.constantFrom('r', 's')),
    ),
  })
  .map((r) => r as unknown as Results);

/** Every object in a value, with the place it stands at. */
function objects(at: unknown, place = ''): readonly (readonly [string, object])[] {
  if (typeof at !== 'object' || at === null) return [];
  return [
    [place, at],
    ...Object.entries(at).flatMap(([key, inner]) => objects(inner, `${place}.${key}`)),
  ];
}

it('withChanges(last, changesBetween(last, next)) is next, and shares with last what is equal', () => {
  fc.assert(
    fc.property(results, results, (last, made) => {
      const next = shared(last, made);
      // As a message carries it: a copy.
      const changes = structuredClone(changesBetween(last, next));
      const page = withChanges(last, changes);
      expect(page).toEqual(made);
      const before = new Map(objects(last));
      const after = new Map(objects(next));
      for (const [place, object] of objects(page))
        if (after.get(place) === before.get(place) && before.has(place))
          expect(object, place).toBe(before.get(place));
    }),
    { numRuns: 500 },
  );
});

it('changes that build on each other end at the last results, whatever came in between', () => {
  fc.assert(
    fc.property(fc.array(results, { minLength: 1, maxLength: 6 }), (list) => {
      let inWorker: Results | null = null;
      let onPage: Results | null = null;
      for (const made of list) {
        const next: Results = shared(inWorker, structuredClone(made));
        onPage = withChanges(onPage, structuredClone(changesBetween(inWorker, next)));
        inWorker = next;
      }
      expect(onPage).toEqual(list.at(-1));
    }),
  );
});
