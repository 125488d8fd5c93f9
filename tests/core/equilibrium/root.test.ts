import { describe, expect, it } from 'vitest';
import { bracketedRoot, type Evaluated } from '../../../core/equilibrium/root.ts';
import { NotConverged } from '../../../core/errors.ts';

const counted = (f: (x: number) => number, slope: (x: number) => number) => {
  const of = {
    calls: 0,
    f: (x: number, out: Evaluated): void => {
      of.calls++;
      out.value = f(x);
      out.slope = slope(x);
    },
  };
  return of;
};

describe('bracketedRoot', () => {
  const cubic = (x: number): number => x * x * x - 2;
  const slope = (x: number): number => 3 * x * x;

  it('finds the cube root of 2 to the last digits in a few Newton steps', () => {
    const { f } = counted(cubic, slope);
    expect(Math.abs(bracketedRoot(f, 0, 10) / Math.cbrt(2) - 1)).toBeLessThan(1e-14);
    const near = counted(cubic, slope);
    bracketedRoot(near.f, 0, 10, { start: 1.3 });
    expect(near.calls).toBeLessThan(12);
  });

  it('finds a falling root, and one of an odd function at 0 with a floor', () => {
    expect(
      Math.abs(
        bracketedRoot(
          (x, out) => {
            out.value = 2 - x * x * x;
            out.slope = -3 * x * x;
          },
          0,
          10,
        ) /
          Math.cbrt(2) -
          1,
      ),
    ).toBeLessThan(1e-14);
    const zero = bracketedRoot(
      (x, out) => {
        out.value = Math.atan(x);
        out.slope = 1 / (1 + x * x);
      },
      -3e4,
      1e4,
      { floor: 1, start: 9e3 },
    );
    expect(Math.abs(zero)).toBeLessThan(1e-13);
  });

  it.each([
    ['unknown', () => 0],
    ['not a number', () => NaN],
    ['of the wrong sign', (x: number) => -3 * x * x],
    ['a hundred times too steep', (x: number) => 300 * x * x],
    ['a hundred times too flat', (x: number) => 0.03 * x * x],
  ])('bisects where the slope is %s', (_, wrong) => {
    const found = bracketedRoot(counted(cubic, wrong).f, 0, 10, { tolerance: 1e-13 });
    expect(Math.abs(found / Math.cbrt(2) - 1)).toBeLessThan(1e-11);
  });

  it('never leaves the bracket', () => {
    const seen: number[] = [];
    bracketedRoot(
      (x, out) => {
        seen.push(x);
        // Flat at both sides: Newton alone leaves by far.
        out.value = Math.tanh(50 * (x - 0.3));
        out.slope = 50 / Math.cosh(50 * (x - 0.3)) ** 2;
      },
      0,
      1,
      { start: 0.9 },
    );
    expect(Math.min(...seen)).toBeGreaterThanOrEqual(0);
    expect(Math.max(...seen)).toBeLessThanOrEqual(1);
  });

  it('returns an end that is a zero', () => {
    const { f } = counted(
      (x) => x * (x - 1),
      (x) => 2 * x - 1,
    );
    expect(bracketedRoot(f, 0, 0.5)).toBe(0);
    expect(bracketedRoot(f, 0.5, 1)).toBe(1);
  });

  it('throws NotConverged with both ends where they have one sign or are not numbers', () => {
    const { f } = counted(
      (x) => x * x + 1,
      (x) => 2 * x,
    );
    expect(() => bracketedRoot(f, -1, 1, { name: 'a parabola' })).toThrow(NotConverged);
    expect(() => bracketedRoot(f, -1, 1, { name: 'a parabola' })).toThrow(/a parabola.*"atLow":2/);
    expect(() =>
      bracketedRoot(
        counted(
          () => NaN,
          () => 1,
        ).f,
        0,
        1,
      ),
    ).toThrow(NotConverged);
  });
});
