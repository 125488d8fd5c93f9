/** A number as a person wrote it. */
export interface WrittenNumber {
  readonly number: number;
  /** Place of the last digit: 2 for hundredths, −3 for thousands as in 12e3. */
  readonly decimals: number;
}

export interface ScannedNumber {
  /** Two where a mark before three digits may be a decimal mark or part thousands; decimal first. */
  readonly meanings: readonly [WrittenNumber] | readonly [WrittenNumber, WrittenNumber];
  /** What follows the number. */
  readonly rest: string;
}

export type DecimalMark = '.' | ',';

const sign = /^[+\-−–‐‑]?/;
const minus = /[-−–‐‑]/;
const mantissaText = /^[0-9.,'’\s]*[0-9]/;
const letterExponent = /^[eE]([+\-−]?)([0-9]{1,3})(?![0-9])/;
const powerExponent = /^\s*[·⋅∙×x*]\s*10\s*\^\s*([+\-−]?)([0-9]{1,3})(?![0-9])/;
const raisedExponent = /^\s*[·⋅∙×x*]\s*10([⁺⁻]?)([⁰¹²³⁴⁵⁶⁷⁸⁹]{1,3})/;
const groups = /^[1-9][0-9]{0,2}(?:([\s'’.,])[0-9]{3})(?:\1[0-9]{3})*$/;
const groupedFraction = /^(?:[0-9]{3}\s)+[0-9]{1,3}$/;

/** More digits or larger exponents than any instrument gives are no reading. */
const mostDigits = 20;
const largestExponent = 30;

function exponentOf(text: string): { exponent: number; length: number } {
  const plain = letterExponent.exec(text) ?? powerExponent.exec(text);
  const match = plain ?? raisedExponent.exec(text);
  if (!match) return { exponent: 0, length: 0 };
  const [whole, mark = '', figures = ''] = match;
  const size = Number(figures.normalize('NFKC'));
  return { exponent: /[-−⁻]/.test(mark) ? -size : size, length: whole.length };
}

/** Figures of the whole part with any thousands spaces removed; undefined if they are misplaced. */
function wholeFigures(text: string): string | undefined {
  if (/^[0-9]*$/.test(text)) return text;
  return groups.test(text) ? text.replace(/[^0-9]/g, '') : undefined;
}

function fractionFigures(text: string): string | undefined {
  if (/^[0-9]*$/.test(text)) return text;
  return groupedFraction.test(text) ? text.replace(/\s/g, '') : undefined;
}

type Figures = readonly [whole: string, fraction: string];

function at(text: string, position: number): Figures | undefined {
  const whole = wholeFigures(text.slice(0, position));
  const fraction = fractionFigures(text.slice(position + 1));
  return whole === undefined || fraction === undefined ? undefined : [whole, fraction];
}

function figuresOf(text: string, decimal: DecimalMark | undefined): readonly Figures[] {
  const marks = [...text.matchAll(/[.,]/g)];
  const last = marks.at(-1);
  const asWhole = wholeFigures(text);
  const whole: readonly Figures[] = asWhole === undefined ? [] : [[asWhole, '']];
  if (!last) return whole;
  const sameMarks = marks.filter(([mark]) => mark === last[0]).length;
  if (sameMarks > 1) return whole;
  const split = at(text, last.index);
  if (!split) return [];
  // Only "1,013" itself reads as both: never with spaces, other marks, or a leading zero.
  if (marks.length > 1 || whole.length === 0) return [split];
  if (decimal) return decimal === last[0] ? [split] : whole;
  return last[0] === ',' ? [split, ...whole] : [split];
}

/**
 * The number at the start of `text`.
 *
 * Reads ASCII and true minus, decimal point or comma, thousands parted by any space, apostrophe,
 * point or comma, and exponents (1e5, 1.2·10^5, 1.2 × 10⁵). A comma before exactly three digits
 * has two meanings unless `decimal` says which mark is decimal; then the other one parts thousands.
 * Undefined if there is no number, its groups are broken, it has more than 20 digits, or its
 * exponent is beyond ±30.
 */
export function scanNumber(text: string, decimal?: DecimalMark): ScannedNumber | undefined {
  const [mark] = sign.exec(text) ?? [''];
  const unsigned = text.slice(mark.length).trimStart();
  const [mantissa] = mantissaText.exec(unsigned) ?? [];
  if (mantissa === undefined || /^['’]/.test(mantissa)) return undefined;
  const after = unsigned.slice(mantissa.length);
  const { exponent, length } = exponentOf(after);
  if (Math.abs(exponent) > largestExponent) return undefined;
  const meanings: WrittenNumber[] = [];
  for (const [whole, fraction] of figuresOf(mantissa, decimal)) {
    if (whole.length + fraction.length > mostDigits) return undefined;
    const size = Number(`${whole || '0'}.${fraction || '0'}e${exponent}`);
    const decimals = fraction.length - exponent;
    meanings.push({
      number: size === 0 ? 0 : minus.test(mark) ? -size : size,
      decimals: size === 0 ? Math.max(0, decimals) : decimals,
    });
  }
  const [first, second] = meanings;
  if (!first) return undefined;
  return { meanings: second ? [first, second] : [first], rest: after.slice(length) };
}
