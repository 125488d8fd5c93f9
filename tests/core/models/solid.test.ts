import { describe, expect, it } from 'vitest';
import { solidProperties } from '../../../core/models/solid.ts';
import { media } from '../../laws/substances.ts';

const solids = media.flatMap((m) => [...m.solids.values()]);

describe.each(solids)('solidProperties, $equation.solid', ({ model, equation }) => {
  const { Tmin, Tmax, pmax } = equation.validity;
  const places = [0.3, 0.6, 1].flatMap((x) =>
    [0, 0.1, 1].map((y) => ({ T: Tmin + x * (Tmax - Tmin), p: y * pmax })),
  );

  it.each(places)('at $T K and $p Pa obeys cp − cv = T v α² / κ and cp/cv = κT/κS', ({ T, p }) => {
    const g = { ...model(T, p) };
    const { cp, cv } = solidProperties(T, p, g);
    const alpha = g.gTp / g.gp;
    const kappaT = -g.gpp / g.gp;
    const kappaS = (g.gTp * g.gTp - g.gTT * g.gpp) / (g.gp * g.gTT);
    expect(Math.abs((cp! - cv!) / ((T * g.gp * alpha * alpha) / kappaT) - 1)).toBeLessThan(1e-9);
    expect(Math.abs((cv! / cp!) * (kappaT / kappaS) - 1)).toBeLessThan(1e-12);
  });

  it.each(places)('at $T K and $p Pa obeys h = u + p v and g = h − T s', ({ T, p }) => {
    const g = { ...model(T, p) };
    const { h, s, u, rho, w } = solidProperties(T, p, g);
    expect(Math.abs(h - u - p / rho)).toBeLessThan(1e-12 * Math.abs(h));
    expect(Math.abs(h - T * s - g.g)).toBeLessThan(1e-12 * Math.abs(h));
    expect(w).toBeNull();
  });
});
