import type { Medium } from '../equilibrium/medium.ts';
import { stablePhase } from '../equilibrium/phase.ts';
import { boundaryCurves, type BoundaryCurve } from '../map/boundary.ts';
import {
  changeOf,
  kindOfChange,
  named,
  samePhase,
  type Encounter,
  type NamedPhase,
} from './encounter.ts';
import { meetings, type Place } from './meetings.ts';

/** Samples in a row within the tolerance of a boundary that make a run along it. */
const leastFollowed = 3;

type Spot =
  | { readonly on: BoundaryCurve; readonly phase: null }
  | { readonly on: null; readonly phase: NamedPhase };

function spotOf(m: Medium, { T, p }: Place, tolerance: Place): Spot | null {
  let best: { readonly curve: BoundaryCurve; readonly off: number } | null = null;
  for (const curve of boundaryCurves(m)) {
    const thermal =
      p >= curve.p[0] && p <= curve.p[1]
        ? Math.abs(curve.atPressure(p).T - T) / tolerance.T
        : Infinity;
    const barometric =
      T >= curve.T[0] && T <= curve.T[1]
        ? Math.abs(curve.atTemperature(T).p - p) / tolerance.p
        : Infinity;
    const off = Math.min(thermal, barometric);
    if (off <= 1 && off < (best?.off ?? Infinity)) best = { curve, off };
  }
  if (best) return { on: best.curve, phase: null };
  try {
    return { on: null, phase: named(stablePhase(m, T, p)) };
  } catch {
    // Nothing is known of the phase here; the samples round it still tell their own.
    return null;
  }
}

/**
 * Encounters of a run given as samples, each uncertain by `tolerance` (K and Pa, both positive): noise
 * about a line is no swarm of crossings. The run crosses a boundary when it has left the band of the
 * tolerance on the other side, touches it when it comes back out on the same side, and follows it
 * while at least three samples in a row stay in the band.
 */
export function encountersOfSamples(
  m: Medium,
  samples: readonly Place[],
  tolerance: Place,
): readonly Encounter[] {
  if (!(tolerance.T > 0 && tolerance.p > 0))
    throw new RangeError(`tolerance must be positive: ${tolerance.T} K, ${tolerance.p} Pa`);
  const found: Encounter[] = [];
  const spots = samples.map((sample) => spotOf(m, sample, tolerance));
  const progress = (i: number): number => (samples.length > 1 ? i / (samples.length - 1) : 0);
  const place = (i: number): Place => ({ T: samples[i]!.T, p: samples[i]!.p });

  let lastOff = -1;
  for (let i = 0; i < spots.length; i++) {
    if (!spots[i]?.phase) continue;
    close(lastOff, i);
    lastOff = i;
  }
  close(lastOff, spots.length);
  return found;

  /** What happened between two samples off all boundaries; -1 and the length stand for the ends. */
  function close(before: number, after: number): void {
    const from = spots[before]?.phase ?? null;
    const to = spots[after]?.phase ?? null;
    const between = spots
      .slice(before + 1, after)
      .map((spot, k) => ({ spot, i: before + 1 + k }))
      .filter((x) => x.spot?.on);
    // Runs along one boundary each.
    let any = false;
    for (let k = 0; k < between.length;) {
      const curve = between[k]!.spot!.on!;
      let end = k;
      while (end + 1 < between.length && between[end + 1]!.spot!.on === curve) end++;
      if (end - k + 1 >= leastFollowed) {
        any = true;
        const [first, last] = [between[k]!.i, between[end]!.i];
        const [a, b] = sidesOf(curve, from, to);
        const at = onCurve(curve, place(first));
        found.push({
          kind: 'follows',
          code: (from && to && changeOf(from.phase, to.phase)) ?? 'follows',
          boundary: curve.id,
          boundaryKind: curve.kind,
          from: a,
          to: b,
          ...at,
          until: onCurve(curve, place(last)),
          share: null,
          progress: progress(first),
          time: null,
        });
      }
      k = end + 1;
    }
    if (any || !from || !to) return;
    if (samePhase(from, to)) {
      const curve = between[0]?.spot?.on;
      if (!curve) return;
      const { i } = between[0]!;
      push('touches', 'touches', curve, onCurve(curve, place(i)), i);
      return;
    }
    // Straight from sample to sample, the first meeting with the line that the change belongs to.
    const change = changeOf(from.phase, to.phase);
    for (let i = before; i < after; i++) {
      const met = meetings(m, place(i), place(i + 1)).find(({ curve }) =>
        change ? curve?.kind === kindOfChange[change] : curve === null,
      );
      if (!met) continue;
      push('crosses', change ?? 'passesAboveCritical', met.curve, met, i + met.at);
      return;
    }
    function push(
      kind: Encounter['kind'],
      code: Encounter['code'],
      curve: BoundaryCurve | null,
      { T, p }: Place,
      at: number,
    ): void {
      found.push({
        kind,
        code,
        boundary: curve?.id ?? 'critical',
        boundaryKind: curve?.kind ?? 'critical',
        from: from!,
        to: to!,
        T,
        p,
        until: null,
        share: null,
        progress: progress(at),
        time: null,
      });
    }
  }
}

function sidesOf(
  curve: BoundaryCurve,
  from: NamedPhase | null,
  to: NamedPhase | null,
): readonly [NamedPhase, NamedPhase] {
  const sides = curve.atTemperature(curve.T[0]).sides.map((side) => named(side!));
  return [from ?? to ?? sides[0]!, to ?? from ?? sides[1]!];
}

/** The boundary's point at a sample's temperature or pressure, the one that it covers. */
function onCurve(curve: BoundaryCurve, { T, p }: Place): Place {
  const key = curve.along;
  const value = Math.min(curve[key][1], Math.max(curve[key][0], key === 'T' ? T : p));
  const point = key === 'T' ? curve.atTemperature(value) : curve.atPressure(value);
  return { T: point.T, p: point.p };
}
