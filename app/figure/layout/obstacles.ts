import type { Point, Rect } from '../scene/scene.ts';
import { boundsOf, boxOfRect, distanceTo, isHit, overlap, type Box } from './box.ts';

/** What labels keep away from; lengths in mm. */
export interface Obstacles {
  readonly polylines?: readonly {
    readonly points: readonly (readonly Point[])[];
    readonly clearance: number;
  }[];
  readonly boxes?: readonly Rect[];
  readonly circles?: readonly { readonly at: Point; readonly r: number }[];
}

/** Whether a box, or a hair line in it, is clear of every obstacle. */
export interface ObstacleIndex {
  readonly isClear: (box: Box) => boolean;
  /** Whether a polyline touches the box itself, clearances left aside. */
  readonly isCrossed: (box: Box) => boolean;
}

const cell = 4;

/** Points nearer to the last one than this, in mm, are left out, and clearances grow by as much. */
const coarse = 0.1;

/**
 * Obstacles in a grid of 4 mm cells, for asking many boxes against thousands of segments.
 *
 * Segments with a coordinate that is no number are passed over, as are those beyond the frame.
 */
export function obstacleIndex(obstacles: Obstacles, frame: Rect): ObstacleIndex {
  const lines = obstacles.polylines ?? [];
  const boxes = (obstacles.boxes ?? []).map(boxOfRect);
  const circles = obstacles.circles ?? [];
  const widest = lines.reduce((most, { clearance }) => Math.max(most, clearance), 0) + coarse;

  const left = frame.x - widest;
  const top = frame.y - widest;
  const columns = Math.max(1, Math.ceil((frame.width + 2 * widest) / cell));
  const rows = Math.max(1, Math.ceil((frame.height + 2 * widest) / cell));
  const columnOf = (x: number): number => Math.floor((x - left) / cell);
  const rowOf = (y: number): number => Math.floor((y - top) / cell);

  let count = 0;
  for (const { points } of lines) for (const line of points) count += line.length;
  const ends = new Float64Array(4 * count);
  const clearances = new Float64Array(count);
  let segments = 0;
  for (const { points, clearance } of lines) {
    for (const line of points) {
      let [x1, y1] = [NaN, NaN];
      for (let i = 0; i < line.length; i++) {
        const point = line[i] as Point;
        const [dx, dy] = [point[0] - x1, point[1] - y1];
        if (dx * dx + dy * dy < coarse * coarse && i < line.length - 1) continue;
        const [x2, y2] = [point[0], point[1]];
        if (Number.isFinite(x1 + y1 + x2 + y2)) {
          ends[4 * segments] = x1;
          ends[4 * segments + 1] = y1;
          ends[4 * segments + 2] = x2;
          ends[4 * segments + 3] = y2;
          clearances[segments++] = clearance + coarse;
        }
        [x1, y1] = [x2, y2];
      }
    }
  }

  /** Visits the cells that a segment passes, column by column. */
  const visit = (segment: number, each: (cell: number, segment: number) => void): void => {
    let x1 = ends[4 * segment] as number;
    let y1 = ends[4 * segment + 1] as number;
    let x2 = ends[4 * segment + 2] as number;
    let y2 = ends[4 * segment + 3] as number;
    if (x1 > x2) [x1, y1, x2, y2] = [x2, y2, x1, y1];
    const first = Math.max(0, columnOf(x1));
    const last = Math.min(columns - 1, columnOf(x2));
    const slope = x2 > x1 ? (y2 - y1) / (x2 - x1) : 0;
    for (let column = first; column <= last; column++) {
      const a = column === columnOf(x1) ? y1 : y1 + slope * (left + column * cell - x1);
      const b = column === columnOf(x2) ? y2 : y1 + slope * (left + (column + 1) * cell - x1);
      const from = Math.max(0, rowOf(Math.min(a, b) - 1e-9));
      const to = Math.min(rows - 1, rowOf(Math.max(a, b) + 1e-9));
      for (let row = from; row <= to; row++) each(row * columns + column, segment);
    }
  };

  const starts = new Uint32Array(columns * rows + 1);
  for (let s = 0; s < segments; s++) {
    visit(s, (at) => {
      starts[at + 1] = (starts[at + 1] as number) + 1;
    });
  }
  for (let i = 1; i < starts.length; i++) {
    starts[i] = (starts[i] as number) + (starts[i - 1] as number);
  }
  const filled = starts.slice();
  const members = new Uint32Array(starts[starts.length - 1] as number);
  for (let s = 0; s < segments; s++) {
    visit(s, (at, segment) => {
      members[filled[at] as number] = segment;
      filled[at] = (filled[at] as number) + 1;
    });
  }

  const meetsLine = (box: Box, share: 0 | 1): boolean => {
    const bounds = boundsOf(box);
    const room = share * widest;
    const c1 = Math.max(0, columnOf(bounds.x - room));
    const c2 = Math.min(columns - 1, columnOf(bounds.x + bounds.width + room));
    const r1 = Math.max(0, rowOf(bounds.y - room));
    const r2 = Math.min(rows - 1, rowOf(bounds.y + bounds.height + room));
    for (let row = r1; row <= r2; row++) {
      for (let column = c1; column <= c2; column++) {
        const at = row * columns + column;
        const end = starts[at + 1] as number;
        for (let m = starts[at] as number; m < end; m++) {
          const s = members[m] as number;
          const hit = isHit(
            box,
            share * (clearances[s] as number),
            ends[4 * s] as number,
            ends[4 * s + 1] as number,
            ends[4 * s + 2] as number,
            ends[4 * s + 3] as number,
          );
          if (hit) return true;
        }
      }
    }
    return false;
  };

  return {
    isClear: (box) =>
      !boxes.some((other) => overlap(box, other)) &&
      !circles.some(({ at, r }) => distanceTo(box, at) < r) &&
      !meetsLine(box, 1),
    isCrossed: (box) => meetsLine(box, 0),
  };
}
