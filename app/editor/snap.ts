import type { Figure } from '../figure/figure.ts';
import type { Point } from '../figure/scene/scene.ts';

/** Where a dragged thing lands: free, on a boundary, or level with another point. */
export interface Landing {
  readonly T: number;
  readonly p: number;
  /** Id of the boundary it lies on. */
  readonly boundary: string | null;
  /** Tags of the points whose temperature or pressure it shares. */
  readonly level: { readonly T: string | null; readonly p: string | null };
}

/** Reach of a boundary and of another point's level, in mm on the page. */
const reach = { boundary: 1.4, level: 0.9 } as const;

function nearestOnLine(points: readonly Point[], [x, y]: Point): { at: Point; distance: number } {
  let best: { at: Point; distance: number } = { at: [x, y], distance: Infinity };
  for (let i = 1; i < points.length; i++) {
    const [ax, ay] = points[i - 1]!;
    const [bx, by] = points[i]!;
    const dx = bx - ax;
    const dy = by - ay;
    const t = Math.min(1, Math.max(0, ((x - ax) * dx + (y - ay) * dy) / (dx * dx + dy * dy || 1)));
    const at: Point = [ax + t * dx, ay + t * dy];
    const distance = Math.hypot(at[0] - x, at[1] - y);
    if (distance < best.distance) best = { at, distance };
  }
  return best;
}

/** A point that others can be level with. */
export interface Peer {
  readonly id: string;
  readonly tag: string;
  readonly T: number;
  readonly p: number;
}

/**
 * Where a thing let go at a place of the page lands. Boundaries draw it from 1.4 mm, the level of
 * another point from 0.9 mm; `free` (a held Alt) switches both off. Places off the frame come in.
 */
export function landing(
  figure: Figure,
  place: Point,
  self: string,
  peers: readonly Peer[],
  free: boolean,
): Landing {
  const { frame, plane, map, project } = figure.view;
  const inside = (v: number, low: number, size: number): number =>
    Math.min(low + size, Math.max(low, v));
  const at: Point = [
    inside(place[0], frame.x, frame.width),
    inside(place[1], frame.y, frame.height),
  ];
  const toState = ([x, y]: Point) => plane.invert([x - frame.x, y - frame.y]);
  const level: { T: string | null; p: string | null } = { T: null, p: null };
  if (free) return { ...toState(at), boundary: null, level };

  let nearest: { id: string; at: Point; distance: number } | null = null;
  for (const b of map.boundaries) {
    if (figure.view.view.hidden.includes(b.id)) continue;
    const found = nearestOnLine(
      b.points.map(({ T, p }) => project(T, p)),
      at,
    );
    if (found.distance < reach.boundary && found.distance < (nearest?.distance ?? Infinity))
      nearest = { id: b.id, ...found };
  }
  if (nearest) return { ...toState(nearest.at), boundary: nearest.id, level };

  let { T, p } = toState(at);
  for (const peer of peers) {
    if (peer.id === self) continue;
    const [x, y] = project(peer.T, peer.p);
    if (level.T === null && Math.abs(x - at[0]) < reach.level) {
      T = peer.T;
      level.T = peer.tag;
    }
    if (level.p === null && Math.abs(y - at[1]) < reach.level) {
      p = peer.p;
      level.p = peer.tag;
    }
  }
  return { T, p, boundary: null, level };
}
