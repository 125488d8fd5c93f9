import type { UnknownReason } from '../../errors.ts';
import type { Properties } from '../../models/fluidProperties.ts';
import type { Medium } from '../medium.ts';
import { solidDensity, type PhaseState } from '../phase.ts';
import { phaseProperties, saturatedPhases } from '../state.ts';

/** One phase alone between two values of what the ladder climbs: T (K) on an isobar, p (Pa) on an isotherm. */
export interface Piece {
  readonly kind: 'piece';
  readonly phase: 'solid' | 'fluid';
  readonly solid: string | null;
  readonly low: number;
  readonly high: number;
  /** Fluid density at both ends where a boundary gives it. */
  readonly rho: readonly [low: number | null, high: number | null];
}

/** A boundary that the ladder passes, its phases in order of the climb; three at the triple point. */
export interface Plateau {
  readonly kind: 'plateau';
  readonly T: number;
  readonly p: number;
  readonly sides: readonly PhaseState[];
}

/** Where no published equation tells the phase or its properties. */
export interface Blank {
  readonly kind: 'blank';
  readonly reason: UnknownReason;
}

export type Rung = Piece | Plateau | Blank;

/** The properties of a plateau's sides; null where one has no equation. */
export function sideProperties(m: Medium, { sides }: Plateau): readonly Properties[] | null {
  const all = sides.map((side) => phaseProperties(m, side));
  return all.every((side) => side !== null) ? all : null;
}

/** The three phases at the triple point with the vapour: solid, liquid, vapour. */
export function triplePhases(m: Medium): readonly [PhaseState, PhaseState, PhaseState] {
  const { triple, substance } = m;
  const { T, p } = triple;
  const name = substance.triplePoints[0].phases[0];
  const solid = m.solids.has(name) ? name : null;
  const [liquid, vapour] = saturatedPhases(triple);
  return [{ phase: 'solid', solid, T, p, rho: solidDensity(m, solid, T, p) }, liquid, vapour];
}

/** Closer to the triple point than this, relative in p or T, a state lies on the three-phase line. */
export const onTriple = 1e-9;
