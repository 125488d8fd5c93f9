import { cautions } from '../cautions/rules.ts';
import type { Judged } from '../cautions/caution.ts';
import { medium, type Medium } from '../equilibrium/medium.ts';
import { saturatedState, stateAt, type State } from '../equilibrium/state.ts';
import { boundaryCurves, type Boundary } from '../map/boundary.ts';
import { margins, type Margin } from '../map/margins.ts';
import { scale, temperaturePressurePlane, type Plane } from '../map/plane.ts';
import { regions, type Region } from '../map/regions.ts';
import { trace } from '../map/trace.ts';
import { problemOf, type Leg, type StateProblem } from '../process/problem.ts';
import type { Substance } from '../substances/substance.ts';
import { absolutePressure, parseReading, temperature, type UnitId } from '../units/index.ts';
import { kept } from './kept.ts';
import { evaluatePath, tracksOf } from './paths.ts';
import { pressureRange, temperatureRange } from './range.ts';
import type {
  MapPoint,
  MapResult,
  PathResult,
  Results,
  SiteResult,
  StateResult,
  Track,
} from './results.ts';
import type { Sheet, Site, StateItem, View } from './schema.ts';
import { localPressure, siteErrors } from './site.ts';
import { touched } from './touched.ts';

export { problemOf };

/** Size in mm of a view's frame on its page, which the caption's length may change. */
export type FrameOf = (
  view: View,
  about: Pick<Results, 'cautions' | 'sites' | 'formulations' | 'absent'>,
) => { readonly width: number; readonly height: number };

const siteOf = (sheet: Sheet, id: string | undefined): Site | undefined =>
  id === undefined ? sheet.sites[0] : sheet.sites.find((site) => site.id === id);

/** A state item evaluated; the same objects give the same result, not made again. */
const evaluateState = kept(function evaluateState(
  item: StateItem,
  m: Medium,
  site: Site | undefined,
  pressureKind: Sheet['pressureKind'],
): StateResult | null {
  const local = localPressure(site);
  const reading =
    item.p === undefined ? null : parseReading(item.p, 'pressure', { defaultKind: pressureKind });
  const kind = reading?.kind === 'unstated' || !reading ? pressureKind : reading.kind!;
  const given = {
    T: item.T === undefined ? null : temperature(parseReading(item.T, 'temperature')),
    p: reading ? absolutePressure(reading, local) : null,
    fraction:
      item.vapourFraction === undefined
        ? null
        : parseReading(item.vapourFraction, 'fraction').value,
  };
  let state: State | null = null;
  let problem: StateProblem | null = null;
  try {
    if (given.T !== null && given.p !== null) state = stateAt(m, given.T, given.p);
    else if (given.T !== null) state = saturatedState(m, { T: given.T }, given.fraction!);
    else state = saturatedState(m, { p: given.p! }, given.fraction!);
  } catch (error) {
    problem = problemOf(error);
  }
  const T = state?.T ?? given.T;
  const p = state?.p ?? given.p;
  // Without a place there is nothing to draw; the run table still tells the problem.
  if (T === null || p === null) return null;
  const error = siteErrors(site, kind);
  let met: readonly Margin[] = [];
  if (state) met = margins(m, T, p);
  return {
    id: item.id,
    tag: item.tag,
    name: item.name ?? null,
    substance: m.substance.id,
    site: site?.id ?? null,
    T,
    p,
    kind,
    state,
    problem,
    margins: met,
    error,
    touches: state ? touched(m, state, error) : null,
  };
});

/** Every formulation that a substance's lines rest on, the fluid's first. */
function formulations({ fluid, solids, melting, sublimation }: Substance): readonly string[] {
  const published = [...melting, ...sublimation]
    .filter(({ route }) => route !== 'equilibrium')
    // Equations of one release differ in their number only.
    .map(({ equation }) => equation.source.replace(/, eqs?\. [\d.]+/, ''));
  return [...new Set([fluid.formulation, ...solids.map((s) => s.formulation), ...published])];
}

const absentLines = ({ absent }: Substance) => absent.map(({ boundary }) => boundary);

function mapPoints(m: Medium): readonly MapPoint[] {
  const { substance, triple, critical } = m;
  return [
    ...substance.triplePoints.map((t, i) => ({
      id: `triple-${t.id}`,
      kind: 'triple' as const,
      phases: t.phases,
      T: t.T,
      p: i === 0 ? triple.p : t.p,
      source: t.source,
    })),
    {
      id: 'critical',
      kind: 'critical' as const,
      phases: ['liquid', 'vapour'],
      T: critical.T,
      p: critical.p,
      source: substance.critical.source,
    },
  ];
}

interface Lines {
  readonly boundaries: readonly Boundary[];
  readonly regions: readonly Region[];
  /** Vertices of the legs drawn on the plane so far. */
  readonly tracks: WeakMap<Leg, Track['points']>;
}
const traced = new WeakMap<Medium, Map<string, Lines>>();
/** Planes whose lines are kept for each substance. */
const mostPlanes = 8;

/** Boundaries and fields of a plane; kept, since most changes of a sheet leave its axes alone. */
function linesOf(m: Medium, plane: Plane): Lines {
  const { T, p, width, height } = plane;
  const key = [T.kind, ...T.range, p.kind, ...p.range, width, height].join(' ');
  let planes = traced.get(m);
  if (!planes) traced.set(m, (planes = new Map<string, Lines>()));
  const ready = planes.get(key);
  if (ready) return ready;
  const boundaries = boundaryCurves(m)
    .map((curve) => trace(curve, plane))
    .filter((b) => b !== null);
  const lines = {
    boundaries,
    regions: regions(m, plane, boundaries),
    tracks: new WeakMap<Leg, Track['points']>(),
  };
  if (planes.size >= mostPlanes) planes.delete(planes.keys().next().value!);
  planes.set(key, lines);
  return lines;
}

function evaluateMap(
  sheet: Sheet,
  view: View,
  m: Medium,
  states: readonly StateResult[],
  paths: readonly PathResult[],
  size: { readonly width: number; readonly height: number },
): MapResult {
  const own = paths.filter((path) => path.substance === m.substance.id);
  const run = [
    ...states.filter((s) => s.substance === m.substance.id),
    ...own.flatMap((path) => path.states),
  ];
  const local = localPressure(siteOf(sheet, view.pressure.site));
  const unit = view.pressure.unit as UnitId;
  const T = view.temperature.range
    ? (view.temperature.range.map((r) => parseReading(r, 'temperature').value) as [number, number])
    : temperatureRange(m, run, view.temperature.unit);
  const p = view.pressure.range
    ? (view.pressure.range.map((r) => {
        const reading = parseReading(r, 'pressure', { defaultKind: sheet.pressureKind });
        return reading.value === 0 && reading.kind === 'absolute'
          ? 0
          : absolutePressure(reading, local);
      }) as [number, number])
    : pressureRange(
        m,
        run.map((s) => s.p),
        view.pressure.scale,
        unit,
        view.pressure.kind === 'gauge' ? local : 0,
      );
  const plane = temperaturePressurePlane({
    T: scale(view.temperature.scale, T),
    p: scale(view.pressure.scale, p),
    ...size,
  });
  const { boundaries, regions: fields, tracks } = linesOf(m, plane);
  const inside = (t: number, q: number) => t >= T[0] && t <= T[1] && q >= p[0] && q <= p[1];
  const { validity } = m.substance.fluid;
  return {
    view: view.id,
    substance: m.substance.id,
    T: { kind: view.temperature.scale, range: T },
    p: { kind: view.pressure.scale, range: p },
    ...size,
    boundaries,
    regions: fields,
    tracks: tracksOf(m, own, plane, boundaries, tracks),
    points: mapPoints(m).filter((point) => inside(point.T, point.p)),
    absent: absentLines(m.substance),
    validity: { T: [validity.vapourTmin, validity.Tmax], pmax: validity.pmax },
    outside: run.filter((s) => !inside(s.T, s.p)).map((s) => s.id),
  };
}

/**
 * What is true of a sheet: pure and deterministic, plain data.
 *
 * `sheet` must have passed `readSheet`; `substances` holds every id in use (throws RangeError
 * otherwise); `frameOf` says how large each view's frame is, on which tracing depends.
 */
export function evaluate(
  sheet: Sheet,
  substances: ReadonlyMap<string, Substance>,
  frameOf: FrameOf,
): Results {
  const mediumOf = (id: string | undefined): Medium => {
    const wanted = id ?? sheet.substances[0]!;
    const substance = substances.get(wanted);
    if (!substance) throw new RangeError(`substance not loaded: ${wanted}`);
    return medium(substance);
  };
  const sites: SiteResult[] = sheet.sites.map((site) => ({
    id: site.id,
    name: site.name,
    local: localPressure(site),
    from:
      site.barometer !== undefined
        ? 'barometer'
        : site.altitude !== undefined
          ? 'altitude'
          : 'standard',
  }));
  const states = sheet.items
    .map((item) =>
      item.kind === 'state'
        ? evaluateState(
            item,
            mediumOf(item.substance),
            siteOf(sheet, item.site),
            sheet.pressureKind,
          )
        : null,
    )
    .filter((state) => state !== null);
  const paths = sheet.items
    .filter((item) => item.kind === 'path')
    .map((item) =>
      evaluatePath(item, mediumOf(item.substance), siteOf(sheet, item.site), sheet.pressureKind),
    );
  const judge = (
    s: Pick<StateResult, 'id' | 'substance' | 'site' | 'T' | 'p'>,
    solid: boolean,
  ): Judged => {
    const m = mediumOf(s.substance);
    return {
      id: s.id,
      substance: s.substance,
      hazards: m.substance.hazards,
      T: s.T,
      p: s.p,
      local: localPressure(siteOf(sheet, s.site ?? undefined)),
      solid,
      triplePressure: m.triple.p,
    };
  };
  const judged: Judged[] = [...states, ...paths.flatMap((path) => path.states)].map((s) =>
    judge(s, s.state?.parts.some((part) => part.phase === 'solid') ?? false),
  );
  // A solid that a step only passes through stands at the step's end.
  for (const { steps, substance, site } of paths)
    for (const { id, encounters, problem } of steps)
      for (const { from, to, T, p } of problem ? [] : encounters)
        if (from.phase === 'solid' || to.phase === 'solid')
          judged.push(judge({ id, substance, site, T, p }, true));
  const about = {
    sites,
    cautions: cautions(judged),
    formulations: Object.fromEntries(
      sheet.substances.map((id) => [id, formulations(mediumOf(id).substance)]),
    ),
    absent: Object.fromEntries(
      sheet.substances.map((id) => [id, absentLines(mediumOf(id).substance)]),
    ),
  };
  return {
    ...about,
    states,
    paths,
    maps: sheet.views.map((view) =>
      evaluateMap(sheet, view, mediumOf(view.substance), states, paths, frameOf(view, about)),
    ),
  };
}
