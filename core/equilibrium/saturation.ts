import { NotConverged, OutOfRange } from '../errors.ts';
import { auxiliary } from '../models/auxiliary.ts';
import type { Medium } from './medium.ts';
import { bracketedRoot } from './root.ts';

/** Liquid and vapour in equilibrium: K, Pa, kg/m³. */
export interface Saturation {
  readonly T: number;
  readonly p: number;
  readonly rhoL: number;
  readonly rhoV: number;
}

/** Closer to the critical temperature (K) than this, both densities are the critical one. */
export const criticalCap = 1e-4;

/**
 * Lowest temperature at which the saturation line of the supercooled liquid is offered as a guide
 * for solvers; what is drawn ends at the triple point.
 */
const lowest = (m: Medium): number => Math.min(m.substance.fluid.validity.Tmin, 0.85 * triple(m));
const triple = (m: Medium): number => m.substance.triplePoints[0].T;

/**
 * Saturation at temperature T (K): equal pressure and Gibbs energy of liquid and vapour.
 *
 * Method: Newton in both densities on J = δ(1 + δ αR_δ) and K = δ αR_δ + αR + ln δ from the
 * published auxiliary equations, steps held so that neither density leaves its side of the critical
 * one; should that fail, a bracketed search for the pressure at which both Gibbs energies agree.
 * The pressure is taken from the vapour side, where no digits cancel.
 * Domain: from 15 % below the triple temperature (supercooled liquid, a guide for solvers only) to
 * the critical temperature; elsewhere throws OutOfRange. Within 1e-4 K of the critical temperature
 * both densities are the critical one and the pressure is interpolated, so that it never passes
 * what the liquid's or the vapour's own isotherm reaches.
 * Source of the method: R. Akasaka, J. Therm. Sci. Technol. 3, 442 (2008).
 */
export function saturationAt(m: Medium, T: number, start?: Saturation): Saturation {
  const { critical, fluid } = m;
  if (m.lastSaturation?.T === T) return m.lastSaturation;
  if (!(T >= lowest(m) && T <= critical.T))
    throw new OutOfRange(
      'T',
      T,
      { min: triple(m), max: critical.T },
      m.substance.fluid.validity.source,
      'K',
    );
  const capT = critical.T - criticalCap;
  if (T > capT) {
    const share = (critical.T - T) / (critical.T - capT);
    const p = critical.p - share * (critical.p - saturationAt(m, capT).p);
    return { T, p, rhoL: critical.rho, rhoV: critical.rho };
  }

  const dc = critical.rho / fluid.rhor;
  const l = start?.rhoL ?? auxiliary(m.substance.saturation.liquidDensity, T);
  const v = start?.rhoV ?? auxiliary(m.substance.saturation.vapourDensity, T);
  const apart = (rho: number): number => rho / critical.rho - 1;
  return (
    // Where the equation's critical point is not the published one, an auxiliary equation ends early.
    (apart(l) > 1e-9 && apart(v) < -1e-9 && v > 0
      ? newton(m, T, l / fluid.rhor, v / fluid.rhor)
      : null) ??
    (T > 0.98 * critical.T
      ? newton(m, T, dc * (1 + halfGap(m, T)), dc * (1 - halfGap(m, T)))
      : null) ??
    saturationByBracket(m, T)
  );
}

/**
 * Half the gap between the saturated densities next to the critical point, relative to the critical
 * density: the isotherm's slope is taken as a parabola over density, whose zeros are the spinodals;
 * √3 times as far out pressure and Gibbs energy agree on both sides.
 */
function halfGap(m: Medium, T: number): number {
  const { fluid, critical } = m;
  const slope = (rho: number): number => {
    fluid.residual(T, rho);
    return 1 + 2 * fluid.aRd + fluid.aRdd;
  };
  let gap = 2 * Math.sqrt(1 - T / critical.T);
  const middle = slope(critical.rho);
  for (let i = 0; i < 8; i++) {
    const bend =
      (slope(critical.rho * (1 + gap)) + slope(critical.rho * (1 - gap)) - 2 * middle) /
      (2 * gap * gap);
    const next = Math.sqrt(Math.max(0, (-3 * middle) / bend));
    if (!(next > 0)) break;
    gap = Math.min(0.6, next);
  }
  return gap;
}

/** Newton in both reduced densities from a start; null where it fails. */
function newton(m: Medium, T: number, l: number, v: number): Saturation | null {
  const { critical, fluid } = m;
  const rhor = fluid.rhor;
  const dc = critical.rho / rhor;
  const x = 1 - T / critical.T;
  const tolerance = 1e-12 + 1e-14 / x;
  let last = Infinity;
  for (let i = 0; i < 60; i++) {
    fluid.residual(T, l * rhor);
    const Jl = l * (1 + fluid.aRd);
    const Kl = fluid.aRd + fluid.aR + Math.log(l);
    const a = 1 + 2 * fluid.aRd + fluid.aRdd;
    fluid.residual(T, v * rhor);
    const Jv = v * (1 + fluid.aRd);
    const Kv = fluid.aRd + fluid.aR + Math.log(v);
    const b = 1 + 2 * fluid.aRd + fluid.aRdd;
    const r = Jv - Jl;
    const B = (Kv - Kl - r / l) / (1 / l - 1 / v);
    let dl = (B + r) / a;
    let dv = B / b;
    if (!Number.isFinite(dl) || !Number.isFinite(dv)) break;
    let size = Math.max(Math.abs(dl) / l, Math.abs(dv) / v);
    if (size < tolerance || (size < 1e-7 && size >= last)) {
      // A bad start can lead to a second pair of equal p and g, on branches that are unstable.
      if (!(a > 0 && b > 0)) break;
      v += dv;
      l += dl;
      return settle(m, T, l, v);
    }
    last = size;
    while (!(l + dl > dc) || !(v + dv < dc) || !(v + dv > 0.2 * v) || l + dl > 1.5 * l) {
      dl *= 0.5;
      dv *= 0.5;
      size *= 0.5;
      if (size < 1e-16) break;
    }
    l += dl;
    v += dv;
  }
  return null;
}

function settle(m: Medium, T: number, l: number, v: number): Saturation | null {
  const dc = m.critical.rho / m.fluid.rhor;
  if (!(l > dc && v < dc && v > 0 && l - v > 1e-6)) return null;
  const rhoV = v * m.fluid.rhor;
  m.fluid.residual(T, rhoV);
  const p = rhoV * m.fluid.R * T * (1 + m.fluid.aRd);
  const solved = { T, p, rhoL: l * m.fluid.rhor, rhoV };
  m.lastSaturation = solved;
  return solved;
}

/**
 * Saturation at T (K) without a start: the pressure at which the two branches have one Gibbs energy,
 * searched between the spinodals. Slow; the way out of `saturationAt` where Newton fails.
 *
 * Domain: as `saturationAt`, up to 0.01 K below the critical temperature.
 */
export function saturationByBracket(m: Medium, T: number): Saturation {
  const { fluid, critical } = m;
  const RT = fluid.R * T;
  const slope = (rho: number): number => {
    fluid.residual(T, rho);
    return 1 + 2 * fluid.aRd + fluid.aRdd;
  };
  const p = (rho: number): number => {
    fluid.residual(T, rho);
    return rho * RT * (1 + fluid.aRd);
  };
  const spinodal = (from: number, factor: number): number => {
    let good = from;
    let bad = from;
    let last = Infinity;
    for (let i = 0; i < 4000; i++) {
      bad = good * factor;
      const next = slope(bad);
      if (next <= 0) break;
      // Between the branches some equations swing far up again: the branch ends where, once soft, it
      // stiffens.
      if (next > last && last < 0.9) return good;
      last = next;
      good = bad;
      if ((factor > 1 && good > critical.rho) || (factor < 1 && good < critical.rho)) break;
    }
    for (let i = 0; i < 60; i++) {
      const mid = 0.5 * (good + bad);
      if (slope(mid) > 0) good = mid;
      else bad = mid;
    }
    return good;
  };
  const topV = spinodal(critical.rho * 1e-12, 1.02);
  const bottomL = spinodal(auxiliary(m.substance.saturation.liquidDensity, T) * 1.02, 0.998);
  const high = p(topV);
  const low = Math.max(p(bottomL), high * 1e-14);
  const onBranch = (target: number, from: number, to: number): number =>
    bracketedRoot(
      (rho, out) => {
        out.value = p(rho) - target;
        out.slope = RT * (1 + 2 * fluid.aRd + fluid.aRdd);
      },
      from,
      to,
      { tolerance: 1e-15 },
    );
  const K = (rho: number): number => {
    fluid.residual(T, rho);
    return fluid.aRd + fluid.aR + Math.log(rho);
  };
  let rhoL = NaN;
  let rhoV = NaN;
  const found = bracketedRoot(
    (log, out) => {
      const target = Math.exp(log);
      rhoV = onBranch(target, 0, topV);
      // Far beyond the densest liquid some equations turn over: the bracket ends once p is passed.
      let dense = bottomL;
      for (let i = 0; i < 100 && p(dense) <= target; i++) dense *= 1.02;
      rhoL = onBranch(target, bottomL, dense);
      out.value = K(rhoL) - K(rhoV);
      out.slope = (target / RT) * (1 / rhoL - 1 / rhoV);
    },
    Math.log(low) + 1e-12,
    Math.log(high) - 1e-12,
    { tolerance: 1e-15, name: 'saturation' },
  );
  if (!(rhoL > critical.rho && rhoV < critical.rho)) throw new NotConverged('saturation', { T });
  const solved = { T, p: Math.exp(found), rhoL, rhoV };
  m.lastSaturation = solved;
  return solved;
}

/**
 * Slope of the saturation line (Pa/K) by Clausius and Clapeyron at a solved point, from residual
 * entropies alone, so that the reference state never enters.
 */
export function saturationSlope(m: Medium, at: Saturation): number {
  const { fluid } = m;
  fluid.residual(at.T, at.rhoL);
  const sL = fluid.aRt - fluid.aR - Math.log(at.rhoL);
  fluid.residual(at.T, at.rhoV);
  const sV = fluid.aRt - fluid.aR - Math.log(at.rhoV);
  return (fluid.R * (sV - sL)) / (1 / at.rhoV - 1 / at.rhoL);
}

/**
 * Saturation at pressure p (Pa).
 *
 * Method: bracketed Newton of ln p over 1/T from the auxiliary vapour pressure, each step a solved
 * saturation state.
 * Domain: triple to critical pressure of the equations, ends included; elsewhere throws OutOfRange.
 */
export function saturationAtPressure(m: Medium, p: number, start?: Saturation): Saturation {
  const { critical, triple } = m;
  if (!(p >= triple.p * (1 - 1e-12) && p <= critical.p))
    throw new OutOfRange(
      'p',
      p,
      { min: triple.p, max: critical.p },
      m.substance.fluid.validity.source,
      'Pa',
    );
  if (p <= triple.p) return triple;
  const capT = critical.T - criticalCap;
  const cap = saturationAt(m, capT);
  if (p >= cap.p) {
    const T = capT + (criticalCap * (p - cap.p)) / Math.max(critical.p - cap.p, 1e-300);
    return { T: Math.min(T, critical.T), p, rhoL: critical.rho, rhoV: critical.rho };
  }
  const log = Math.log(p);
  let solved = start ?? cap;
  const x = bracketedRoot(
    (inverse, out) => {
      solved = saturationAt(m, 1 / inverse);
      out.value = Math.log(solved.p) - log;
      out.slope = -saturationSlope(m, solved) / (solved.p * inverse * inverse);
    },
    1 / capT,
    1 / triple.T,
    {
      start: 1 / (start?.T ?? guessTemperature(m, log)),
      tolerance: 2e-15,
      name: 'saturation at p',
    },
  );
  const T = 1 / x;
  solved = saturationAt(m, T);
  return { ...solved, p };
}

/** Boiling temperature (K) by the published vapour pressure alone, a start for solvers; takes ln p. */
export function guessTemperature(m: Medium, log: number): number {
  const equation = m.substance.saturation.pressure;
  let low = m.triple.T;
  let high = m.critical.T - criticalCap;
  let atLow = Math.log(auxiliary(equation, low));
  let atHigh = Math.log(auxiliary(equation, high));
  let x = 1 / low;
  for (let i = 0; i < 5; i++) {
    const share = Math.min(1, Math.max(0, (log - atLow) / (atHigh - atLow)));
    x = 1 / low + share * (1 / high - 1 / low);
    const value = Math.log(auxiliary(equation, 1 / x));
    if (Math.abs(value - log) < 1e-6) break;
    if (value < log) [low, atLow] = [1 / x, value];
    else [high, atHigh] = [1 / x, value];
  }
  return 1 / x;
}
