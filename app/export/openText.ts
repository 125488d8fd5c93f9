import { readSheet, type SheetIssue } from '../../core/sheet/read.ts';
import type { Sheet } from '../../core/sheet/schema.ts';
import { SheetInSvgError, sheetFromSvg, sheetLimit } from './sheetInSvg.ts';

export type Opened =
  | { readonly ok: true; readonly sheet: Sheet }
  | { readonly ok: false; readonly issues: readonly SheetIssue[] };

const refused = (code: 'notASheet' | 'tooLarge'): Opened => ({
  ok: false,
  issues: [{ place: '', code }],
});

/** A sheet from the text of a sheet file or of an exported figure; bounded, never run or drawn. */
export function openText(text: string): Opened {
  if (text.length > sheetLimit) return refused('tooLarge');
  let data: unknown;
  try {
    data = text.trimStart().startsWith('<') ? sheetFromSvg(text) : JSON.parse(text);
  } catch (error) {
    return refused(
      error instanceof SheetInSvgError && error.code === 'tooLarge' ? 'tooLarge' : 'notASheet',
    );
  }
  return readSheet(data);
}
