import type { PressureKind } from './pressureKind.ts';
import type { Quantity } from './quantity.ts';
import type { Reading } from './reading.ts';
import { ReadingError } from './readingError.ts';

function requireQuantity(reading: Reading, quantity: Quantity): void {
  if (reading.quantity !== quantity)
    throw new ReadingError({ code: 'notThatQuantity', reading, quantity });
}

function requireLocal(pLocal: number): void {
  if (!(pLocal > 0 && pLocal < Infinity))
    throw new RangeError(`local pressure must be positive: ${pLocal}`);
}

/**
 * Absolute pressure (Pa) of a pressure reading where the local atmosphere is `pLocal` (Pa).
 *
 * Gauge adds to the local atmosphere, vacuum V is pLocal − V, absolute stands as it is.
 * Errors: `ReadingError` 'belowZeroAbsolute' at or below zero, 'unstatedKind' where the kind is
 * open, 'notThatQuantity' for anything but a pressure.
 *
 * @example absolutePressure(parseReading('1 bar(g)', 'pressure'), 101325) // 201325
 */
export function absolutePressure(reading: Reading, pLocal: number): number {
  requireQuantity(reading, 'pressure');
  requireLocal(pLocal);
  const kind = reading.kind ?? 'unstated';
  if (kind === 'unstated') throw new ReadingError({ code: 'unstatedKind', reading });
  const above = { gauge: pLocal, absolute: 0, vacuum: pLocal }[kind];
  const p = kind === 'vacuum' ? above - reading.value : above + reading.value;
  if (!(p > 0))
    throw new ReadingError({ code: 'belowZeroAbsolute', reading, kind, value: p, local: pLocal });
  return p;
}

/** Gauge pressure (Pa) of an absolute pressure `p` (Pa) where the local atmosphere is `pLocal`. */
export function gaugePressure(p: number, pLocal: number): number {
  requireLocal(pLocal);
  return p - pLocal;
}

/**
 * What an instrument of `kind` reads (Pa) at absolute pressure `p` (Pa): the inverse of
 * `absolutePressure`. A vacuum is negative above the local atmosphere.
 */
export function pressureAs(
  kind: Exclude<PressureKind, 'unstated'>,
  p: number,
  pLocal: number,
): number {
  if (kind === 'absolute') return p;
  const gauge = gaugePressure(p, pLocal);
  return kind === 'gauge' ? gauge : -gauge;
}

/** Temperature (K) of a temperature reading. Errors: `ReadingError` 'notThatQuantity'. */
export function temperature(reading: Reading): number {
  requireQuantity(reading, 'temperature');
  return reading.value;
}
