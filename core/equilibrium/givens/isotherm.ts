import type { MeltingLine } from '../../substances/substance.ts';
import type { Medium } from '../medium.ts';
import { solidDensity, sublimationLineAt, type PhaseState } from '../phase.ts';
import { criticalCap, saturationAt } from '../saturation.ts';
import { meltingPoint, meltingPressureRange, sublimationPoint } from '../solidLines.ts';
import { saturatedPhases } from '../state.ts';
import { checkTemperature } from './isobar.ts';
import { onTriple, triplePhases, type Plateau, type Rung } from './rungs.ts';

const boundary = (sides: readonly PhaseState[]): Plateau => {
  const { T, p } = sides[0]!;
  return { kind: 'plateau', T, p, sides };
};

function melting(m: Medium, line: MeltingLine, T: number): Plateau | null {
  const at = meltingPoint(m, line, T);
  const { p } = at;
  if (p > m.substance.fluid.validity.pmax) return null;
  const rho = solidDensity(m, line.solid, T, p);
  const solid: PhaseState = { phase: 'solid', solid: line.solid, T, p, rho };
  const phase = p > m.critical.p && T > m.critical.T ? 'supercritical' : 'liquid';
  const liquid: PhaseState = { phase, solid: null, T, p, rho: at.rho };
  const [low, high] = [line.range.Tmin, line.range.Tmax].map((t) => meltingPoint(m, line, t).p);
  return boundary(low! > high! ? [solid, liquid] : [liquid, solid]);
}

/** Highest pressure (Pa) at which a solid is known, as `stablePhase` has it. */
function topOfSolid(m: Medium, solid: string): number {
  const { validity } = m.solids.get(solid)!.equation;
  const tops = m.substance.melting
    .filter((line) => line.solid === solid)
    .map((line) => meltingPressureRange(m, line)[1]);
  // A melting line passes the solid equation's own limit by rounding alone, as in `solidDensity`.
  const most = Math.min(validity.pmax * 1.000001, m.substance.fluid.validity.pmax);
  return Math.min(most, Math.max(m.triple.p, ...tops));
}

/** Highest pressure (Pa) at which a fluid that meets no melting line at T is known to be one. */
function topOfFluid(m: Medium, T: number): number {
  const { pmax } = m.substance.fluid.validity;
  const lines = m.substance.melting.map((line) => ({
    high: meltingPressureRange(m, line)[1],
    Tmax: line.range.Tmax,
  }));
  if (lines.length === 0) return pmax;
  // Beyond the last line's end the substance may be solid below T ∝ p, see `maybeSolidBelow`.
  const covered = Math.max(...lines.map(({ high }) => high));
  const maybe = Math.min(...lines.map(({ high, Tmax }) => (high * T) / Tmax));
  return Math.min(pmax, Math.max(covered, maybe));
}

interface Known {
  readonly T: number;
  readonly rungs: readonly Rung[];
}
const last = new WeakMap<Medium, Known>();

/**
 * The phases and boundaries met at temperature T (K) as pressure rises: single phases as pieces over
 * pressure, boundaries as plateaus, density rising all the way. At the triple temperature, to 1e-9,
 * one plateau holds three phases.
 *
 * Domain: the temperatures of the equations; elsewhere throws OutOfRange.
 */
export function isotherm(m: Medium, T: number): readonly Rung[] {
  const ready = last.get(m);
  if (ready?.T === T) return ready.rungs;
  checkTemperature(m, T);
  const { triple, critical, substance } = m;
  const { pmax } = substance.fluid.validity;
  const onTripleLine = Math.abs(T - triple.T) <= onTriple * triple.T;
  const met: Plateau[] = [];
  const rungs: Rung[] = [];
  if (onTripleLine) {
    const sides = triplePhases(m).map((side) => ({ ...side, T }));
    met.push(boundary(sides.sort((a, b) => (a.rho ?? Infinity) - (b.rho ?? Infinity))));
  } else if (T > triple.T) {
    if (T <= critical.T - criticalCap)
      met.push(boundary([...saturatedPhases(saturationAt(m, T))].reverse()));
  } else {
    const line = sublimationLineAt(m, T);
    if (!line) return [{ kind: 'blank', reason: 'sublimation not published' }];
    const at = sublimationPoint(m, line, T);
    const rho = solidDensity(m, line.solid, T, at.p);
    const solid: PhaseState = { phase: 'solid', solid: line.solid, T, p: at.p, rho };
    met.push(boundary([{ phase: 'vapour', solid: null, T, p: at.p, rho: at.rho }, solid]));
  }
  const lines = substance.melting
    .filter(({ range }) => T >= range.Tmin && T <= range.Tmax)
    .map((line) => melting(m, line, T))
    .filter((plateau) => plateau !== null)
    // The line that starts at the triple point is part of its plateau.
    .filter(({ p }) => !(onTripleLine && p < 2 * triple.p + 1e4))
    .sort((a, b) => a.p - b.p);
  for (const line of lines) {
    // Two lines that meet at a triple point at this temperature are one boundary.
    const before = met.at(-1);
    if (!before || (before.sides.at(-1)!.phase === 'solid') === (line.sides[0]!.phase === 'solid'))
      met.push(line);
  }
  let low = 0;
  let side: PhaseState | null = null;
  for (const plateau of met) {
    const next = plateau.sides[0]!;
    const phase = next.phase === 'solid' ? 'solid' : 'fluid';
    if (phase === 'solid' && next.rho === null) break;
    rungs.push({
      kind: 'piece',
      phase,
      solid: next.solid,
      low,
      high: plateau.p,
      rho: [side?.rho ?? null, next.rho],
    });
    rungs.push(plateau);
    low = plateau.p;
    side = plateau.sides.at(-1)!;
  }
  if (side?.phase === 'solid') {
    const top = side.solid !== null && side.rho !== null ? topOfSolid(m, side.solid) : 0;
    if (top > low)
      rungs.push({
        kind: 'piece',
        phase: 'solid',
        solid: side.solid,
        low,
        high: top,
        rho: [side.rho, null],
      });
    const whole = side.rho !== null && top >= pmax;
    if (!whole)
      rungs.push({
        kind: 'blank',
        reason: side.rho === null ? 'no equation for the solid' : 'beyond the melting line',
      });
  } else {
    const top = topOfFluid(m, T);
    if (top > low)
      rungs.push({
        kind: 'piece',
        phase: 'fluid',
        solid: null,
        low,
        high: top,
        rho: [side?.rho ?? null, null],
      });
    if (top < pmax) rungs.push({ kind: 'blank', reason: 'beyond the melting line' });
  }
  last.set(m, { T, rungs });
  return rungs;
}
