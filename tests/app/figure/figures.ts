import { composeFigure, type Figure } from '../../../app/figure/figure.ts';
import { frameOf } from '../../../app/figure/page.ts';
import type { Shape, TextShape } from '../../../app/figure/scene/scene.ts';
import { en } from '../../../app/words/en.ts';
import { evaluate } from '../../../core/sheet/evaluate.ts';
import type { Sheet } from '../../../core/sheet/schema.ts';
import { demos, sheetOf, substances } from '../../core/sheet/sheets.ts';

export { demos, sheetOf };

/** A demo sheet printed otherwise. */
export function printed(
  data: unknown,
  change: {
    readonly colours?: 'colour' | 'grey' | 'black';
    readonly fields?: 'faint' | 'full' | 'none';
    readonly page?: readonly [width: number, height: number];
    readonly temperature?: Record<string, unknown>;
    readonly pressure?: Record<string, unknown>;
  },
): Sheet {
  const raw = structuredClone(data) as { views: Record<string, unknown>[] };
  for (const view of raw.views) {
    if (change.colours) view.colours = change.colours;
    if (change.fields) view.fields = change.fields;
    if (change.page) view.page = { width: `${change.page[0]} mm`, height: `${change.page[1]} mm` };
    for (const axis of ['temperature', 'pressure'] as const)
      view[axis] = { ...(view[axis] as object), ...change[axis] };
  }
  return sheetOf(raw);
}

export function figureOf(sheet: Sheet, view = sheet.views[0]!.id): Figure {
  return composeFigure(sheet, evaluate(sheet, substances, frameOf(sheet, en)), view, en);
}

export const shapesOf = ({ scene }: Figure): readonly Shape[] =>
  scene.layers.flatMap(({ shapes }) => shapes);

export const textsOf = (figure: Figure): readonly TextShape[] =>
  shapesOf(figure).filter((shape) => shape.kind === 'text');
