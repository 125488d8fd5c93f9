import type { Point, Rect } from '../scene/scene.ts';
import { boxAt, isHit, type Box } from './box.ts';
import type { Candidate } from './candidate.ts';
import { pointCandidates } from './pointCandidates.ts';
import type { LineLabel, PointLabel } from './request.ts';
import { textBox } from './textBox.ts';

/** Clear distances between a line and its name, in mm. */
const gaps = [0.9, 1.5, 2.4];
const otherSideCost = 3;

/** A polyline with the length reached at each of its points. */
export interface Measured {
  readonly points: readonly Point[];
  readonly lengths: readonly number[];
  /** The part of its length that lies in the frame, from the first to the last point there. */
  readonly from: number;
  readonly to: number;
}

/** Measures a polyline, points nearer together than 0.1 mm taken as one. */
export function measured(along: readonly Point[], frame: Rect): Measured {
  const points: Point[] = [];
  const lengths: number[] = [];
  let from = Infinity;
  let to = -Infinity;
  for (let i = 0; i < along.length; i++) {
    const point = along[i] as Point;
    const [x, y] = [point[0], point[1]];
    if (!Number.isFinite(x + y)) continue;
    const last = points.at(-1);
    const step = last ? Math.sqrt((x - last[0]) ** 2 + (y - last[1]) ** 2) : 0;
    if (last && step < 0.1 && i < along.length - 1) continue;
    const length = (lengths.at(-1) ?? 0) + step;
    points.push(point);
    lengths.push(length);
    const isIn =
      x >= frame.x && x <= frame.x + frame.width && y >= frame.y && y <= frame.y + frame.height;
    if (isIn) {
      from = Math.min(from, length);
      to = Math.max(to, length);
    }
  }
  return { points, lengths, from, to };
}

/** Index of the last point at or before a length. */
function indexAt({ lengths }: Measured, length: number): number {
  let [low, high] = [0, lengths.length - 1];
  while (low < high) {
    const middle = (low + high + 1) >> 1;
    if ((lengths[middle] as number) <= length) low = middle;
    else high = middle - 1;
  }
  return low;
}

/** The point at a length along a polyline. */
export function pointAt(line: Measured, length: number): Point {
  const i = indexAt(line, length);
  const a = line.points[i] as Point;
  const b = line.points[i + 1] ?? a;
  const step = (line.lengths[i + 1] ?? 0) - (line.lengths[i] as number);
  const share =
    step > 0 ? Math.max(0, Math.min(1, (length - (line.lengths[i] as number)) / step)) : 0;
  return [a[0] + (b[0] - a[0]) * share, a[1] + (b[1] - a[1]) * share];
}

/** Degrees of a direction, turned so that a text along it reads from left to right. */
export function readable(dx: number, dy: number): number {
  const angle = (Math.atan2(dy, dx) * 180) / Math.PI;
  // An upright text reads upwards, as an axis title does; the tolerance takes rounding with it.
  if (angle >= 90 - 1e-6) return angle - 180;
  return angle < -90 - 1e-6 ? angle + 180 : angle;
}

/** Places beside a line, its middle and its straight parts first. */
export function lineCandidates(request: LineLabel, line: Measured): readonly Candidate[] {
  const text = textBox(request);
  const visible = line.to - line.from;
  const found: Candidate[] = [];
  if (!(visible > 0)) return found;
  const steps = Math.max(8, Math.min(40, Math.ceil(visible / 2)));
  for (let k = 0; k <= steps; k++) {
    const at = line.from + (visible * k) / steps;
    const [a, b] = [at - text.width / 2, at + text.width / 2];
    if (a < line.from || b > line.to) continue;
    const start = pointAt(line, a);
    const end = pointAt(line, b);
    const [dx, dy] = [end[0] - start[0], end[1] - start[1]];
    const chord = Math.hypot(dx, dy);
    if (chord < 0.85 * text.width) continue;
    const angle = readable(dx, dy);
    const turn = (angle * Math.PI) / 180;
    const [cos, sin] = [Math.cos(turn), Math.sin(turn)];
    const middle: Point = [(start[0] + end[0]) / 2, (start[1] + end[1]) / 2];
    let [highest, lowest] = [0, 0];
    for (let i = indexAt(line, a) + 1; i < line.points.length; i++) {
      if ((line.lengths[i] as number) > b) break;
      const [x, y] = line.points[i] as Point;
      const across = (y - middle[1]) * cos - (x - middle[0]) * sin;
      highest = Math.min(highest, across);
      lowest = Math.max(lowest, across);
    }
    const bulge = lowest - highest;
    if (bulge > Math.max(1, 0.2 * text.width)) continue;
    const offMiddle = Math.abs((2 * k) / steps - 1);
    const straightness = (8 * bulge) / text.width;
    for (const side of ['above', 'below'] as const) {
      const isOther = request.side !== 'either' && request.side !== side;
      const sideCost = isOther ? otherSideCost : side === 'above' ? 0 : 0.15;
      for (const gap of gaps) {
        const shift =
          side === 'above' ? highest - gap - text.height / 2 : lowest + gap + text.height / 2;
        const centre: Point = [middle[0] - shift * sin, middle[1] + shift * cos];
        found.push({
          cost: offMiddle + straightness + sideCost + (gap - 0.9),
          box: boxAt(centre, text.width, text.height, angle),
          angle,
          anchor: 'middle',
          text,
        });
      }
    }
  }
  return found.sort((p, q) => p.cost - q.cost);
}

const uprightGap = 1.2;
const uprightShares = [0.5, 0.35, 0.65, 0.2, 0.8];

function isOn(box: Box, line: readonly Point[]): boolean {
  let [px, py] = line[0] ?? [0, 0];
  for (let i = 1; i < line.length; i++) {
    const point = line[i] as Point;
    const [x, y] = [point[0], point[1]];
    // Steps of about half a millimetre are fine enough here, whatever the line is drawn with.
    if (Math.abs(x - px) + Math.abs(y - py) < 0.5 && i < line.length - 1) continue;
    if (isHit(box, 0.5, px, py, x, y)) return true;
    [px, py] = [x, y];
  }
  return false;
}

/** Level places beside a line that is too short, too curved or too crowded for a text along it. */
export function uprightCandidates(request: LineLabel, line: Measured): readonly Candidate[] {
  if (!(line.to >= line.from)) return [];
  const found: Candidate[] = [];
  for (const share of uprightShares) {
    const at = pointAt(line, line.from + share * (line.to - line.from));
    const point: PointLabel = { ...request, kind: 'point', at, gap: uprightGap };
    for (const candidate of pointCandidates(point)) {
      if (isOn(candidate.box, line.points)) continue;
      found.push({ ...candidate, cost: 4 + candidate.cost + Math.abs(share - 0.5) });
    }
  }
  return found.sort((a, b) => a.cost - b.cost);
}

/** Direction in degrees of the line where it comes nearest to a point, taken over the text's width. */
export function angleNear(line: Measured, point: Point, width: number): number {
  let [nearest, at] = [Infinity, 0];
  for (const [i, [x, y]] of line.points.entries()) {
    const next = line.points[i + 1] ?? [x, y];
    const [dx, dy] = [next[0] - x, next[1] - y];
    const square = dx * dx + dy * dy;
    const share =
      square > 0
        ? Math.max(0, Math.min(1, ((point[0] - x) * dx + (point[1] - y) * dy) / square))
        : 0;
    const distance = Math.hypot(point[0] - x - dx * share, point[1] - y - dy * share);
    if (distance < nearest) {
      nearest = distance;
      at = (line.lengths[i] as number) + share * Math.sqrt(square);
    }
  }
  const total = line.lengths.at(-1) ?? 0;
  const start = pointAt(line, Math.max(0, at - width / 2));
  const end = pointAt(line, Math.min(total, at + width / 2));
  const [dx, dy] = [end[0] - start[0], end[1] - start[1]];
  return dx === 0 && dy === 0 ? 0 : readable(dx, dy);
}
