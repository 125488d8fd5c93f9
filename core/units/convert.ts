import { unitTable, type UnitId } from './unitTable.ts';

/** SI value of a number read in `unit`; for gauge and vacuum readings the bare difference in Pa. */
export function toSI(value: number, unit: UnitId): number {
  const { times, over = 1, shift = 0 } = unitTable[unit];
  return ((value + shift) * times) / over;
}

/** The number to be read in `unit` for an SI value. Inverse of `toSI` within rounding. */
export function fromSI(value: number, unit: UnitId): number {
  const { times, over = 1, shift = 0 } = unitTable[unit];
  return (value * over) / times - shift;
}

/** Size of one step of `unit` in SI, without any shift of zero: 1 °F is 5/9 K. */
export function stepSI(unit: UnitId): number {
  const { times, over = 1 } = unitTable[unit];
  return times / over;
}
