import type { Medium } from '../equilibrium/medium.ts';
import { phaseProperties } from '../equilibrium/state.ts';
import { boundaryCurves, type BoundaryCurve, type BoundaryPoint } from '../map/boundary.ts';
import { targetOf, wayOf, type KeptLine } from './keptLine.ts';
import { nearest, rootBetween } from './meetings.ts';

/** Where one side of a boundary has what the line keeps: there the line enters or leaves it. */
export interface KeptMeeting {
  /** Pressure, or temperature where the volume is kept. */
  readonly u: number;
  readonly curve: BoundaryCurve;
  readonly side: 0 | 1;
}

type Kept = Readonly<Record<'h' | 's' | 'v', number>>;

interface Node {
  readonly point: BoundaryPoint;
  readonly sides: readonly [Kept | null, Kept | null];
}

const nodeCount = 96;
const tables = new WeakMap<BoundaryCurve, readonly Node[]>();

function nodeAt(m: Medium, point: BoundaryPoint): Node {
  const [a, b] = point.sides.map((side) => {
    const known = side && phaseProperties(m, side);
    return known ? { h: known.h, s: known.s, v: 1 / known.rho } : null;
  });
  return { point, sides: [a ?? null, b ?? null] };
}

/** Both sides' properties at points solved once along a boundary. */
function table(m: Medium, curve: BoundaryCurve): readonly Node[] {
  const ready = tables.get(curve);
  if (ready) return ready;
  const [low, high] = curve[curve.along];
  const nodes: Node[] = [];
  let near: BoundaryPoint | undefined;
  for (let i = 0; i <= nodeCount; i++) {
    const k = i / nodeCount;
    const u =
      i === nodeCount
        ? high
        : curve.along === 'p'
          ? low + k * (high - low)
          : // Closer together towards the critical point, where properties turn.
            curve.kind === 'saturation'
            ? high - (high - low) * (1 - k) ** 2
            : 1 / (1 / low + k * (1 / high - 1 / low));
    near = curve.along === 'T' ? curve.atTemperature(u, near) : curve.atPressure(u, near);
    nodes.push(nodeAt(m, near));
  }
  tables.set(curve, nodes);
  return nodes;
}

/**
 * Every place between `from` and `to` (excluded) at which the line meets a boundary, in order from
 * `from`: one side there has the kept property. The table of solved points brackets each, which is then
 * solved; a near tangent (the enthalpy of steam has a highest value) is searched.
 */
export function keptMeetings(
  m: Medium,
  line: KeptLine,
  from: number,
  to: number,
): readonly KeptMeeting[] {
  const way = wayOf(line);
  const { of, at } = targetOf(m, line);
  const [least, most] = [Math.min(from, to), Math.max(from, to)];
  const found: KeptMeeting[] = [];
  for (const curve of boundaryCurves(m)) {
    const low = Math.max(least, curve[way][0]);
    const high = Math.min(most, curve[way][1]);
    if (!(high > low)) continue;
    const pointAt = (u: number): BoundaryPoint =>
      way === 'p' ? curve.atPressure(u) : curve.atTemperature(u);
    const inside = table(m, curve).filter(({ point }) => point[way] > low && point[way] < high);
    const nodes = [nodeAt(m, pointAt(low)), ...inside, nodeAt(m, pointAt(high))].sort(
      (a, b) => a.point[way] - b.point[way],
    );
    for (const side of [0, 1] as const) {
      const gap = (node: Node): number => {
        const known = node.sides[side];
        return known ? known[of] - at(node.point[way]) : NaN;
      };
      const f = (u: number): number => gap(nodeAt(m, pointAt(u)));
      const gaps = nodes.map((node) => ({ u: node.point[way], v: gap(node) }));
      const add = (u: number): void => {
        if (u > least && u < most) found.push({ u, curve, side });
      };
      for (let i = 0; i < gaps.length; i++) {
        const here = gaps[i]!;
        const next = gaps[i + 1];
        const last = gaps[i - 1];
        if (here.v === 0) add(here.u);
        else if (next && here.v * next.v < 0) add(rootBetween(f, here.u, here.v, next.u, next.v));
        if (!last || !next || !(last.v * here.v > 0 && here.v * next.v > 0)) continue;
        const sign = Math.sign(here.v);
        if (!(here.v * sign <= last.v * sign && here.v * sign <= next.v * sign)) continue;
        const near = nearest(f, last.u, next.u, sign);
        if (!(near.v * sign < 0)) continue;
        add(rootBetween(f, last.u, last.v, near.u, near.v));
        add(rootBetween(f, near.u, near.v, next.u, next.v));
      }
    }
  }
  const forward = to > from ? 1 : -1;
  return found.sort((a, b) => forward * (a.u - b.u));
}
