import { Helmholtz } from '../models/helmholtz.ts';
import { solidModel } from '../models/solid.ts';
import type { SolidModel } from '../models/solidGibbs.ts';
import type { SolidEquation, Substance } from '../substances/substance.ts';
import { saturationAt, type Saturation } from './saturation.ts';

/** A substance whose equations are ready to be evaluated. */
export interface Medium {
  readonly substance: Substance;
  readonly fluid: Helmholtz;
  readonly solids: ReadonlyMap<
    string,
    { readonly model: SolidModel; readonly equation: SolidEquation }
  >;
  /** Critical point of the fluid equation, where the dome closes. */
  readonly critical: { readonly T: number; readonly p: number; readonly rho: number };
  /** Triple point with the pressure that the fluid equation itself has there. */
  readonly triple: Saturation;
  /** Last saturation state solved, for the next call at the same temperature. */
  lastSaturation: Saturation | null;
}

const known = new WeakMap<Substance, Medium>();

/** The substance made ready; the same object for the same substance. */
export function medium(substance: Substance): Medium {
  const ready = known.get(substance);
  if (ready) return ready;
  const made: Medium = {
    substance,
    fluid: new Helmholtz(substance.fluid),
    solids: new Map(
      substance.solids.map((equation) => [
        equation.solid,
        { model: solidModel(equation), equation },
      ]),
    ),
    critical: substance.critical.equation,
    triple: { T: NaN, p: NaN, rhoL: NaN, rhoV: NaN },
    lastSaturation: null,
  };
  const whole = Object.assign(made, { triple: saturationAt(made, substance.triplePoints[0].T) });
  known.set(substance, whole);
  return whole;
}
