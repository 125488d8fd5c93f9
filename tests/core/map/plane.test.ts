import { describe, expect, it } from 'vitest';
import { scale, temperaturePressurePlane } from '../../../core/map/plane.ts';
import { seeded } from './frames.ts';

describe('scale', () => {
  it.each([
    ['linear', -40, 100],
    ['linear', 0, 450e3],
    ['logarithmic', 1e-3, 1e9],
    ['logarithmic', 1e-40, 1],
    ['reciprocal', 150, 700],
  ] as const)('scale(%s, %d to %d) returns to where it came from', (kind, low, high) => {
    const s = scale(kind, [low, high]);
    const random = seeded(3);
    for (let i = 0; i < 200; i++) {
      const share = random();
      expect(Math.abs(s.share(s.value(share)) - share)).toBeLessThan(1e-12);
      expect(s.value(share)).toBeGreaterThanOrEqual(low);
      expect(s.value(share)).toBeLessThanOrEqual(high);
    }
    expect([s.value(0), s.value(1)]).toEqual([low, high]);
    expect(s.share(low)).toBe(0);
    expect(s.share(high)).toBe(1);
  });

  it('scale(logarithmic, …) gives each decade the same length', () => {
    const s = scale('logarithmic', [1e2, 1e6]);
    expect(s.share(1e3)).toBeCloseTo(0.25, 12);
    expect(s.share(1e5)).toBeCloseTo(0.75, 12);
  });

  it('scale(reciprocal, …) is even in 1/T and still rises to the right', () => {
    const s = scale('reciprocal', [200, 400]);
    expect(s.value(0.5)).toBeCloseTo(1 / (0.5 / 200 + 0.5 / 400), 9);
    expect(s.share(300)).toBeGreaterThan(s.share(299));
  });

  it.each([
    ['linear', 5, 5],
    ['linear', 6, 5],
    ['linear', 0, Infinity],
    ['linear', NaN, 5],
    ['linear', -Infinity, 5],
    ['logarithmic', 0, 5],
    ['logarithmic', -1, 5],
    ['reciprocal', 0, 5],
    ['reciprocal', NaN, 5],
  ] as const)('scale(%s, %d to %d) throws a RangeError that names the range', (kind, low, high) => {
    expect(() => scale(kind, [low, high])).toThrow(RangeError);
    expect(() => scale(kind, [low, high])).toThrow(`${low} to ${high}`);
  });
});

describe('temperaturePressurePlane', () => {
  const plane = temperaturePressurePlane({
    T: scale('reciprocal', [200, 700]),
    p: scale('logarithmic', [1, 1e8]),
    width: 150,
    height: 100,
  });
  it('project(…) has high pressure above and warm at the right', () => {
    expect(plane.project({ T: 200, p: 1 })).toEqual([0, 100]);
    expect(plane.project({ T: 700, p: 1e8 })).toEqual([150, 0]);
  });
  it('invert(…) returns to where project(…) came from', () => {
    const random = seeded(9);
    for (let i = 0; i < 100; i++) {
      const T = 200 + 500 * random();
      const p = 10 ** (8 * random());
      const back = plane.invert(plane.project({ T, p })!);
      expect(Math.abs(back.T / T - 1)).toBeLessThan(1e-12);
      expect(Math.abs(back.p / p - 1)).toBeLessThan(1e-12);
    }
  });
});
