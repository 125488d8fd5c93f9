import { cautions } from '../cautions/rules.ts';
import type { Judged } from '../cautions/caution.ts';
import { medium, type Medium } from '../equilibrium/medium.ts';
import { saturatedState, stateAt, type State } from '../equilibrium/state.ts';
import { OutOfRange, Undetermined, Unknown } from '../errors.ts';
import { boundaryCurves } from '../map/boundary.ts';
import { margins, type Margin } from '../map/margins.ts';
import { scale, temperaturePressurePlane } from '../map/plane.ts';
import { regions } from '../map/regions.ts';
import { trace } from '../map/trace.ts';
import type { Substance } from '../substances/substance.ts';
import { absolutePressure, parseReading, temperature, type UnitId } from '../units/index.ts';
import { pressureRange, temperatureRange } from './range.ts';
import type {
  MapPoint,
  MapResult,
  Results,
  SiteResult,
  StateProblem,
  StateResult,
} from './results.ts';
import type { Sheet, Site, StateItem, View } from './schema.ts';
import { localPressure, siteErrors } from './site.ts';

/** Size in mm of a view's frame on its page, which the caption's length may change. */
export type FrameOf = (
  view: View,
  about: Pick<Results, 'cautions' | 'sites' | 'formulations'>,
) => { readonly width: number; readonly height: number };

const siteOf = (sheet: Sheet, id: string | undefined): Site | undefined =>
  id === undefined ? sheet.sites[0] : sheet.sites.find((site) => site.id === id);

/** The problem behind an error that a user's givens can cause; others are ours and pass through. */
export function problemOf(error: unknown): StateProblem {
  if (error instanceof OutOfRange) {
    const { quantity, value, range, source, unit } = error;
    return { code: 'outOfRange', quantity, value, min: range.min, max: range.max, source, unit };
  }
  if (error instanceof Undetermined)
    return { code: 'onBoundary', boundary: error.boundary, needs: error.needs };
  if (error instanceof Unknown) return { code: 'unknown', reason: error.reason };
  throw error;
}

function evaluateState(sheet: Sheet, item: StateItem, m: Medium): StateResult | null {
  const site = siteOf(sheet, item.site);
  const local = localPressure(site);
  const reading =
    item.p === undefined
      ? null
      : parseReading(item.p, 'pressure', { defaultKind: sheet.pressureKind });
  const kind = reading?.kind === 'unstated' || !reading ? sheet.pressureKind : reading.kind!;
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
    touches: touched(met, error),
  };
}

/** The boundary inside the limits of error, if any. */
function touched(
  met: readonly Margin[],
  error: { readonly T: number; readonly p: number },
): string | null {
  for (const margin of met) {
    if (margin.boundary === null) continue;
    const thermal = margin.direction === 'warmer' || margin.direction === 'colder';
    if (margin.distance <= (thermal ? error.T : error.p)) return margin.boundary;
  }
  return null;
}

/** Every formulation that a substance's lines rest on, the fluid's first. */
function formulations({ fluid, solids, melting, sublimation }: Substance): readonly string[] {
  const published = [...melting, ...sublimation]
    .filter(({ route }) => route !== 'equilibrium')
    // Equations of one release differ in their number only.
    .map(({ equation }) => equation.source.replace(/, eqs?\. [\d.]+/, ''));
  return [...new Set([fluid.formulation, ...solids.map((s) => s.formulation), ...published])];
}

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

function evaluateMap(
  sheet: Sheet,
  view: View,
  m: Medium,
  states: readonly StateResult[],
  size: { readonly width: number; readonly height: number },
): MapResult {
  const run = states.filter((s) => s.substance === m.substance.id);
  const local = localPressure(siteOf(sheet, view.pressure.site));
  const unit = view.pressure.unit as UnitId;
  const T = view.temperature.range
    ? (view.temperature.range.map((r) => parseReading(r, 'temperature').value) as [number, number])
    : temperatureRange(
        m,
        run.map((s) => s.T),
        view.temperature.unit,
      );
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
  const boundaries = boundaryCurves(m)
    .map((curve) => trace(curve, plane))
    .filter((b) => b !== null);
  const inside = (t: number, q: number) => t >= T[0] && t <= T[1] && q >= p[0] && q <= p[1];
  const { validity } = m.substance.fluid;
  return {
    view: view.id,
    substance: m.substance.id,
    T: { kind: view.temperature.scale, range: T },
    p: { kind: view.pressure.scale, range: p },
    ...size,
    boundaries,
    regions: regions(m, plane, boundaries),
    points: mapPoints(m).filter((point) => inside(point.T, point.p)),
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
    .map((item) => evaluateState(sheet, item, mediumOf(item.substance)))
    .filter((state) => state !== null);
  const judged: Judged[] = states.map((s) => {
    const m = mediumOf(s.substance);
    return {
      id: s.id,
      substance: s.substance,
      hazards: m.substance.hazards,
      T: s.T,
      p: s.p,
      local: localPressure(siteOf(sheet, s.site ?? undefined)),
      solid: s.state?.parts.some((part) => part.phase === 'solid') ?? false,
      triplePressure: m.triple.p,
    };
  });
  const about = {
    sites,
    cautions: cautions(judged),
    formulations: Object.fromEntries(
      sheet.substances.map((id) => [id, formulations(mediumOf(id).substance)]),
    ),
  };
  return {
    ...about,
    states,
    maps: sheet.views.map((view) =>
      evaluateMap(sheet, view, mediumOf(view.substance), states, frameOf(view, about)),
    ),
  };
}
