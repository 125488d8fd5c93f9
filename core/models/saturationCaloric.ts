import { OutOfRange } from '../errors.ts';
import type { AuxiliaryEquation, Substance } from '../substances/substance.ts';
import { auxiliary } from './auxiliary.ts';

/** Enthalpy (J/kg) and entropy (J/(kg K)) of saturated liquid and vapour from auxiliary equations. */
export interface SaturationCaloric {
  readonly alpha: number;
  readonly phi: number;
  /** Slope of the auxiliary vapour-pressure equation, Pa/K. */
  readonly dpdT: number;
  readonly hL: number;
  readonly hV: number;
  readonly sL: number;
  readonly sV: number;
}

const vapourPressureSlope = (e: AuxiliaryEquation, p: number, T: number): number => {
  const x = 1 - T / e.reducing.T;
  let sum = Math.log(p / e.reducing.y);
  e.a.forEach((a, i) => (sum += a * e.t[i]! * x ** (e.t[i]! - 1)));
  return (-p / T) * sum;
};

/**
 * Caloric values on the saturation line at T (K), apart from the fluid equation: a check, never a
 * result. Null where the substance has no such equations.
 *
 * Domain: the equation's range, ends included; elsewhere, NaN included, throws OutOfRange.
 * Source: IAPWS SR1-86(1992), equations 4 to 9; vapour pressure and densities by equations 1 to 3.
 */
export function saturationCaloric(
  { pressure, liquidDensity, vapourDensity, caloric }: Substance['saturation'],
  T: number,
): SaturationCaloric | null {
  if (!caloric) return null;
  const { Tmin, Tmax } = caloric.range;
  if (!(T >= Tmin && T <= Tmax))
    throw new OutOfRange('T', T, { min: Tmin, max: Tmax }, caloric.source, 'K');
  const { alpha0, dAlpha, dPhi } = caloric;
  const [d1, d2, d3, d4, d5] = caloric.d;
  const th = T / caloric.T;
  const alpha =
    alpha0 * (dAlpha + d1 * th ** -19 + d2 * th + d3 * th ** 4.5 + d4 * th ** 5 + d5 * th ** 54.5);
  const phi =
    (alpha0 / caloric.T) *
    (dPhi +
      (19 / 20) * d1 * th ** -20 +
      d2 * Math.log(th) +
      (9 / 7) * d3 * th ** 3.5 +
      (5 / 4) * d4 * th ** 4 +
      (109 / 107) * d5 * th ** 53.5);
  const dpdT = vapourPressureSlope(pressure, auxiliary(pressure, T), T);
  const pullL = dpdT / auxiliary(liquidDensity, T);
  const pullV = dpdT / auxiliary(vapourDensity, T);
  return {
    alpha,
    phi,
    dpdT,
    hL: alpha + T * pullL,
    hV: alpha + T * pullV,
    sL: phi + pullL,
    sV: phi + pullV,
  };
}
