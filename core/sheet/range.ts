import type { Medium } from '../equilibrium/medium.ts';
import { boundaryCurves } from '../map/boundary.ts';
import { fromSI, toSI, type UnitId } from '../units/index.ts';

type Ends = readonly [low: number, high: number];

/** Step of 1, 2 or 5 times a power of ten, the first that is at least `least`. */
function roundStep(least: number): number {
  const power = 10 ** Math.floor(Math.log10(least));
  return [1, 2, 5, 10].map((k) => k * power).find((step) => step >= least * (1 - 1e-9))!;
}

/** Widens to whole steps in the shown unit. */
function rounded([low, high]: Ends, unit: UnitId, steps: number): Ends {
  const a = fromSI(low, unit);
  const b = fromSI(high, unit);
  const step = roundStep((b - a) / steps);
  return [toSI(Math.floor(a / step) * step, unit), toSI(Math.ceil(b / step) * step, unit)];
}

/**
 * Temperatures (K) from end to end of a run with room at both sides, its boiling points kept in
 * sight where they are not far off; the whole map without a run.
 */
export function temperatureRange(
  m: Medium,
  places: readonly { readonly T: number; readonly p: number }[],
  unit: UnitId,
): Ends {
  const { validity } = m.substance.fluid;
  const { triple, critical } = m;
  const span = critical.T - triple.T;
  const run = [...places.map(({ T }) => T), ...boilingNear(m, places)];
  if (run.length === 0)
    return rounded(
      [Math.max(validity.vapourTmin, triple.T - 0.15 * span), critical.T + 0.2 * span],
      unit,
      10,
    );
  const low = Math.min(...run);
  const high = Math.max(...run);
  const room = Math.max(0.22 * (high - low), 0.04 * span);
  return rounded([Math.max(validity.vapourTmin, low - room), high + room], unit, 10);
}

/** Boiling temperatures (K) at the run's pressures, those within 120 K of the state itself. */
function boilingNear(
  m: Medium,
  places: readonly { readonly T: number; readonly p: number }[],
): readonly number[] {
  const saturation = boundaryCurves(m).find(({ kind }) => kind === 'saturation')!;
  return places
    .filter(({ p }) => p > m.triple.p && p < m.critical.p)
    .map(({ T, p }) => ({ T, boils: saturation.atPressure(p).T }))
    .filter(({ T, boils }) => Math.abs(boils - T) < 120)
    .map(({ boils }) => boils);
}

/** Absolute pressures (Pa) of a run with room; linear axes start at zero, logarithmic ones at a decade. */
export function pressureRange(
  m: Medium,
  run: readonly number[],
  kind: 'linear' | 'logarithmic',
  unit: UnitId,
  offset: number,
): Ends {
  const { triple, critical } = m;
  if (kind === 'logarithmic') {
    const low = run.length > 0 ? Math.min(...run) / 2 : triple.p / 100;
    const high = run.length > 0 ? Math.max(...run) * 2 : critical.p * 4;
    return [
      toSI(10 ** Math.floor(Math.log10(fromSI(low, unit)) + 1e-9), unit),
      toSI(10 ** Math.ceil(Math.log10(fromSI(high, unit)) - 1e-9), unit),
    ];
  }
  const top = run.length > 0 ? Math.max(...run) * 1.5 : critical.p * 1.2;
  // Absolute zero stays the foot of the axis; the top is round in the shown unit and kind.
  const shown = fromSI(top - offset, unit);
  const step = roundStep(fromSI(top, unit) / 10);
  return [0, toSI(Math.ceil(shown / step - 1e-9) * step, unit) + offset];
}
