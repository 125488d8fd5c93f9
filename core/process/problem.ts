import { NotConverged, OutOfRange, Undetermined, Unknown, type UnknownReason } from '../errors.ts';
import type { BoundaryKind } from '../map/boundary.ts';
import { ReadingError, type ReadingIssue } from '../units/index.ts';
import type { KeptLine } from './keptLine.ts';

/** Why a state has no result; carries what the sentence needs. */
export type StateProblem =
  | {
      readonly code: 'outOfRange';
      readonly quantity: string;
      readonly value: number;
      readonly min: number;
      readonly max: number;
      readonly source: string;
      readonly unit: string;
    }
  | {
      readonly code: 'onBoundary';
      readonly boundary: string;
      readonly needs: 'vapour fraction' | 'solid fraction';
    }
  | { readonly code: 'unknown'; readonly reason: UnknownReason }
  /** A defect of ours: the solver gave up. Told at its item, so that the rest of the sheet stands. */
  | { readonly code: 'unsolved'; readonly solver: string };

/** Why a step does not reach its end. */
export type StepProblem =
  | StateProblem
  /** No boundary of the kind is met at the pressure or temperature that the step keeps. */
  | {
      readonly code: 'noBoundary';
      readonly boundary: BoundaryKind | null;
      readonly keeps: 'T' | 'p' | 'h' | 's' | 'v';
      readonly value: number;
    }
  /** No line with both phases of the fraction is met. */
  | {
      readonly code: 'noSuchPhase';
      readonly fraction: 'vapour' | 'solid';
      readonly T: number;
      readonly p: number;
    }
  /** The step needs a state that lies on a boundary. */
  | { readonly code: 'notOnBoundary'; readonly T: number; readonly p: number }
  /** All of it boiled or sublimed and left. */
  | { readonly code: 'nothingLeft'; readonly T: number; readonly p: number }
  /** Vapour left, so the share that left cannot fall below `least`. */
  | { readonly code: 'nothingCondensesBack'; readonly least: number }
  /** The heat would take the step past one of the two phases: J per kg at the path's start. */
  | {
      readonly code: 'heatRange';
      readonly heat: number;
      readonly least: number;
      readonly most: number;
    }
  | { readonly code: 'reading'; readonly issue: ReadingIssue }
  /** An earlier step was not completed. */
  | { readonly code: 'notRun' };

/** The problem behind an error that a user's givens can cause; others are ours and pass through. */
export function problemOf(error: unknown): StateProblem {
  if (error instanceof OutOfRange) {
    const { quantity, value, range, source, unit } = error;
    return { code: 'outOfRange', quantity, value, min: range.min, max: range.max, source, unit };
  }
  if (error instanceof Undetermined)
    return { code: 'onBoundary', boundary: error.boundary, needs: error.needs };
  if (error instanceof Unknown) return { code: 'unknown', reason: error.reason };
  if (error instanceof NotConverged) return { code: 'unsolved', solver: error.solver };
  throw error;
}

/** Part of a step's way on the map: straight in T and p, along a boundary, or on a kept property. */
export interface Leg {
  /** Id of the boundary it lies on; null where it is straight. */
  readonly along: string | null;
  readonly from: { readonly T: number; readonly p: number };
  readonly to: { readonly T: number; readonly p: number };
  /** What it keeps where it is curved in T and p. */
  readonly kept?: KeptLine;
  /** True where its points are possible ends of the step and not states gone through. */
  readonly locus?: boolean;
}

/** Thrown by a step that cannot reach its end, with the way it did go. */
export class StepFailure extends Error {
  override readonly name = 'StepFailure';
  constructor(
    readonly problem: StepProblem,
    readonly legs: readonly Leg[] = [],
  ) {
    super(`step not completed: ${problem.code}`);
  }
}

/** The problem behind any error that a step's givens can cause. */
export function stepProblemOf(error: unknown): StepProblem {
  if (error instanceof StepFailure) return error.problem;
  if (error instanceof ReadingError) return { code: 'reading', issue: error.issue };
  return problemOf(error);
}
