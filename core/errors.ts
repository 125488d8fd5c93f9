/** What a function was asked for lies outside what its source covers. */
export class OutOfRange extends Error {
  override readonly name = 'OutOfRange';
  constructor(
    readonly quantity: string,
    readonly value: number,
    readonly range: { readonly min: number; readonly max: number },
    /** Where the range is published. */
    readonly source: string,
    /** Range and value carry this SI unit. */
    readonly unit: string,
  ) {
    super(
      `${quantity} = ${value} ${unit} is outside ${range.min} to ${range.max} ${unit} (${source})`,
    );
  }
}

/** The two givens leave the state open: more must be said to fix it. */
export class Undetermined extends Error {
  override readonly name = 'Undetermined';
  constructor(
    readonly boundary: string,
    readonly T: number,
    readonly p: number,
    /** The given that would fix the state. */
    readonly needs: 'vapour fraction' | 'solid fraction',
  ) {
    super(`(T, p) = (${T} K, ${p} Pa) lies on the boundary "${boundary}": give a ${needs}`);
  }
}

/** Why something is not known, a code that app/words spells out. */
export type UnknownReason =
  | 'melting not published'
  | 'sublimation not published'
  | 'beyond the melting line'
  /** Only the solid's lines are published: nothing is known of its own properties. */
  | 'no equation for the solid';

/** No published equation says what is asked. */
export class Unknown extends Error {
  override readonly name = 'Unknown';
  constructor(
    readonly subject: 'phase',
    readonly reason: UnknownReason,
  ) {
    super(`${subject} is not known: ${reason}`);
  }
}

/** An iteration left its bracket: a defect of ours, never the user's. */
export class NotConverged extends Error {
  override readonly name = 'NotConverged';
  constructor(
    readonly solver: string,
    readonly inputs: Readonly<Record<string, number>>,
  ) {
    super(`${solver} did not converge at ${JSON.stringify(inputs)}`);
  }
}
