import { overall, phaseProperties, type State } from '../equilibrium/state.ts';
import type { Medium } from '../equilibrium/medium.ts';
import type { Properties } from '../models/fluidProperties.ts';
import type { BoundaryCurve, BoundaryPoint } from '../map/boundary.ts';
import { changeOf, named, type Encounter } from './encounter.ts';
import { integral } from './integral.ts';
import { absence, type HeatAbsent, type Outcome } from './outcome.ts';
import { StepFailure } from './problem.ts';
import { hasVapour, shareOf, standOn, type Share, type Stand } from './stand.ts';

export interface Along {
  readonly curve: BoundaryCurve;
  readonly to: BoundaryPoint;
  /** Share of the second side at the end; where vapour leaves, of the mass at the step's start that has turned to vapour. */
  readonly share: number | null;
  /** Heat taken in, J per kg at the path's start, evenly over the temperature. */
  readonly heat: number | null;
  readonly leaves: boolean;
}

/** Both sides' properties on the boundary at a temperature, each point the start of the next. */
function sidesAlong(
  m: Medium,
  curve: BoundaryCurve,
  ends: readonly [BoundaryPoint, BoundaryPoint],
): (T: number) => readonly [Properties | null, Properties | null] {
  let near = ends[0];
  return (T) => {
    near = T === ends[0].T ? ends[0] : T === ends[1].T ? ends[1] : curve.atTemperature(T, near);
    return [phaseProperties(m, near.sides[0]!), phaseProperties(m, near.sides[1]!)];
  };
}

type Sides = (T: number) => readonly [Properties, Properties];

/** ∫T ds with the share of the second side changing evenly with temperature, J/kg. */
function heatStaying(sides: Sides, T0: number, T1: number, y0: number, y1: number, tol: number) {
  const s = (T: number, y: number): number => {
    const [a, b] = sides(T);
    return (1 - y) * a.s + y * b.s;
  };
  const edges = T1 * s(T1, y1) - T0 * s(T0, y0);
  if (T1 === T0) return edges;
  const y = (T: number): number => y0 + ((T - T0) / (T1 - T0)) * (y1 - y0);
  return edges - integral((T) => s(T, y(T)), T0, T1, tol);
}

/** Share at the end where `q` (J/kg) is taken in evenly over the temperature: Δs = q ln(T1/T0)/(T1 − T0). */
function shareStaying(sides: Sides, T0: number, T1: number, y0: number, q: number): number {
  const [a0, b0] = sides(T0);
  const [a1, b1] = sides(T1);
  const perT = T1 === T0 ? 1 / T0 : Math.log(T1 / T0) / (T1 - T0);
  return ((1 - y0) * a0.s + y0 * b0.s + q * perT - a1.s) / (b1.s - a1.s);
}

interface Loss {
  readonly heat: number;
  /** ∫ h of the vapour over what leaves, and of its heat of vaporisation. */
  readonly enthalpy: number;
  readonly latent: number;
}

/**
 * Vapour leaving as it forms, its share of the mass growing evenly with temperature from y0 to y1:
 * δq = m T ds + L δy with m = 1 − y of the condensed phase, which the heat of vaporisation L leaves.
 */
function heatLeaving(
  sides: Sides,
  T0: number,
  T1: number,
  y0: number,
  y1: number,
  tol: number,
): Loss {
  if (T1 === T0) {
    const [a, b] = sides(T0);
    const latent = (y1 - y0) * (b.h - a.h);
    return { heat: latent, enthalpy: (y1 - y0) * b.h, latent };
  }
  const dT = T1 - T0;
  const slope = (y1 - y0) / dT;
  const y = (T: number): number => y0 + (T - T0) * slope;
  const edges = T1 * (1 - y1) * sides(T1)[0].s - T0 * (1 - y0) * sides(T0)[0].s;
  // By parts: ∫ m T ds = [m T s] − ∫ s d(mT).
  const area = integral((T) => sides(T)[0].s * (1 - y(T) - T * slope), T0, T1, tol);
  const latent = slope * integral((T) => sides(T)[1].h - sides(T)[0].h, T0, T1, tol);
  const enthalpy = slope * integral((T) => sides(T)[1].h, T0, T1, tol);
  return { heat: edges - area + latent, enthalpy, latent };
}

/** Share that has left where `q` (J/kg) is taken in evenly over the temperature, and what it took along. */
function shareLeaving(
  sides: Sides,
  T0: number,
  T1: number,
  y0: number,
  q: number,
): Loss & { readonly y1: number } {
  if (T1 === T0) {
    const [a, b] = sides(T0);
    const y1 = y0 + q / (b.h - a.h);
    return { heat: q, y1, enthalpy: (y1 - y0) * b.h, latent: q };
  }
  // Trapezoids of m T Δs + L Δy = Δq, then Richardson: the error falls with the fourth power.
  const march = (n: number): Loss & { readonly y1: number } => {
    let mass = 1 - y0;
    let enthalpy = 0;
    let latent = 0;
    let [a0, b0] = sides(T0);
    for (let i = 1; i <= n; i++) {
      const T = T0 + (i / n) * (T1 - T0);
      const [a, b] = sides(T);
      const half = 0.5 * (T - (0.5 * (T1 - T0)) / n) * (a.s - a0.s);
      const L = 0.5 * (b0.h - a0.h + b.h - a.h);
      const next = (mass * (L + half) - q / n) / (L - half);
      enthalpy += 0.5 * (b0.h + b.h) * (mass - next);
      latent += L * (mass - next);
      mass = next;
      [a0, b0] = [a, b];
    }
    return { heat: q, y1: 1 - mass, enthalpy, latent };
  };
  const coarse = march(24);
  const fine = march(48);
  const better = (key: 'y1' | 'enthalpy' | 'latent'): number =>
    fine[key] + (fine[key] - coarse[key]) / 3;
  return { heat: q, y1: better('y1'), enthalpy: better('enthalpy'), latent: better('latent') };
}

const heatTolerance = 1e-8;
/** Rounding may take a share past its end by this much. */
const slack = 1e-9;

/**
 * A run along a boundary from where the path stands on it, or a change of phase at one point of it.
 *
 * Without a share or a heat the share at the end is open. With a share it changes evenly with
 * temperature; with a heat the heat is taken in evenly with temperature, so no heat at all follows
 * the line at constant entropy. Throws StepFailure where that leaves 0 to 1, or where vapour that
 * left would have to condense.
 */
export function along(m: Medium, from: Stand, run: Along): Outcome {
  const { curve, to } = run;
  const A = { T: from.state.T, p: from.state.p };
  const still = to.T === A.T;
  const leaves = run.leaves && hasVapour(curve);
  const given = shareOf(curve, from.state);
  const start: BoundaryPoint = still ? to : { ...A, sides: pointAt(curve, A.T).sides };
  const both = sidesAlong(m, curve, [start, to]);
  const blank = [...both(A.T), ...both(to.T)].some((side) => side === null);
  const sides = both as Sides;
  const tol = heatTolerance * m.fluid.R * m.critical.T;
  const y0 = typeof given === 'number' ? given : null;
  if (leaves && y0 === 1) throw new StepFailure({ code: 'nothingLeft', ...A });

  let y1: number | null = run.share;
  let loss: Loss | null = null;
  if (run.heat !== null && y0 !== null && !blank && from.mass !== null) {
    const q = run.heat / from.mass;
    const range = (least: number, most: number): never => {
      const [low, high] = [least * from.mass!, most * from.mass!];
      throw new StepFailure({
        code: 'heatRange',
        heat: run.heat!,
        least: Math.min(low, high),
        most: Math.max(low, high),
      });
    };
    if (leaves) {
      const out = shareLeaving(sides, A.T, to.T, y0, q);
      if (out.y1 < y0 - slack || out.y1 > 1 + slack)
        range(
          heatLeaving(sides, A.T, to.T, y0, y0, tol).heat,
          heatLeaving(sides, A.T, to.T, y0, 1, tol).heat,
        );
      y1 = Math.min(1, Math.max(y0, out.y1));
      loss = out;
    } else {
      y1 = shareStaying(sides, A.T, to.T, y0, q);
      if (y1 < -slack || y1 > 1 + slack) {
        const at = (y: number): number => {
          const perT = still ? 1 / A.T : Math.log(to.T / A.T) / (to.T - A.T);
          const [a0, b0] = sides(A.T);
          const [a1, b1] = sides(to.T);
          return (a1.s + y * (b1.s - a1.s) - (1 - y0) * a0.s - y0 * b0.s) / perT;
        };
        range(at(0), at(1));
      }
      y1 = Math.min(1, Math.max(0, y1));
    }
  }
  if (leaves && y1 !== null && y0 !== null && y1 < y0 - slack)
    throw new StepFailure({ code: 'nothingCondensesBack', least: y0 });

  const open: Share = [0, 1];
  const mass = from.mass;
  const end: Stand = leaves
    ? standOn(m, curve, to, 0, mass === null || y1 === null ? null : mass * (1 - y1))
    : standOn(m, curve, to, y1 ?? open, mass);

  let heatAbsent: HeatAbsent | null = null;
  if (mass === null) heatAbsent = { code: 'openMass' };
  else if (blank) heatAbsent = absence(blankState(m, start, to), curve.id, 'start');
  else if (y0 === null) heatAbsent = { code: 'openFraction', boundary: curve.id, at: 'start' };
  else if (y1 === null) heatAbsent = { code: 'openFraction', boundary: curve.id, at: 'end' };
  let heat: number | null = null;
  let work: number | null = null;
  let lost: Outcome['lost'] = leaves ? { mass: null, enthalpy: null, latent: null } : null;
  if (heatAbsent === null && mass !== null && y0 !== null && y1 !== null) {
    let q: number;
    let enthalpy = 0;
    if (leaves) {
      loss ??= heatLeaving(sides, A.T, to.T, y0, y1, tol);
      q = loss.heat;
      // What is vapour at the start leaves at once and takes no heat.
      const [a, b] = sides(A.T);
      enthalpy = loss.enthalpy + y0 * b.h;
      const latent = loss.latent + y0 * (b.h - a.h);
      lost = { mass: mass * y1, enthalpy: mass * enthalpy, latent: mass * latent };
    } else q = run.heat !== null ? run.heat / mass : heatStaying(sides, A.T, to.T, y0, y1, tol);
    const left = leaves ? 1 - y1 : 1;
    heat = mass * q;
    work = mass * (left * overall(end.state, 'u')! - overall(from.state, 'u')! - q + enthalpy);
  }
  // The heat that was given is known whatever else is open.
  if (run.heat !== null) heat ??= run.heat;

  const share = y0 === null || y1 === null ? null : Math.abs(y1 - y0);
  const rising = (y1 ?? 0) >= (y0 ?? 0);
  const [a, b] = rising ? to.sides : [to.sides[1], to.sides[0]];
  const code = share === null || share === 0 ? null : changeOf(a!.phase, b!.phase);
  const encounters: Encounter[] =
    still && share === 0
      ? []
      : [
          {
            kind: 'follows',
            code: code ?? 'follows',
            boundary: curve.id,
            boundaryKind: curve.kind,
            from: named(a!),
            to: named(b!),
            ...A,
            until: { T: to.T, p: to.p },
            share,
            progress: 0,
            time: null,
          },
        ];
  return {
    end,
    legs: still ? [] : [{ along: curve.id, from: A, to: { T: to.T, p: to.p } }],
    encounters,
    phases: [],
    heat,
    heatAbsent: heat === null ? heatAbsent : null,
    work,
    lost,
  };
}

const pointAt = (curve: BoundaryCurve, T: number): BoundaryPoint =>
  curve.atTemperature(Math.min(curve.T[1], Math.max(curve.T[0], T)));

/** A state that holds all four ends, to name the one without an equation. */
const blankState = (m: Medium, a: BoundaryPoint, b: BoundaryPoint): State => ({
  T: a.T,
  p: a.p,
  freedom: 0,
  parts: [...a.sides, ...b.sides].map((side) => ({
    ...side!,
    fraction: 1,
    properties: phaseProperties(m, side!),
  })),
});
