import type { PressureKind } from './pressureKind.ts';
import { quantities, type Quantity } from './quantity.ts';
import { readingOf, type Reading } from './reading.ts';
import { ReadingError } from './readingError.ts';
import { quantitiesOf, spelledUnit, type SpelledUnit } from './unitSpelling.ts';
import type { UnitId } from './unitTable.ts';
import { scanNumber, type DecimalMark } from './writtenNumber.ts';

export interface ParseOptions {
  /** The decimal mark; without it a comma before three digits is ambiguous. */
  readonly decimal?: DecimalMark;
  /** For a number without unit. */
  readonly defaultUnit?: UnitId;
  /** For a pressure without kind. */
  readonly defaultKind?: PressureKind;
}

/** Longest text taken for a reading, in UTF-16 units. */
export const longestReading = 200;

/**
 * The reading that `text` gives of `quantity`.
 *
 * Takes what people write: "2.5 bar(g)", "35 psig", "100 kPa abs", "20 inHg vac", "250F",
 * "1 013,25 hPa", "1.2·10^5 Pa". A pressure without kind is 'unstated' unless `defaultKind` is
 * given. Read stored canonical text without options.
 * Errors: `ReadingError`, its issue carrying what was understood and the units expected; 0 K,
 * density and mass are bounded here, absolute pressure only where the site is known
 * (`absolutePressure`).
 *
 * @example parseReading('20 inHg vac', 'pressure').text // '20 inHg vacuum'
 */
export function parseReading(
  text: string,
  quantity: Quantity,
  options: ParseOptions = {},
): Reading {
  const { units, minimum, bare } = quantities[quantity];
  const sought = { text: text.slice(0, longestReading), quantity, expected: units };
  if (text.length > longestReading) {
    const { length } = text;
    throw new ReadingError({ code: 'tooLong', ...sought, length, limit: longestReading });
  }
  const trimmed = text.trim();
  if (trimmed === '') throw new ReadingError({ code: 'empty', ...sought });
  const scanned = scanNumber(trimmed, options.decimal);
  if (!scanned) throw new ReadingError({ code: 'notANumber', ...sought });

  const [first, second] = scanned.meanings;
  // A number with two meanings was not understood.
  const number = second ? undefined : first.number;
  const written = scanned.rest.trim();
  const spelled: SpelledUnit | undefined =
    written === '' ? { kind: 'unstated' } : spelledUnit(written, quantity);
  if (!spelled) {
    const found = quantitiesOf(written);
    if (found.length > 0)
      throw new ReadingError({ code: 'wrongQuantity', ...sought, number, unit: written, found });
    throw new ReadingError({ code: 'unknownUnit', ...sought, number, unit: written });
  }
  const unit = spelled.unit ?? options.defaultUnit ?? bare;
  if (unit === undefined) throw new ReadingError({ code: 'missingUnit', ...sought, number });
  if (!units.includes(unit)) throw new RangeError(`defaultUnit must measure ${quantity}: ${unit}`);
  const kind = spelled.kind === 'unstated' ? (options.defaultKind ?? 'unstated') : spelled.kind;

  const reading = readingOf(quantity, first.number, first.decimals, unit, kind);
  if (second) {
    const other = readingOf(quantity, second.number, second.decimals, unit, kind);
    throw new ReadingError({ code: 'ambiguousNumber', ...sought, readings: [reading, other] });
  }
  const { value } = reading;
  if (minimum !== undefined && value < minimum)
    throw new ReadingError({
      code: 'belowMinimum',
      ...sought,
      number: first.number,
      unit,
      value,
      minimum,
    });
  if (reading.kind === 'vacuum' && value < 0)
    throw new ReadingError({ code: 'negativeVacuum', ...sought, number: first.number, unit });
  return reading;
}
