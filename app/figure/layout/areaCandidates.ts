import type { Point, Rect } from '../scene/scene.ts';
import { boxAt } from './box.ts';
import type { Candidate } from './candidate.ts';
import type { AreaLabel } from './request.ts';
import { textBox, type TextBox } from './textBox.ts';

const columns = 25;
const rows = 19;

/** Least room between a name and its area's edge, and the most that is still worth having, in mm. */
const leastRoom = 1;
const mostRoom = 12;

/** Room that a name keeps from everything while there is enough, in mm. */
const air = 2;

/** Smallest type of a name, in points. */
const smallest = 7;

/** The ring with points at most 1 mm apart, so that its distance can be taken from its points. */
function dense(ring: readonly Point[]): readonly Point[] {
  const points: Point[] = [];
  let last: Point | undefined;
  const finite = ring.filter(([x, y]) => Number.isFinite(x + y));
  for (const point of [...finite, ...finite.slice(0, 1)]) {
    if (last) {
      const [dx, dy] = [point[0] - last[0], point[1] - last[1]];
      const length = Math.hypot(dx, dy);
      if (length < 0.25) continue;
      const pieces = Math.min(1000, Math.ceil(length));
      for (let i = 1; i < pieces; i++) {
        points.push([last[0] + (dx * i) / pieces, last[1] + (dy * i) / pieces]);
      }
    }
    points.push(point);
    last = point;
  }
  return points;
}

/** Where a level line crosses the ring, ascending: inside between the first and second, and so on. */
function crossingsAt(y: number, ring: readonly Point[]): readonly number[] {
  const crossings: number[] = [];
  let [px, py] = ring.at(-1) ?? [0, 0];
  for (const [qx, qy] of ring) {
    if (qy > y !== py > y) crossings.push(((px - qx) * (y - qy)) / (py - qy) + qx);
    [px, py] = [qx, qy];
  }
  return crossings.sort((a, b) => a - b);
}

/** The part of the frame that the ring spans, or null where they are apart. */
function spanOf(ring: readonly Point[], frame: Rect): Rect | null {
  let [x1, y1, x2, y2] = [Infinity, Infinity, -Infinity, -Infinity];
  for (const [x, y] of ring) {
    if (!Number.isFinite(x + y)) continue;
    [x1, y1, x2, y2] = [Math.min(x1, x), Math.min(y1, y), Math.max(x2, x), Math.max(y2, y)];
  }
  x1 = Math.max(x1, frame.x);
  y1 = Math.max(y1, frame.y);
  x2 = Math.min(x2, frame.x + frame.width);
  y2 = Math.min(y2, frame.y + frame.height);
  return x2 > x1 && y2 > y1 ? { x: x1, y: y1, width: x2 - x1, height: y2 - y1 } : null;
}

/** Places on a grid over the span that lie in the area. */
function samplesIn(ring: readonly Point[], span: Rect): readonly Point[] {
  const inside: Point[] = [];
  for (let row = 0; row < rows; row++) {
    const y = span.y + ((row + 0.5) / rows) * span.height;
    const crossings = crossingsAt(y, ring);
    let passed = 0;
    for (let column = 0; column < columns; column++) {
      const x = span.x + ((column + 0.5) / columns) * span.width;
      while (passed < crossings.length && (crossings[passed] as number) <= x) passed++;
      if (passed % 2 === 1) inside.push([x, y]);
    }
  }
  return inside;
}

function middleOf(inside: readonly Point[], span: Rect): Point {
  if (inside.length === 0) return [span.x + span.width / 2, span.y + span.height / 2];
  let [x, y] = [0, 0];
  for (const point of inside) {
    x += point[0] / inside.length;
    y += point[1] / inside.length;
  }
  return [x, y];
}

/** Middle of the part of an area that lies in the frame. */
export function areaMiddle(ring: readonly Point[], frame: Rect): Point {
  const span = spanOf(ring, frame) ?? frame;
  return middleOf(samplesIn(dense(ring), span), span);
}

/** Room between the box about a point and the edges of area and frame; negative where it crosses. */
function roomAt(
  [x, y]: Point,
  { width, height }: TextBox,
  ring: readonly Point[],
  frame: Rect,
): number {
  const [w, h] = [width / 2, height / 2];
  let least = Math.min(
    x - w - frame.x,
    frame.x + frame.width - x - w,
    y - h - frame.y,
    frame.y + frame.height - y - h,
  );
  for (const point of ring) {
    const room = Math.max(Math.abs(point[0] - x) - w, Math.abs(point[1] - y) - h);
    if (room < least) {
      least = room;
      if (least < leastRoom) break;
    }
  }
  return least;
}

/** The same text with room about it. */
function airy(text: TextBox): TextBox {
  return {
    ...text,
    width: text.width + 2 * air,
    height: text.height + 2 * air,
    baseline: text.baseline + air,
    pad: text.pad + air,
  };
}

/** The styles a name can take: with air about it if there is any, then ever narrower. */
function stylesOf(request: AreaLabel): readonly TextBox[] {
  const spacing = request.spacing ?? 0;
  const smaller = Math.min(request.size, Math.max(smallest, request.size - 1));
  const styles: (readonly [number, number])[] = [[request.size, spacing]];
  if (spacing > 0) styles.push([request.size, spacing * 0.4]);
  if (smaller < request.size) styles.push([smaller, spacing * 0.4]);
  if (spacing > 0) styles.push([smaller, 0]);
  const texts = styles.map(([size, each]) => textBox(request, size, each));
  return request.plate ? texts : [airy(textBox(request)), ...texts];
}

/**
 * Places inside an area: those with the most room about the text and nearest to the middle first,
 * one list for each style that the name can take.
 */
export function areaCandidates(
  request: AreaLabel,
  frame: Rect,
): readonly (() => readonly Candidate[])[] {
  const span = spanOf(request.ring, frame);
  if (!span) return [];
  const ring = dense(request.ring);
  const inside = samplesIn(ring, span);
  const [mx, my] = middleOf(inside, span);
  const reach = Math.hypot(span.width, span.height);
  return stylesOf(request).map((text) => () => {
    const found: Candidate[] = [];
    for (const point of inside) {
      const room = roomAt(point, text, ring, frame);
      if (room < leastRoom) continue;
      const away = Math.hypot(point[0] - mx, point[1] - my) / reach;
      found.push({
        cost: 1 - Math.min(room, mostRoom) / mostRoom + 3 * away,
        box: boxAt(point, text.width, text.height),
        angle: 0,
        anchor: 'middle',
        text,
      });
    }
    return found.sort((a, b) => a.cost - b.cost);
  });
}
