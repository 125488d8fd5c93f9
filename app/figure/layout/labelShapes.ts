import { mmPerPoint, type Point, type Shape } from '../scene/scene.ts';
import { boundsOf, cornersOf } from './box.ts';
import type { Candidate } from './candidate.ts';
import type { LabelRequest } from './request.ts';
import { tagEdge } from './textBox.ts';

const paper = '#ffffff';
const plateOpacity = 0.82;
const leaderWeight = 0.6;

/** The shapes of a placed label: leader, tag or plate, text. */
export interface LabelShapes {
  readonly leader?: Shape;
  readonly ground?: Shape;
  readonly text: Shape;
}

function groundOf(request: LabelRequest, { box, angle }: Candidate): Shape | undefined {
  const { id, of } = request;
  if (request.kind === 'point' && request.tag !== undefined) {
    const edge = (tagEdge * mmPerPoint) / 2;
    const { x, y, width, height } = boundsOf(box);
    return {
      kind: 'rect',
      id: `${id}/tag`,
      of,
      rect: { x: x + edge, y: y + edge, width: width - 2 * edge, height: height - 2 * edge },
      radius: Math.min(width, height) / 2 - edge,
      fill: { colour: request.tag },
      stroke: { colour: paper, weight: tagEdge },
    };
  }
  if (!request.plate) return undefined;
  const fill = { colour: paper, opacity: plateOpacity };
  if (angle === 0)
    return { kind: 'rect', id: `${id}/plate`, of, rect: boundsOf(box), radius: 0.5, fill };
  return { kind: 'poly', id: `${id}/plate`, of, points: [cornersOf(box)], closed: true, fill };
}

function leaderOf(request: LabelRequest, { box, leader }: Candidate): Shape | undefined {
  if (!leader) return undefined;
  const isTag = request.kind === 'point' && request.tag !== undefined;
  // A tag is round: its leader goes on to its middle, beneath it.
  const to: Point = isTag ? [box.x, box.y] : leader.to;
  return {
    kind: 'poly',
    id: `${request.id}/leader`,
    of: request.of,
    points: [[leader.from, to]],
    closed: false,
    stroke: { colour: isTag ? request.tag : request.colour, weight: leaderWeight },
  };
}

/** Draws a label at a place. */
export function labelShapes(request: LabelRequest, place: Candidate): LabelShapes {
  const { box, text, angle } = place;
  // On a plate the room to spare is shared between both sides.
  const anchor = request.plate ? 'middle' : place.anchor;
  const [u, v] = [
    anchor === 'middle' ? 0 : (box.halfWidth - text.pad) * (anchor === 'start' ? -1 : 1),
    text.baseline - box.halfHeight,
  ];
  const leader = leaderOf(request, place);
  const ground = groundOf(request, place);
  const isTag = request.kind === 'point' && request.tag !== undefined;
  return {
    ...(leader && { leader }),
    ...(ground && { ground }),
    text: {
      kind: 'text',
      id: request.id,
      of: request.of,
      at: [box.x + u * box.cos - v * box.sin, box.y + u * box.sin + v * box.cos],
      runs: text.runs,
      size: text.size,
      anchor,
      colour: isTag ? paper : request.colour,
      ...(angle !== 0 && { angle }),
      ...(text.spacing !== 0 && { spacing: text.spacing }),
    },
  };
}
