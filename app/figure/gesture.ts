import { scale, type Scale } from '../../core/map/plane.ts';
import type { MapResult } from '../../core/sheet/results.ts';
import type { Rect } from './scene/scene.ts';

export interface Ranges {
  readonly T: readonly [number, number];
  readonly p: readonly [number, number];
}

/** Which axes a gesture at a place of the page moves: inside the frame both, beside it that one. */
export function axesAt(frame: Rect, x: number, y: number): { T: boolean; p: boolean } {
  const beside = x < frame.x || x > frame.x + frame.width;
  const below = y > frame.y + frame.height;
  return { T: !beside, p: !below };
}

const moved = (s: Scale, from: number, to: number): [number, number] => [
  s.value(from),
  s.value(to),
];

/** Ranges after zooming by `factor` (> 1: closer) about shares of the axes. */
export function zoomed(
  map: MapResult,
  about: { readonly T: number; readonly p: number },
  factor: number,
  axes: { readonly T: boolean; readonly p: boolean },
): Ranges {
  const ends = (s: Scale, at: number) => moved(s, at - at / factor, at + (1 - at) / factor);
  return held(map, {
    T: axes.T ? ends(scale(map.T.kind, map.T.range), about.T) : map.T.range,
    p: axes.p ? ends(scale(map.p.kind, map.p.range), about.p) : map.p.range,
  });
}

/** Ranges after moving the map by shares of the frame (positive: map to the right, upwards). */
export function panned(map: MapResult, dx: number, dy: number): Ranges {
  return held(map, {
    T: moved(scale(map.T.kind, map.T.range), -dx, 1 - dx),
    p: moved(scale(map.p.kind, map.p.range), -dy, 1 - dy),
  });
}

/** Keeps ranges drawable: above absolute zero, not beyond all equations, wide enough to divide. */
function held(map: MapResult, { T, p }: Ranges): Ranges {
  const Tok = T[0] > 1 && T[1] < 5000 && T[1] - T[0] > 0.02;
  const linear = map.p.kind === 'linear';
  const span = p[1] - p[0];
  let kept = p;
  // A linear axis rests on zero pressure instead of passing it.
  if (linear && p[0] < 0) kept = [0, map.p.range[0] <= 0 ? Math.max(p[1], 1e-3) : span];
  const pok = kept[1] < 1e12 && kept[1] - kept[0] > 1e-7 * kept[1] && (linear || kept[0] > 1e-45);
  return { T: Tok ? T : map.T.range, p: pok ? kept : map.p.range };
}
