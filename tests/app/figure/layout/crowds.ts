import type { Obstacles } from '../../../../app/figure/layout/obstacles.ts';
import type { LabelRequest } from '../../../../app/figure/layout/request.ts';
import type { Point, Rect } from '../../../../app/figure/scene/scene.ts';

/** Numbers from 0 to 1 that are the same for the same seed (mulberry32, public domain). */
export function seeded(seed: number): () => number {
  let state = seed >>> 0;
  return () => {
    state = (state + 0x6d2b79f5) >>> 0;
    let t = state;
    t = Math.imul(t ^ (t >>> 15), t | 1);
    t ^= t + Math.imul(t ^ (t >>> 7), t | 61);
    return ((t ^ (t >>> 14)) >>> 0) / 2 ** 32;
  };
}

export const frame: Rect = { x: 16, y: 8, width: 147, height: 98 };

export interface Crowd {
  readonly requests: readonly LabelRequest[];
  readonly obstacles: Obstacles;
}

const words = ['boiling', 'A1', 'held for 12 min', 'vessel rating 2.9 bar(g)', 'product', 'B3'];

/** A page of curves and labels of all kinds on and off them, some of them moved. */
export function crowd(seed: number, labels: number, vertices: number): Crowd {
  const random = seeded(seed);
  const point = (): Point => [frame.x + random() * frame.width, frame.y + random() * frame.height];
  const curves = Array.from({ length: 5 }, (): readonly Point[] => {
    const [a, b, c] = [point(), point(), point()];
    const n = Math.max(2, Math.floor(vertices / 5));
    return Array.from({ length: n }, (_, i): Point => {
      const t = i / (n - 1);
      const mix = (k: 0 | 1): number =>
        (1 - t) ** 2 * a[k] + 2 * t * (1 - t) * b[k] + t ** 2 * c[k];
      return [mix(0), mix(1)];
    });
  });
  const requests = Array.from({ length: labels }, (_, i): LabelRequest => {
    const common = {
      id: `label${i}`,
      runs: [{ text: words[Math.floor(random() * words.length)] as string }],
      size: 7 + 2 * random(),
      colour: '#1f2a33',
      priority: Math.floor(4 * random()),
      plate: random() < 0.3,
      ...(random() < 0.1 && { offset: [40 * random() - 20, 40 * random() - 20] as const }),
    };
    const curve = curves[Math.floor(random() * curves.length)] as readonly Point[];
    const kind = random();
    if (kind < 0.6) {
      return {
        ...common,
        kind: 'point',
        at: random() < 0.5 ? (curve[Math.floor(random() * curve.length)] as Point) : point(),
        gap: 1.5 + random(),
        leader: random() < 0.5,
        ...(random() < 0.5 && { tag: '#b3401f' }),
      };
    }
    if (kind < 0.85) {
      const side = (['above', 'below', 'either'] as const)[Math.floor(3 * random())] ?? 'either';
      return { ...common, kind: 'line', along: curve, side };
    }
    return { ...common, kind: 'area', ring: [point(), point(), point(), point()], spacing: 0.15 };
  });
  return {
    requests,
    obstacles: {
      polylines: curves.map((curve) => ({ points: [curve], clearance: random() })),
      circles: Array.from({ length: 6 }, () => ({ at: point(), r: 1 + random() })),
      boxes: Array.from({ length: 3 }, () => {
        const [x, y] = point();
        return { x, y, width: 20 * random(), height: 8 * random() };
      }),
    },
  };
}
