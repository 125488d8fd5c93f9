import type { Medium } from '../equilibrium/medium.ts';
import { boundaryCurves, type BoundaryCurve } from '../map/boundary.ts';

export interface Place {
  readonly T: number;
  readonly p: number;
}

/** A point that a straight run shares with a boundary; `curve` is null at the critical convention. */
export interface Meeting {
  /** Share of the run, 0 to 1. */
  readonly at: number;
  readonly curve: BoundaryCurve | null;
  readonly T: number;
  readonly p: number;
}

interface Node {
  readonly u: number;
  readonly v: number;
}

const nodeCount = 128;
const tables = new WeakMap<BoundaryCurve, readonly Node[]>();

/** Points solved once along a boundary, over its single-valued quantity: they bracket every crossing. */
function table(curve: BoundaryCurve): readonly Node[] {
  const ready = tables.get(curve);
  if (ready) return ready;
  const [low, high] = curve[curve.along];
  const made: Node[] = [];
  let near;
  for (let i = 0; i <= nodeCount; i++) {
    const k = i / nodeCount;
    // Vapour pressures spread evenly over 1/T, melting lines over p.
    const u =
      i === 0
        ? low
        : i === nodeCount
          ? high
          : curve.along === 'T'
            ? 1 / (1 / low + k * (1 / high - 1 / low))
            : low + k * (high - low);
    near = curve.along === 'T' ? curve.atTemperature(u, near) : curve.atPressure(u, near);
    made.push({ u, v: curve.along === 'T' ? near.p : near.T });
  }
  tables.set(curve, made);
  return made;
}

/** Root between two values of opposite sign: regula falsi with halved ends (Dowell and Jarratt 1971). */
export function rootBetween(
  f: (u: number) => number,
  low: number,
  atLow: number,
  high: number,
  atHigh: number,
): number {
  let [a, fa, b, fb] = [low, atLow, high, atHigh];
  let side = 0;
  for (let i = 0; i < 100; i++) {
    const inner = (a * fb - b * fa) / (fb - fa);
    const u = inner > Math.min(a, b) && inner < Math.max(a, b) ? inner : 0.5 * (a + b);
    if (Math.abs(b - a) <= 4e-16 * Math.abs(u)) return u;
    const fu = f(u);
    if (fu === 0) return u;
    if (fu < 0 === fb < 0) {
      if (Math.abs(u - b) <= 1e-15 * Math.abs(u)) return u;
      b = u;
      fb = fu;
      if (side === -1) fa *= 0.5;
      side = -1;
    } else {
      if (Math.abs(u - a) <= 1e-15 * Math.abs(u)) return u;
      a = u;
      fa = fu;
      if (side === 1) fb *= 0.5;
      side = 1;
    }
  }
  return 0.5 * (a + b);
}

/** Least |f| between two values of one sign (golden section), stopped as soon as the sign turns. */
export function nearest(f: (u: number) => number, low: number, high: number, sign: number): Node {
  const g = 0.5 * (3 - Math.sqrt(5));
  let [a, b] = [low, high];
  let x = a + g * (b - a);
  let y = b - g * (b - a);
  let fx = f(x);
  let fy = f(y);
  for (let i = 0; i < 60 && b - a > 1e-9 * Math.abs(b); i++) {
    if (fx * sign <= 0) return { u: x, v: fx };
    if (fy * sign <= 0) return { u: y, v: fy };
    if (fx * sign < fy * sign) {
      b = y;
      y = x;
      fy = fx;
      x = a + g * (b - a);
      fx = f(x);
    } else {
      a = x;
      x = y;
      fx = fy;
      y = b - g * (b - a);
      fy = f(y);
    }
  }
  return fx * sign < fy * sign ? { u: x, v: fx } : { u: y, v: fy };
}

/** A run this close to a line, relative in p or T, that does not cross it touches it. */
const touching = 1e-8;

/** Values of u at which a straight run meets a boundary. */
function rootsOf(curve: BoundaryCurve, A: Place, B: Place): number[] {
  const { along } = curve;
  const other = along === 'T' ? 'p' : 'T';
  const [a, b] = [A[along], B[along]];
  const low = Math.max(Math.min(a, b), curve[along][0]);
  const high = Math.min(Math.max(a, b), curve[along][1]);
  if (!(high >= low)) return [];
  const onRun = (u: number): number => A[other] + ((u - a) / (b - a)) * (B[other] - A[other]);
  // Relative, so that the sign is told by the numbers that matter on either axis.
  const gap = (u: number, v: number): number => onRun(u) / v - 1;
  const f = (u: number): number =>
    gap(u, along === 'T' ? curve.atTemperature(u).p : curve.atPressure(u).T);
  const nodes: Node[] = [{ u: low, v: f(low) }];
  for (const { u, v } of table(curve)) if (u > low && u < high) nodes.push({ u, v: gap(u, v) });
  if (high > low) nodes.push({ u: high, v: f(high) });
  const roots: number[] = [];
  for (let i = 0; i < nodes.length; i++) {
    const here = nodes[i]!;
    const next = nodes[i + 1];
    if (here.v === 0) roots.push(here.u);
    else if (next && here.v * next.v < 0)
      roots.push(rootBetween(f, here.u, here.v, next.u, next.v));
    const last = nodes[i - 1];
    if (!last || !next || !(last.v * here.v > 0 && here.v * next.v > 0)) continue;
    // The parabola through three nodes tells whether the run may dip through the line between them.
    const s1 = (here.v - last.v) / (here.u - last.u);
    const s2 = (next.v - here.v) / (next.u - here.u);
    const curvature = (s2 - s1) / (next.u - last.u);
    const vertex = 0.5 * (last.u + here.u) - s1 / (2 * curvature);
    if (!(vertex > last.u && vertex < next.u)) continue;
    const least = last.v + (vertex - last.u) * (s1 + curvature * (vertex - here.u));
    if (least / here.v > 0.5) continue;
    const sign = Math.sign(here.v);
    const found = nearest(f, last.u, next.u, sign);
    if (found.v * sign < 0) {
      roots.push(rootBetween(f, last.u, last.v, found.u, found.v));
      roots.push(rootBetween(f, found.u, found.v, next.u, next.v));
    } else if (Math.abs(found.v) < touching) roots.push(found.u);
  }
  return roots;
}

/**
 * Every point that a run straight in T and p shares with a boundary of the substance, and its passes
 * of the critical temperature above the critical pressure and of the critical pressure above the
 * critical temperature, in order along the run, ends included.
 *
 * Method: at constant pressure or temperature the boundary is solved there; on a ramp the boundary's
 * table of solved points brackets each crossing, which is then solved, and a near tangent is searched.
 * Error: about 1e-13 relative in the boundary's own quantity.
 */
export function meetings(m: Medium, A: Place, B: Place): readonly Meeting[] {
  const dT = B.T - A.T;
  const dp = B.p - A.p;
  if (dT === 0 && dp === 0) return [];
  const found: Meeting[] = [];
  const add = (curve: BoundaryCurve | null, T: number, p: number): void => {
    // The quantity that changes more, relatively, tells the place along the run better.
    const at = Math.abs(dT) / A.T > Math.abs(dp) / A.p ? (T - A.T) / dT : (p - A.p) / dp;
    if (at >= -1e-12 && at <= 1 + 1e-12)
      found.push({ at: Math.min(1, Math.max(0, at)), curve, T, p });
  };
  for (const curve of boundaryCurves(m)) {
    if (dp === 0) {
      if (A.p >= curve.p[0] && A.p <= curve.p[1]) add(curve, curve.atPressure(A.p).T, A.p);
    } else if (dT === 0) {
      if (A.T >= curve.T[0] && A.T <= curve.T[1]) add(curve, A.T, curve.atTemperature(A.T).p);
    } else
      for (const u of new Set(rootsOf(curve, A, B))) {
        if (curve.along === 'T') add(curve, u, A.p + ((u - A.T) / dT) * dp);
        else add(curve, A.T + ((u - A.p) / dp) * dT, u);
      }
  }
  const { critical } = m;
  if (dT !== 0) {
    const p = A.p + ((critical.T - A.T) / dT) * dp;
    if (p > critical.p) add(null, critical.T, p);
  }
  if (dp !== 0) {
    const T = A.T + ((critical.p - A.p) / dp) * dT;
    if (T > critical.T) add(null, T, critical.p);
  }
  return found.sort((x, y) => x.at - y.at);
}
