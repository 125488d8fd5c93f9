import type { PressureKind } from './pressureKind.ts';
import type { Quantity } from './quantity.ts';
import type { Reading } from './reading.ts';
import type { UnitId } from './unitTable.ts';

/** What was looked for, in every issue with typed text. */
interface Sought {
  readonly text: string;
  readonly quantity: Quantity;
  readonly expected: readonly UnitId[];
}

/** Why a reading cannot be taken, with what was understood of it. */
export type ReadingIssue =
  | (Sought & { readonly code: 'empty' })
  | (Sought & { readonly code: 'tooLong'; readonly length: number; readonly limit: number })
  | (Sought & { readonly code: 'notANumber' })
  /** Both meanings, the decimal one first. */
  | (Sought & { readonly code: 'ambiguousNumber'; readonly readings: readonly [Reading, Reading] })
  | (Sought & { readonly code: 'missingUnit'; readonly number?: number })
  | (Sought & { readonly code: 'unknownUnit'; readonly number?: number; readonly unit: string })
  | (Sought & {
      readonly code: 'wrongQuantity';
      readonly number?: number;
      readonly unit: string;
      readonly found: readonly Quantity[];
    })
  | (Sought & {
      readonly code: 'belowMinimum';
      readonly number: number;
      readonly unit: UnitId;
      /** SI, as is `minimum`. */
      readonly value: number;
      readonly minimum: number;
    })
  /** A vacuum counts downwards: its sign would say it twice. */
  | (Sought & { readonly code: 'negativeVacuum'; readonly number: number; readonly unit: UnitId })
  /** The kind must be settled before the pressure can be resolved. */
  | { readonly code: 'unstatedKind'; readonly reading: Reading }
  /** No such pressure exists where the local atmosphere is `local` (Pa). */
  | {
      readonly code: 'belowZeroAbsolute';
      readonly reading: Reading;
      readonly kind: PressureKind;
      /** Absolute pressure it would be, Pa. */
      readonly value: number;
      readonly local: number;
    }
  | { readonly code: 'notThatQuantity'; readonly reading: Reading; readonly quantity: Quantity }
  /** The ends of a scale count from different zeros, or are equal. */
  | { readonly code: 'noSpan'; readonly low: Reading; readonly high: Reading };

export type ReadingErrorCode = ReadingIssue['code'];

/** A reading that cannot be taken or cannot be true. */
export class ReadingError extends Error {
  override readonly name = 'ReadingError';
  readonly code: ReadingErrorCode;
  constructor(readonly issue: ReadingIssue) {
    super(`${issue.code}: ${JSON.stringify(issue)}`);
    this.code = issue.code;
  }
}
