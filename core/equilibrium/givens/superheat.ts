import { OutOfRange } from '../../errors.ts';
import type { Medium } from '../medium.ts';
import { saturationAtPressure } from '../saturation.ts';
import { saturatedState, stateAt, type State } from '../state.ts';
import { isobar } from './isobar.ts';

/**
 * The vapour at pressure p (Pa) that is `kelvin` warmer than its boiling point.
 *
 * Domain: triple to critical pressure, 0 K to the equation's highest temperature; elsewhere throws
 * OutOfRange. At 0 K the saturated vapour.
 */
export function stateFromPressureSuperheat(m: Medium, p: number, kelvin: number): State {
  const s = saturationAtPressure(m, p);
  const { Tmax, source } = m.substance.fluid.validity;
  const max = Tmax - s.T;
  if (!(kelvin >= 0 && kelvin <= max))
    throw new OutOfRange('superheat', kelvin, { min: 0, max }, source, 'K');
  return kelvin > 1e-9 * s.T ? stateAt(m, s.T + kelvin, p) : saturatedState(m, { p }, 1);
}

/**
 * The liquid at pressure p (Pa) that is `kelvin` colder than its boiling point.
 *
 * Domain: triple to critical pressure, 0 K to where it would freeze; elsewhere throws OutOfRange. At
 * 0 K the saturated liquid.
 */
export function stateFromPressureSubcooling(m: Medium, p: number, kelvin: number): State {
  const s = saturationAtPressure(m, p);
  const { source } = m.substance.fluid.validity;
  const liquid = isobar(m, p).find((rung) => rung.kind === 'piece' && rung.phase === 'fluid');
  const low = liquid?.kind === 'piece' && liquid.low < s.T ? liquid.low : s.T;
  const max = s.T - low;
  if (!(kelvin >= 0 && kelvin < max + 1e-9))
    throw new OutOfRange('subcooling', kelvin, { min: 0, max }, source, 'K');
  return kelvin > 1e-9 * s.T ? stateAt(m, s.T - kelvin, p) : saturatedState(m, { p }, 0);
}
