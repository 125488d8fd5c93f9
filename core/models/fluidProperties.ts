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
 * Source: relations as in IAPWS R6-95(2018), table 3. cp is null where ∂p/∂ρ is not positive (at
 * the critical point it is infinite); the speed of sound likewise.
 */
export function fluidProperties(f: Helmholtz): Properties {
  const { R, T } = f;
  const slope = 1 + 2 * f.aRd + f.aRdd;
  const cross = 1 + f.aRd - f.aRdt;
  const cv = -R * (f.a0tt + f.aRtt);
  const cp = cv + (R * cross * cross) / slope;
  const w2 = R * T * (slope + (cross * cross * R) / cv);
  return {
    rho: f.delta * f.rhor,
    h: enthalpy(f),
    s: entropy(f),
    u: R * T * (f.a0t + f.aRt),
    cp: slope > 0 ? finite(cp) : null,
    cv: finite(cv),
    w: w2 > 0 && slope > 0 ? Math.sqrt(w2) : null,
  };
}
