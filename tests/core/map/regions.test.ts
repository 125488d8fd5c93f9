import { describe, expect, it } from 'vitest';
import { stablePhase } from '../../../core/equilibrium/phase.ts';
import { OutOfRange, Undetermined, Unknown } from '../../../core/errors.ts';
import { boundaryCurves } from '../../../core/map/boundary.ts';
import type { Place, Plane } from '../../../core/map/plane.ts';
import { regions } from '../../../core/map/regions.ts';
import { trace } from '../../../core/map/trace.ts';
import type { Medium } from '../../../core/equilibrium/medium.ts';
import { distance, frames, media, seeded, share, told } from './frames.ts';

const regionsOf = (m: Medium, plane: Plane) =>
  regions(
    m,
    plane,
    boundaryCurves(m)
      .map((curve) => trace(curve, plane))
      .filter((line) => line !== null),
  );

/** Whether a place is in a ring, by the parity of crossings. */
function isIn([x, y]: Place, ring: readonly Place[]): boolean {
  let inside = false;
  ring.forEach(([x1, y1], i) => {
    const [x2, y2] = ring[(i + 1) % ring.length]!;
    if (y1 > y !== y2 > y && x < x1 + ((y - y1) / (y2 - y1)) * (x2 - x1)) inside = !inside;
  });
  return inside;
}

const area = (ring: readonly Place[]): number =>
  Math.abs(
    ring.reduce((sum, [x1, y1], i) => {
      const [x2, y2] = ring[(i + 1) % ring.length]!;
      return sum + (x1 * y2 - x2 * y1) / 2;
    }, 0),
  );

/** Id of the field in which the equations have a place; null where they say nothing. */
function expected(m: Medium, T: number, p: number): string | null {
  try {
    const { phase, solid } = stablePhase(m, T, p);
    return phase === 'solid' ? `solid-${solid ?? 'unresolved'}` : phase;
  } catch (error) {
    if (error instanceof Undetermined) return 'line';
    if (error instanceof OutOfRange || error instanceof Unknown) return null;
    throw error;
  }
}

describe.each(media)('regions(…) of %s', (_, m) => {
  const planes = frames(m, 77, share(m, 150));

  it('hold each place of the frame in the field of its stable phase, and nothing that is not known', () => {
    const random = seeded(5);
    const found: string[] = [];
    const met = new Set<string | null>();
    let located = 0;
    for (const plane of planes) {
      const fields = regionsOf(m, plane);
      for (let k = 0; k < 40; k++) {
        const place: Place = [random() * plane.width, random() * plane.height];
        const near = fields.some(({ ring }) =>
          ring.some((a, i) => distance(place, a, ring[(i + 1) % ring.length]!) < 0.2),
        );
        if (near) continue;
        const { T, p } = plane.invert(place);
        const wanted = expected(m, T, p);
        if (wanted === 'line') continue;
        located++;
        met.add(wanted);
        const holding = fields.filter(({ ring }) => isIn(place, ring)).map(({ id }) => id);
        if (holding.join() !== (wanted ?? ''))
          found.push(`${T} K, ${p} Pa is ${wanted}, drawn in [${holding.join()}]: ${told(plane)}`);
      }
    }
    expect(found.slice(0, 6)).toEqual([]);
    expect(located).toBeGreaterThan(planes.length * 20);
    for (const field of ['liquid', 'vapour', 'supercritical', null]) expect(met).toContain(field);
    const solid = [...met].some((field) => field?.startsWith('solid'));
    expect(solid).toBe(m.substance.melting.length > 0);
  });

  it('have rings inside the frame, an edge a side, ids once, and no more area than the frame', () => {
    for (const plane of planes) {
      const fields = regionsOf(m, plane);
      expect(new Set(fields.map(({ id }) => id)).size).toBe(fields.length);
      let whole = 0;
      for (const { ring, edges } of fields) {
        expect(edges).toHaveLength(ring.length);
        for (const [x, y] of ring) {
          expect(x).toBeGreaterThanOrEqual(-1e-9);
          expect(y).toBeGreaterThanOrEqual(-1e-9);
          expect(x).toBeLessThanOrEqual(plane.width + 1e-9);
          expect(y).toBeLessThanOrEqual(plane.height + 1e-9);
        }
        whole += area(ring);
      }
      // Neighbours share a traced line, so overlaps are no more than rounding.
      expect(whole).toBeLessThanOrEqual(plane.width * plane.height * (1 + 1e-6));
    }
  });
});

// 791.03 MPa is where the melting line ends, 800 MPa where the fluid's equation does.
it('stablePhase(…) calls no cold carbon dioxide liquid above the end of its melting line', () => {
  const m = media.find(([name]) => name === 'carbon dioxide')![1];
  expect(expected(m, 234.6, 796e6)).not.toBe('liquid');
});
