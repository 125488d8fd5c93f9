import { fromSI, stepSI } from './convert.ts';
import { kindSuffix, type PressureKind } from './pressureKind.ts';
import type { Reading } from './reading.ts';
import type { UnitId } from './unitTable.ts';
import type { DecimalMark } from './writtenNumber.ts';

const thinSpace = '\u2009';
const noBreakSpace = '\u00a0';
const minusSign = '\u2212';
const mostDecimals = 20;

/** How many digits: the first one given counts; with none, four significant digits. */
export interface DigitOptions {
  /** Place of the last digit in the unit shown: 2 for hundredths, −3 for thousands. */
  readonly decimals?: number;
  /** Limits of error, SI: see `digitsFor`. */
  readonly uncertainty?: number;
  /** Smallest step worth showing, SI: the last digit is never finer. */
  readonly resolution?: number;
  /** Significant digits. */
  readonly digits?: number;
}

export interface FormatOptions extends DigitOptions {
  readonly kind?: PressureKind;
  readonly decimal?: DecimalMark;
}

/** Floor of −log₁₀(step), steady against the last bit at powers of ten. */
function decimalsNotFinerThan(step: number): number {
  return Math.floor(-Math.log10(step) + 1e-9);
}

/**
 * Place of the last digit that a number with limits of error ± `uncertainty` deserves, in the same
 * unit: that of the first digit of the uncertainty. ±1.6 gives 0 (ones), ±0.07 gives 2, ±30 gives −1.
 *
 * The last digit then weighs between a tenth and the whole of the uncertainty: rounding never adds
 * more than half of it, and ± itself keeps a digit that says something. Common practice, no source.
 */
export function digitsFor(uncertainty: number): number {
  if (!(uncertainty > 0 && uncertainty < Infinity))
    throw new RangeError(`uncertainty must be positive: ${uncertainty}`);
  return 0 - Number(uncertainty.toExponential(12).split('e')[1]);
}

function decimalsOf(shown: number, unit: UnitId, options: DigitOptions): number {
  const { decimals, uncertainty, resolution, digits = 4 } = options;
  if (decimals !== undefined) return decimals;
  if (uncertainty !== undefined && uncertainty !== 0) return digitsFor(uncertainty / stepSI(unit));
  if (resolution !== undefined) {
    if (!(resolution > 0)) throw new RangeError(`resolution must be positive: ${resolution}`);
    return decimalsNotFinerThan(resolution / stepSI(unit));
  }
  if (shown === 0) return 0;
  return digits - 1 - Number(shown.toExponential(digits - 1).split('e')[1]);
}

function grouped(whole: string): string {
  return whole.replace(/\B(?=(?:[0-9]{3})+$)/g, thinSpace);
}

/**
 * A bare number with its last digit at `decimals`: true minus sign, thin spaces between thousands
 * from four digits on, never −0.
 */
export function formatNumber(number: number, decimals: number, decimal: DecimalMark = '.'): string {
  if (!Number.isFinite(number)) throw new RangeError(`number must be finite: ${number}`);
  const places = Math.min(mostDecimals, Math.max(0, decimals));
  const step = decimals < 0 ? 10 ** -decimals : 1;
  const rounded = Math.round(Math.abs(number) / step) * step;
  const text = (decimals < 0 ? rounded : Math.abs(number)).toFixed(places);
  const [whole = '0', fraction] = text.split('.');
  const sign = number < 0 && /[1-9]/.test(text) ? minusSign : '';
  return sign + grouped(whole) + (fraction === undefined ? '' : decimal + fraction);
}

function withUnit(figures: string, unit: UnitId, kind: PressureKind): string {
  if (unit === '1') return figures;
  return figures + noBreakSpace + unit + kindSuffix[kind].replace(' ', noBreakSpace);
}

/**
 * An SI value shown in `unit`, with its unit after a non-breaking space. For gauge and vacuum the
 * value is the bare difference in Pa (`pressureAs`).
 *
 * @example format(394.25, '°C', { digits: 4 }) // '121.1 °C'
 */
export function format(value: number, unit: UnitId, options: FormatOptions = {}): string {
  const shown = fromSI(value, unit);
  const figures = formatNumber(shown, decimalsOf(shown, unit, options), options.decimal);
  return withUnit(figures, unit, options.kind ?? 'unstated');
}

/** A reading with the digits it was written with. */
export function formatReading(
  { number, decimals, unit, kind = 'unstated' }: Reading,
  decimal?: DecimalMark,
): string {
  return withUnit(formatNumber(number, decimals, decimal), unit, kind);
}

/**
 * A temperature difference (K) for people who read temperatures in `unit`: F° beside °F, K beside
 * all others.
 */
export function formatDifference(
  difference: number,
  unit: '°C' | 'K' | '°F',
  options: DigitOptions & { readonly decimal?: DecimalMark } = {},
): string {
  return format(difference, unit === '°F' ? 'F°' : 'K', options);
}
