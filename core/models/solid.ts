import type { SolidEquation } from '../substances/substance.ts';
import { dryIce } from './dryIce.ts';
import type { Properties } from './fluidProperties.ts';
import { iceIh } from './iceIh.ts';
import type { SolidGibbs, SolidModel } from './solidGibbs.ts';

/** The evaluator of a solid's published equation. */
export function solidModel(equation: SolidEquation): SolidModel {
  return equation.kind === 'iceIh' ? iceIh(equation) : dryIce(equation);
}

/**
 * Properties of the solid at (T, p). The speed of sound in a solid depends on direction and shear,
 * of which a Gibbs energy says nothing: null.
 */
export function solidProperties(T: number, p: number, g: Readonly<SolidGibbs>): Properties {
  const h = g.g - T * g.gT;
  const cp = -T * g.gTT;
  return {
    rho: 1 / g.gp,
    h,
    s: -g.gT,
    u: h - p * g.gp,
    cp,
    cv: cp + (T * g.gTp * g.gTp) / g.gpp,
    w: null,
  };
}
