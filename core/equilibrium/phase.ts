import { OutOfRange, Undetermined, Unknown } from '../errors.ts';
import type { MeltingLine, SublimationLine } from '../substances/substance.ts';
import { auxiliary } from '../models/auxiliary.ts';
import { densityAt } from './density.ts';
import type { Medium } from './medium.ts';
import { saturationAt } from './saturation.ts';
import {
  meltingPointAtPressure,
  meltingPressureRange,
  seam,
  sublimationPoint,
} from './solidLines.ts';

export type PhaseName = 'solid' | 'liquid' | 'vapour' | 'supercritical';

/** One phase at (T, p): K, Pa, kg/m³. */
export interface PhaseState {
  readonly phase: PhaseName;
  /** Name of the solid, null where its form is not resolved or the phase is a fluid. */
  readonly solid: string | null;
  readonly T: number;
  readonly p: number;
  /** Null where no published equation gives it. */
  readonly rho: number | null;
}

/** Closer to a boundary than this, relative in T or p, (T, p) does not fix the state. */
export const onBoundary = 1e-9;

/** The line along which the substance melts at pressure p, or null where none is published. */
export function meltingLineAt(m: Medium, p: number): MeltingLine | null {
  const { melting } = m.substance;
  const covers = (slack: number) => (line: MeltingLine) => {
    const [low, high] = meltingPressureRange(m, line);
    return p >= low * (1 - slack) && p <= high * (1 + slack);
  };
  // Only a pressure that no line has, in the gap at a seam, goes to a neighbour.
  return melting.find(covers(0)) ?? melting.find(covers(seam)) ?? null;
}

/**
 * Below this temperature the substance may be solid at a pressure that no melting line reaches: a
 * melting curve rises more steeply than p ∝ T, which bounds it beyond its last published point.
 */
export function maybeSolidBelow(m: Medium, p: number): number {
  return m.substance.melting.reduce((T, line) => {
    const [, high] = meltingPressureRange(m, line);
    return Math.max(T, p > high ? line.range.Tmax * (p / high) : T);
  }, m.triple.T);
}

/** The sublimation line that covers temperature T, or null. */
export function sublimationLineAt(m: Medium, T: number): SublimationLine | null {
  return m.substance.sublimation.find(({ range }) => T >= range.Tmin && T <= range.Tmax) ?? null;
}

/** Names the fluid at (T, p) by the usual convention: supercritical above both critical values. */
export function fluidName(m: Medium, T: number, p: number): 'liquid' | 'vapour' | 'supercritical' {
  const { critical } = m;
  if (T >= critical.T) return p >= critical.p ? 'supercritical' : 'vapour';
  if (p >= critical.p) return 'liquid';
  const guess = T >= m.triple.T ? auxiliary(m.substance.saturation.pressure, T) : m.triple.p;
  if (p > 1.2 * guess) return 'liquid';
  if (p < 0.8 * guess) return 'vapour';
  return p > saturationAt(m, T).p ? 'liquid' : 'vapour';
}

const close = (a: number, b: number): boolean => Math.abs(a - b) < onBoundary * Math.abs(b);

/** Whether (T, p) is within 1e-9, in p or in T, of a line of which only p over T is solved. */
function onLine(
  T: number,
  p: number,
  atT: number,
  [Tmin, Tmax]: readonly [number, number],
  line: (T: number) => number,
): boolean {
  if (close(p, atT)) return true;
  // Far from the line the two solutions below cannot enclose p.
  if (Math.abs(p / atT - 1) > 1e-6) return false;
  const colder = line(Math.max(Tmin, T * (1 - onBoundary)));
  const warmer = line(Math.min(Tmax, T * (1 + onBoundary)));
  return p > colder && p < warmer;
}

/**
 * The stable phase of the substance at T (K) and p (Pa), with its density.
 *
 * Domain: the validity of the fluid and solid equations; outside it throws OutOfRange, where no
 * boundary is published that would tell solid from fluid it throws Unknown. Within 1e-9 of a
 * boundary it throws Undetermined, for there (T, p) fixes no fraction.
 */
export function stablePhase(m: Medium, T: number, p: number): PhaseState {
  const { substance, critical, triple } = m;
  const { validity } = substance.fluid;
  if (!(p > 0 && p <= validity.pmax))
    throw new OutOfRange('p', p, { min: 0, max: validity.pmax }, validity.source, 'Pa');
  const sublimes = substance.sublimation.length > 0;
  const Tlow = sublimes
    ? Math.min(...substance.sublimation.map((line) => line.range.Tmin))
    : Math.min(triple.T, validity.Tmin);
  if (!(T >= Tlow && T <= validity.Tmax))
    throw new OutOfRange('T', T, { min: Tlow, max: validity.Tmax }, validity.source, 'K');

  if (p < triple.p) {
    if (T < triple.T) {
      const line = sublimationLineAt(m, T);
      if (!line) throw new Unknown('phase', 'sublimation not published');
      const at = sublimationPoint(m, line, T);
      const { Tmin, Tmax } = line.range;
      if (onLine(T, p, at.p, [Tmin, Tmax], (t) => sublimationPoint(m, line, t).p))
        throw new Undetermined(line.id, T, p, 'solid fraction');
      if (p > at.p)
        return { phase: 'solid', solid: line.solid, T, p, rho: solidDensity(m, line.solid, T, p) };
      return { phase: 'vapour', solid: null, T, p, rho: densityAt(m, T, p, 'vapour') };
    }
  } else {
    const line = meltingLineAt(m, p);
    if (line) {
      const { Tmin, Tmax } = line.range;
      const slack = 0.05;
      if (T < Tmin - slack)
        return { phase: 'solid', solid: line.solid, T, p, rho: solidDensity(m, line.solid, T, p) };
      if (T <= Tmax + slack) {
        const at = meltingPointAtPressure(m, line, p);
        if (close(T, at.T)) throw new Undetermined(line.id, T, p, 'solid fraction');
        if (T < at.T)
          return {
            phase: 'solid',
            solid: line.solid,
            T,
            p,
            rho: solidDensity(m, line.solid, T, p),
          };
      }
    } else if (T < maybeSolidBelow(m, p)) {
      throw new Unknown(
        'phase',
        substance.melting.length > 0 ? 'beyond the melting line' : 'melting not published',
      );
    }
  }
  const phase = fluidName(m, T, p);
  if (T < critical.T && T >= triple.T && p < critical.p) {
    const guess = auxiliary(substance.saturation.pressure, T);
    if (
      Math.abs(p / guess - 1) < 0.2 &&
      onLine(T, p, saturationAt(m, T).p, [triple.T, critical.T], (t) => saturationAt(m, t).p)
    )
      throw new Undetermined('saturation', T, p, 'vapour fraction');
  }
  const branch = phase === 'vapour' ? 'vapour' : 'liquid';
  return { phase, solid: null, T, p, rho: densityAt(m, T, p, branch) };
}

/** Density of the named solid (kg/m³), null where its equation does not reach. */
export function solidDensity(m: Medium, solid: string | null, T: number, p: number): number | null {
  const known = solid === null ? undefined : m.solids.get(solid);
  if (!known) return null;
  const { Tmin, Tmax, pmax } = known.equation.validity;
  // The melting line passes the equation's own limit by rounding alone.
  if (T < Tmin || T > Tmax * 1.000001 || p > pmax * 1.000001) return null;
  return 1 / known.model(T, p).gp;
}
