import { auxiliary } from '../../models/auxiliary.ts';
import {
  entropy,
  gibbs,
  pressure,
  pressureOverTemperature,
  pressureSlope,
} from '../../models/fluidProperties.ts';
import { meltingPressure } from '../../models/meltingPressure.ts';
import type { Medium } from '../medium.ts';
import { fluidName, maybeSolidBelow, meltingLineAt } from '../phase.ts';
import { guessTemperature, type Saturation } from '../saturation.ts';
import { saturatedPhases, type State } from '../state.ts';
import { caloric, fluidNewton, type Caloric } from './fluidAt.ts';
import { mixture, pure } from './mixture.ts';

/** Below this share of the critical pressure the saturation line is smooth enough for plain Newton. */
const smooth = 0.8;

/**
 * Saturation at pressure p (Pa) by Newton in T and both densities at once, pressures and Gibbs energies
 * taken to first order about each phase's own pressure. Null where a step is long: then the bracketed
 * search of `saturationAtPressure` must find it.
 */
export function quickSaturation(m: Medium, p: number): Saturation | null {
  if (!(p > m.triple.p && p < smooth * m.critical.p)) return null;
  const { fluid, substance, critical } = m;
  let T = guessTemperature(m, Math.log(p));
  let rhoL = auxiliary(substance.saturation.liquidDensity, T);
  let rhoV = auxiliary(substance.saturation.vapourDensity, T);
  for (let i = 0; i < 8; i++) {
    fluid.evaluate(T, rhoL);
    const shortL = p - pressure(fluid);
    const gL = gibbs(fluid) + shortL / rhoL;
    const sL = entropy(fluid);
    const [slopeL, crossL] = [pressureSlope(fluid), pressureOverTemperature(fluid)];
    fluid.evaluate(T, rhoV);
    const shortV = p - pressure(fluid);
    const gV = gibbs(fluid) + shortV / rhoV;
    const sV = entropy(fluid);
    const [slopeV, crossV] = [pressureSlope(fluid), pressureOverTemperature(fluid)];
    const dT = (gV - gL) / (sV - sL);
    const dL = (shortL - crossL * dT) / slopeL;
    const dV = (shortV - crossV * dT) / slopeV;
    const size = Math.max(Math.abs(dT) / T, Math.abs(dL) / rhoL, Math.abs(dV) / rhoV);
    if (!(slopeL > 0 && slopeV > 0 && size < 0.05)) return null;
    T += dT;
    rhoL += dL;
    rhoV += dV;
    if (size < 1e-8)
      return rhoL > critical.rho && rhoV < critical.rho && T > m.triple.T
        ? { T, p, rhoL, rhoV }
        : null;
  }
  return null;
}

/** Whether the published curves alone show, with 5 % to spare, that nothing is frozen at (T, p). */
function surelyFluid(m: Medium, T: number, p: number): boolean {
  if (p < m.triple.p) return T >= m.triple.T;
  const line = meltingLineAt(m, p);
  if (!line) return T >= maybeSolidBelow(m, p);
  const { Tmin, Tmax } = line.range;
  if (T >= Tmax + 0.1) return true;
  // Next to an end of the line only the line itself tells.
  if (!(T > Tmin && T < Tmax)) return false;
  const at = meltingPressure(line.equation, T);
  const rising = meltingPressure(line.equation, Tmax) > meltingPressure(line.equation, Tmin);
  return rising ? at > 1.05 * p : at < 0.95 * p;
}

/** A fluid by Newton from a start, if it is known to be one by its temperature. */
function fluid(
  m: Medium,
  of: Caloric,
  p: number,
  value: number,
  start: { readonly T: number; readonly rho: number },
  belongs: (found: { readonly T: number; readonly rho: number }) => boolean,
): State | null {
  const found = fluidNewton(m, of, p, value, start);
  if (!found || !belongs(found) || !(found.T <= m.substance.fluid.validity.Tmax)) return null;
  const { T, rho } = found;
  if (!surelyFluid(m, T, p)) return null;
  return pure(m, { phase: fluidName(m, T, p), solid: null, T, p, rho });
}

/**
 * The state of given pressure and enthalpy or entropy where plain Newton finds it in a few steps and
 * the result itself shows that it is the right one; null elsewhere.
 */
export function quickState(m: Medium, of: Caloric, p: number, value: number): State | null {
  const { critical, triple, substance } = m;
  const { R } = m.fluid;
  if (p > 0 && p < triple.p * (1 - 1e-8)) {
    const T = Math.min(substance.fluid.validity.Tmax, 1.2 * triple.T);
    const rho = p / (R * T);
    return fluid(m, of, p, value, { T, rho }, (found) => found.rho <= triple.rhoV);
  }
  if (p > triple.p * (1 + 1e-8) && p < smooth * critical.p) {
    const s = quickSaturation(m, p);
    if (!s) return null;
    const vapour = m.fluid.evaluate(s.T, s.rhoV);
    const atV = caloric(vapour, of);
    if (value > atV) {
      const cv = -R * (vapour.a0tt + vapour.aRtt);
      const cross = 1 + vapour.aRd - vapour.aRdt;
      const cp = cv + (R * cross * cross) / (1 + 2 * vapour.aRd + vapour.aRdd);
      const rise = (value - atV) / Math.max(cp, 1.2 * (cv + R));
      const T = Math.min(
        substance.fluid.validity.Tmax,
        of === 'h' ? s.T + rise : s.T * Math.exp(Math.min(rise, 3)),
      );
      const start = { T, rho: (s.rhoV * s.T) / T };
      return fluid(m, of, p, value, start, ({ T, rho }) => T >= s.T && rho <= s.rhoV);
    }
    const liquid = m.fluid.evaluate(s.T, s.rhoL);
    const atL = caloric(liquid, of);
    if (value >= atL) {
      const [a, b] = saturatedPhases(s);
      return mixture(m, { kind: 'plateau', T: s.T, p, sides: [a, b] }, of, value);
    }
    const cold = Math.max(substance.fluid.validity.Tmin, 0.5 * s.T);
    const fall = (value - atL) / (-1.2 * R * (liquid.a0tt + liquid.aRtt));
    const T = Math.max(cold, of === 'h' ? s.T + fall : s.T * Math.exp(Math.max(fall, -1)));
    const start = { T, rho: auxiliary(substance.saturation.liquidDensity, T) };
    return fluid(m, of, p, value, start, (found) => insideLiquid(m, found, s.T));
  }
  if (p > critical.p && p <= substance.fluid.validity.pmax) {
    const atCritical = caloric(m.fluid.evaluate(critical.T, critical.rho), of);
    if (value < atCritical) {
      const T = Math.max(1.02 * triple.T, 0.75 * critical.T);
      const start = { T, rho: 1.02 * auxiliary(substance.saturation.liquidDensity, T) };
      return fluid(m, of, p, value, start, (found) => insideLiquid(m, found, critical.T));
    }
    const T = 1.3 * critical.T;
    const start = { T, rho: Math.min(p / (R * T), 1.5 * critical.rho) };
    return fluid(m, of, p, value, start, (found) => found.T > critical.T * 1.001);
  }
  return null;
}

/** A liquid colder than its boiling point and denser than the dome. */
function insideLiquid(
  m: Medium,
  { T, rho }: { readonly T: number; readonly rho: number },
  boiling: number,
): boolean {
  return (
    T <= boiling &&
    T < 0.97 * m.critical.T &&
    rho >= 0.985 * auxiliary(m.substance.saturation.liquidDensity, T)
  );
}
