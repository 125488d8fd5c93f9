import type { Scale } from '../../core/map/plane.ts';
import { formatNumber, fromSI, toSI, type UnitId } from '../../core/units/index.ts';
import type { TextRun } from './scene/scene.ts';

export interface Tick {
  /** Share of the axis from its low end. */
  readonly share: number;
  /** Null for a minor tick. */
  readonly label: readonly TextRun[] | null;
}

/** How an axis is read: values of the scale are `offset` above what is shown (local atmosphere). */
export interface Reading {
  readonly unit: UnitId;
  readonly offset: number;
  readonly decimal: '.' | ',';
}

const epsilon = 1e-9;

/**
 * A number as it stands beside a tick: plain from 0.001 to 999 999, else with a power of ten.
 * `decimals` is the place of its last figure, negative left of the point.
 */
export function tickLabel(value: number, decimals: number, decimal: '.' | ','): readonly TextRun[] {
  const size = Math.abs(value);
  if (size !== 0 && (size < 0.001 * (1 - epsilon) || size >= 1e6 * (1 - epsilon))) {
    const exponent = Math.floor(Math.log10(size) + epsilon);
    const factor = value / 10 ** exponent;
    const power = { text: formatNumber(exponent, 0), scale: 0.75, shift: 0.38 };
    if (Math.abs(Math.abs(factor) - 1) < epsilon)
      return [{ text: factor < 0 ? `${minus}10` : '10' }, power];
    return [{ text: `${formatNumber(factor, decimals + exponent, decimal)}·10` }, power];
  }
  return [{ text: formatNumber(value, decimals, decimal) }];
}

const minus = '\u2212';

/** Place of the first figure of a number: 0 for ones, 1 for tenths, −2 for hundreds. */
const place = (value: number): number => -Math.floor(Math.log10(Math.abs(value)) + epsilon);

/** Place of the last figure of a number that differs from zero. */
function lastPlace(value: number): number {
  if (value === 0) return 0;
  for (let at = place(value); ; at++) {
    const whole = value * 10 ** at;
    if (Math.abs(whole - Math.round(whole)) < epsilon * Math.max(1, Math.abs(whole))) return at;
  }
}

/** Whole multiples of a step from low to high, ends included. */
function multiples(step: number, low: number, high: number): number[] {
  const out: number[] = [];
  const last = Math.floor(high / step + epsilon);
  for (let k = Math.ceil(low / step - epsilon); k <= last; k++)
    out.push(Number((k * step).toPrecision(12)) + 0);
  return out;
}

/** Steps of 1, 2 and 5 times a power of ten, the coarsest first, over `decades` below `size`. */
const roundSteps = (size: number, decades: number): readonly number[] =>
  Array.from({ length: decades + 1 }, (_, i) => 10 ** (-place(size) - i)).flatMap((power) =>
    [5, 2, 1].map((k) => k * power),
  );

/** Ticks of a scale shown in a unit, at least `spacing` mm apart over `length` mm. */
export function axisTicks(
  scale: Scale,
  length: number,
  spacing: number,
  reading: Reading,
): readonly Tick[] {
  return scale.kind === 'logarithmic' && reading.offset === 0
    ? logarithmicTicks(scale, length, spacing, reading)
    : scale.kind === 'linear'
      ? linearTicks(scale, length, spacing, reading)
      : pickedTicks(scale, length, spacing, reading);
}

const shown = (value: number, { unit, offset }: Reading): number => fromSI(value - offset, unit);
const hidden = (value: number, { unit, offset }: Reading): number => toSI(value, unit) + offset;

function linearTicks(scale: Scale, length: number, spacing: number, reading: Reading): Tick[] {
  const low = shown(scale.range[0], reading);
  const high = shown(scale.range[1], reading);
  const steps = roundSteps(high - low, 2);
  const fine = steps.filter((step) => (step / (high - low)) * length >= spacing * (1 - epsilon));
  // An axis without room for two ticks still needs two to be read.
  const step =
    fine.findLast((s) => multiples(s, low, high).length >= 2) ??
    steps.find((s) => multiples(s, low, high).length >= 2)!;
  return multiples(step, low, high).map((value) => ({
    share: scale.share(hidden(value, reading)),
    label: tickLabel(value, place(step), reading.decimal),
  }));
}

function logarithmicTicks(scale: Scale, length: number, spacing: number, reading: Reading): Tick[] {
  const low = shown(scale.range[0], reading);
  const high = shown(scale.range[1], reading);
  const first = Math.ceil(Math.log10(low) - epsilon);
  const last = Math.floor(Math.log10(high) + epsilon);
  const decade = length / (Math.log10(high) - Math.log10(low));
  const every = Math.max(1, Math.ceil(spacing / decade));
  const labelled = (k: number): boolean =>
    (k === 2 || k === 5) && decade * Math.log10(2) >= spacing && last - first <= 3;
  const out: Tick[] = [];
  for (let e = first - 1; e <= last; e++) {
    for (let k = 1; k < 10; k++) {
      const value = k * 10 ** e;
      if (value < low * (1 - epsilon) || value > high * (1 + epsilon)) continue;
      const named = k === 1 ? (e - first) % every === 0 : labelled(k);
      // Minor ticks closer than half a millimetre only grey the axis.
      if (!named && k > 1 && decade * Math.log10(10 / 9) < 0.5) continue;
      out.push({
        share: scale.share(hidden(value, reading)),
        label: named ? tickLabel(value, place(value), reading.decimal) : null,
      });
    }
  }
  return out;
}

/**
 * Ticks on a scale that is not even in the shown quantity (gauge pressure on a logarithmic axis,
 * temperature on a reciprocal one): round values, the roundest first, each kept if it has room.
 */
function pickedTicks(scale: Scale, length: number, spacing: number, reading: Reading): Tick[] {
  const low = shown(scale.range[0], reading);
  const high = shown(scale.range[1], reading);
  const picked = (wanted: readonly number[]): { share: number; value: number }[] => {
    const kept: { share: number; value: number }[] = [];
    for (const value of new Set(wanted)) {
      const at = hidden(value, reading);
      if (at < scale.range[0] || at > scale.range[1]) continue;
      const share = scale.share(at);
      if (kept.every((other) => Math.abs(other.share - share) * length >= spacing))
        kept.push({ share, value });
    }
    return kept.sort((a, b) => a.share - b.share);
  };
  if (scale.kind !== 'reciprocal')
    return picked(roundPressures(low, high)).map(({ share, value }) => ({
      share,
      label: tickLabel(value, lastPlace(value), reading.decimal),
    }));

  const steps = roundSteps(high - low, 2);
  const even = ((high - low) * spacing) / length;
  let finest = Math.max(
    0,
    steps.findLastIndex((step) => step >= even * (1 - epsilon)),
  );
  const kept = () => {
    const step = steps[finest]!;
    // All on the grid of the finest step, so that neighbours do not stand at odds.
    const whole = steps.filter(
      (s) => s >= step && Math.abs(s / step - Math.round(s / step)) < epsilon,
    );
    return picked(whole.flatMap((s) => multiples(s, low, high)));
  };
  while (kept().length < 2 && finest < steps.length - 1) finest++;
  const digits = place(steps[finest]!);
  return kept().map(({ share, value }) => ({
    share,
    label: tickLabel(value, digits, reading.decimal),
  }));
}

/** Round pressures from low to high, the roundest first: powers of ten, and steps below zero. */
function roundPressures(low: number, high: number): readonly number[] {
  const wanted = [0];
  const top = -place(Math.max(Math.abs(low), Math.abs(high)));
  for (const k of [1, 5, 2]) for (let e = top; e > top - 7; e--) wanted.push(k * 10 ** e);
  const end = Math.min(high, 0);
  if (low < end)
    for (const step of roundSteps(end - low, 1))
      wanted.push(...multiples(step, low, end).reverse());
  return wanted.map((value) => Number(value.toPrecision(12)));
}
