import type { Boundary, BoundaryCurve, BoundaryPoint } from './boundary.ts';
import type { Place, Plane } from './plane.ts';

/** A traced line stays within this of the curve, in mm on the page. */
export const traceTolerance = 0.03;

type Ends = readonly [low: BoundaryPoint, high: BoundaryPoint];

/** The part of the curve inside the frame, its ends solved on the frame; null where none is. */
function clip(curve: BoundaryCurve, plane: Plane): Ends | null {
  const [Tlow, Thigh] = plane.T.range;
  const [plow, phigh] = plane.p.range;
  if (curve.T[1] < Tlow || curve.T[0] > Thigh || curve.p[1] < plow || curve.p[0] > phigh)
    return null;
  const low =
    curve.p[0] >= plow
      ? curve.falling
        ? curve.atTemperature(curve.T[1])
        : curve.atTemperature(curve.T[0])
      : curve.atPressure(plow);
  const high =
    curve.p[1] <= phigh
      ? curve.falling
        ? curve.atTemperature(curve.T[0])
        : curve.atTemperature(curve.T[1])
      : curve.atPressure(phigh);
  // Both ends lie inside in pressure; now bring each inside in temperature.
  const inside = (end: BoundaryPoint, other: BoundaryPoint): BoundaryPoint | null => {
    if (end.T < Tlow) return other.T < Tlow ? null : curve.atTemperature(Tlow);
    if (end.T > Thigh) return other.T > Thigh ? null : curve.atTemperature(Thigh);
    return end;
  };
  const a = inside(low, high);
  const b = inside(high, low);
  return a && b && (a.T !== b.T || a.p !== b.p) ? [a, b] : null;
}

/** Distance of a place from a chord, signed by its side. */
const deviation = (m: Place, a: Place, b: Place): number => {
  const dx = b[0] - a[0];
  const dy = b[1] - a[1];
  const length = Math.hypot(dx, dy);
  return length === 0
    ? Math.hypot(m[0] - a[0], m[1] - a[1])
    : (dx * (m[1] - a[1]) - dy * (m[0] - a[0])) / length;
};

/**
 * Follows a boundary inside the plane's frame.
 *
 * Method: the frame's own crossings are solved; between them segments are halved, in the axis along
 * which the curve is single-valued, until the midpoint lies within 4 × 0.4 × `tolerance` of its
 * chord; the midpoint then becomes a vertex too, which leaves a quarter of that deviation. About an
 * inflection a midpoint lies near its chord by chance: a bend that is even has a quarter of the chord's
 * above, and half of what it differs from that bounds what the halves leave.
 * Returns null where the curve does not enter the frame.
 */
export function trace(
  curve: BoundaryCurve,
  plane: Plane,
  tolerance = traceTolerance,
): Boundary | null {
  const ends = clip(curve, plane);
  if (!ends) return null;
  const axis = curve.along === 'T' ? plane.T : plane.p;
  const at = (share: number, near: BoundaryPoint): BoundaryPoint => {
    const value = axis.value(share);
    const [low, high] = curve[curve.along];
    const held = Math.min(high, Math.max(low, value));
    return curve.along === 'T' ? curve.atTemperature(held, near) : curve.atPressure(held, near);
  };
  const shareOf = (point: BoundaryPoint): number => axis.share(point[curve.along]);
  const points: BoundaryPoint[] = [ends[0]];
  const refine = (
    a: BoundaryPoint,
    sa: number,
    b: BoundaryPoint,
    sb: number,
    depth: number,
    above: number,
  ): void => {
    const s = 0.5 * (sa + sb);
    const middle = at(s, points[points.length - 1]!);
    const d = deviation(plane.project(middle)!, plane.project(a)!, plane.project(b)!);
    const left = 0.25 * Math.abs(d) + 0.5 * Math.abs(d - 0.25 * above);
    if (depth > 2 && ((Math.abs(d) <= 1.6 * tolerance && left <= tolerance) || depth > 18)) {
      points.push(middle, b);
      return;
    }
    refine(a, sa, middle, s, depth + 1, d);
    refine(middle, s, b, sb, depth + 1, d);
  };
  const [sa, sb] = ends.map(shareOf) as [number, number];
  refine(ends[0], sa, ends[1], sb, 0, 0);
  return {
    id: curve.id,
    kind: curve.kind,
    of: curve.of,
    basis: curve.basis,
    source: curve.source,
    form: curve.form,
    range: { T: curve.T, p: curve.p },
    points,
  };
}
