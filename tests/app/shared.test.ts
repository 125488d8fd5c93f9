import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { shared } from '../../app/shared.ts';

const plain = fc.letrec((tie) => ({
  value: fc.oneof(
    { maxDepth: 3 },
    fc.constantFrom(0, 1, 'a', null, true, NaN),
    fc.array(tie('value'), { maxLength: 4 }),
    fc.dictionary(fc.constantFrom('id', 'x', 'y'), tie('value'), { noNullPrototype: true }),
  ),
})).value;

describe('sharing what did not change', () => {
  it('never changes what is said, nor what was said before', () => {
    fc.assert(
      fc.property(plain, plain, (last, next) => {
        const before = structuredClone(last);
        expect(shared(last, next)).toEqual(next);
        expect(last).toEqual(before);
      }),
      { numRuns: 2000 },
    );
  });

  it('gives the last object itself for an equal one', () => {
    fc.assert(
      fc.property(plain, (last) => {
        expect(Object.is(shared(last, structuredClone(last)), last)).toBe(true);
      }),
      { numRuns: 1000 },
    );
  });

  it('keeps every part beside the one that changed', () => {
    const last = { a: { n: [1, 2] }, b: { n: [3] }, c: 4 };
    const made = shared(last, { a: { n: [1, 2] }, b: { n: [5] }, c: 4 });
    expect(made.a).toBe(last.a);
    expect(made.b).not.toBe(last.b);
    expect(made).toEqual({ a: { n: [1, 2] }, b: { n: [5] }, c: 4 });
  });

  it('matches entries by id where one is taken out or put in', () => {
    const last = [
      { id: 'a', n: 1 },
      { id: 'b', n: 2 },
      { id: 'c', n: 3 },
    ];
    const fewer = shared(last, [
      { id: 'b', n: 2 },
      { id: 'c', n: 3 },
    ]);
    expect(fewer.map((entry) => last.indexOf(entry))).toEqual([1, 2]);
    const more = shared(last, [{ id: 'd', n: 0 }, ...structuredClone(last)]);
    expect(more.map((entry) => last.indexOf(entry))).toEqual([-1, 0, 1, 2]);
  });

  it('tells a field that is gone from one that is undefined', () => {
    const last: { a: number; b?: number | undefined } = { a: 1, b: undefined };
    expect(shared(last, { a: 1 })).not.toBe(last);
    expect('b' in shared(last, { a: 1 })).toBe(false);
    expect('b' in shared({ a: 1 }, { a: 1, b: undefined })).toBe(true);
  });
});
