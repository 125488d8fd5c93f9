import type { Quantity } from '../../core/units/index.ts';

/** A figure inside a sentence that can be edited in place. */
export interface Slot {
  /** What it stands for in its item, a path such as "T" or "end.p". */
  readonly field: string;
  readonly text: string;
  /** Read aloud: "temperature of A2". */
  readonly name: string;
  /** A quantity is typed with any of its units, */
  readonly quantity?: Quantity;
  /** a choice is made among words, */
  readonly choices?: readonly { readonly value: string; readonly label: string }[];
  /** a choice that only shows a caret, where what is chosen is plain from the figures beside it, */
  readonly quiet?: boolean;
  /** anything else is plain text; `hint` stands where it is empty. */
  readonly hint?: string;
}

/** A sentence as a person writes it in a log book, with figures in it. */
export type Sentence = readonly (string | Slot)[];
