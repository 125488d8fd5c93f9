import type { Point } from '../scene/scene.ts';
import { boxAt, distanceTo, nearestOn, type Box, type Segment } from './box.ts';
import type { Candidate } from './candidate.ts';
import type { PointLabel } from './request.ts';
import { textBox } from './textBox.ts';

const half = Math.SQRT1_2;

interface Side {
  readonly x: number;
  readonly y: number;
  readonly cost: number;
}

/** Beside first: a reader's eye goes from the point to the right. */
const plain: readonly Side[] = [
  { x: 1, y: 0, cost: 0 },
  { x: half, y: -half, cost: 0.3 },
  { x: half, y: half, cost: 0.4 },
  { x: -1, y: 0, cost: 0.5 },
  { x: -half, y: -half, cost: 0.6 },
  { x: -half, y: half, cost: 0.7 },
  { x: 0, y: -1, cost: 0.8 },
  { x: 0, y: 1, cost: 1 },
];

/** On a leader the diagonals come first: lines of a figure mostly run level or upright. */
const led: readonly Side[] = [
  { x: half, y: -half, cost: 0 },
  { x: -half, y: -half, cost: 0.2 },
  { x: half, y: half, cost: 0.3 },
  { x: -half, y: half, cost: 0.4 },
  { x: 0, y: -1, cost: 0.6 },
  { x: 0, y: 1, cost: 0.8 },
  { x: 1, y: 0, cost: 0.7 },
  { x: -1, y: 0, cost: 0.9 },
];

/** Added to the gap, in mm. */
const plainSteps = [0, 0.6, 1.4];
const ledSteps = [0, 1.5, 3, 5, 8, 12];
const costPerMm = 0.25;

/** A leader from a point to a box, or none where the box is at the point. */
export function leaderTo(request: PointLabel, box: Box): Segment | undefined {
  const { at, gap, tag } = request;
  const distance = distanceTo(box, at);
  // A tag's leader begins in its dot; other signs are open and the leader stays outside them.
  const clear = tag === undefined ? Math.min(gap, 1.2) : 0;
  if (distance <= clear + 0.3) return undefined;
  const to = nearestOn(box, at);
  const share = clear / distance;
  const from: Point = [at[0] + (to[0] - at[0]) * share, at[1] + (to[1] - at[1]) * share];
  return { from, to };
}

/** Places at eight sides of a point, in order of cost. */
export function pointCandidates(request: PointLabel): readonly Candidate[] {
  const text = textBox(request);
  const isLed = request.leader === true;
  const found: Candidate[] = [];
  for (const step of isLed ? ledSteps : plainSteps) {
    const gap = request.gap + step;
    for (const side of isLed ? led : plain) {
      const centre: Point = [
        request.at[0] + side.x * gap + (Math.sign(side.x) * text.width) / 2,
        request.at[1] + side.y * gap + (Math.sign(side.y) * text.height) / 2,
      ];
      const box = boxAt(centre, text.width, text.height);
      const leader = isLed ? leaderTo(request, box) : undefined;
      const anchor =
        request.tag !== undefined || side.x === 0 ? 'middle' : side.x > 0 ? 'start' : 'end';
      found.push({
        cost: side.cost + costPerMm * step,
        box,
        angle: 0,
        anchor,
        text,
        ...(leader && { leader, isUntried: true }),
      });
    }
  }
  return found.sort((a, b) => a.cost - b.cost);
}
