import type { Medium } from '../equilibrium/medium.ts';
import { stablePhase, sublimationLineAt, type PhaseName } from '../equilibrium/phase.ts';
import { saturationAt, saturationAtPressure, saturationSlope } from '../equilibrium/saturation.ts';
import { sublimationPoint, sublimationPointAtPressure } from '../equilibrium/solidLines.ts';
import { margins, type Margin } from '../map/margins.ts';
import { problemOf } from './evaluate.ts';
import type { StateProblem } from './results.ts';

/** What stands at a place of the map. */
export interface PlaceAnswer {
  readonly T: number;
  readonly p: number;
  readonly phase: PhaseName | null;
  readonly solid: string | null;
  readonly problem: StateProblem | null;
  readonly margins: readonly Margin[];
}

/** Phase and margins at T (K) and p (Pa); a place outside the equations is told, never thrown. */
export function answerAt(m: Medium, T: number, p: number): PlaceAnswer {
  try {
    const { phase, solid } = stablePhase(m, T, p);
    return { T, p, phase, solid, problem: null, margins: margins(m, T, p) };
  } catch (error) {
    return { T, p, phase: null, solid: null, problem: problemOf(error), margins: [] };
  }
}

/** Where the pure substance boils (or its solid sublimes) at a single reading. */
export interface LineAnswer {
  readonly line: 'saturation' | 'sublimation';
  readonly T: number;
  readonly p: number;
  /** Slope of the line, Pa/K: turns an error of one reading into one of the other. */
  readonly slope: number;
}

/** The boiling point at pressure p (Pa), below the triple point the sublimation point; null beyond both. */
export function lineAtPressure(m: Medium, p: number): LineAnswer | null {
  if (p >= m.triple.p && p <= m.critical.p) {
    const s = saturationAtPressure(m, p);
    return { line: 'saturation', T: s.T, p, slope: saturationSlope(m, s) };
  }
  const line = m.substance.sublimation.find((one) => {
    const [low, high] = [one.range.Tmin, one.range.Tmax].map((T) => sublimationPoint(m, one, T).p);
    return p < m.triple.p && p >= low! && p <= high!;
  });
  if (!line) return null;
  const { T } = sublimationPointAtPressure(m, line, p);
  return { line: 'sublimation', T, p, slope: sublimationSlope(m, T) };
}

/** The boiling pressure at temperature T (K), below the triple point the sublimation pressure; null beyond both. */
export function lineAtTemperature(m: Medium, T: number): LineAnswer | null {
  if (T >= m.triple.T && T <= m.critical.T) {
    const s = saturationAt(m, T);
    return { line: 'saturation', T, p: s.p, slope: saturationSlope(m, s) };
  }
  const line = T < m.triple.T ? sublimationLineAt(m, T) : null;
  return line
    ? { line: 'sublimation', T, p: sublimationPoint(m, line, T).p, slope: sublimationSlope(m, T) }
    : null;
}

function sublimationSlope(m: Medium, T: number): number {
  const line = sublimationLineAt(m, T)!;
  const step = Math.min(0.01, 0.5 * (T - line.range.Tmin) + 1e-6);
  const below = Math.max(line.range.Tmin, T - step);
  return (
    (sublimationPoint(m, line, T).p - sublimationPoint(m, line, below).p) / (T - below || step)
  );
}
