import type { PhaseName } from '../equilibrium/phase.ts';
import type { BoundaryKind } from '../map/boundary.ts';

/** A phase by name, with the solid's form where it is resolved. */
export interface NamedPhase {
  readonly phase: PhaseName;
  readonly solid: string | null;
}

/** What happens to the substance where a run meets a boundary. */
export type Change = 'boils' | 'condenses' | 'freezes' | 'melts' | 'sublimes' | 'deposits';

export type EncounterCode =
  | Change
  /** Between liquid-like and gas-like fluid without a boundary. */
  | 'passesAboveCritical'
  /** The run ends on the line, or starts on it and goes off, and nothing has changed yet or any more. */
  | 'reaches'
  | 'leaves'
  /** The run touches the line and stays on its side. */
  | 'touches'
  /** The run stays on the line and how much changes over is open, or nothing does. */
  | 'follows';

/** A meeting of a run with a boundary, solved on the boundary. */
export interface Encounter {
  readonly kind: 'crosses' | 'touches' | 'follows';
  readonly code: EncounterCode;
  /** Id of the boundary; 'critical' for the convention above the critical point. */
  readonly boundary: string;
  readonly boundaryKind: BoundaryKind;
  readonly from: NamedPhase;
  readonly to: NamedPhase;
  readonly T: number;
  readonly p: number;
  /** Where a run that follows the boundary leaves off. */
  readonly until: { readonly T: number; readonly p: number } | null;
  /** Share of the mass at the step's start that changes over; null where it is open. */
  readonly share: number | null;
  /** Share of the step's way on the map at which it happens, 0 to 1. */
  readonly progress: number;
  /** Time into the step (s), null where it is not determined. */
  readonly time: number | null;
}

/** What a change from one phase to the other is called; null where none takes place on a boundary. */
export function changeOf(from: PhaseName, to: PhaseName): Change | null {
  if (from === to) return null;
  if (from === 'solid') return to === 'vapour' ? 'sublimes' : 'melts';
  if (to === 'solid') return from === 'vapour' ? 'deposits' : 'freezes';
  if (from === 'liquid' && to === 'vapour') return 'boils';
  return from === 'vapour' && to === 'liquid' ? 'condenses' : null;
}

/** The kind of boundary on which a change takes place. */
export const kindOfChange: Readonly<Record<Change, BoundaryKind>> = {
  boils: 'saturation',
  condenses: 'saturation',
  freezes: 'melting',
  melts: 'melting',
  sublimes: 'sublimation',
  deposits: 'sublimation',
};

export const samePhase = (a: NamedPhase, b: NamedPhase): boolean =>
  a.phase === b.phase && a.solid === b.solid;

export const named = ({ phase, solid }: NamedPhase): NamedPhase => ({ phase, solid });
