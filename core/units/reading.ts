import { fromSI, toSI } from './convert.ts';
import { kindSuffix, type PressureKind } from './pressureKind.ts';
import type { Quantity } from './quantity.ts';
import type { UnitId } from './unitTable.ts';

/** A quantity as it was given. What a sheet keeps is `text`. */
export interface Reading {
  readonly quantity: Quantity;
  /** SI; for gauge and vacuum readings the bare pressure difference in Pa. */
  readonly value: number;
  /** Pressures only. */
  readonly kind?: PressureKind;
  readonly unit: UnitId;
  /** The number as written, in `unit`. */
  readonly number: number;
  /** Place of the last digit written: 2 for hundredths, −3 for thousands as in 12e3. */
  readonly decimals: number;
  /** The one canonical string. */
  readonly text: string;
}

function canonicalNumber(number: number, decimals: number): string {
  if (decimals >= 0) return number.toFixed(decimals);
  const magnitude = Number(number.toExponential().split('e')[1]);
  return number.toExponential(Math.max(0, magnitude + decimals)).replace('e+', 'e');
}

/**
 * The one string for a reading: decimal point, ASCII minus, no thousands marks, one plain space,
 * the unit's id, the kind. Read without options it gives the same reading.
 *
 * @example canonical(parseReading('2,50 barG', 'pressure')) // '2.50 bar(g)'
 */
export function canonical({
  number,
  decimals,
  unit,
  kind = 'unstated',
}: Pick<Reading, 'number' | 'decimals' | 'unit' | 'kind'>): string {
  const figures = canonicalNumber(number, decimals);
  return unit === '1' ? figures : `${figures} ${unit}${kindSuffix[kind]}`;
}

/** The reading of a number written in `unit` with its last digit at `decimals`. */
export function readingOf(
  quantity: Quantity,
  number: number,
  decimals: number,
  unit: UnitId,
  kind: PressureKind = 'unstated',
): Reading {
  const value = toSI(number, unit);
  const parts = { quantity, value, unit, number, decimals };
  if (quantity !== 'pressure') return { ...parts, text: canonical(parts) };
  return { ...parts, kind, text: canonical({ ...parts, kind }) };
}

/**
 * The reading that shows an SI value in `unit`, rounded to `decimals`: what a drag writes. For gauge
 * and vacuum `value` is the bare difference in Pa (see `pressureAs`).
 */
export function readingFromSI(
  quantity: Quantity,
  value: number,
  decimals: number,
  unit: UnitId,
  kind?: PressureKind,
): Reading {
  const exact = fromSI(value, unit);
  if (!Number.isFinite(exact)) throw new RangeError(`value must be finite: ${value}`);
  const place = 10 ** -decimals;
  const rounded =
    decimals >= 0 ? Number(exact.toFixed(decimals)) : Math.round(exact / place) * place;
  const number = rounded === 0 ? 0 : rounded;
  return readingOf(quantity, number, number === 0 ? Math.max(0, decimals) : decimals, unit, kind);
}
