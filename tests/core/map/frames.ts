import type { Medium } from '../../../core/equilibrium/medium.ts';
import { medium } from '../../../core/equilibrium/medium.ts';
import { boundaryCurves } from '../../../core/map/boundary.ts';
import {
  scale,
  temperaturePressurePlane,
  type Place,
  type Plane,
  type Scale,
} from '../../../core/map/plane.ts';
import { catalogue } from '../../../core/substances/catalogue.ts';

/** Numbers from 0 to 1 that are the same for the same seed (mulberry32, public domain). */
export function seeded(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = state;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 2 ** 32;
  };
}

/** Every substance of the catalogue: a new one meets these tests by being listed there. */
export const media: readonly (readonly [name: string, m: Medium])[] = await Promise.all(
  catalogue.map(async ({ names, load }) => [names[0]!, medium(await load())] as const),
);

/** Frames a test looks at: many of the two substances with solids of their own equations, fewer of each other. */
export const share = (m: Medium, count: number): number =>
  m.solids.size > 0 ? count : Math.ceil(count / 4);

type Range = readonly [number, number];

const planeOf = (
  kinds: readonly [Scale['kind'], Scale['kind']],
  T: Range,
  p: Range,
  width: number,
  height: number,
): Plane =>
  temperaturePressurePlane({ T: scale(kinds[0], T), p: scale(kinds[1], p), width, height });

/** What the frames of one medium are to show: everything, or one place of one boundary. */
export function frames(m: Medium, seed: number, count: number): readonly Plane[] {
  const random = seeded(seed);
  const between = (a: number, b: number): number => a + (b - a) * random();
  const curves = boundaryCurves(m);
  const { validity } = m.substance.fluid;
  return Array.from({ length: count }, (_, i) => {
    const width = between(90, 400);
    const height = between(90, 400);
    const kinds = [
      random() < 0.7 ? ('linear' as const) : ('reciprocal' as const),
      random() < 0.5 ? ('linear' as const) : ('logarithmic' as const),
    ] as const;
    const linear = kinds[1] === 'linear';
    if (i % 3 === 0) {
      // The whole map, and beyond it.
      const T: Range = [
        between(0.11, 0.88) * m.triple.T,
        between(m.critical.T * 1.05, validity.Tmax * 1.1),
      ];
      const high = 10 ** between(Math.log10(m.critical.p * 1.1), Math.log10(validity.pmax * 3));
      const p: Range = [linear ? 0 : m.triple.p * 10 ** between(-8, 0), high];
      return planeOf(kinds, T, p, width, height);
    }
    const curve = curves[Math.floor(random() * curves.length)]!;
    const point = curve.atTemperature(between(curve.T[0], curve.T[1]));
    const spanT = 10 ** between(-1.5, 2.3);
    const shareT = between(-0.1, 1.1);
    const T: Range = [
      Math.max(5, point.T - spanT * shareT),
      Math.max(6, point.T + spanT * (1 - shareT)),
    ];
    if (linear) {
      const span = point.p * 10 ** between(-2.5, 1.5);
      const share = between(-0.1, 1.1);
      const low = Math.max(0, point.p - span * share);
      return planeOf(kinds, T, [low, low + span], width, height);
    }
    const decades = 10 ** between(-1.5, 0.9);
    const share = between(-0.1, 1.1);
    const low = point.p * 10 ** (-decades * share);
    return planeOf(kinds, T, [low, low * 10 ** decades], width, height);
  });
}

export const told = (plane: Plane): string =>
  `T ${plane.T.kind} ${plane.T.range.join('..')} K, p ${plane.p.kind} ${plane.p.range.join('..')} Pa, ${plane.width} × ${plane.height} mm`;

/** Distance in mm from a place to a straight piece. */
export function distance(m: Place, a: Place, b: Place): number {
  const dx = b[0] - a[0];
  const dy = b[1] - a[1];
  const square = dx * dx + dy * dy;
  const t =
    square === 0 ? 0 : Math.min(1, Math.max(0, ((m[0] - a[0]) * dx + (m[1] - a[1]) * dy) / square));
  return Math.hypot(m[0] - a[0] - t * dx, m[1] - a[1] - t * dy);
}

export function distanceToLine(m: Place, line: readonly Place[]): number {
  let least = Infinity;
  for (let i = 1; i < line.length; i++)
    least = Math.min(least, distance(m, line[i - 1]!, line[i]!));
  return least;
}
