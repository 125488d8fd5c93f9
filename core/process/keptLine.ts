import {
  stateFromPressureEnthalpy,
  stateFromPressureEntropy,
} from '../equilibrium/givens/pressureCaloric.ts';
import { stateFromTemperatureDensity } from '../equilibrium/givens/temperatureDensity.ts';
import type { Medium } from '../equilibrium/medium.ts';
import { overall, type State } from '../equilibrium/state.ts';

/** A line of states of one enthalpy (J/kg), entropy (J/(kg K)) or volume (m³/kg): plain data. */
export interface KeptLine {
  readonly keeps: 'h' | 's' | 'v';
  readonly value: number;
  /**
   * Where a machine is not ideal: the ends it reaches, of enthalpy h + times · (h′ − h), with h of its
   * start and h′ on the line of constant entropy.
   */
  readonly exits?: { readonly h: number; readonly times: number };
}

/** What one goes along a line by: pressure, or temperature where the volume is kept. */
export const wayOf = ({ keeps }: KeptLine): 'T' | 'p' => (keeps === 'v' ? 'T' : 'p');

/** The property that is told on the line, and its value at a pressure or temperature. */
export function targetOf(
  m: Medium,
  line: KeptLine,
): { of: 'h' | 's' | 'v'; at: (u: number) => number } {
  const { keeps, value, exits } = line;
  if (!exits) return { of: keeps, at: () => value };
  return {
    of: 'h',
    at: (p) =>
      exits.h + exits.times * (overall(stateFromPressureEntropy(m, p, value), 'h')! - exits.h),
  };
}

/** The state on the line at a pressure (Pa), or a temperature (K) where the volume is kept. Throws as the givens do. */
export function stateOn(m: Medium, line: KeptLine, u: number): State {
  const { of, at } = targetOf(m, line);
  if (of === 'v') return stateFromTemperatureDensity(m, u, 1 / line.value);
  return of === 'h'
    ? stateFromPressureEnthalpy(m, u, at(u))
    : stateFromPressureEntropy(m, u, at(u));
}
