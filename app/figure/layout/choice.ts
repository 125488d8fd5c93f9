import { areaCandidates } from './areaCandidates.ts';
import type { Point } from '../scene/scene.ts';
import { boxAt, isInside, type Segment } from './box.ts';
import type { Candidate, Page } from './candidate.ts';
import { lineCandidates, measured, uprightCandidates } from './lineCandidates.ts';
import { pointCandidates } from './pointCandidates.ts';
import type { LabelRequest } from './request.ts';

const crossingCost = 1.2;

/** The places of one label that are in the frame and clear of obstacles, best first. */
export interface Choice {
  /** The place of a rank, or undefined when there are no more. */
  readonly at: (rank: number) => Candidate | undefined;
}

/** Whether a leader runs through a line, its own surroundings at the point left aside. */
function isCrossing({ from, to }: Segment, page: Page): boolean {
  const [dx, dy] = [to[0] - from[0], to[1] - from[1]];
  const length = Math.hypot(dx, dy);
  const start = 1;
  if (length <= start) return false;
  const share = (1 + start / length) / 2;
  const angle = (Math.atan2(dy, dx) * 180) / Math.PI;
  const middle: Point = [from[0] + dx * share, from[1] + dy * share];
  return page.obstacles.isCrossed(boxAt(middle, length - start, 0.1, angle));
}

function listsOf(request: LabelRequest, page: Page): readonly (() => readonly Candidate[])[] {
  switch (request.kind) {
    case 'point':
      return [() => pointCandidates(request)];
    case 'line': {
      const line = measured(request.along, page.frame);
      return [() => lineCandidates(request, line), () => uprightCandidates(request, line)];
    }
    case 'area':
      return areaCandidates(request, page.frame);
  }
}

function isFree({ box }: Candidate, { frame, obstacles }: Page): boolean {
  return isInside(box, frame) && obstacles.isClear(box);
}

/** Finds places only as they are asked for: most labels take one of their first. */
export function choiceOf(request: LabelRequest, page: Page): Choice {
  const lists = listsOf(request, page);
  const clear: Candidate[] = [];
  let list: Candidate[] = [];
  let [nextList, next] = [0, 0];
  const extend = (): boolean => {
    for (;;) {
      while (next >= list.length) {
        const make = lists[nextList++];
        if (!make) return false;
        list = [...make()];
        next = 0;
      }
      const candidate = list[next++] as Candidate;
      if (candidate.leader && candidate.isUntried) {
        if (!isFree(candidate, page)) continue;
        const crossing = isCrossing(candidate.leader, page) ? crossingCost : 0;
        const tried = { ...candidate, cost: candidate.cost + crossing, isUntried: false };
        let to = next;
        while (to < list.length && (list[to] as Candidate).cost < tried.cost) to++;
        list.splice(to, 0, tried);
      } else if (candidate.isUntried === false || isFree(candidate, page)) {
        clear.push(candidate);
        return true;
      }
    }
  };
  return {
    at: (rank) => {
      while (clear.length <= rank) if (!extend()) return undefined;
      return clear[rank];
    },
  };
}
