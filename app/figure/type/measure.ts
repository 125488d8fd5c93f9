import { mmPerPoint, type TextRun } from '../scene/scene.ts';
import { codePoints, faces, unitsPerEm, type FaceName } from './advances.ts';

const indexOf: ReadonlyMap<number, number> = new Map(codePoints.map((c, i) => [c, i]));

/** Advance in em of a sign that the fonts lack: about that of the emoji that stand in for it. */
const strange = 1.3;

/**
 * Room that a label claims, as a share of its measured width.
 *
 * The sums of advances leave out kerning, and where Inter is not installed a file falls back to
 * Arial or Helvetica, whose figures and capitals are narrower but whose small letters and spaces
 * are here and there wider. Four per cent covers both in the texts of this project.
 */
export const room = 1.04;

/** Lengths of the regular face in em: `capHeight` up, `descent` down, both positive. */
export const em = {
  capHeight: faces.regular.capHeight / unitsPerEm,
  xHeight: faces.regular.xHeight / unitsPerEm,
  ascent: faces.regular.ascent / unitsPerEm,
  descent: -faces.regular.descent / unitsPerEm,
} as const;

function faceOf(run: TextRun): FaceName {
  return run.bold ? 'bold' : run.italic ? 'italic' : 'regular';
}

/**
 * Width in mm of a line of text as the sum of its advances.
 *
 * `sizePt` is its type size in points, `spacing` the advance added after each character, in em.
 * Bold italic is measured as bold. Error: 3 % for a phrase, 5 % for a tag of two
 * signs, from kerning, which is left out; mostly too wide.
 */
export function measure(runs: readonly TextRun[], sizePt: number, spacing = 0): number {
  let width = 0;
  for (const run of runs) {
    const { advances } = faces[faceOf(run)];
    let sum = 0;
    let count = 0;
    for (const sign of run.text) {
      const index = indexOf.get(sign.codePointAt(0) as number);
      sum += index === undefined ? strange : (advances[index] as number) / unitsPerEm;
      count++;
    }
    width += sum * (run.scale ?? 1) + count * spacing;
  }
  return width * sizePt * mmPerPoint;
}

/** Signs of the text that the fonts lack, each once, in the order met. */
export function missing(text: string): readonly string[] {
  return [...new Set(text)].filter((sign) => !indexOf.has(sign.codePointAt(0) as number));
}
