import { cautions } from '../../core/cautions/rules.ts';
import type { Medium } from '../../core/equilibrium/medium.ts';
import { en as words } from '../words/en.ts';

/** The cautions that a state calls for, a line each. */
export function cautionLines(
  m: Medium,
  at: { readonly T: number; readonly p: number; readonly solid: boolean },
  local: number,
): readonly string[] {
  const { id, hazards } = m.substance;
  const judged = { ...at, id, substance: id, hazards, local, triplePressure: m.triple.p };
  return cautions([judged])
    .filter(({ code }) => code !== 'equilibrium lines')
    .map(({ code }) => words.caution[code]);
}
