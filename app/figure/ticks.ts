import { ticks as roundValues, tickStep } from 'd3';
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

/** A number as it stands beside a tick: plain from 0.001 to 999 999, else a power of ten. */
export function tickLabel(value: number, decimals: number, decimal: '.' | ','): readonly TextRun[] {
  const size = Math.abs(value);
  if (size !== 0 && (size < 0.001 * (1 - epsilon) || size >= 1e6 * (1 - epsilon))) {
    const exponent = Math.floor(Math.log10(size) + epsilon);
    const factor = value / 10 ** exponent;
    const power = { text: formatNumber(exponent, 0), scale: 0.75, shift: 0.38 };
    if (Math.abs(factor - 1) < 1e-6) return [{ text: '10' }, power];
    return [
      { text: `${formatNumber(factor, Number.isInteger(+factor.toFixed(6)) ? 0 : 1, decimal)}·10` },
      power,
    ];
  }
  return [{ text: formatNumber(value, decimals, decimal) }];
}

const place = (step: number): number => Math.max(0, -Math.floor(Math.log10(step) + epsilon));
const ownPlace = (value: number): number =>
  value === 0 ? 0 : Math.max(0, -Math.floor(Math.log10(Math.abs(value)) + epsilon));

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
  const count = Math.max(2, Math.floor(length / spacing));
  const step = tickStep(low, high, count);
  const digits = place(step);
  const major = roundValues(low, high, count).map((value) => ({
    share: scale.share(hidden(value, reading)),
    label: tickLabel(value, digits, reading.decimal),
  }));
  return major;
}

function logarithmicTicks(scale: Scale, length: number, spacing: number, reading: Reading): Tick[] {
  const low = shown(scale.range[0], reading);
  const high = shown(scale.range[1], reading);
  const first = Math.ceil(Math.log10(low) - epsilon);
  const last = Math.floor(Math.log10(high) + epsilon);
  const decade = length / (Math.log10(high) - Math.log10(low));
  const every = Math.max(1, Math.ceil(spacing / decade));
  const labelled = (k: number): boolean =>
    (k === 2 || k === 5) && decade * Math.log10(2) >= spacing * 0.9 && last - first <= 3;
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
        label: named ? tickLabel(value, ownPlace(value), reading.decimal) : null,
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
  const wanted: number[] = [];
  if (scale.kind === 'reciprocal') {
    for (const count of [4, 8, 16, 32]) wanted.push(...roundValues(low, high, count));
  } else {
    wanted.push(0);
    const top = Math.floor(Math.log10(Math.max(Math.abs(low), Math.abs(high))));
    for (const k of [1, 5, 2]) {
      for (let e = top; e > top - 7; e--) wanted.push(k * 10 ** e);
    }
    if (low < 0) {
      const unit = 10 ** Math.floor(Math.log10(-low));
      for (const step of [5, 2, 1].map((k) => k * unit))
        for (let k = 1; k * step < -low; k++) wanted.push(-k * step);
    }
  }
  const kept: { share: number; value: number }[] = [];
  for (const value of new Set(wanted.map((x) => +x.toPrecision(2)))) {
    const at = hidden(value, reading);
    if (at < scale.range[0] || at > scale.range[1]) continue;
    const share = scale.share(at);
    if (kept.every((other) => Math.abs(other.share - share) * length >= spacing))
      kept.push({ share, value });
  }
  return kept
    .sort((a, b) => a.share - b.share)
    .map(({ share, value }) => ({
      share,
      label: tickLabel(
        value,
        value === 0
          ? 0
          : Math.max(
              0,
              ownPlace(value) +
                (Number.isInteger(+(value * 10 ** ownPlace(value)).toFixed(6)) ? 0 : 1),
            ),
        reading.decimal,
      ),
    }));
}
