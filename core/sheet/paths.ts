import type { Medium } from '../equilibrium/medium.ts';
import { margins, type Margin } from '../map/margins.ts';
import type { Plane } from '../map/plane.ts';
import type { Boundary } from '../map/boundary.ts';
import { heatAbsentOf, runPath } from '../process/path.ts';
import { keptTrack } from '../process/keptTrack.ts';
import type { Leg } from '../process/problem.ts';
import type { Stand } from '../process/stand.ts';
import type { Env } from '../process/step.ts';
import { trackOf } from '../process/track.ts';
import { parseReading } from '../units/index.ts';
import { kept } from './kept.ts';
import type { PathResult, PathState, StepResult, Track } from './results.ts';
import type { PathItem, Sheet, Site } from './schema.ts';
import { localPressure, siteErrors } from './site.ts';
import { touched } from './touched.ts';

/** The id of a path's state: of its start, or of the end of a step. */
export const pathStateId = (path: string, step: string | null): string =>
  `${path}.${step ?? 'start'}`;

/** Margins of a stand, kept with it: a run keeps the stands that did not change. */
const marginsOf = kept(({ state, on }: Stand, m: Medium): readonly Margin[] =>
  margins(m, state.T, state.p, on),
);

/** The boundary that a stand's error box touches, kept in the same way. */
const touchedBy = kept(({ state }: Stand, m: Medium, T: number, p: number): string | null =>
  touched(m, state, { T, p }),
);

/**
 * A path item evaluated: states, steps and what they cost. `site` is the item's own, `pressureKind`
 * what a bare pressure means. The same objects give the same result, not made again.
 */
export const evaluatePath = kept(function evaluatePath(
  item: PathItem,
  m: Medium,
  site: Site | undefined,
  pressureKind: Sheet['pressureKind'],
): PathResult {
  const env: Env = { m, local: localPressure(site), pressureKind };
  const run = runPath(item, env);

  const kindIn = (text: string | undefined): PathState['kind'] | null => {
    if (text === undefined) return null;
    const { kind } = parseReading(text, 'pressure', { defaultKind: pressureKind });
    return kind === undefined || kind === 'unstated' ? pressureKind : kind;
  };
  // A state shows its pressure in the kind in which one was last given.
  let kind = kindIn(item.start.p) ?? pressureKind;
  const states: PathState[] = [];
  const stateOf = (stand: Stand, step: string | null): PathState => {
    const { state } = stand;
    const error = siteErrors(site, kind);
    const found = marginsOf(stand, m);
    return {
      id: pathStateId(item.id, step),
      path: item.id,
      step,
      tag: `${item.tag}${states.length + 1}`,
      name: null,
      substance: m.substance.id,
      site: site?.id ?? null,
      T: state.T,
      p: state.p,
      kind,
      state,
      problem: null,
      margins: found,
      error,
      touches: touchedBy(stand, m, error.T, error.p),
      on: stand.on,
      mass: stand.mass,
    };
  };
  if (run.start) states.push(stateOf(run.start, null));

  let clock: number | null = 0;
  let problem: PathResult['problem'] = run.problem && { step: null, problem: run.problem };
  const steps = run.steps.map((s): StepResult => {
    const end = 'p' in s.step.end ? s.step.end.p : undefined;
    if (s.problem === null) {
      kind = kindIn(end) ?? kind;
      states.push(stateOf(s.end!, s.step.id));
      clock = clock === null || s.time === null ? null : clock + s.time;
    } else clock = null;
    if (s.problem && !problem) problem = { step: s.step.id, problem: s.problem };
    return {
      id: pathStateId(item.id, s.step.id),
      step: s.step.id,
      kind: s.step.kind,
      legs: s.legs,
      phases: s.outcome?.phases ?? [],
      encounters: s.encounters,
      heat: s.outcome?.heat ?? null,
      heatAbsent: heatAbsentOf(s),
      work: s.outcome?.work ?? null,
      lost: s.outcome?.lost ?? null,
      mass: s.end?.mass ?? null,
      time: s.time,
      clock,
      problem: s.problem,
    };
  });
  const total = (key: 'heat' | 'work' | 'time'): number | null =>
    steps.reduce<number | null>((sum, step) => {
      const value = step[key];
      return sum === null || value === null ? null : sum + value;
    }, 0);
  return {
    id: item.id,
    tag: item.tag,
    name: item.name ?? null,
    substance: m.substance.id,
    site: site?.id ?? null,
    states,
    steps,
    problem,
    total: { heat: total('heat'), work: total('work'), time: total('time') },
  };
});

/** The paths of a map's substance as vertices on its plane. `known` are those made for this plane before. */
export const tracksOf = (
  m: Medium,
  paths: readonly PathResult[],
  plane: Plane,
  traced: readonly Boundary[],
  known: WeakMap<Leg, Track['points']>,
): readonly Track[] =>
  paths.flatMap((path) =>
    path.steps.flatMap((step) =>
      step.legs.map((leg) => {
        const points =
          known.get(leg) ??
          (leg.kept ? keptTrack(m, leg, leg.kept, plane) : trackOf(leg, plane, traced));
        known.set(leg, points);
        const { along, locus = false } = leg;
        return { path: path.id, step: step.id, along, locus, points };
      }),
    ),
  );
