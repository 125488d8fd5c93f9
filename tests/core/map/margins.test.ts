import { describe, expect, it } from 'vitest';
import { stablePhase } from '../../../core/equilibrium/phase.ts';
import type { Medium } from '../../../core/equilibrium/medium.ts';
import { boundaryCurves } from '../../../core/map/boundary.ts';
import { margins, nearestMargin, type Direction } from '../../../core/map/margins.ts';
import { media, seeded } from './frames.ts';

/** Name of what is stable; null where the equations do not say. */
function phaseAt(m: Medium, T: number, p: number): string | null {
  try {
    // No boundary is known that parts one solid from another.
    return stablePhase(m, T, p).phase;
  } catch {
    return null;
  }
}

const isFluidByName = (a: string, b: string, m: Medium, T: number, p: number): boolean => {
  const beyond = T >= m.critical.T || p >= m.critical.p;
  return beyond && !a.startsWith('solid') && !b.startsWith('solid');
};

const close = (a: number, b: number, share: number): boolean => Math.abs(a / b - 1) < share;

/**
 * The first change of phase met from (T, p), by walking in small steps and halving; null where none
 * is met before the equations end.
 */
function walked(
  m: Medium,
  T: number,
  p: number,
  direction: Direction,
  reach: number,
): { readonly T: number; readonly p: number } | null {
  const thermal = direction === 'warmer' || direction === 'colder';
  const up = direction === 'warmer' || direction === 'higher pressure';
  const ratio = (up ? 1 : -1) * (thermal ? 0.002 : 0.01);
  const at = (k: number): readonly [number, number] =>
    thermal ? [T * (1 + ratio) ** k, p] : [T, p * (1 + ratio) ** k];
  let from = phaseAt(m, T, p)!;
  for (let k = 1; k < reach; k++) {
    const [T2, p2] = at(k);
    const to = phaseAt(m, T2, p2);
    if (to === null) return null;
    if (to !== from && !isFluidByName(from, to, m, T2, p2)) {
      let [low, high] = [k - 1, k];
      for (let i = 0; i < 40; i++) {
        const middle = (low + high) / 2;
        const [T3, p3] = at(middle);
        const met = phaseAt(m, T3, p3);
        if (met === from || (met !== null && isFluidByName(from, met, m, T3, p3))) low = middle;
        else high = middle;
      }
      const [T4, p4] = at(high);
      return { T: T4, p: p4 };
    }
    from = to;
  }
  return null;
}

const directions = ['warmer', 'colder', 'higher pressure', 'lower pressure'] as const;

describe.each(media)('margins(…) of %s', (_, m) => {
  it('are where walking through stable phases first meets another', () => {
    const random = seeded(11);
    const found: string[] = [];
    const met: Record<string, number> = {};
    let walks = 0;
    while (walks < 60) {
      const T = m.triple.T * 0.75 + random() * (m.critical.T * 1.15 - m.triple.T * 0.75);
      const p = m.triple.p * 10 ** (-2 + random() * 5.5);
      if (phaseAt(m, T, p) === null) continue;
      walks++;
      for (const margin of margins(m, T, p)) {
        const place = walked(m, T, p, margin.direction, 500);
        const at = `${T} K, ${p} Pa ${margin.direction}`;
        if (margin.boundary === null) {
          if (place) found.push(`${at}: absent, but met at ${place.T} K, ${place.p} Pa`);
          continue;
        }
        met[margin.kind] = (met[margin.kind] ?? 0) + 1;
        // Beyond the reach of the walk, or stepped over next to the critical point: it cannot tell.
        if (!place && margin.p > 0.98 * m.critical.p && margin.kind === 'saturation') continue;
        if (!place) {
          const ahead =
            Math.abs(Math.log(margin.T / T)) / 0.002 + Math.abs(Math.log(margin.p / p)) / 0.01;
          if (ahead < 450)
            found.push(`${at}: ${margin.boundary} at ${margin.T} K, ${margin.p} Pa, not met`);
          continue;
        }
        // A phase is open within 1e-9 of a boundary in T, which on a steep line is 1e-7 in p.
        if (!close(place.T, margin.T, 1e-8) || !close(place.p, margin.p, 1e-7))
          found.push(
            `${at}: ${margin.boundary} at ${margin.T}, ${margin.p}; met ${place.T}, ${place.p}`,
          );
        const thermal = margin.direction === 'warmer' || margin.direction === 'colder';
        const distance = thermal ? Math.abs(margin.T - T) : Math.abs(margin.p - p);
        if (!close(distance, margin.distance, 1e-12))
          found.push(`${at}: distance ${margin.distance}`);
      }
    }
    expect(found.slice(0, 6)).toEqual([]);
    for (const kind of new Set(boundaryCurves(m).map((curve) => curve.kind)))
      expect(met[kind]).toBeGreaterThan(3);
  });

  it('are told in the order warmer, colder, higher, lower pressure, each with its own line', () => {
    const [T, p] = [0.5 * (m.triple.T + m.critical.T), 0.9 * m.critical.p];
    const all = margins(m, T, p);
    expect(all.map(({ direction }) => direction)).toEqual(directions);
    const ids = boundaryCurves(m).map(({ id }) => id);
    for (const { boundary } of all) if (boundary !== null) expect(ids).toContain(boundary);
    expect(all[0]).toMatchObject({ boundary: 'saturation', kind: 'saturation', form: null });
    expect(all[3]).toMatchObject({ boundary: 'saturation', T });
  });

  it('leave a boundary on which the point lies out, on either side', () => {
    const curve = boundaryCurves(m).find(({ kind }) => kind === 'saturation')!;
    const { T, p } = curve.atTemperature(0.5 * (m.triple.T + m.critical.T));
    const all = margins(m, T, p);
    expect(all[2]).not.toMatchObject({ boundary: 'saturation' });
    expect(all[3]).not.toMatchObject({ boundary: 'saturation' });
    for (const margin of all)
      if (margin.boundary !== null) expect(margin.distance).toBeGreaterThan(1e-3);
  });

  it('say why there is none beyond the critical point', () => {
    const all = margins(m, m.critical.T * 1.05, m.critical.p * 1.2);
    expect(all[0]).toMatchObject({ boundary: null, reason: 'beyond the critical point' });
    expect(all[3]).toMatchObject({ boundary: null, reason: 'beyond the critical point' });
  });

  it('say that nothing lies beyond vapour warmer or at lower pressure', () => {
    const all = margins(m, 0.5 * (m.triple.T + m.critical.T), m.triple.p);
    expect(all[0]).toMatchObject({ boundary: null, reason: 'none' });
    expect(all[3]).toMatchObject({ boundary: null, reason: 'none' });
  });

  it('say of a cold solid that lines between solids are not in the equations, or of a cold liquid that none is published', () => {
    const { melting } = m.substance;
    const all = margins(m, m.triple.T * (melting.length > 0 ? 0.9 : 1.1), m.triple.p * 1.5);
    const reason = melting.length > 0 ? 'between solid forms' : 'not published';
    if (melting.length > 0) expect(all[1]).toMatchObject({ boundary: null, reason });
    else
      for (const i of [1, 2])
        expect(margins(m, m.triple.T * 1.1, m.critical.p)[i]).toMatchObject({
          boundary: null,
          reason,
        });
  });
});

describe('margins of water in a kitchen', () => {
  const m = media[0]![1];
  it('boil 100 K warmer less a little from a cold pan at 101.325 kPa, freeze 20 K colder', () => {
    const [warmer, colder] = margins(m, 293.15, 101325);
    // Normal boiling point 373.1243 K: IAPWS SR1-86(1992). Freezing point 0.0026 °C, air-free: recalled.
    expect(warmer).toMatchObject({ kind: 'saturation' });
    expect((warmer as { T: number }).T).toBeCloseTo(373.1243, 3);
    expect(colder).toMatchObject({ kind: 'melting', form: 'ice Ih' });
    expect((colder as { T: number }).T).toBeCloseTo(273.1525, 3);
  });
  it('meet, below 0.01 °C, ice Ih at lower pressure and a denser ice at higher', () => {
    const all = margins(m, 262, 200e6);
    expect(all[3]).toMatchObject({ kind: 'melting', form: 'ice Ih' });
    expect(all[2]).toMatchObject({ kind: 'melting', form: 'ice V' });
  });
});

describe('nearestMargin', () => {
  const m = media[0]![1];
  it('nearestMargin(…, temperature) is the nearer of warmer and colder, in its own unit', () => {
    const all = margins(m, 293.15, 101325);
    expect(nearestMargin(all, 'temperature')).toMatchObject({ direction: 'colder' });
    expect(nearestMargin(all, 'pressure')).toMatchObject({ direction: 'lower pressure' });
  });
  it('nearestMargin(…) is null where none is met', () => {
    const all = margins(m, m.critical.T * 1.8, m.critical.p * 0.01);
    expect(
      nearestMargin(
        all.filter(({ boundary }) => boundary === null),
        'pressure',
      ),
    ).toBeNull();
  });
});
