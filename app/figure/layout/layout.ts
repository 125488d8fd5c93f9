import type { Point, Rect, Shape, Unplaced } from '../scene/scene.ts';
import { overlap, segmentHits, type Box, type Segment } from './box.ts';
import type { Candidate, Page } from './candidate.ts';
import { choiceOf, type Choice } from './choice.ts';
import { labelShapes, type LabelShapes } from './labelShapes.ts';
import { movedCandidate } from './moved.ts';
import { obstacleIndex, type ObstacleIndex, type Obstacles } from './obstacles.ts';
import type { LabelRequest } from './request.ts';

/** Where a label stands, for picking and for tests. */
export interface PlacedBox {
  readonly id: string;
  readonly of?: string;
  readonly box: Box;
  readonly leader?: Segment;
  readonly isMoved: boolean;
}

export interface Layout {
  /** Leaders first, then tags and plates, then texts. */
  readonly shapes: readonly Shape[];
  readonly boxes: readonly PlacedBox[];
  /** Labels that found no room, in the order of the requests. */
  readonly unplaced: readonly Unplaced[];
  /** Pairs of moved labels that stand on each other, by id: reported, not moved. */
  readonly overlaps: readonly (readonly [string, string])[];
}

/** Space kept between two labels, in mm. */
export const apart = 0.4;

/** Ranks looked at when a label is to make room or to find some. */
const ranksTried = 24;
const rounds = 2;

interface Label {
  readonly request: LabelRequest;
  readonly isMoved: boolean;
  readonly choice: Choice | null;
  rank: number;
  place: Candidate | null;
}

function isConflict(a: Candidate, b: Candidate): boolean {
  return (
    overlap(a.box, b.box, apart) ||
    (a.leader !== undefined && segmentHits(b.box, a.leader)) ||
    (b.leader !== undefined && segmentHits(a.box, b.leader)) ||
    (a.leader !== undefined && b.leader !== undefined && isCross(a.leader, b.leader))
  );
}

/** Twice the area of the triangle of a segment and a point, its sign telling the side. */
function side({ from, to }: Segment, point: Point): number {
  return (to[0] - from[0]) * (point[1] - from[1]) - (to[1] - from[1]) * (point[0] - from[0]);
}

function isCross(a: Segment, b: Segment): boolean {
  return side(a, b.from) * side(a, b.to) < 0 && side(b, a.from) * side(b, a.to) < 0;
}

/** The next label, from an index on, in whose way a place would be, `label` itself left aside. */
function blockerFrom(
  start: number,
  place: Candidate,
  label: Label,
  labels: readonly Label[],
): number {
  for (let i = start; i < labels.length; i++) {
    const other = labels[i] as Label;
    if (other !== label && other.place && isConflict(place, other.place)) return i;
  }
  return -1;
}

/** Gives a label its best free place of a rank below `limit` and a cost below `budget`. */
function settle(label: Label, labels: readonly Label[], limit: number, budget = Infinity): boolean {
  for (let rank = 0; rank < limit; rank++) {
    const place = label.choice?.at(rank);
    if (!place || place.cost >= budget) return false;
    if (blockerFrom(0, place, label, labels) >= 0) continue;
    label.rank = rank;
    label.place = place;
    return true;
  }
  return false;
}

/**
 * Gives a label a place of a rank below `limit` where just one other is in the way and can stand
 * elsewhere; where the label had a place already, only if both together stand better than before.
 */
function makeRoom(label: Label, labels: readonly Label[], limit: number): boolean {
  const own = { rank: label.rank, place: label.place };
  for (let rank = 0; rank < Math.min(limit, ranksTried); rank++) {
    const place = label.choice?.at(rank);
    if (!place) break;
    const first = blockerFrom(0, place, label, labels);
    const blocker = labels[first];
    if (!blocker?.place || blocker.isMoved) continue;
    if (blockerFrom(first + 1, place, label, labels) >= 0) continue;
    const before = { rank: blocker.rank, place: blocker.place };
    const worth = own.place ? own.place.cost + before.place.cost : Infinity;
    if (worth - place.cost <= 0) break;
    label.rank = rank;
    label.place = place;
    blocker.place = null;
    if (settle(blocker, labels, ranksTried, worth - place.cost)) return true;
    Object.assign(blocker, before);
    Object.assign(label, own);
  }
  return false;
}

function isFinite(request: LabelRequest): boolean {
  const { offset } = request;
  const numbers = [
    request.size,
    ...(offset ?? []),
    ...(request.kind === 'point' ? [...request.at, request.gap] : []),
  ];
  return numbers.every(Number.isFinite);
}

function isAnchored(request: LabelRequest, frame: Rect): boolean {
  if (request.kind !== 'point') return true;
  const [x, y] = request.at;
  const slack = 1e-6;
  return (
    x >= frame.x - slack &&
    x <= frame.x + frame.width + slack &&
    y >= frame.y - slack &&
    y <= frame.y + frame.height + slack
  );
}

function textOf(request: LabelRequest): string {
  return request.runs.map(({ text }) => text).join('');
}

/** Where moved labels stand, kept with their requests: while something is dragged most are the same. */
const stands = new WeakMap<LabelRequest, { readonly frame: Rect; readonly place: Candidate }>();

function standing(request: LabelRequest, offset: Point, frame: Rect): Candidate {
  const ready = stands.get(request);
  if (ready?.frame === frame) return ready.place;
  const place = movedCandidate(request, offset, frame);
  stands.set(request, { frame, place });
  return place;
}

/** Shapes by their place, which belongs to one label. */
const drawings = new WeakMap<Candidate, LabelShapes>();

function drawing(request: LabelRequest, place: Candidate): LabelShapes {
  const ready = drawings.get(place) ?? labelShapes(request, place);
  drawings.set(place, ready);
  return ready;
}

/** A label that has no place. */
export const unplacedOf = (request: LabelRequest): Unplaced => ({
  id: request.id,
  text: textOf(request),
});

function overlapsOf(labels: readonly Label[]): Layout['overlaps'] {
  const moved = labels.filter(({ isMoved }) => isMoved);
  return moved.flatMap((a, i) =>
    moved
      .slice(i + 1)
      .filter((b) => a.place && b.place && overlap(a.place.box, b.place.box))
      .map((b) => [a.request.id, b.request.id] as const),
  );
}

/**
 * Places all labels of a page at once.
 *
 * Labels that the user moved stand exactly where they were put. The rest follow in the order of
 * `priority`, then of the list: each takes its best place that is in the frame, clear of obstacles
 * and `apart` from other labels and their leaders. Then, twice over, each moves to a better
 * place that has come free or that one other can make free at a gain. The same requests give the
 * same places. Requests without text are left out.
 */
export function layout(
  requests: readonly LabelRequest[],
  obstacles: Obstacles,
  frame: Rect,
): Layout {
  // While something is dragged every label stands already and nobody asks for obstacles.
  let index: ObstacleIndex | undefined;
  const page: Page = {
    frame,
    get obstacles() {
      return (index ??= obstacleIndex(obstacles, frame));
    },
  };
  const labels = requests
    .filter((request) => textOf(request).trim() !== '')
    .map((request): Label => {
      const isMoved = request.offset !== undefined && isFinite(request);
      const canStand = isFinite(request) && isAnchored(request, frame);
      return {
        request,
        isMoved,
        choice: !isMoved && canStand ? choiceOf(request, page) : null,
        rank: 0,
        place: isMoved && request.offset ? standing(request, request.offset, frame) : null,
      };
    });
  const ordered = labels
    .filter(({ isMoved }) => !isMoved)
    .toSorted((a, b) => a.request.priority - b.request.priority);

  for (const label of ordered) settle(label, labels, Infinity);
  for (let [round, isMoving] = [0, true]; isMoving && round < rounds; round++) {
    isMoving = false;
    for (const label of ordered) {
      const limit = label.place ? label.rank : ranksTried;
      if (settle(label, labels, limit) || makeRoom(label, labels, limit)) isMoving = true;
    }
  }

  const placed = labels.flatMap(({ request, place, isMoved }) =>
    place ? [{ request, place, isMoved }] : [],
  );
  const drawn = placed.map(({ request, place }) => drawing(request, place));
  return {
    shapes: [
      ...drawn.flatMap(({ leader }) => leader ?? []),
      ...drawn.flatMap(({ ground }) => ground ?? []),
      ...drawn.map(({ text }) => text),
    ],
    boxes: placed.map(({ request, place, isMoved }) => ({
      id: request.id,
      of: request.of,
      box: place.box,
      isMoved,
      ...(place.leader && { leader: place.leader }),
    })),
    unplaced: labels.filter(({ place }) => !place).map(({ request }) => unplacedOf(request)),
    get overlaps() {
      return overlapsOf(labels);
    },
  };
}
