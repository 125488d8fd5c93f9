import type { PhaseState } from '../equilibrium/phase.ts';

/** A place on the plane in mm from the frame's upper left corner, y downwards. */
export type Place = readonly [x: number, y: number];

/** Where a phase stands on the plane; null where the plane has no place for it. */
export type Projection = (s: Pick<PhaseState, 'T' | 'p'>) => Place | null;

/** One axis of a plane: a monotone scale of a quantity in SI, drawn over `length` mm. */
export interface Scale {
  readonly kind: 'linear' | 'logarithmic' | 'reciprocal';
  readonly range: readonly [low: number, high: number];
  /** 0 at the low end, 1 at the high end. */
  share(value: number): number;
  value(share: number): number;
}

/** What stays in sight when a logarithmic axis is asked for zero pressure or less. */
const least = 1e-300;

const transforms = {
  linear: { to: (v: number) => v, from: (v: number) => v },
  logarithmic: { to: (v: number) => Math.log(Math.max(v, least)), from: Math.exp },
  // −1/T, so that temperature still rises to the right.
  reciprocal: { to: (v: number) => -1 / Math.max(v, least), from: (v: number) => -1 / v },
} as const;

/** A scale of the kind over a range; throws RangeError where the range cannot be drawn. */
export function scale(kind: Scale['kind'], range: readonly [number, number]): Scale {
  const [low, high] = range;
  if (!(high > low) || (kind !== 'linear' && !(low > 0)) || !Number.isFinite(high - low))
    throw new RangeError(`a ${kind} scale cannot run from ${low} to ${high}`);
  const { to, from } = transforms[kind];
  const a = to(low);
  const b = to(high);
  return {
    kind,
    range,
    share: (value) => (to(value) - a) / (b - a),
    value: (share) => (share === 0 ? low : share === 1 ? high : from(a + share * (b - a))),
  };
}

/** The temperature–pressure plane of a figure. */
export interface Plane {
  readonly T: Scale;
  readonly p: Scale;
  /** Size of the frame in mm. */
  readonly width: number;
  readonly height: number;
  readonly project: Projection;
  invert(place: Place): { readonly T: number; readonly p: number };
}

export function temperaturePressurePlane(axes: {
  readonly T: Scale;
  readonly p: Scale;
  readonly width: number;
  readonly height: number;
}): Plane {
  const { T, p, width, height } = axes;
  return {
    ...axes,
    project: (s) => [T.share(s.T) * width, (1 - p.share(s.p)) * height],
    invert: ([x, y]) => ({ T: T.value(x / width), p: p.value(1 - y / height) }),
  };
}
