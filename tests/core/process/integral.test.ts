import { describe, expect, it } from 'vitest';
import { integral } from '../../../core/process/integral.ts';

describe('integral(…)', () => {
  it.each([0, 1, 2, 7, 13, 20, 22])('is exact for x^%d, once over', (n) => {
    let count = 0;
    const value = integral(
      (x) => {
        count++;
        return x ** n;
      },
      0,
      1,
      1,
    );
    expect(count).toBe(15);
    expect(value * (n + 1)).toBeCloseTo(1, 13);
  });

  it('halves until a root at the end is met to the tolerance', () => {
    expect(Math.abs(integral(Math.sqrt, 0, 1, 1e-9) - 2 / 3)).toBeLessThan(1e-8);
  });

  it('is signed, and zero over nothing', () => {
    expect(integral((x) => x, 2, 1, 1e-12)).toBeCloseTo(-1.5, 12);
    expect(integral(() => NaN, 1, 1, 1)).toBe(0);
  });
});
