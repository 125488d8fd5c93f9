import type { Medium } from '../../core/equilibrium/medium.ts';
import { boundaryCurves, type BoundaryCurve } from '../../core/map/boundary.ts';

export type Random = () => number;

export const between = (r: Random, low: number, high: number): number => low + r() * (high - low);
export const evenly = (r: Random, low: number, high: number): number =>
  low * Math.exp(r() * Math.log(high / low));
export const sign = (r: Random): number => (r() < 0.5 ? -1 : 1);
export const oneOf = <T>(r: Random, list: readonly T[]): T => list[Math.floor(r() * list.length)]!;
export const within = (x: number, low: number, high: number): number =>
  Math.min(high, Math.max(low, x));

/** Temperatures and pressures over which `stablePhase` promises an answer or a reason. */
export function domain(m: Medium): { readonly T: [number, number]; readonly p: [number, number] } {
  const { validity } = m.substance.fluid;
  const { sublimation } = m.substance;
  const Tlow = sublimation.length
    ? Math.min(...sublimation.map(({ range }) => range.Tmin))
    : Math.min(m.triple.T, validity.Tmin);
  return { T: [Tlow, validity.Tmax], p: [1e-40, validity.pmax] };
}

/** A temperature on a boundary; half of them near one of its ends. */
export function temperatureOn(r: Random, { T: [low, high] }: BoundaryCurve): number {
  const share = r() < 0.5 ? r() : 10 ** between(r, -7, -1);
  const T = r() < 0.5 ? low + share * (high - low) : high - share * (high - low);
  return within(T, low, high);
}

export type Place = 'anywhere' | 'low pressure' | 'near critical' | 'near triple' | 'by a boundary';
const places: readonly Place[] = [
  'anywhere',
  'low pressure',
  'near critical',
  'near triple',
  'by a boundary',
];

/** A random (T, p) inside the domain, over-weighted where solvers have it hard. */
export function drawTp(m: Medium, r: Random): { T: number; p: number; place: Place } {
  const d = domain(m);
  const place = oneOf(r, places);
  const near = (x: number): number => x * (1 + sign(r) * 10 ** between(r, -8, -1));
  let T = between(r, ...d.T);
  let p = evenly(r, m.triple.p, d.p[1]);
  if (place === 'low pressure') p = evenly(r, 1e-30, m.triple.p);
  if (place === 'near critical') [T, p] = [near(m.critical.T), near(m.critical.p)];
  if (place === 'near triple') [T, p] = [near(m.triple.T), near(m.triple.p)];
  if (place === 'by a boundary') {
    const at = boundaryPointOf(r, oneOf(r, boundaryCurves(m)));
    [T, p] = r() < 0.5 ? [near(at.T), at.p] : [at.T, near(at.p)];
  }
  return { T: within(T, ...d.T), p: within(p, ...d.p), place };
}

export function boundaryPointOf(r: Random, curve: BoundaryCurve) {
  return curve.atTemperature(temperatureOn(r, curve));
}
