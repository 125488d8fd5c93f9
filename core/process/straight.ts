import { densityAt } from '../equilibrium/density.ts';
import type { Medium } from '../equilibrium/medium.ts';
import { solidDensity, stablePhase } from '../equilibrium/phase.ts';
import { overall, phaseProperties, type State } from '../equilibrium/state.ts';
import { Undetermined } from '../errors.ts';
import type { BoundaryCurve, BoundaryPoint } from '../map/boundary.ts';
import {
  changeOf,
  kindOfChange,
  named,
  samePhase,
  type Encounter,
  type NamedPhase,
} from './encounter.ts';
import { integral } from './integral.ts';
import { meetings, type Meeting, type Place } from './meetings.ts';
import { absence, type HeatAbsent, type Outcome } from './outcome.ts';
import { StepFailure, type Leg } from './problem.ts';
import { curveOf, hasVapour, shareOf, sideOf, standAt, standOn, type Stand } from './stand.ts';

/** Where a straight run ends: anywhere, or at a point of a boundary with a share of its second side. */
export interface Arrival {
  readonly curve: BoundaryCurve;
  readonly point: BoundaryPoint;
  /** 'as it comes': on the side from which the run reaches the line. */
  readonly share: number | 'as it comes';
}

export interface Straight {
  readonly to: Place;
  readonly arrival: Arrival | null;
  /** The definition of heat: Δh where the pressure is kept, ∫T ds elsewhere. */
  readonly heat: 'enthalpy' | 'entropy';
  readonly leaves: boolean;
}

/** Closer than this along the run, two meetings are one. */
const together = 1e-10;

interface Stretch {
  readonly from: number;
  readonly to: number;
  readonly phase: NamedPhase;
}

/** Entropy of a phase along the run (J/(kg K)), each density the start of the next; null where no equation gives it. */
function entropyOf(m: Medium, { phase, solid }: NamedPhase): (at: Place) => number | null {
  let start: number | undefined;
  return ({ T, p }) => {
    const rho =
      phase === 'solid'
        ? solidDensity(m, solid, T, p)
        : densityAt(m, T, p, phase === 'vapour' ? 'vapour' : 'liquid', start);
    start = phase === 'solid' ? undefined : (rho ?? undefined);
    return phaseProperties(m, { phase, solid, T, p, rho })?.s ?? null;
  };
}

/** Temperature times entropy is kept to this share of R·Tc. */
const heatTolerance = 1e-8;

/** ∫T ds along the run (J/kg), by parts so that changes of phase on the way need no care; or why not. */
function heatByEntropy(
  m: Medium,
  at: (k: number) => Place,
  stretches: readonly Stretch[],
  start: State,
  end: State,
): number | NamedPhase {
  let q = end.T * overall(end, 's')! - start.T * overall(start, 's')!;
  const dT = end.T - start.T;
  if (dT === 0) return q;
  const tolerance = heatTolerance * m.fluid.R * m.critical.T;
  for (const { from, to, phase } of stretches) {
    const s = entropyOf(m, phase);
    let blank = false;
    const area = integral(
      (k) => {
        const value = s(at(k));
        if (value === null) blank = true;
        return value ?? 0;
      },
      from,
      to,
      tolerance / Math.abs(dT),
    );
    if (blank) return phase;
    q -= area * dT;
  }
  return q;
}

/**
 * The phase between two meetings; where `narrow` allows it, null if the run does not come away from
 * the line between them. Throws as `stablePhase` does.
 */
function phaseBetween(
  m: Medium,
  at: (k: number) => Place,
  low: number,
  high: number,
  narrow: boolean,
): NamedPhase | null {
  for (const k of [0.5, 0.9, 0.1]) {
    const { T, p } = at(low + k * (high - low));
    try {
      return named(stablePhase(m, T, p));
    } catch (error) {
      if (!(error instanceof Undetermined)) throw error;
      if (k === 0.1 && !narrow) throw error;
    }
  }
  return null;
}

/** The group's curve on which the phases change, or the one that was touched. */
function curveFor(
  group: readonly Meeting[],
  from: NamedPhase,
  to: NamedPhase,
): Meeting | undefined {
  const change = changeOf(from.phase, to.phase);
  return change
    ? (group.find(({ curve }) => curve?.kind === kindOfChange[change]) ?? group[0])
    : samePhase(from, to)
      ? group.find(({ curve }) => curve !== null)
      : group[0];
}

/**
 * A run straight in T and p from where the path stands.
 *
 * Boundaries on the way are crossed whole, at one point each; a start on a boundary first changes
 * over to the phase of the run's side. Throws StepFailure where vapour that leaves takes the last of
 * the mass, and as `stablePhase` does where the run enters what no equation covers.
 */
export function straight(m: Medium, from: Stand, run: Straight): Outcome {
  const A: Place = { T: from.state.T, p: from.state.p };
  const { to, arrival, leaves } = run;
  const at = (k: number): Place =>
    k === 0 ? A : k === 1 ? to : { T: A.T + k * (to.T - A.T), p: A.p + k * (to.p - A.p) };
  const leg = (end: Place): Leg => ({ along: null, from: A, to: end });
  const startCurve = from.on === null ? null : curveOf(m, from.on);

  const still = Math.abs(to.T - A.T) <= 1e-12 * A.T && Math.abs(to.p - A.p) <= 1e-11 * A.p;
  if (still && (!arrival || arrival.curve === startCurve)) {
    const known = overall(from.state, 'h') !== null;
    const heatAbsent = known ? null : absence(from.state, from.on, 'start');
    const zero = known ? 0 : null;
    return {
      end: from,
      legs: [],
      encounters: [],
      phases: [],
      heat: zero,
      heatAbsent,
      work: zero,
      lost: null,
    };
  }

  // Meetings at the ends belong to the start's and the end's own boundaries.
  const onTheWay = meetings(m, A, to).filter(
    ({ at: k, curve }) =>
      k > together &&
      k < 1 - together &&
      !(curve !== null && curve === startCurve && k < 1e-7) &&
      !(curve !== null && curve === arrival?.curve && k > 1 - 1e-7),
  );
  const groups: Meeting[][] = [];
  for (const meeting of onTheWay) {
    const last = groups.at(-1);
    if (last && meeting.at - last[0]!.at < together) last.push(meeting);
    else groups.push([meeting]);
  }
  const stretches: Stretch[] = [];
  let low = 0;
  for (let i = 0; !still && i <= groups.length;) {
    const high = groups[i]?.[0]!.at ?? 1;
    const phase = phaseBetween(m, at, low, high, i > 0 && i < groups.length);
    if (phase === null) {
      // A near tangent meets the line twice in one place.
      groups.splice(i - 1, 2, [...groups[i - 1]!, ...groups[i]!]);
      continue;
    }
    stretches.push({ from: low, to: high, phase });
    low = high;
    i++;
  }

  const encounters: Encounter[] = [];

  // The start.
  let vent: number | null = 0;
  let begin = from.state;
  const first = stretches[0]?.phase;
  if (startCurve) {
    const share = shareOf(startCurve, from.state);
    if (leaves && hasVapour(startCurve)) {
      vent = typeof share === 'number' ? share : null;
      if (vent === 1) throw new StepFailure({ code: 'nothingLeft', ...A });
      const condensed = begin.parts.filter((part) => sideOf(startCurve, part.phase) === 0);
      begin = { ...begin, parts: condensed.map((part) => ({ ...part, fraction: 1 })), freedom: 0 };
    }
    if (first) {
      const target = sideOf(startCurve, first.phase);
      if (leaves && hasVapour(startCurve) && target === 1)
        throw new StepFailure({ code: 'nothingLeft', ...A });
      const now = leaves && hasVapour(startCurve) ? 0 : share;
      const moved = typeof now === 'number' ? Math.abs(target - now) : null;
      const sides = startCurve.atTemperature(
        Math.min(startCurve.T[1], Math.max(startCurve.T[0], A.T)),
      ).sides;
      const [a, b] = target === 1 ? sides : [sides[1], sides[0]];
      const code = moved === 0 ? null : changeOf(a!.phase, b!.phase);
      encounters.push({
        kind: moved === 0 ? 'touches' : 'crosses',
        code: code ?? 'leaves',
        boundary: startCurve.id,
        boundaryKind: startCurve.kind,
        from: named(moved === 0 ? b! : a!),
        to: named(b!),
        ...A,
        until: null,
        share: moved,
        progress: 0,
        time: null,
      });
    }
  }

  // The way.
  groups.forEach((group, i) => {
    const [before, after] = [stretches[i]!.phase, stretches[i + 1]!.phase];
    const met = curveFor(group, before, after);
    if (!met) return;
    const { T, p, curve } = met;
    const change = curve ? changeOf(before.phase, after.phase) : null;
    if (leaves && (change === 'boils' || change === 'sublimes'))
      throw new StepFailure({ code: 'nothingLeft', T, p }, [leg({ T, p })]);
    if (leaves && (change === 'condenses' || change === 'deposits'))
      throw new StepFailure({ code: 'nothingCondensesBack', least: 1 }, [leg({ T, p })]);
    encounters.push({
      kind: samePhase(before, after) ? 'touches' : 'crosses',
      code: curve === null ? 'passesAboveCritical' : (change ?? 'touches'),
      boundary: curve?.id ?? 'critical',
      boundaryKind: curve?.kind ?? 'critical',
      from: before,
      to: after,
      T,
      p,
      until: null,
      share: change ? (vent === null ? null : 1 - vent) : 0,
      progress: group[0]!.at,
      time: null,
    });
  });

  // The end.
  const last = stretches.at(-1)?.phase ?? named(from.state.parts[0]!);
  let arrived: State;
  let end: Stand;
  let evaporated: number | null = 0;
  let vapourAt: BoundaryPoint | null = null;
  const kept = (share: number | null): number | null =>
    from.mass === null || share === null ? null : from.mass * share;
  const left = (now: number | null): number | null => (now === null ? null : 1 - now);
  if (arrival) {
    const { curve, point } = arrival;
    const side = sideOf(curve, last.phase);
    const share = arrival.share === 'as it comes' ? side : arrival.share;
    arrived = standOn(m, curve, point, side, 1).state;
    const off = leaves && hasVapour(curve);
    if (off && side === 0) {
      if (vent !== null && share < vent && arrival.share !== 'as it comes')
        throw new StepFailure({ code: 'nothingCondensesBack', least: vent }, [leg(to)]);
      vapourAt = point;
      evaporated =
        vent === null ? null : Math.max(0, share - (arrival.share === 'as it comes' ? 0 : vent));
      const gone = vent === null || evaporated === null ? null : vent + evaporated;
      end = standOn(m, curve, point, 0, kept(left(gone)));
    } else if (off && share !== 1) {
      throw new StepFailure({ code: 'nothingCondensesBack', least: 1 }, [leg(to)]);
    } else end = standOn(m, curve, point, share, kept(left(vent)));
    const [a, b] = side === 0 ? point.sides : [point.sides[1], point.sides[0]];
    const moved = off && side === 0 ? evaporated : Math.abs(share - side);
    const code = moved === 0 ? null : changeOf(a!.phase, b!.phase);
    if (!still || code)
      encounters.push({
        kind: code ? 'follows' : 'touches',
        code: code ?? 'reaches',
        boundary: curve.id,
        boundaryKind: curve.kind,
        from: named(a!),
        to: named(code ? b! : a!),
        T: point.T,
        p: point.p,
        until: code ? { T: point.T, p: point.p } : null,
        share: moved,
        progress: 1,
        time: null,
      });
  } else {
    end = standAt(m, to.T, to.p, kept(left(vent)));
    arrived = end.state;
    if (end.on !== null && !still) {
      const curve = curveOf(m, end.on);
      encounters.push({
        kind: 'touches',
        code: 'reaches',
        boundary: curve.id,
        boundaryKind: curve.kind,
        from: last,
        to: last,
        ...to,
        until: null,
        share: null,
        progress: 1,
        time: null,
      });
      if (leaves && hasVapour(curve)) end = { ...end, mass: null };
    }
  }

  // The heat: of what stays, per kg that stays, then of what leaves at the end.
  const target = leaves ? arrived : end.state;
  let heatAbsent: HeatAbsent | null = null;
  let perKg: number | null = null;
  if (from.mass === null || vent === null) heatAbsent = { code: 'openMass' };
  else if (overall(begin, 'h') === null) heatAbsent = absence(begin, from.on, 'start');
  else if (overall(target, 'h') === null) heatAbsent = absence(target, end.on, 'end');
  else if (run.heat === 'enthalpy') perKg = overall(target, 'h')! - overall(begin, 'h')!;
  else {
    const q = heatByEntropy(m, at, stretches, begin, target);
    if (typeof q === 'number') perKg = q;
    else heatAbsent = { code: 'noEquation', phase: q };
  }
  const vapourThere = leaves && ((startCurve && hasVapour(startCurve)) || vapourAt !== null);
  let heat: number | null = null;
  let work: number | null = null;
  let lost: Outcome['lost'] = vapourThere ? { mass: null, enthalpy: null, latent: null } : null;
  if (perKg !== null && from.mass !== null && vent !== null && evaporated !== null) {
    const ventAt = vent > 0 ? startCurve!.atTemperature(A.T) : null;
    const at0 = ventAt && sidesOf(m, ventAt);
    const at1 = evaporated > 0 ? sidesOf(m, vapourAt!) : null;
    const enthalpy = vent * (at0?.h[1] ?? 0) + evaporated * (at1?.h[1] ?? 0);
    const latent = vent * (at0?.latent ?? 0) + evaporated * (at1?.latent ?? 0);
    const q = (1 - vent) * perKg + evaporated * (at1?.latent ?? 0);
    const uStart = overall(from.state, 'u')!;
    const uEnd = (vapourAt ? 1 - vent - evaporated : 1 - vent) * overall(end.state, 'u')!;
    heat = from.mass * q;
    work = from.mass * (uEnd - uStart - q + enthalpy);
    if (vapourThere)
      lost = {
        mass: from.mass * (vent + evaporated),
        enthalpy: from.mass * enthalpy,
        latent: from.mass * latent,
      };
  }
  const phases: NamedPhase[] = [];
  for (const { phase } of stretches)
    if (!phases.length || !samePhase(phases.at(-1)!, phase)) phases.push(phase);
  return { end, legs: still ? [] : [leg(to)], encounters, phases, heat, heatAbsent, work, lost };
}

/** Enthalpies of a boundary point's two sides and their difference, J/kg. */
export function sidesOf(
  m: Medium,
  point: BoundaryPoint,
): { readonly h: readonly [number, number]; readonly latent: number } | null {
  const [a, b] = point.sides.map((side) => phaseProperties(m, side!));
  return a && b ? { h: [a.h, b.h], latent: b.h - a.h } : null;
}
