import type { Point, Rect } from '../scene/scene.ts';

/** A rectangle of any direction, in mm: centre, half sides, and the unit vector along its width. */
export interface Box {
  readonly x: number;
  readonly y: number;
  readonly halfWidth: number;
  readonly halfHeight: number;
  readonly cos: number;
  readonly sin: number;
}

export interface Segment {
  readonly from: Point;
  readonly to: Point;
}

/** A box about a centre; `angle` in degrees, clockwise on the page. */
export function boxAt(centre: Point, width: number, height: number, angle = 0): Box {
  const [cos, sin] =
    angle === 0 ? [1, 0] : [Math.cos((angle * Math.PI) / 180), Math.sin((angle * Math.PI) / 180)];
  return { x: centre[0], y: centre[1], halfWidth: width / 2, halfHeight: height / 2, cos, sin };
}

export function boxOfRect({ x, y, width, height }: Rect): Box {
  return boxAt([x + width / 2, y + height / 2], width, height);
}

/** Half the extent of the box along the page's x and y. */
function reach(box: Box): readonly [number, number] {
  const [c, s] = [Math.abs(box.cos), Math.abs(box.sin)];
  return [box.halfWidth * c + box.halfHeight * s, box.halfWidth * s + box.halfHeight * c];
}

/** The upright rectangle around a box. */
export function boundsOf(box: Box): Rect {
  const [rx, ry] = reach(box);
  return { x: box.x - rx, y: box.y - ry, width: 2 * rx, height: 2 * ry };
}

/** Corners of a box, in order around it, beginning at the start of its top edge. */
export function cornersOf(box: Box): readonly Point[] {
  const corner = (u: number, v: number): Point => [
    box.x + u * box.halfWidth * box.cos - v * box.halfHeight * box.sin,
    box.y + u * box.halfWidth * box.sin + v * box.halfHeight * box.cos,
  ];
  return [corner(-1, -1), corner(1, -1), corner(1, 1), corner(-1, 1)];
}

export function isInside(box: Box, frame: Rect): boolean {
  const [rx, ry] = reach(box);
  return (
    box.x - rx >= frame.x &&
    box.x + rx <= frame.x + frame.width &&
    box.y - ry >= frame.y &&
    box.y + ry <= frame.y + frame.height
  );
}

function isApartAlong(cos: number, sin: number, half: number, a: Box, b: Box): boolean {
  const distance = Math.abs((b.x - a.x) * cos + (b.y - a.y) * sin);
  const along = Math.abs(b.cos * cos + b.sin * sin);
  const across = Math.abs(b.cos * sin - b.sin * cos);
  return distance >= half + b.halfWidth * along + b.halfHeight * across;
}

/** Whether two boxes share more than an edge, or are less than `space` apart, by the axes of both. */
export function overlap(a: Box, b: Box, space = 0): boolean {
  const span = a.halfWidth + a.halfHeight + b.halfWidth + b.halfHeight + space;
  if (Math.abs(a.x - b.x) >= span || Math.abs(a.y - b.y) >= span) return false;
  return !(
    isApartAlong(a.cos, a.sin, a.halfWidth + space, a, b) ||
    isApartAlong(-a.sin, a.cos, a.halfHeight + space, a, b) ||
    isApartAlong(b.cos, b.sin, b.halfWidth + space, b, a) ||
    isApartAlong(-b.sin, b.cos, b.halfHeight + space, b, a)
  );
}

/** Whether a segment comes nearer to a box than `clearance`; the box grows with square corners. */
export function isHit(
  box: Box,
  clearance: number,
  x1: number,
  y1: number,
  x2: number,
  y2: number,
): boolean {
  // No arrays here: this runs for each box against each segment near it.
  const { cos, sin } = box;
  const dx1 = x1 - box.x;
  const dy1 = y1 - box.y;
  const dx2 = x2 - box.x;
  const dy2 = y2 - box.y;
  const w = box.halfWidth + clearance;
  const h = box.halfHeight + clearance;
  const u1 = dx1 * cos + dy1 * sin;
  const u2 = dx2 * cos + dy2 * sin;
  if ((u1 <= -w && u2 <= -w) || (u1 >= w && u2 >= w)) return false;
  const v1 = dy1 * cos - dx1 * sin;
  const v2 = dy2 * cos - dx2 * sin;
  if ((v1 <= -h && v2 <= -h) || (v1 >= h && v2 >= h)) return false;
  // Separating axis across the segment.
  const du = u2 - u1;
  const dv = v2 - v1;
  return Math.abs(u1 * dv - v1 * du) < w * Math.abs(dv) + h * Math.abs(du);
}

export function segmentHits(box: Box, { from, to }: Segment): boolean {
  return isHit(box, 0, from[0], from[1], to[0], to[1]);
}

/** Distance from a point to a box, 0 inside. */
export function distanceTo(box: Box, point: Point): number {
  // No arrays and no hypot here: this runs for each box against each dot of the page.
  const dx = point[0] - box.x;
  const dy = point[1] - box.y;
  const u = Math.max(0, Math.abs(dx * box.cos + dy * box.sin) - box.halfWidth);
  const v = Math.max(0, Math.abs(dy * box.cos - dx * box.sin) - box.halfHeight);
  return Math.sqrt(u * u + v * v);
}

/** The point of a box nearest to a point. */
export function nearestOn(box: Box, [x, y]: Point): Point {
  const [dx, dy] = [x - box.x, y - box.y];
  const clamp = (value: number, half: number): number => Math.max(-half, Math.min(half, value));
  const u = clamp(dx * box.cos + dy * box.sin, box.halfWidth);
  const v = clamp(dy * box.cos - dx * box.sin, box.halfHeight);
  return [box.x + u * box.cos - v * box.sin, box.y + u * box.sin + v * box.cos];
}
