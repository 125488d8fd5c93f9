import { NotConverged, OutOfRange } from '../errors.ts';
import {
  entropy,
  gibbs,
  pressure,
  pressureOverTemperature,
  pressureSlope,
} from '../models/fluidProperties.ts';
import { meltingPressure } from '../models/meltingPressure.ts';
import type { SolidModel } from '../models/solidGibbs.ts';
import { sublimationPressure } from '../models/sublimationPressure.ts';
import type { MeltingLine, SublimationLine } from '../substances/substance.ts';
import { densityAt } from './density.ts';
import type { Medium } from './medium.ts';
import { bracketedRoot } from './root.ts';

/** A point of a solid's boundary, with the fluid's density there where the fluid equation covers it. */
export interface SolidLinePoint {
  readonly T: number;
  readonly p: number;
  readonly rho: number | null;
}

const slopeOf = (line: MeltingLine): number => {
  const { Tmin, Tmax } = line.range;
  return meltingPressure(line.equation, Tmax) - meltingPressure(line.equation, Tmin);
};

/** Liquid density on a melting line, null beyond the pressure to which the fluid equation holds. */
function liquidDensity(m: Medium, T: number, p: number, start?: number): number | null {
  return p <= m.substance.fluid.validity.pmax ? densityAt(m, T, p, 'liquid', start) : null;
}

/**
 * Solid and fluid in equilibrium by Newton in the fluid's density and in the one of T (K) and p (Pa)
 * that is `free`, at once: equal pressure and Gibbs energy, both taken to first order about the
 * fluid's own pressure P, so g_l(p) = g_l + (p − P)/ρ. Quick from a neighbour or a published curve;
 * null where a step is long or leads off the fluid's side of the critical density.
 *
 * Error: steps shrink quadratically; the last one is below 1e-9 (of p: or 1 mPa on a melting line,
 * where the Gibbs energies' rounding leaves about as much).
 */
function solvedAtOnce(
  m: Medium,
  solid: SolidModel,
  start: { readonly T: number; readonly p: number; readonly rho: number },
  free: 'T' | 'p',
  fluid: 'liquid' | 'vapour',
): SolidLinePoint | null {
  let { T, p, rho } = start;
  const small = 1e-9;
  const floor = fluid === 'liquid' ? 1e-3 : 0;
  for (let i = 0; i < 8; i++) {
    const f = m.fluid.evaluate(T, rho);
    const slope = pressureSlope(f);
    if (!(slope > 0) || rho > m.critical.rho !== (fluid === 'liquid')) return null;
    const s = solid(T, p);
    const short = p - pressure(f);
    const gap = s.g - gibbs(f) - short / rho;
    const dT = free === 'T' ? gap / (-s.gT - entropy(f)) : 0;
    const dp = free === 'p' ? gap / (1 / rho - s.gp) : 0;
    const dRho = (short + dp - pressureOverTemperature(f) * dT) / slope;
    if (!(Math.abs(dT) < 0.05 * T && Math.abs(dRho) < 0.3 * rho && p + dp > 0)) return null;
    T += dT;
    p += dp;
    rho += dRho;
    if (
      Math.abs(dT) < small * T &&
      Math.abs(dp) < small * p + floor &&
      Math.abs(dRho) < small * rho
    )
      return { T, p, rho };
  }
  return null;
}

/**
 * Neighbouring melting lines meet at their triple point to within this, relative in pressure (the
 * published curves of water leave at most 3e-6); a pressure in the gap takes the nearer end.
 */
export const seam = 2e-5;

/** Ends of a melting line in pressure (Pa), closed on the fluid equation's triple point. */
const ends = new WeakMap<MeltingLine, readonly [number, number]>();
export function meltingPressureRange(m: Medium, line: MeltingLine): readonly [number, number] {
  const known = ends.get(line);
  if (known) return known;
  const at = [line.range.Tmin, line.range.Tmax].map((T) => meltingPoint(m, line, T).p) as [
    number,
    number,
  ];
  const range = at[0] < at[1] ? at : ([at[1], at[0]] as const);
  ends.set(line, range);
  return range;
}

/**
 * Point of a melting line at temperature T (K).
 *
 * Method: `equilibrium` lines solve g(solid) = g(liquid) from a neighbour by `solvedAtOnce`, else by
 * Newton in p, dp = −Δg/Δv, from the published curve; others evaluate the published curve.
 * Domain: the line's own range, ends included; elsewhere throws OutOfRange.
 */
export function meltingPoint(
  m: Medium,
  line: MeltingLine,
  T: number,
  start?: SolidLinePoint,
): SolidLinePoint {
  const { Tmin, Tmax } = line.range;
  if (!(T >= Tmin && T <= Tmax))
    throw new OutOfRange('T', T, { min: Tmin, max: Tmax }, line.equation.source, 'K');
  if (line.route !== 'equilibrium') {
    const p = meltingPressure(line.equation, T);
    return { T, p, rho: liquidDensity(m, T, p, start?.rho ?? undefined) };
  }
  if (Math.abs(T - m.triple.T) < 1e-9) return { T, p: m.triple.p, rho: m.triple.rhoL };
  const solid = m.solids.get(line.solid!)!.model;
  let p = meltingPressure(line.equation, T);
  let rho: number | undefined;
  // The published curve lies parallel to the solved one: a neighbour gives the distance.
  if (start && Math.abs(start.T - T) < 0.01 * T) {
    p += start.p - meltingPressure(line.equation, start.T);
    rho = start.rho ?? undefined;
  }
  if (rho !== undefined) {
    const solved = solvedAtOnce(m, solid, { T, p, rho }, 'p', 'liquid');
    if (solved) return solved;
  }
  let last = Infinity;
  for (let i = 0; i < 50; i++) {
    rho = densityAt(m, T, Math.max(p, 1), 'liquid', rho);
    m.fluid.evaluate(T, rho);
    const liquid = gibbs(m.fluid);
    const s = solid(T, p);
    const dp = -(s.g - liquid) / (s.gp - 1 / rho);
    p += dp;
    const size = Math.abs(dp);
    // Rounding of the Gibbs energies leaves about a millipascal; a relative stop is meaningless
    // near the triple point.
    if (size < 1e-3 + 1e-12 * Math.abs(p) || (size < 10 && size >= last)) {
      return { T, p, rho: densityAt(m, T, Math.max(p, 1), 'liquid', rho) };
    }
    last = size;
  }
  throw new NotConverged('melting pressure', { T });
}

/**
 * Point of a melting line at pressure p (Pa); the better-posed direction for ice Ih.
 *
 * Method: `equilibrium` lines from a neighbour by `solvedAtOnce`, else by Newton in T, dT = (g_s − g_l)/(s_s − s_l), held inside the line's
 * range; others invert the published curve in a bracket.
 * Domain: the pressures of the line's own range; elsewhere throws OutOfRange.
 */
export function meltingPointAtPressure(
  m: Medium,
  line: MeltingLine,
  p: number,
  start?: SolidLinePoint,
): SolidLinePoint {
  const { Tmin, Tmax } = line.range;
  const [pmin, pmax] = meltingPressureRange(m, line);
  if (!(p >= pmin * (1 - seam) && p <= pmax * (1 + seam)))
    throw new OutOfRange('p', p, { min: pmin, max: pmax }, line.equation.source, 'Pa');
  if (line.route !== 'equilibrium') {
    const inside = Math.min(pmax, Math.max(pmin, p));
    const T = bracketedRoot(
      (t, out) => {
        out.value = meltingPressure(line.equation, t) - inside;
        const step = 1e-6 * t;
        const other = t + step <= Tmax ? t + step : t - step;
        out.slope = (meltingPressure(line.equation, other) - inside - out.value) / (other - t);
      },
      Tmin,
      Tmax,
      { tolerance: 1e-15, name: 'melting temperature' },
    );
    return { T, p, rho: liquidDensity(m, T, p, start?.rho ?? undefined) };
  }
  const solid = m.solids.get(line.solid!)!.model;
  // The range ends where the published curve does; the solved line may pass it by a hair.
  const low = Tmin - 0.05;
  const high = Tmax + 0.05;
  if (start?.rho) {
    const solved = solvedAtOnce(m, solid, { T: start.T, p, rho: start.rho }, 'T', 'liquid');
    if (solved && solved.T >= low && solved.T <= high) return solved;
  }
  // From a far neighbour Newton may ask for a liquid where there is none.
  const near = start && Math.abs(start.p - p) < 0.1 * p ? start : undefined;
  let T = near?.T ?? startTemperature(line, p);
  let rho = near?.rho ?? undefined;
  let last = Infinity;
  for (let i = 0; i < 50; i++) {
    rho = densityAt(m, T, p, 'liquid', rho);
    m.fluid.evaluate(T, rho);
    const liquid = gibbs(m.fluid);
    const sL = m.fluid.R * (m.fluid.a0t + m.fluid.aRt - m.fluid.a0 - m.fluid.aR);
    const s = solid(T, p);
    // g falls with T by the entropy, so Δg/ΔT = −(s_s − s_l).
    const dT = (s.g - liquid) / (-s.gT - sL);
    const next = Math.min(high, Math.max(low, T + dT));
    const size = Math.abs(next - T);
    T = next;
    if (size < 1e-12 * T || (size < 1e-8 && size >= last))
      return { T, p, rho: densityAt(m, T, p, 'liquid', rho) };
    last = size;
  }
  throw new NotConverged('melting temperature', { p });
}

function startTemperature(line: MeltingLine, p: number): number {
  const { Tmin, Tmax } = line.range;
  const rising = slopeOf(line) > 0;
  let low = Tmin;
  let high = Tmax;
  for (let i = 0; i < 12; i++) {
    const T = 0.5 * (low + high);
    if (meltingPressure(line.equation, T) < p === rising) low = T;
    else high = T;
  }
  return 0.5 * (low + high);
}

/**
 * Point of a sublimation line at temperature T (K).
 *
 * Method: `equilibrium` lines solve g(solid) = g(vapour) by `solvedAtOnce`, else by Newton in ln p with the slope
 * (v_s − v_v) p, steps of at most 1; others evaluate the published curve.
 * Domain: the line's own range, ends included; elsewhere throws OutOfRange.
 */
export function sublimationPoint(
  m: Medium,
  line: SublimationLine,
  T: number,
  start?: SolidLinePoint,
): SolidLinePoint {
  const { Tmin, Tmax } = line.range;
  if (!(T >= Tmin && T <= Tmax))
    throw new OutOfRange('T', T, { min: Tmin, max: Tmax }, line.equation.source, 'K');
  if (line.route !== 'equilibrium') {
    const p = sublimationPressure(line.equation, T);
    return { T, p, rho: vapourDensity(m, T, p, p / (m.fluid.R * T)) };
  }
  if (Math.abs(T - m.triple.T) < 1e-9) return { T, p: m.triple.p, rho: m.triple.rhoV };
  const solid = m.solids.get(line.solid!)!.model;
  const RT = m.fluid.R * T;
  // The published curve lies parallel to the solved one, on a logarithmic scale.
  let p = sublimationPressure(line.equation, T);
  if (start) p *= start.p / sublimationPressure(line.equation, start.T);
  let rho = start?.rho ? (start.rho * start.T * p) / (T * start.p) : p / RT;
  const solved = solvedAtOnce(m, solid, { T, p, rho }, 'p', 'vapour');
  if (solved) return solved;
  let last = Infinity;
  for (let i = 0; i < 100; i++) {
    rho = vapourDensity(m, T, p, rho);
    m.fluid.evaluate(T, rho);
    const vapour = gibbs(m.fluid);
    const s = solid(T, p);
    const step = Math.max(-1, Math.min(1, -(s.g - vapour) / (p * (s.gp - 1 / rho))));
    p *= Math.exp(step);
    const size = Math.abs(step);
    if (size < 1e-13 || (size < 1e-8 && size >= last))
      return { T, p, rho: vapourDensity(m, T, p, rho) };
    last = size;
  }
  throw new NotConverged('sublimation pressure', { T });
}

/** Vapour on the sublimation line: thin enough for Newton from the last density. */
function vapourDensity(m: Medium, T: number, p: number, start: number): number {
  const RT = m.fluid.R * T;
  let rho = start;
  for (let i = 0; i < 30; i++) {
    m.fluid.residual(T, rho);
    const step = (rho * RT * (1 + m.fluid.aRd) - p) / (RT * (1 + 2 * m.fluid.aRd + m.fluid.aRdd));
    if (!(Math.abs(step) < 0.5 * rho)) return densityAt(m, T, p, 'vapour');
    rho -= step;
    if (Math.abs(step) <= 1e-15 * rho) return rho;
  }
  return rho;
}

/** Point of a sublimation line at pressure p (Pa); bracketed Newton of ln p over 1/T. */
export function sublimationPointAtPressure(
  m: Medium,
  line: SublimationLine,
  p: number,
): SolidLinePoint {
  const low = sublimationPoint(m, line, line.range.Tmin);
  const high = sublimationPoint(m, line, line.range.Tmax);
  if (!(p >= low.p * (1 - 1e-12) && p <= high.p * (1 + 1e-12)))
    throw new OutOfRange('p', p, { min: low.p, max: high.p }, line.equation.source, 'Pa');
  const log = Math.log(p);
  let solved = low;
  const x = bracketedRoot(
    (inverse, out) => {
      solved = sublimationPoint(m, line, Math.min(high.T, Math.max(low.T, 1 / inverse)));
      const step = 1e-4 * solved.T;
      const other = sublimationPoint(
        m,
        line,
        solved.T - step >= low.T ? solved.T - step : solved.T + step,
      );
      out.value = Math.log(solved.p) - log;
      out.slope = Math.log(other.p / solved.p) / (1 / other.T - 1 / solved.T);
    },
    1 / high.T,
    1 / low.T,
    { tolerance: 2e-15, name: 'sublimation at p' },
  );
  return { ...sublimationPoint(m, line, Math.min(high.T, Math.max(low.T, 1 / x))), p };
}
