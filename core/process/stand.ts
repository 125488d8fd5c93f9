import type { Medium } from '../equilibrium/medium.ts';
import { mixedState, stateAt, type Part, type State } from '../equilibrium/state.ts';
import { Undetermined } from '../errors.ts';
import { boundaryCurves, type BoundaryCurve, type BoundaryPoint } from '../map/boundary.ts';

/** Where a path stands: its state, the boundary it lies on and the mass that is left. */
export interface Stand {
  readonly state: State;
  /** Id of the boundary; null off all boundaries. */
  readonly on: string | null;
  /** kg per kg at the path's start; null where it is open. */
  readonly mass: number | null;
}

/** Share of the phase on a boundary's second side: vapour, or on a melting line the liquid. */
export type Share = number | readonly [number, number];

/** A boundary by its id; throws RangeError for one that the substance does not have. */
export function curveOf(m: Medium, id: string): BoundaryCurve {
  const curve = boundaryCurves(m).find((c) => c.id === id);
  if (!curve) throw new RangeError(`no boundary ${id}`);
  return curve;
}

export const hasVapour = (curve: BoundaryCurve): boolean => curve.kind !== 'melting';

/** 0 or 1: the side of the boundary to which a phase belongs. */
export const sideOf = (curve: BoundaryCurve, phase: Part['phase']): 0 | 1 =>
  (curve.kind === 'saturation' ? phase === 'vapour' : phase !== 'solid') ? 1 : 0;

/** The share of the second side in a state on the boundary. */
export function shareOf(curve: BoundaryCurve, state: State): Share {
  const second = state.parts.find((part) => sideOf(curve, part.phase) === 1);
  return second ? second.fraction : 0;
}

/** The stand at a point of a boundary; T and p stay to the last digit as `at` has them. */
export function standOn(
  m: Medium,
  curve: BoundaryCurve,
  at: BoundaryPoint,
  share: Share,
  mass: number | null,
): Stand {
  const state = mixedState(m, [at.sides[0]!, at.sides[1]!], share);
  return { state: { ...state, T: at.T, p: at.p }, on: curve.id, mass };
}

/** The stand at T (K) and p (Pa); on a boundary its fractions are open. Throws as `stateAt` does. */
export function standAt(m: Medium, T: number, p: number, mass: number | null): Stand {
  try {
    return { state: stateAt(m, T, p), on: null, mass };
  } catch (error) {
    if (!(error instanceof Undetermined)) throw error;
    const curve = curveOf(m, error.boundary);
    const at = curve.along === 'T' ? curve.atTemperature(T) : curve.atPressure(p);
    return standOn(m, curve, { ...at, T, p }, [0, 1], mass);
  }
}
