import type { Medium } from '../equilibrium/medium.ts';
import type { Checks, CheckState } from '../substances/substance.ts';
import { evaluations } from './evaluations.ts';

/** One published value with the state it belongs to; SI, `printed` as its source prints it. */
export interface CheckRow {
  readonly kind: string;
  readonly source: string;
  readonly provenance: string;
  readonly at: CheckState;
  readonly property: string;
  readonly value: number;
  readonly printed: string;
  readonly toleranceAbs: number;
}

/** A published value beside the one computed here. */
export interface CheckResult extends CheckRow {
  /** Null where the property is not defined at the state. */
  readonly computed: number | null;
  /** Computed less published, null without a computed value. */
  readonly deviation: number | null;
  readonly passes: boolean;
}

/** The rows of a substance's checks, one a value. */
export const checkRows = ({ groups }: Checks): readonly CheckRow[] =>
  groups.flatMap(({ kind, source, provenance, states }) =>
    states.flatMap(({ at, values }) =>
      Object.entries(values).flatMap(([property, value]) =>
        value ? [{ kind, source, provenance, at, property, ...value }] : [],
      ),
    ),
  );

/**
 * Computes a published value again by the kind's own way.
 *
 * Domain: rows of the medium's own substance; a kind not known throws RangeError, a state outside a
 * function's range its error.
 */
export function evaluateCheck(m: Medium, row: CheckRow): CheckResult {
  const evaluation = evaluations[row.kind];
  if (!evaluation) throw new RangeError(`no such kind of check: ${row.kind}`);
  const found = evaluation(m, row.at)[row.property];
  const computed = typeof found === 'number' && Number.isFinite(found) ? found : null;
  const deviation = computed === null ? null : computed - row.value;
  return {
    ...row,
    computed,
    deviation,
    passes: deviation !== null && Math.abs(deviation) <= row.toleranceAbs,
  };
}
