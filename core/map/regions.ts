import type { Medium } from '../equilibrium/medium.ts';
import type { PhaseName } from '../equilibrium/phase.ts';
import { boundaryCurves, type Boundary, type BoundaryCurve } from './boundary.ts';
import type { Place, Plane } from './plane.ts';

export type Edge = 'boundary' | 'convention' | 'frame' | 'validity' | 'unknown';

/** An area of one phase, for drawing only; points are located by the equations. */
export interface Region {
  readonly id: string;
  readonly phase: PhaseName;
  /** Name of the solid, null where its form is not resolved or the phase is a fluid. */
  readonly solid: string | null;
  /** Closed ring in mm from the frame's upper left corner; the last place joins the first. */
  readonly ring: readonly Place[];
  /** What each side of the ring is, from its place to the next. */
  readonly edges: readonly Edge[];
}

interface Corner {
  readonly at: Place;
  /** What the side from here to the next corner is. */
  readonly edge: Edge;
}

/** Keeps the part of a ring on one side of a line parallel to an axis (Sutherland and Hodgman 1974). */
function cut(ring: readonly Corner[], axis: 0 | 1, limit: number, keepBelow: boolean): Corner[] {
  const inside = ({ at }: Corner): boolean => (keepBelow ? at[axis] <= limit : at[axis] >= limit);
  const out: Corner[] = [];
  ring.forEach((a, i) => {
    const b = ring[(i + 1) % ring.length]!;
    const crossing = (): Place => {
      const t = (limit - a.at[axis]) / (b.at[axis] - a.at[axis]);
      const other = a.at[1 - axis]! + t * (b.at[1 - axis]! - a.at[1 - axis]!);
      return axis === 0 ? [limit, other] : [other, limit];
    };
    if (inside(a)) {
      out.push(a);
      if (!inside(b)) out.push({ at: crossing(), edge: 'frame' });
    } else if (inside(b)) out.push({ at: crossing(), edge: a.edge });
  });
  return out;
}

/**
 * The fields of the plane's frame: solid (each resolved form, and one for what is not resolved),
 * liquid, vapour and supercritical fluid.
 *
 * `traced` are the boundaries already followed inside this frame. Fields end at the validity of the
 * equations; supercritical fluid is set off by convention at the critical temperature and pressure.
 */
export function regions(m: Medium, plane: Plane, traced: readonly Boundary[]): readonly Region[] {
  const { validity } = m.substance.fluid;
  const { critical, triple } = m;
  const curves = boundaryCurves(m);
  const place = (T: number, p: number): Place => plane.project({ T, p })!;
  const corner = (T: number, p: number, edge: Edge): Corner => ({ at: place(T, p), edge });
  // What a linear axis calls zero pressure; a logarithmic one just goes below the frame.
  const nothing = Math.min(plane.p.range[0], 1e-60);
  const middle = plane.invert([plane.width / 2, plane.height / 2]);

  /** A curve from its end at low pressure upwards, cut at `pmax`: exact in the frame, outside it only on its side. */
  const run = (curve: BoundaryCurve, pmax = Infinity, Tmax = Infinity): Corner[] => {
    const [Tlow, Thigh] = curve.T;
    const low = curve.falling ? Thigh : Tlow;
    const high = curve.falling ? Tlow : Thigh;
    const first: readonly [number, number] = [low, curve.p[0]];
    let last: readonly [number, number] = [high, curve.p[1]];
    if (last[1] > pmax) last = [curve.atPressure(pmax).T, pmax];
    if (last[0] > Tmax) last = [Tmax, curve.atTemperature(Tmax).p];
    const line = traced.find(({ id }) => id === curve.id);
    const inner = (line?.points ?? []).filter(
      ({ T, p }) => p > first[1] && p < last[1] && T <= Tmax,
    );
    const places: (readonly [number, number])[] = inner.map(({ T, p }) => [T, p]);
    if (places.length === 0) {
      const p = Math.min(last[1], Math.max(first[1], middle.p));
      const left = curve.atPressure(p).T < middle.T;
      places.push(left === first[0] < last[0] ? [first[0], last[1]] : [last[0], first[1]]);
    }
    return [first, ...places, last].map(([T, p]) => corner(T, p, 'boundary'));
  };
  const reversed = (corners: Corner[]): Corner[] => [...corners].reverse();

  const found: Region[] = [];
  const add = (id: string, phase: PhaseName, solid: string | null, ring: Corner[]): void => {
    let kept = ring;
    kept = cut(kept, 0, 0, false);
    kept = cut(kept, 0, plane.width, true);
    kept = cut(kept, 1, 0, false);
    kept = cut(kept, 1, plane.height, true);
    if (kept.length < 3) return;
    found.push({
      id,
      phase,
      solid,
      ring: kept.map(({ at }) => at),
      edges: kept.map(({ edge }) => edge),
    });
  };

  const sublimation = curves.filter(({ kind }) => kind === 'sublimation');
  const melting = curves.filter(({ kind, p }) => kind === 'melting' && p[0] < validity.pmax);
  const saturation = curves.find(({ kind }) => kind === 'saturation')!;
  const coldest = sublimation[0]?.T[0] ?? triple.T;
  const top = melting.length > 0 ? Math.min(validity.pmax, melting.at(-1)!.p[1]) : validity.pmax;

  const sublimationRun = sublimation.flatMap((curve) => run(curve));
  const forms = new Map(m.substance.melting.map((line) => [line.id, line.solid]));
  for (let i = 0; i < melting.length;) {
    const solid = forms.get(melting[i]!.id) ?? null;
    let end = i;
    while (end < melting.length && (forms.get(melting[end]!.id) ?? null) === solid) end++;
    const lines = melting.slice(i, end);
    const first = i === 0;
    const pTop = Math.min(lines.at(-1)!.p[1], validity.pmax);
    const up = lines.flatMap((curve) => run(curve, validity.pmax));
    up[up.length - 1] = { ...up.at(-1)!, edge: end < melting.length ? 'unknown' : 'validity' };
    const ring: Corner[] = first
      ? [...sublimationRun, ...up, corner(coldest, pTop, 'validity')]
      : [...up, corner(coldest, pTop, 'validity'), corner(coldest, lines[0]!.p[0], 'unknown')];
    if (sublimation.length > 0) add(`solid-${solid ?? 'unresolved'}`, 'solid', solid, ring);
    i = end;
  }

  const saturationRun = run(saturation);
  // Where the melting chain passes the critical temperature the liquid ends there.
  const beyond = melting.find(({ T }) => T[0] <= critical.T && T[1] > critical.T);
  const meltingToCritical = melting
    .filter(({ T }) => T[0] <= critical.T)
    .flatMap((curve) => run(curve, top, curve === beyond ? critical.T : Infinity));
  add('liquid', 'liquid', null, [
    ...saturationRun.slice(0, -1),
    { ...saturationRun.at(-1)!, edge: 'convention' },
    ...(beyond ? [] : [corner(critical.T, top, 'validity')]),
    ...(melting.length > 0
      ? reversed(meltingToCritical)
      : [corner(triple.T, top, 'unknown'), corner(triple.T, triple.p, 'boundary')]),
  ]);
  add('vapour', 'vapour', null, [
    ...sublimationRun,
    ...saturationRun.slice(0, -1),
    { ...saturationRun.at(-1)!, edge: 'convention' },
    corner(validity.Tmax, critical.p, 'validity'),
    corner(validity.Tmax, nothing, 'frame'),
    corner(coldest, nothing, sublimation.length > 0 ? 'validity' : 'unknown'),
  ]);
  const hot = melting
    .filter(({ T }) => T[1] > critical.T)
    .flatMap((curve) => run(curve, top))
    .filter(({ at }) => at[0] > place(critical.T, critical.p)[0]);
  add('supercritical', 'supercritical', null, [
    corner(critical.T, critical.p, 'convention'),
    corner(validity.Tmax, critical.p, 'validity'),
    corner(validity.Tmax, top, 'validity'),
    ...(beyond
      ? [...reversed(hot), corner(critical.T, beyond.atTemperature(critical.T).p, 'convention')]
      : [corner(critical.T, top, 'convention')]),
  ]);
  return found;
}
