import {
  meltingPoint,
  meltingPointAtPressure,
  meltingPressureRange,
  sublimationPoint,
  sublimationPointAtPressure,
  type SolidLinePoint,
} from '../equilibrium/solidLines.ts';
import type { Medium } from '../equilibrium/medium.ts';
import { solidDensity, type PhaseState } from '../equilibrium/phase.ts';
import { saturationAt, saturationAtPressure } from '../equilibrium/saturation.ts';
import { saturatedPhases } from '../equilibrium/state.ts';
import type { MeltingLine, SublimationLine } from '../substances/substance.ts';

export type BoundaryKind = 'saturation' | 'melting' | 'sublimation' | 'critical';
export type Basis = 'equilibrium' | 'correlation' | 'estimate' | 'convention';

/** A point of a boundary with the phases on both sides; null where no phase is known there. */
export interface BoundaryPoint {
  readonly T: number;
  readonly p: number;
  readonly sides: readonly [PhaseState | null, PhaseState | null];
}

/** A boundary as an equation: solved at any temperature or pressure of its range. */
export interface BoundaryCurve {
  readonly id: string;
  readonly kind: BoundaryKind;
  readonly of: string;
  readonly basis: Basis;
  readonly source: string;
  /** The solid's form on a melting or sublimation line. */
  readonly form: string | null;
  readonly T: readonly [low: number, high: number];
  readonly p: readonly [low: number, high: number];
  /** True where pressure falls as temperature rises (ice Ih). */
  readonly falling: boolean;
  /** The single-valued quantity along which the curve is best followed. */
  readonly along: 'T' | 'p';
  atTemperature(T: number, near?: BoundaryPoint): BoundaryPoint;
  atPressure(p: number, near?: BoundaryPoint): BoundaryPoint;
}

/** A boundary followed as points, ready for any projection. */
export interface Boundary {
  readonly id: string;
  readonly kind: BoundaryKind;
  readonly of: string;
  readonly basis: Basis;
  readonly source: string;
  readonly form: string | null;
  readonly range: { readonly T: readonly [number, number]; readonly p: readonly [number, number] };
  readonly points: readonly BoundaryPoint[];
}

const known = new WeakMap<Medium, readonly BoundaryCurve[]>();

/** All boundaries of a substance between its phases, in the order sublimation, melting, saturation. */
export function boundaryCurves(m: Medium): readonly BoundaryCurve[] {
  const ready = known.get(m);
  if (ready) return ready;
  const made = [
    ...m.substance.sublimation.map((line) => sublimationCurve(m, line)),
    ...m.substance.melting.map((line) => meltingCurve(m, line)),
    saturationCurve(m),
  ].map(remembering);
  known.set(m, made);
  return made;
}

/** Points that a curve keeps for each of its two directions. */
const mostPoints = 512;

/** A function of a number that knows its last values; a neighbour only starts a solver closer. */
function remembered(
  solve: (at: number, near?: BoundaryPoint) => BoundaryPoint,
): (at: number, near?: BoundaryPoint) => BoundaryPoint {
  const points = new Map<number, BoundaryPoint>();
  return (at, near) => {
    // A trace asks for each of its many points once.
    if (near) return solve(at, near);
    const ready = points.get(at);
    if (ready) return ready;
    const point = solve(at);
    if (points.size >= mostPoints) points.clear();
    points.set(at, point);
    return point;
  };
}

/**
 * The same temperatures and pressures are asked for over and over: a run's meetings, margins and
 * error boxes at one place, and all of its other places while one of them is dragged.
 */
const remembering = (curve: BoundaryCurve): BoundaryCurve => ({
  ...curve,
  atTemperature: remembered((T, near) => curve.atTemperature(T, near)),
  atPressure: remembered((p, near) => curve.atPressure(p, near)),
});

function saturationCurve(m: Medium): BoundaryCurve {
  const { triple, critical, substance } = m;
  const point = (s: ReturnType<typeof saturationAt>): BoundaryPoint => ({
    T: s.T,
    p: s.p,
    sides: saturatedPhases(s),
  });
  const start = (near: BoundaryPoint | undefined, T: number) =>
    // Away from the critical point the last densities start Newton closer than the auxiliary ones.
    near && Math.abs(near.T - T) < 0.002 * T && critical.T - Math.max(T, near.T) > 0.02 * T
      ? { T, p: near.p, rhoL: near.sides[0]!.rho!, rhoV: near.sides[1]!.rho! }
      : undefined;
  return {
    id: 'saturation',
    kind: 'saturation',
    of: substance.id,
    basis: 'equilibrium',
    source: substance.fluid.formulation,
    form: null,
    T: [triple.T, critical.T],
    p: [triple.p, critical.p],
    falling: false,
    along: 'T',
    atTemperature: (T, near) => point(saturationAt(m, T, start(near, T))),
    atPressure: (p, near) =>
      point(
        saturationAtPressure(
          m,
          p,
          near && { T: near.T, p: near.p, rhoL: near.sides[0]!.rho!, rhoV: near.sides[1]!.rho! },
        ),
      ),
  };
}

function meltingCurve(m: Medium, line: MeltingLine): BoundaryCurve {
  const { Tmin, Tmax } = line.range;
  const falling = meltingPoint(m, line, Tmin).p > meltingPoint(m, line, Tmax).p;
  const point = ({ T, p, rho }: SolidLinePoint): BoundaryPoint => ({
    T,
    p,
    sides: [
      { phase: 'solid', solid: line.solid, T, p, rho: solidDensity(m, line.solid, T, p) },
      {
        phase: p > m.critical.p && T > m.critical.T ? 'supercritical' : 'liquid',
        solid: null,
        T,
        p,
        rho,
      },
    ],
  });
  const start = (near: BoundaryPoint | undefined) =>
    near && { T: near.T, p: near.p, rho: near.sides[1]!.rho };
  return {
    id: line.id,
    kind: 'melting',
    of: m.substance.id,
    basis: line.route,
    source: sourceOf(m, line),
    form: line.form,
    T: [Tmin, Tmax],
    p: meltingPressureRange(m, line),
    falling,
    along: 'p',
    atTemperature: (T, near) => point(meltingPoint(m, line, T, start(near))),
    atPressure: (p, near) => point(meltingPointAtPressure(m, line, p, start(near))),
  };
}

function sublimationCurve(m: Medium, line: SublimationLine): BoundaryCurve {
  const { Tmin, Tmax } = line.range;
  const point = ({ T, p, rho }: SolidLinePoint): BoundaryPoint => ({
    T,
    p,
    sides: [
      { phase: 'solid', solid: line.solid, T, p, rho: solidDensity(m, line.solid, T, p) },
      { phase: 'vapour', solid: null, T, p, rho },
    ],
  });
  return {
    id: line.id,
    kind: 'sublimation',
    of: m.substance.id,
    basis: line.route,
    source: sourceOf(m, line),
    form: line.form,
    T: [Tmin, Tmax],
    p: [sublimationPoint(m, line, Tmin).p, sublimationPoint(m, line, Tmax).p],
    falling: false,
    along: 'T',
    atTemperature: (T, near) =>
      point(
        sublimationPoint(
          m,
          line,
          T,
          near && Math.abs(near.T - T) < 0.01 * T
            ? { T, p: near.p, rho: near.sides[1]!.rho }
            : undefined,
        ),
      ),
    atPressure: (p) => point(sublimationPointAtPressure(m, line, p)),
  };
}

/** An equilibrium line stands on both phases' equations; the published curve only started it. */
function sourceOf(m: Medium, line: MeltingLine | SublimationLine): string {
  const solid = line.solid === null ? undefined : m.solids.get(line.solid);
  return line.route === 'equilibrium' && solid
    ? `${m.substance.fluid.formulation}; ${solid.equation.formulation}`
    : line.equation.source;
}
