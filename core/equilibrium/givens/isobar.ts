import { OutOfRange } from '../../errors.ts';
import type { Medium } from '../medium.ts';
import { maybeSolidBelow, meltingLineAt, solidDensity, type PhaseState } from '../phase.ts';
import { criticalCap, saturationAt, saturationAtPressure } from '../saturation.ts';
import {
  meltingPointAtPressure,
  sublimationPoint,
  sublimationPointAtPressure,
} from '../solidLines.ts';
import { saturatedPhases } from '../state.ts';
import { quickSaturation } from './quick.ts';
import { onTriple, triplePhases, type Plateau, type Rung } from './rungs.ts';

/** Lowest temperature (K) at which anything is known of the substance. */
export function coldest(m: Medium): number {
  const { sublimation, fluid } = m.substance;
  return sublimation.length > 0
    ? Math.min(...sublimation.map(({ range }) => range.Tmin))
    : Math.min(m.triple.T, fluid.validity.Tmin);
}

/** From this pressure (Pa) up the dome is lost in rounding and the fluid is one. */
export const capPressure = (m: Medium): number => saturationAt(m, m.critical.T - criticalCap).p;

/** Throws OutOfRange for a pressure (Pa) that no equation covers. */
export function checkPressure(m: Medium, p: number): void {
  const { pmax, source } = m.substance.fluid.validity;
  if (!(p > 0 && p <= pmax)) throw new OutOfRange('p', p, { min: 0, max: pmax }, source, 'Pa');
}

/** Throws OutOfRange for a temperature (K) that no equation covers. */
export function checkTemperature(m: Medium, T: number): void {
  const { Tmax, source } = m.substance.fluid.validity;
  const min = coldest(m);
  if (!(T >= min && T <= Tmax)) throw new OutOfRange('T', T, { min, max: Tmax }, source, 'K');
}

/** The solid below a boundary at p, where its equation reaches. */
function solidBelow(m: Medium, { solid, T, rho }: PhaseState): readonly Rung[] {
  const equation = solid === null || rho === null ? undefined : m.solids.get(solid)?.equation;
  if (!equation) return [{ kind: 'blank', reason: 'no equation for the solid' }];
  const low = Math.max(equation.validity.Tmin, coldest(m));
  if (!(low < T)) return [];
  return [{ kind: 'piece', phase: 'solid', solid, low, high: T, rho: [null, null] }];
}

const boundary = (sides: readonly PhaseState[]): Plateau => {
  const { T, p } = sides[0]!;
  return { kind: 'plateau', T, p, sides };
};

/** What lies below the fluid at p (Pa) and where the fluid begins. */
function below(m: Medium, p: number): { rungs: readonly Rung[]; T: number; rho: number | null } {
  const { triple, substance } = m;
  if (Math.abs(p - triple.p) <= onTriple * triple.p) {
    const sides = triplePhases(m).map((side) => ({ ...side, p }));
    return { rungs: [...solidBelow(m, sides[0]!), boundary(sides)], T: triple.T, rho: triple.rhoV };
  }
  if (p < triple.p) {
    let low = Infinity;
    for (const line of substance.sublimation) {
      const [bottom, top] = [line.range.Tmin, line.range.Tmax].map(
        (T) => sublimationPoint(m, line, T).p,
      ) as [number, number];
      low = Math.min(low, bottom);
      if (!(p >= bottom && p <= top)) continue;
      const at = sublimationPointAtPressure(m, line, p);
      const rho = solidDensity(m, line.solid, at.T, p);
      const solid: PhaseState = { phase: 'solid', solid: line.solid, T: at.T, p, rho };
      const vapour: PhaseState = { phase: 'vapour', solid: null, T: at.T, p, rho: at.rho };
      return { rungs: [...solidBelow(m, solid), boundary([solid, vapour])], T: at.T, rho: at.rho };
    }
    if (p < low && low < Infinity) return { rungs: [], T: coldest(m), rho: null };
    return {
      rungs: [{ kind: 'blank', reason: 'sublimation not published' }],
      T: triple.T,
      rho: null,
    };
  }
  const line = meltingLineAt(m, p);
  if (!line) {
    const reason =
      substance.melting.length > 0 ? 'beyond the melting line' : 'melting not published';
    return { rungs: [{ kind: 'blank', reason }], T: maybeSolidBelow(m, p), rho: null };
  }
  const at = meltingPointAtPressure(m, line, p);
  const rho = solidDensity(m, line.solid, at.T, p);
  const solid: PhaseState = { phase: 'solid', solid: line.solid, T: at.T, p, rho };
  const liquid: PhaseState = { phase: 'liquid', solid: null, T: at.T, p, rho: at.rho };
  return { rungs: [...solidBelow(m, solid), boundary([solid, liquid])], T: at.T, rho: at.rho };
}

interface Known {
  readonly p: number;
  readonly rungs: readonly Rung[];
}
const last = new WeakMap<Medium, Known>();

/**
 * The phases and boundaries met at pressure p (Pa) as temperature rises: single phases as pieces over
 * temperature, boundaries as plateaus. At the triple pressure, to 1e-9, one plateau holds three phases;
 * from 1e-4 K below the critical temperature up there is one fluid.
 *
 * Domain: 0 < p up to the fluid equation's; elsewhere throws OutOfRange.
 */
export function isobar(m: Medium, p: number): readonly Rung[] {
  const ready = last.get(m);
  if (ready?.p === p) return ready.rungs;
  checkPressure(m, p);
  const { Tmax } = m.substance.fluid.validity;
  const { rungs: start, T, rho } = below(m, p);
  const rungs = [...start];
  const onTripleLine = Math.abs(p - m.triple.p) <= onTriple * m.triple.p;
  if (p > m.triple.p && p < capPressure(m) && !onTripleLine) {
    const s = quickSaturation(m, p) ?? saturationAtPressure(m, p);
    if (s.T > T)
      rungs.push({
        kind: 'piece',
        phase: 'fluid',
        solid: null,
        low: T,
        high: s.T,
        rho: [rho, s.rhoL],
      });
    rungs.push(boundary(saturatedPhases(s)));
    rungs.push({
      kind: 'piece',
      phase: 'fluid',
      solid: null,
      low: s.T,
      high: Tmax,
      rho: [s.rhoV, null],
    });
  } else
    rungs.push({
      kind: 'piece',
      phase: 'fluid',
      solid: null,
      low: T,
      high: Tmax,
      rho: [rho, null],
    });
  last.set(m, { p, rungs });
  return rungs;
}
