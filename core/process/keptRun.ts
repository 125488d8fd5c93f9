import type { Medium } from '../equilibrium/medium.ts';
import { overall, type Part, type State } from '../equilibrium/state.ts';
import { boundaryCurves, type BoundaryCurve } from '../map/boundary.ts';
import {
  changeOf,
  kindOfChange,
  named,
  samePhase,
  type Encounter,
  type NamedPhase,
} from './encounter.ts';
import { stateOn, wayOf, type KeptLine } from './keptLine.ts';
import { keptMeetings, type KeptMeeting } from './keptMeetings.ts';
import { StepFailure, type Leg } from './problem.ts';
import { sideOf, type Stand } from './stand.ts';

/** What a run on a kept property came to, before its heat and work. */
export interface KeptRun {
  readonly state: State;
  /** Id of the boundary that the end lies on. */
  readonly on: string | null;
  readonly legs: readonly Leg[];
  readonly encounters: readonly Encounter[];
  readonly phases: readonly NamedPhase[];
}

/** A property of where a path stands; throws StepFailure where it is open or not published. */
export function known({ state, on }: Stand, property: 'h' | 's' | 'v' | 'u'): number {
  const value = overall(state, property);
  if (value !== null) return value;
  throw new StepFailure(
    state.parts.some(({ properties }) => properties === null)
      ? { code: 'unknown', reason: 'no equation for the solid' }
      : {
          code: 'onBoundary',
          boundary: on ?? 'saturation',
          needs: state.parts.some(({ phase }) => phase === 'vapour')
            ? 'vapour fraction'
            : 'solid fraction',
        },
  );
}

/** The boundary on which two phases stand together. */
export function boundaryOf(m: Medium, { parts, T, p }: State): BoundaryCurve | null {
  const has = (phase: string): boolean => parts.some((part) => part.phase === phase);
  const kind = !has('solid') ? 'saturation' : has('vapour') ? 'sublimation' : 'melting';
  const far = (curve: BoundaryCurve): number =>
    Math.max(0, curve.p[0] - p, p - curve.p[1]) / p +
    Math.max(0, curve.T[0] - T, T - curve.T[1]) / T;
  return (
    boundaryCurves(m)
      .filter((curve) => curve.kind === kind)
      .sort((a, b) => far(a) - far(b))[0] ?? null
  );
}

const fractionOf = (state: State, phase: NamedPhase): number => {
  const part = state.parts.find((one) => samePhase(one, phase));
  return typeof part?.fraction === 'number' ? part.fraction : 0;
};

interface Stretch {
  readonly from: number;
  readonly to: number;
  /** One phase, or the two of a boundary in the order of its sides. */
  readonly phases: readonly NamedPhase[];
  readonly curve: BoundaryCurve | null;
}

/** As far (relative) as a state is taken off a place where phases change over. */
const aside = 4e-9;

/** The places at which the phases may change: meetings, the three-phase line and the ends. */
function placesOf(m: Medium, line: KeptLine, from: number, to: number): readonly number[] {
  const triple = m.triple[wayOf(line)];
  const forward = to > from ? 1 : -1;
  const met = keptMeetings(m, line, from, to).map(({ u }) => u);
  const through = (triple - from) * forward > 0 && (to - triple) * forward > 0 ? [triple] : [];
  const between = [...met, ...through]
    .filter((u) => Math.abs(u - from) > aside * u && Math.abs(u - to) > aside * u)
    .sort((a, b) => forward * (a - b));
  const kept = [from];
  for (const u of between)
    if (Math.abs(u - kept.at(-1)!) > aside * u) kept.push(u);
    // A meeting at the triple point is the three-phase line's own.
    else if (u === triple) kept[kept.length - 1] = u;
  return [...kept, to];
}

/** Where between two places of one fluid its name changes, without a boundary. */
function renamed(
  m: Medium,
  line: KeptLine,
  low: number,
  high: number,
  name: string,
): number | null {
  const nameAt = (u: number): string => stateOn(m, line, u).parts[0]!.phase;
  if (nameAt(high) === name) return null;
  let [same, other] = [low, high];
  for (let i = 0; i < 48 && Math.abs(other - same) > 1e-12 * same; i++) {
    const middle = 0.5 * (same + other);
    if (nameAt(middle) === name) same = middle;
    else other = middle;
  }
  return other;
}

function stretchesOf(m: Medium, line: KeptLine, places: readonly number[]): readonly Stretch[] {
  const found: Stretch[] = [];
  for (let i = 0; i + 1 < places.length; i++) {
    let from = places[i]!;
    const to = places[i + 1]!;
    const middle = stateOn(m, line, 0.5 * (from + to));
    if (middle.parts.length > 1) {
      const curve = boundaryOf(m, middle);
      const phases = [...middle.parts]
        .sort((a, b) => sideOf(curve!, a.phase) - sideOf(curve!, b.phase))
        .map(named);
      found.push({ from, to, phases, curve });
      continue;
    }
    // A fluid may change its name up to twice on the way.
    const solid = middle.parts[0]!.phase === 'solid';
    for (let k = 0; k < 3; k++) {
      const inner = from + 1e-9 * (to - from);
      const phase = named(stateOn(m, line, inner).parts[0]!);
      const end = solid ? null : renamed(m, line, inner, to - 1e-9 * (to - from), phase.phase);
      found.push({ from, to: end ?? to, phases: [phase], curve: null });
      if (end === null) break;
      from = end;
    }
  }
  return found;
}

/**
 * Runs along a line of a kept property from where a path stands to a pressure (Pa), or to a temperature
 * (K) where the volume is kept. On a boundary it follows it while both phases last; at the three-phase
 * line all that must change over does so at one place.
 *
 * `at` is a meeting at which it ends; the state then lies on that boundary. Throws as the givens do.
 */
export function keptRun(
  m: Medium,
  from: Stand,
  line: KeptLine,
  to: number,
  at: KeptMeeting | null = null,
): KeptRun {
  const way = wayOf(line);
  const start = from.state[way];
  const end = stateOn(m, line, to);
  const locus = line.exits !== undefined && line.exits.times !== 1;
  if (to === start) return { state: from.state, on: from.on, legs: [], encounters: [], phases: [] };
  const stretches = stretchesOf(m, line, placesOf(m, line, start, to));
  const stateAt = (u: number): State =>
    u === start ? from.state : u === to ? end : stateOn(m, line, u);
  const place = (u: number): { T: number; p: number } => {
    const { T, p } = stateAt(u);
    return { T, p };
  };
  const progress = (u: number): number => Math.min(1, Math.max(0, (u - start) / (to - start)));

  const legs: Leg[] = stretches.map((stretch) => ({
    along: locus ? null : (stretch.curve?.id ?? null),
    from: place(stretch.from),
    to: place(stretch.to),
    ...(stretch.curve === null || locus ? { kept: line } : {}),
    ...(locus ? { locus } : {}),
  }));

  const encounters: Encounter[] = [];
  const add = (
    given: Pick<Encounter, 'kind' | 'code' | 'boundary' | 'boundaryKind' | 'from' | 'to'> & {
      readonly u: number;
      readonly until: number | null;
      readonly share: number | null;
    },
  ): void => {
    const { u, until, ...rest } = given;
    encounters.push({
      ...rest,
      ...place(u),
      until: until === null ? null : place(until),
      progress: progress(u),
      time: null,
    });
  };
  /** Off an end of a stretch, inside it, where the fractions are its own. */
  const within = ({ from: a, to: b }: Stretch, end: 'from' | 'to'): State => {
    const u = end === 'from' ? a : b;
    if (u === start) return from.state;
    if (u === to && Math.abs(u / m.triple[way] - 1) > 1e-8) return stateAt(u);
    const into = Math.min(aside * u, 0.25 * Math.abs(b - a));
    return stateOn(m, line, u + into * Math.sign(end === 'from' ? b - a : a - b));
  };

  stretches.forEach((stretch, i) => {
    const before = stretches[i - 1];
    if (before && before.phases.length > 1 && stretch.phases.length > 1)
      changesAt(m, stretch.from, within(before, 'to'), within(stretch, 'from'), add);
    if (stretch.curve) {
      const { curve, phases } = stretch;
      const [first, second] = phases as [NamedPhase, NamedPhase];
      const grown =
        fractionOf(within(stretch, 'to'), second) - fractionOf(within(stretch, 'from'), second);
      const [a, b] = grown >= 0 ? [first, second] : [second, first];
      // A run that begins or ends in one phase changes the whole of it.
      add({
        kind: 'follows',
        code: (Math.abs(grown) > 1e-9 ? changeOf(a.phase, b.phase) : null) ?? 'follows',
        boundary: curve.id,
        boundaryKind: curve.kind,
        from: a,
        to: b,
        u: stretch.from,
        until: stretch.to,
        share: Math.abs(grown),
      });
      return;
    }
    const phase = stretch.phases[0]!;
    if (!before) {
      const curve =
        from.on === null ? undefined : boundaryCurves(m).find(({ id }) => id === from.on);
      if (curve)
        add({
          kind: 'touches',
          code: 'leaves',
          boundary: curve.id,
          boundaryKind: curve.kind,
          from: phase,
          to: phase,
          u: stretch.from,
          until: null,
          share: 0,
        });
      return;
    }
    if (before.curve) return;
    const last = before.phases[0]!;
    if (!samePhase(last, phase))
      add({
        kind: 'crosses',
        code: 'passesAboveCritical',
        boundary: 'critical',
        boundaryKind: 'critical',
        from: last,
        to: phase,
        u: stretch.from,
        until: null,
        share: 0,
      });
  });
  const last = stretches.at(-1)!;
  if (at && last.curve === null)
    add({
      kind: 'touches',
      code: 'reaches',
      boundary: at.curve.id,
      boundaryKind: at.curve.kind,
      from: last.phases[0]!,
      to: last.phases[0]!,
      u: to,
      until: null,
      share: 0,
    });
  const phases: NamedPhase[] = [];
  for (const { phases: of, curve } of stretches)
    if (curve === null && !(phases.length && samePhase(phases.at(-1)!, of[0]!)))
      phases.push(of[0]!);
  const state = at ? onBoundary(end, at) : end;
  const on = at ? at.curve.id : end.parts.length > 1 ? (boundaryOf(m, end)?.id ?? null) : null;
  return { state, on, legs, encounters, phases };
}

/** The state at a meeting: its fractions are those of the side met, freed from rounding. */
function onBoundary(state: State, { curve, side }: KeptMeeting): State {
  if (state.parts.length !== 2) return state;
  const part = state.parts.find(({ phase }) => sideOf(curve, phase) === side);
  return part ? { ...state, parts: [{ ...part, fraction: 1 }] } : state;
}

/** What changes over where one pair of phases gives way to another: at the three-phase line. */
function changesAt(
  m: Medium,
  u: number,
  before: State,
  after: State,
  add: (
    given: Pick<Encounter, 'kind' | 'code' | 'boundary' | 'boundaryKind' | 'from' | 'to'> & {
      readonly u: number;
      readonly until: null;
      readonly share: number;
    },
  ) => void,
): void {
  const all: Part[] = [...before.parts];
  for (const part of after.parts) if (!all.some((one) => samePhase(one, part))) all.push(part);
  const grown = all.map((part) => ({
    phase: named(part),
    by: fractionOf(after, part) - fractionOf(before, part),
  }));
  const losers = grown.filter(({ by }) => by < -1e-7);
  const winners = grown.filter(({ by }) => by > 1e-7);
  for (const loser of losers)
    for (const winner of winners) {
      const code = changeOf(loser.phase.phase, winner.phase.phase);
      if (!code) continue;
      const kind = kindOfChange[code];
      const curve = boundaryCurves(m)
        .filter((one) => one.kind === kind)
        .sort((a, b) => Math.abs(a.p[0] - m.triple.p) - Math.abs(b.p[0] - m.triple.p))[0];
      add({
        kind: 'crosses',
        code,
        boundary: curve?.id ?? kind,
        boundaryKind: kind,
        from: loser.phase,
        to: winner.phase,
        u,
        until: null,
        share: Math.min(-loser.by, winner.by),
      });
    }
}
