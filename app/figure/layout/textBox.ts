import { mmPerPoint, type TextRun } from '../scene/scene.ts';
import { em, measure, room } from '../type/measure.ts';
import type { LabelRequest } from './request.ts';

/** The room a label takes, in mm, before it is given a place. */
export interface TextBox {
  readonly width: number;
  readonly height: number;
  /** Baseline below the box's top edge. */
  readonly baseline: number;
  /** Space between the box's ends and the text. */
  readonly pad: number;
  readonly runs: readonly TextRun[];
  readonly size: number;
  readonly spacing: number;
}

const platePad = 0.6;
const tagPad = { x: 1.2, y: 0.85 } as const;

/** Width of a tag's white edge in points. */
export const tagEdge = 0.8;

/** The room of a label in a type size and spacing, by default those it asks for. */
export function textBox(
  request: LabelRequest,
  size = request.size,
  spacing = request.spacing ?? 0,
): TextBox {
  const unit = size * mmPerPoint;
  const isTag = request.kind === 'point' && request.tag !== undefined;
  const runs = isTag ? request.runs.map((run) => ({ ...run, bold: true })) : request.runs;
  const text = measure(runs, size, spacing) * room;
  if (isTag) {
    const edge = tagEdge * mmPerPoint;
    const capHeight = em.capHeight * unit;
    const height = capHeight + 2 * tagPad.y + edge;
    // No narrower than high: a single figure stands in a round tag.
    const width = Math.max(height, text + 2 * tagPad.x + edge);
    return {
      width,
      height,
      baseline: (height + capHeight) / 2,
      pad: (width - text) / 2,
      runs,
      size,
      spacing,
    };
  }
  // Capitals with an accent rise above the cap height by about this share.
  const above = Math.max(
    ...runs.map((run) => (em.capHeight + 0.08) * (run.scale ?? 1) + (run.shift ?? 0)),
  );
  const below = Math.max(...runs.map((run) => em.descent * (run.scale ?? 1) - (run.shift ?? 0)));
  const pad = request.plate ? platePad : 0;
  return {
    width: text + 2 * pad,
    height: (above + below) * unit + pad,
    baseline: above * unit + pad / 2,
    pad,
    runs,
    size,
    spacing,
  };
}
