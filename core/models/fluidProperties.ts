import type { Helmholtz } from './helmholtz.ts';

/** What an equation of state says of one phase, per kilogram, in SI. */
export interface Properties {
  readonly rho: number;
  readonly h: number;
  readonly s: number;
  readonly u: number;
  /** Absent (null) where the sources define none or it is infinite. */
  readonly cp: number | null;
  readonly cv: number | null;
  /** Speed of sound in m/s. */
  readonly w: number | null;
}

/** Pressure (Pa) at the last evaluated T and ρ. */
export const pressure = (f: Helmholtz): number => f.delta * f.rhor * f.R * f.T * (1 + f.aRd);

/** ∂p/∂ρ at constant T (J/kg) at the last evaluated T and ρ. */
export const pressureSlope = (f: Helmholtz): number => f.R * f.T * (1 + 2 * f.aRd + f.aRdd);

/** ∂p/∂T at constant ρ (Pa/K) at the last evaluated T and ρ. */
export const pressureOverTemperature = (f: Helmholtz): number =>
  f.delta * f.rhor * f.R * (1 + f.aRd - f.aRdt);

/** Specific Gibbs energy (J/kg); needs `evaluate`. */
export const gibbs = (f: Helmholtz): number => f.R * f.T * (1 + f.a0 + f.aR + f.aRd);

/** Specific enthalpy (J/kg); needs `evaluate`. */
export const enthalpy = (f: Helmholtz): number => f.R * f.T * (1 + f.a0t + f.aRt + f.aRd);

/** Specific entropy (J/(kg K)); needs `evaluate`. */
export const entropy = (f: Helmholtz): number => f.R * (f.a0t + f.aRt - f.a0 - f.aR);

const finite = (x: number): number | null => (Number.isFinite(x) && x > 0 ? x : null);

/**
 * Properties of the fluid at the last evaluated (T, ρ), as a fresh record.
 *
 * Source: relations as in IAPWS R6-95(2018), table 3. Where ∂p/∂ρ vanishes to rounding, at the
 * critical point, cp and cv are infinite and the speed of sound is zero: null.
 */
export function fluidProperties(f: Helmholtz): Properties {
  const { R, T } = f;
  const slope = 1 + 2 * f.aRd + f.aRdd;
  // Rounding leaves about 1e-14 of the terms that cancel at the critical point.
  const critical = slope < 1e-11;
  const cross = 1 + f.aRd - f.aRdt;
  const cv = -R * (f.a0tt + f.aRtt);
  const cp = cv + (R * cross * cross) / slope;
  const w2 = R * T * (slope + (cross * cross * R) / cv);
  return {
    rho: f.delta * f.rhor,
    h: enthalpy(f),
    s: entropy(f),
    u: R * T * (f.a0t + f.aRt),
    cp: critical ? null : finite(cp),
    cv: critical ? null : finite(cv),
    w: critical || !(w2 > 0) ? null : Math.sqrt(w2),
  };
}
