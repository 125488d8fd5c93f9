import type { Point, Rect } from '../scene/scene.ts';
import { areaMiddle } from './areaCandidates.ts';
import { boxAt, distanceTo } from './box.ts';
import type { Candidate } from './candidate.ts';
import { angleNear, measured, pointAt } from './lineCandidates.ts';
import { leaderTo } from './pointCandidates.ts';
import type { LabelRequest } from './request.ts';
import { textBox } from './textBox.ts';

/** A moved label farther than this from its point gets a leader unless it declines one, in mm. */
const near = 4;

/**
 * What a label's `offset` counts from, in mm on the page: the point, the middle of the visible part
 * of the line, or the middle of the area. It depends on nothing else on the page.
 */
export function anchorOf(request: LabelRequest, frame: Rect): Point {
  switch (request.kind) {
    case 'point':
      return request.at;
    case 'line': {
      const line = measured(request.along, frame);
      if (line.to >= line.from) return pointAt(line, (line.from + line.to) / 2);
      return line.points[0] ?? [frame.x + frame.width / 2, frame.y + frame.height / 2];
    }
    case 'area':
      return areaMiddle(request.ring, frame);
  }
}

/** Where the user put a label: its box is centred there, and a name turns with its line. */
export function movedCandidate(request: LabelRequest, offset: Point, frame: Rect): Candidate {
  const anchor = anchorOf(request, frame);
  const centre: Point = [anchor[0] + offset[0], anchor[1] + offset[1]];
  const text = textBox(request);
  const angle =
    request.kind === 'line' ? angleNear(measured(request.along, frame), centre, text.width) : 0;
  const box = boxAt(centre, text.width, text.height, angle);
  const wantsLeader =
    request.kind === 'point' &&
    (request.leader ?? distanceTo(box, request.at) > Math.max(near, request.gap));
  const leader = wantsLeader ? leaderTo(request, box) : undefined;
  return { cost: 0, box, angle, anchor: 'middle', text, ...(leader && { leader }) };
}
