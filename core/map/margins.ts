import type { Medium } from '../equilibrium/medium.ts';
import { boundaryCurves, type BoundaryCurve } from './boundary.ts';

export type Direction = 'warmer' | 'colder' | 'higher pressure' | 'lower pressure';

/** The first boundary met from a point in one direction, or why there is none. */
export type Margin =
  | {
      readonly direction: Direction;
      readonly boundary: string;
      readonly kind: BoundaryCurve['kind'];
      readonly form: string | null;
      readonly T: number;
      readonly p: number;
      /** Positive distance in K or Pa. */
      readonly distance: number;
    }
  | { readonly direction: Direction; readonly boundary: null; readonly reason: NoMargin };

export type NoMargin =
  /** No boundary of this substance lies that way. */
  | 'none'
  /** Above the critical pressure nothing boils, above the critical temperature nothing condenses. */
  | 'beyond the critical point'
  /** Boundaries between solid forms are not in the published equations used. */
  | 'between solid forms'
  /** No boundary is published that way. */
  | 'not published';

/**
 * The four margins of (T, p) in K and Pa: the first boundary warmer, colder, at higher and at lower
 * pressure, each named or absent with its reason.
 *
 * A point on a boundary has that boundary at distance 0 on neither side; the next one counts. A state
 * known to lie on the boundary `on` says so, since rounding might put it beside.
 */
export function margins(
  m: Medium,
  T: number,
  p: number,
  on: string | null = null,
): readonly Margin[] {
  const curves = boundaryCurves(m).filter(({ id }) => id !== on);
  const across = curves
    .filter((c) => p >= c.p[0] && p <= c.p[1])
    .map((c) => ({ c, T: c.atPressure(p).T, p }));
  const along = curves
    .filter((c) => T >= c.T[0] && T <= c.T[1])
    .map((c) => ({ c, T, p: c.atTemperature(T).p }));
  const nearest = (
    direction: Direction,
    met: readonly { c: BoundaryCurve; T: number; p: number; distance: number }[],
  ): Margin => {
    const ahead = met
      .filter((x) => x.distance > 1e-12 * (direction.endsWith('pressure') ? x.p : x.T))
      .sort((a, b) => a.distance - b.distance)[0];
    if (!ahead) return { direction, boundary: null, reason: absent(m, T, p, direction) };
    const { c, T: Tb, p: pb, distance } = ahead;
    return { direction, boundary: c.id, kind: c.kind, form: c.form, T: Tb, p: pb, distance };
  };
  return [
    nearest(
      'warmer',
      across.map((x) => ({ ...x, distance: x.T - T })),
    ),
    nearest(
      'colder',
      across.map((x) => ({ ...x, distance: T - x.T })),
    ),
    nearest(
      'higher pressure',
      along.map((x) => ({ ...x, distance: x.p - p })),
    ),
    nearest(
      'lower pressure',
      along.map((x) => ({ ...x, distance: p - x.p })),
    ),
  ];
}

function absent(m: Medium, T: number, p: number, direction: Direction): NoMargin {
  const { critical, triple, substance } = m;
  const { melting, sublimation } = substance;
  if (direction === 'warmer') return p > critical.p ? 'beyond the critical point' : 'none';
  if (direction === 'colder') {
    const solid = melting.length > 0 || T < triple.T;
    return solid && (sublimation.length > 0 || melting.length > 0)
      ? 'between solid forms'
      : 'not published';
  }
  if (direction === 'higher pressure') {
    if (T < triple.T) return sublimation.length > 0 ? 'between solid forms' : 'not published';
    return melting.length === 0
      ? 'not published'
      : T > critical.T
        ? 'beyond the critical point'
        : 'not published';
  }
  return T > critical.T
    ? 'beyond the critical point'
    : T < triple.T && p > triple.p
      ? 'between solid forms'
      : 'none';
}

/** The nearest of several margins in the unit of one direction pair, or null. */
export function nearestMargin(
  all: readonly Margin[],
  pair: 'temperature' | 'pressure',
): Extract<Margin, { boundary: string }> | null {
  const wanted: readonly Direction[] =
    pair === 'temperature' ? ['warmer', 'colder'] : ['higher pressure', 'lower pressure'];
  const met = all.filter(
    (x): x is Extract<Margin, { boundary: string }> =>
      x.boundary !== null && wanted.includes(x.direction),
  );
  return met.sort((a, b) => a.distance - b.distance)[0] ?? null;
}
