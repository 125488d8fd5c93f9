import type { Helmholtz } from '../../models/helmholtz.ts';
import {
  enthalpy,
  entropy,
  pressure,
  pressureOverTemperature,
  pressureSlope,
} from '../../models/fluidProperties.ts';
import type { Medium } from '../medium.ts';

/** A property that rises with temperature at constant pressure in every phase. */
export type Caloric = 'h' | 's';

/** J/kg or J/(kg K) at the fluid's last evaluated (T, ρ). */
export const caloric = (f: Helmholtz, of: Caloric): number =>
  of === 'h' ? enthalpy(f) : entropy(f);

/** Scale on which values of a property are compared: R·Tc for enthalpy, R for entropy. */
export const caloricScale = (m: Medium, of: Caloric): number =>
  m.fluid.R * (of === 'h' ? m.critical.T : 1);

/**
 * Temperature and density of the fluid of given pressure p (Pa) and enthalpy (J/kg) or entropy
 * (J/(kg K)), by Newton in both at once from a start; regular at the critical point too.
 *
 * Null where a step is long, or the result is unstable or misses the givens by more than 1e-11: then
 * a bracket must find it. Which root was found is for the caller to check by T and ρ.
 */
export function fluidNewton(
  m: Medium,
  of: Caloric,
  p: number,
  value: number,
  start: { readonly T: number; readonly rho: number },
): { readonly T: number; readonly rho: number } | null {
  const { fluid, critical } = m;
  const { R } = fluid;
  const { Tmax } = m.substance.fluid.validity;
  const scale = caloricScale(m, of);
  let { T, rho } = start;
  let last = Infinity;
  for (let i = 0; i < 25; i++) {
    const f = fluid.evaluate(T, rho);
    const slope = pressureSlope(f);
    const cross = pressureOverTemperature(f);
    const short = p - pressure(f);
    const lack = value - caloric(f, of);
    const cv = -R * (f.a0tt + f.aRtt);
    const overT = of === 'h' ? cv + R * (1 + f.aRd - f.aRdt) : cv / T;
    const overRho = of === 'h' ? ((R * T) / rho) * (f.aRd + f.aRdd + f.aRdt) : -cross / (rho * rho);
    const det = cross * overRho - slope * overT;
    let dT = (short * overRho - slope * lack) / det;
    let dRho = (cross * lack - overT * short) / det;
    if (!Number.isFinite(dT) || !Number.isFinite(dRho)) return null;
    const step = Math.max(Math.abs(dT) / T, Math.abs(dRho) / rho);
    const near = Math.abs(T / critical.T - 1) < 0.03;
    const settled = step < (near ? 1e-13 : 3e-9) || (step < 1e-8 && step >= last);
    if (settled) {
      if (!near) {
        T += dT;
        rho += dRho;
      }
      const rounding = 1e-14 * rho * R * T * (1 + Math.abs(f.aRd));
      const met =
        Math.abs(short) <= (near ? 1e-11 * p + rounding : Infinity) &&
        Math.abs(lack) <= (near ? 1e-11 * scale : Infinity);
      return met && slope > 0 ? { T, rho } : null;
    }
    last = step;
    const most = Math.max(Math.abs(dT) / (0.25 * T), Math.abs(dRho) / (0.4 * rho));
    if (most > 1) {
      dT /= most;
      dRho /= most;
    }
    T = Math.min(T + dT, 1.5 * Tmax);
    rho += dRho;
  }
  return null;
}
