import type { State } from '../equilibrium/state.ts';
import type { Encounter, NamedPhase } from './encounter.ts';
import type { Leg } from './problem.ts';
import type { Stand } from './stand.ts';

/** Why heat and work of a step are not told. */
export type HeatAbsent =
  /** A phase at one end, or on the way, has no published equation. */
  | { readonly code: 'noEquation'; readonly phase: NamedPhase }
  /** A fraction is open at the step's start or end. */
  | { readonly code: 'openFraction'; readonly boundary: string; readonly at: 'start' | 'end' }
  /** How much is left of the mass is open since an earlier step. */
  | { readonly code: 'openMass' }
  | { readonly code: 'notReached' };

/** What a step came to; energies in J and masses in kg, per kg at the path's start. */
export interface Outcome {
  readonly end: Stand;
  readonly legs: readonly Leg[];
  readonly encounters: readonly Encounter[];
  /** The phases gone through off the boundaries, in order. */
  readonly phases: readonly NamedPhase[];
  /** Heat taken in; null where `heatAbsent` says why. */
  readonly heat: number | null;
  readonly heatAbsent: HeatAbsent | null;
  /** Work done on the substance, by the balance of internal energy. */
  readonly work: number | null;
  /** What left as vapour: mass, the enthalpy it took along, and its heat of vaporisation. Null where none may leave. */
  readonly lost: {
    readonly mass: number | null;
    readonly enthalpy: number | null;
    readonly latent: number | null;
  } | null;
}

/** Why a property of a state is not known. */
export function absence(state: State, on: string | null, at: 'start' | 'end'): HeatAbsent {
  const blank = state.parts.find((part) => part.properties === null);
  if (blank) return { code: 'noEquation', phase: { phase: blank.phase, solid: blank.solid } };
  return { code: 'openFraction', boundary: on ?? 'saturation', at };
}
