import type { Reading } from './reading.ts';
import { ReadingError } from './readingError.ts';

/** Accuracy classes of pressure gauges, percent of span. Source: EN 837-1:1996 (recalled). */
export const gaugeClasses = [0.1, 0.25, 0.6, 1, 1.6, 2.5, 4] as const;

export type GaugeClass = (typeof gaugeClasses)[number];

/** What is known of a pressure instrument: class and scale, or its limits of error outright. */
export type PressureAccuracy =
  | {
      readonly by: 'class';
      readonly class: GaugeClass;
      /** The ends of the scale. */
      readonly low: Reading;
      readonly high: Reading;
    }
  /** A pressure difference. */
  | { readonly by: 'plusMinus'; readonly plusMinus: Reading };

/** Place of a scale's end on a line that rises with pressure, and what that line counts from. */
function onScale(reading: Reading): { zero: 'local' | 'absolute' | 'unstated'; p: number } {
  if (reading.quantity !== 'pressure')
    throw new ReadingError({ code: 'notThatQuantity', reading, quantity: 'pressure' });
  const { kind = 'unstated', value } = reading;
  if (kind === 'vacuum') return { zero: 'local', p: -value };
  return { zero: kind === 'gauge' ? 'local' : kind, p: value };
}

function plusMinus(
  reading: Reading,
  quantity: 'pressureDifference' | 'temperatureDifference',
): number {
  if (reading.quantity !== quantity)
    throw new ReadingError({ code: 'notThatQuantity', reading, quantity });
  return Math.abs(reading.value);
}

/**
 * Span (Pa) of a scale from `low` to `high`. A compound scale may mix vacuum and gauge:
 * 30 inHg vacuum to 60 psi(g). The order of the ends is free.
 * Errors: `ReadingError` 'noSpan' where the ends count from different zeros or are equal.
 */
export function spanOf(low: Reading, high: Reading): number {
  const a = onScale(low);
  const b = onScale(high);
  const span = Math.abs(b.p - a.p);
  if (a.zero !== b.zero || !(span > 0)) throw new ReadingError({ code: 'noSpan', low, high });
  return span;
}

/**
 * Limits of error (± Pa) of a pressure instrument.
 *
 * A class is percent of the whole span, wherever the pointer stands: EN 837-1:1996 (recalled). It
 * holds at the standard's reference temperature of 20 °C; drift with temperature is not added.
 */
export function pressureError(accuracy: PressureAccuracy): number {
  if (accuracy.by === 'class') return (accuracy.class / 100) * spanOf(accuracy.low, accuracy.high);
  return plusMinus(accuracy.plusMinus, 'pressureDifference');
}

/** Limits of error (± K) of a probe given as a temperature difference. */
export function probeError(reading: Reading): number {
  return plusMinus(reading, 'temperatureDifference');
}

/**
 * Limits of error (± Pa) of an absolute pressure taken from a reading of `kind`: gauge and vacuum
 * readings carry the barometer's error too, an absolute instrument does not.
 *
 * The two are added, not combined as root sum of squares. Both are limits, not standard deviations;
 * one gauge and one altitude keep the same error all day, so nothing averages out; and what hangs on
 * the result is whether a state can be told from a boundary, where a narrow box misleads.
 */
export function absoluteError(
  kind: 'gauge' | 'absolute' | 'vacuum',
  instrument: number,
  barometer: number,
): number {
  if (!(instrument >= 0))
    throw new RangeError(`instrument error must not be negative: ${instrument}`);
  if (!(barometer >= 0)) throw new RangeError(`barometer error must not be negative: ${barometer}`);
  return kind === 'absolute' ? instrument : instrument + barometer;
}
