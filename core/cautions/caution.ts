import type { Hazard } from '../substances/substance.ts';

/** A caution with the numbers it stands on; app/words says it. */
export interface Caution {
  readonly code: CautionCode;
  /** Ids of the items it stands at; empty for the whole map. */
  readonly at: readonly string[];
  readonly numbers: Readonly<Record<string, number>>;
}

export type CautionCode =
  | 'equilibrium lines'
  | 'pressure vessel'
  | 'scald'
  | 'vacuum'
  | 'asphyxiation'
  | 'displaces air'
  | 'toxic'
  | 'flammable'
  | 'mildly flammable'
  | 'toxic in fire'
  | 'oxidiser'
  | 'cryogenic'
  | 'cold burn'
  | 'dry ice blocks lines'
  | 'high pressure';

/** What the rules look at: a state with its site and its substance's hazards. */
export interface Judged {
  readonly id: string;
  readonly substance: string;
  readonly hazards: readonly Hazard[];
  readonly T: number;
  readonly p: number;
  /** Local atmosphere, Pa. */
  readonly local: number;
  readonly solid: boolean;
  /** Pressure at the triple point, Pa. */
  readonly triplePressure: number;
}
