import { describe, expect, it } from 'vitest';
import {
  boxAt,
  cornersOf,
  overlap,
  segmentHits,
  type Box,
} from '../../../../app/figure/layout/box.ts';
import { layout, type Layout } from '../../../../app/figure/layout/layout.ts';
import { anchorOf } from '../../../../app/figure/layout/moved.ts';
import type { LabelRequest, LineLabel, PointLabel } from '../../../../app/figure/layout/request.ts';
import type { Point, TextShape } from '../../../../app/figure/scene/scene.ts';
import { crowd, frame, seeded, type Crowd } from './crowds.ts';

const seeds = Array.from({ length: 50 }, (_, i) => i + 1);

const note: PointLabel = {
  kind: 'point',
  id: 'note',
  at: [80, 50],
  gap: 2,
  runs: [{ text: 'triple point' }],
  size: 8,
  colour: '#1f2a33',
  priority: 1,
};

/** Distance from a point to a segment, written apart from the code under test. */
function distance([px, py]: Point, [ax, ay]: Point, [bx, by]: Point): number {
  const square = (bx - ax) ** 2 + (by - ay) ** 2;
  const t = square
    ? Math.max(0, Math.min(1, ((px - ax) * (bx - ax) + (py - ay) * (by - ay)) / square))
    : 0;
  return Math.hypot(px - ax - t * (bx - ax), py - ay - t * (by - ay));
}

/** Points along the edges and in the middle of a box, for judging it without its own algebra. */
function probes(box: Box): readonly Point[] {
  const corners = cornersOf(box);
  const points: Point[] = [[box.x, box.y]];
  for (const [i, [x, y]] of corners.entries()) {
    const [nx, ny] = corners[(i + 1) % 4] as Point;
    for (let k = 0; k < 12; k++) points.push([x + ((nx - x) * k) / 12, y + ((ny - y) * k) / 12]);
  }
  return points;
}

function isIn({ x, y, cos, sin, halfWidth, halfHeight }: Box, [px, py]: Point): boolean {
  const [u, v] = [(px - x) * cos + (py - y) * sin, (py - y) * cos - (px - x) * sin];
  return Math.abs(u) < halfWidth - 1e-9 && Math.abs(v) < halfHeight - 1e-9;
}

function texts({ shapes }: Layout): readonly TextShape[] {
  return shapes.filter((shape) => shape.kind === 'text');
}

/** What an automatic label may not do and does, in words. */
function faults({ requests, obstacles }: Crowd, { boxes }: Layout): readonly string[] {
  const found: string[] = [];
  const check = (isFault: boolean, words: string): void => {
    if (isFault) found.push(words);
  };
  for (const [i, a] of boxes.entries()) {
    for (const b of boxes.slice(i + 1)) {
      if (a.isMoved && b.isMoved) continue;
      const pair = `${a.id} and ${b.id}`;
      check(overlap(a.box, b.box), `${pair} overlap`);
      check(
        probes(a.box).some((p) => isIn(b.box, p)),
        `${pair} meet`,
      );
      check(
        probes(b.box).some((p) => isIn(a.box, p)),
        `${pair} meet`,
      );
      check(a.leader !== undefined && segmentHits(b.box, a.leader), `${pair}: leader`);
      check(b.leader !== undefined && segmentHits(a.box, b.leader), `${pair}: leader`);
    }
    if (a.isMoved) continue;
    const around = probes(a.box);
    for (const [x, y] of around) {
      const isOut =
        Math.abs(x - frame.x - frame.width / 2) > frame.width / 2 + 1e-9 ||
        Math.abs(y - frame.y - frame.height / 2) > frame.height / 2 + 1e-9;
      check(isOut, `${a.id} leaves the frame`);
    }
    for (const { points, clearance } of obstacles.polylines ?? []) {
      for (const line of points) {
        for (let k = 1; k < line.length; k++) {
          const [p, q] = [line[k - 1] as Point, line[k] as Point];
          check(isIn(a.box, p), `${a.id} lies on a line`);
          if (Math.hypot(p[0] - a.box.x, p[1] - a.box.y) > 40) continue;
          const least = Math.min(...around.map((corner) => distance(corner, p, q)));
          check(least < clearance - 1e-9, `${a.id} is too near a line`);
        }
      }
    }
    for (const { at, r } of obstacles.circles ?? []) {
      check(
        around.some(([x, y]) => Math.hypot(x - at[0], y - at[1]) < r - 1e-9),
        `${a.id} lies on a circle`,
      );
    }
    for (const { x, y, width, height } of obstacles.boxes ?? []) {
      const box = boxAt([x + width / 2, y + height / 2], width, height);
      check(overlap(a.box, box), `${a.id} lies on a box`);
    }
  }
  check(boxes.length < requests.length / 4, 'hardly a label is placed');
  return found;
}

describe('layout over random pages', () => {
  it.each(seeds)('layout(crowd %i) lets no automatic label overlap anything', (seed) => {
    const page = crowd(seed, 40, 150);
    expect(faults(page, layout(page.requests, page.obstacles, frame))).toEqual([]);
  });

  it.each(seeds.slice(0, 10))('layout(crowd %i) accounts for each request once', (seed) => {
    const { requests, obstacles } = crowd(seed, 40, 400);
    const { boxes, unplaced, shapes } = layout(requests, obstacles, frame);
    const ids = [...boxes, ...unplaced].map(({ id }) => id);
    expect(ids.toSorted()).toEqual(requests.map(({ id }) => id).toSorted());
    expect(new Set(shapes.map(({ id }) => id)).size).toBe(shapes.length);
  });

  it('layout(…) gives the same places twice', () => {
    const { requests, obstacles } = crowd(7, 60, 1000);
    expect(layout(requests, obstacles, frame)).toEqual(layout(requests, obstacles, frame));
  });
});

describe('layout', () => {
  it('layout(point) stands to the right of its point, clear by the gap', () => {
    const { boxes, unplaced } = layout([note], {}, frame);
    expect(unplaced).toEqual([]);
    const { box } = boxes[0] as { box: Box };
    expect(box.x - box.halfWidth).toBeCloseTo(82, 9);
    expect(box.y).toBeCloseTo(50, 9);
  });

  it('layout(point) turns to another side in a corner of the frame', () => {
    const at: Point = [frame.x + frame.width, frame.y + frame.height];
    const { boxes } = layout([{ ...note, at }], {}, frame);
    expect(boxes).toHaveLength(1);
    expect((boxes[0] as { box: Box }).box.x).toBeLessThan(at[0]);
  });

  it('layout(tag) is white bold text on its colour, on a leader from the point', () => {
    const tag: PointLabel = { ...note, runs: [{ text: 'A1' }], leader: true, tag: '#b3401f' };
    const { shapes } = layout([tag], {}, frame);
    expect(shapes.map(({ kind }) => kind)).toEqual(['poly', 'rect', 'text']);
    expect(shapes[1]).toMatchObject({ fill: { colour: '#b3401f' } });
    expect(shapes[2]).toMatchObject({ colour: '#ffffff', runs: [{ text: 'A1', bold: true }] });
    expect(shapes[0]).toMatchObject({ points: [[note.at, expect.anything()]] });
  });

  it('layout(…) lists what has no room', () => {
    const all = { x: frame.x, y: frame.y, width: frame.width, height: frame.height };
    const { unplaced, shapes } = layout([note], { boxes: [all] }, frame);
    expect(unplaced).toEqual([{ id: 'note', text: 'triple point' }]);
    expect(shapes).toEqual([]);
  });

  it('layout(…) lists what has no finite place or lies off the page, and throws nothing', () => {
    const { unplaced } = layout(
      [
        { ...note, id: 'a', at: [NaN, 1] },
        { ...note, id: 'b', at: [500, 50] },
        { ...note, id: 'c', kind: 'line', along: [], side: 'either' },
        {
          ...note,
          id: 'd',
          kind: 'line',
          along: [
            [NaN, NaN],
            [50, 50],
          ],
          side: 'either',
        },
        { ...note, id: 'e', kind: 'area', ring: [] },
        { ...note, id: 'f', offset: [NaN, 0] },
      ],
      {
        polylines: [
          {
            points: [
              [
                [NaN, 0],
                [50, 50],
              ],
              [],
            ],
            clearance: 1,
          },
        ],
      },
      frame,
    );
    expect(unplaced.map(({ id }) => id)).toEqual(['a', 'b', 'c', 'e', 'f']);
  });

  it('layout(…) serves a smaller priority first', () => {
    const tight = { x: 60, y: 45, width: 40, height: 10 };
    const text = { ...note, at: [62, 50] as const };
    const labels: LabelRequest[] = [
      { ...text, id: 'later', priority: 2 },
      { ...text, id: 'first', priority: 1 },
    ];
    const { boxes } = layout(labels, {}, { ...tight, height: 6, y: 47 });
    expect(boxes.map(({ id }) => id)).toEqual(['first']);
  });

  it('layout(…) puts a moved label exactly where it was put, and others about it', () => {
    const moved: PointLabel = { ...note, id: 'moved', at: [100, 60], offset: [-10, -10] };
    const { boxes } = layout([note, moved], {}, frame);
    expect(boxes.map(({ isMoved }) => isMoved)).toEqual([false, true]);
    expect(boxes[1]?.box).toMatchObject({ x: 90, y: 50 });
    expect(overlap((boxes[0] as { box: Box }).box, (boxes[1] as { box: Box }).box)).toBe(false);
  });

  it('layout(…) reports moved labels that stand on each other, and moves neither', () => {
    const a: PointLabel = { ...note, id: 'a', offset: [5, 5] };
    const b: PointLabel = { ...note, id: 'b', offset: [6, 6] };
    const { boxes, overlaps } = layout([a, b], {}, frame);
    expect(overlaps).toEqual([['a', 'b']]);
    expect(boxes.map(({ box }) => [box.x, box.y])).toEqual([
      [85, 55],
      [86, 56],
    ]);
  });

  it('layout(…) gives room to one label by moving another', () => {
    // The wide label fits on one side only, which the short one would take for itself.
    const band = { x: 60, y: 47, width: 40, height: 6 };
    const short: PointLabel = { ...note, id: 'short', runs: [{ text: 'A' }], at: [72, 50] };
    const wide: PointLabel = { ...note, id: 'wide', at: [72, 50], priority: 2 };
    const { unplaced } = layout([short, wide], {}, band);
    expect(unplaced).toEqual([]);
  });
});

describe('layout of names along lines', () => {
  const slope: readonly Point[] = Array.from({ length: 50 }, (_, i) => [30 + 2 * i, 95 - i]);
  const name: LineLabel = { ...note, kind: 'line', along: slope, side: 'above' };

  it.each([
    ['as drawn', slope],
    ['drawn backwards', slope.toReversed()],
  ])('layout(line %s) reads from left to right, above the line at its middle', (_, along) => {
    const { shapes, boxes } = layout([{ ...name, along }], {}, frame);
    const [text] = texts({ shapes } as Layout);
    expect(text?.angle).toBeCloseTo((-Math.atan(0.5) * 180) / Math.PI, 6);
    const { x, y } = (boxes[0] as { box: Box }).box;
    expect(Math.abs(x - 79)).toBeLessThan(3);
    expect(y).toBeLessThan(95 - (x - 30) / 2);
  });

  it('layout(line) reads upwards beside an upright line', () => {
    const along: readonly Point[] = [
      [80, 20],
      [80, 90],
    ];
    for (const line of [along, along.toReversed()]) {
      const [text] = texts(layout([{ ...name, along: line }], {}, frame));
      expect(text?.angle).toBeCloseTo(-90, 9);
    }
  });

  it('layout(line) chooses the straight part of a line with a bend', () => {
    const bent: readonly Point[] = Array.from({ length: 200 }, (_, i) =>
      i < 100 ? [30 + i, 80] : [130 + 8 * Math.sin((i - 100) / 4), 80 - (i - 100) / 4],
    );
    const [text] = texts(layout([{ ...name, along: bent }], {}, frame));
    expect(Math.abs(text?.angle ?? 0)).toBeLessThan(1);
  });

  it('layout(line) stands level beside a line shorter than its text', () => {
    const along: readonly Point[] = [
      [80, 50],
      [80, 56],
    ];
    const { shapes, unplaced } = layout([{ ...name, along }], {}, frame);
    expect(unplaced).toEqual([]);
    expect(texts({ shapes } as Layout)[0]?.angle).toBeUndefined();
  });

  it('layout(line) turns a moved name with its line', () => {
    const anchor = anchorOf(name, frame);
    const { boxes, shapes } = layout([{ ...name, offset: [10, -8] }], {}, frame);
    expect(boxes[0]?.box).toMatchObject({ x: anchor[0] + 10, y: anchor[1] - 8 });
    expect(texts({ shapes } as Layout)[0]?.angle).toBeCloseTo(-26.565, 2);
  });
});

describe('layout of names in areas', () => {
  const area = (ring: readonly Point[], text = 'LIQUID WATER'): LabelRequest => ({
    ...note,
    kind: 'area',
    ring,
    runs: [{ text }],
    size: 9,
    spacing: 0.18,
  });

  it('layout(area) stands in the middle of a plain area', () => {
    const { boxes } = layout(
      [
        area([
          [20, 20],
          [120, 20],
          [120, 80],
          [20, 80],
        ]),
      ],
      {},
      frame,
    );
    const { x, y } = (boxes[0] as { box: Box }).box;
    expect(Math.hypot(x - 70, y - 50)).toBeLessThan(3);
  });

  it('layout(area) keeps inside a slanting area', () => {
    const random = seeded(3);
    for (let i = 0; i < 20; i++) {
      const ring = Array.from({ length: 3 }, (): Point => [
        frame.x + random() * frame.width,
        frame.y + random() * frame.height,
      ]);
      const { boxes } = layout([area(ring, 'ICE')], {}, frame);
      for (const { box } of boxes) {
        for (const [k, p] of ring.entries()) {
          const q = ring[(k + 1) % ring.length] as Point;
          expect(segmentHits(box, { from: p, to: q })).toBe(false);
        }
      }
    }
  });

  it('layout(area) closes up and shrinks a name in a narrow area, and gives up below 7 pt', () => {
    const strip = (width: number): readonly Point[] => [
      [50, 20],
      [50 + width, 20],
      [50 + width, 80],
      [50, 80],
    ];
    const sizes = [60, 30, 26.5, 23.5, 12].map((width) => {
      const [text] = texts(layout([area(strip(width))], {}, frame));
      return text ? [text.size, text.spacing ?? 0] : null;
    });
    expect(sizes[0]).toEqual([9, 0.18]);
    expect(sizes.at(-1)).toBeNull();
    const stepped = sizes.slice(1, -1).filter((style) => style !== null);
    expect(stepped.length).toBeGreaterThan(0);
    for (const [size, spacing] of stepped) {
      expect(size).toBeGreaterThanOrEqual(7);
      expect(spacing).toBeLessThan(0.18);
    }
  });
});
