import type { Step } from '../../core/process/steps/index.ts';
import type { PathItem, Sheet } from '../../core/sheet/schema.ts';
import { freshId, freshTag, withItem } from './edits.ts';

/** A sheet with one path changed; other items and other kinds stay. */
export const withPath = (sheet: Sheet, id: string, change: (path: PathItem) => PathItem): Sheet =>
  withItem(sheet, id, (item) => (item.kind === 'path' ? change(item) : item));

/** A path with one step replaced. */
export const withStep = (path: PathItem, id: string, change: (step: Step) => Step): PathItem => ({
  ...path,
  steps: path.steps.map((step) => (step.id === id ? change(step) : step)),
});

/** A step id that the path does not use. */
export function freshStepId(path: PathItem): string {
  const taken = new Set(path.steps.map(({ id }) => id));
  for (let n = 1; ; n++) if (!taken.has(`step-${n}`)) return `step-${n}`;
}

/** The first letter that no path bears. */
export function freshLetter(sheet: Sheet): string {
  const taken = new Set(sheet.items.map(({ tag }) => tag));
  for (let n = 0; ; n++) {
    const letter = String.fromCharCode(65 + (n % 26)) + (n < 26 ? '' : String(Math.floor(n / 26)));
    if (!taken.has(letter)) return letter;
  }
}

/** A path item that starts at two readings and has no steps yet. */
export function newPath(sheet: Sheet, start: { readonly T: string; readonly p: string }): PathItem {
  return { kind: 'path', id: freshId(sheet, 'path'), tag: freshLetter(sheet), start, steps: [] };
}

/** An item's id and, where the id is that of a path's state, the step: null at the start. */
export function partsOf(
  sheet: Sheet,
  id: string,
): { readonly path: PathItem; readonly step: Step | null } | null {
  const dot = id.indexOf('.');
  const path = sheet.items.find((item) => item.id === (dot < 0 ? id : id.slice(0, dot)));
  if (path?.kind !== 'path' || dot < 0) return null;
  const step = id.slice(dot + 1);
  return { path, step: path.steps.find((s) => s.id === step) ?? null };
}

/** A sheet without an item, or without a step of a path; the same sheet where nothing bears the id. */
export function removed(sheet: Sheet, id: string): Sheet {
  if (sheet.items.some((item) => item.id === id))
    return { ...sheet, items: sheet.items.filter((item) => item.id !== id) };
  const parts = partsOf(sheet, id);
  if (!parts?.step) return sheet;
  const { step } = parts;
  return withPath(sheet, parts.path.id, (path) => ({
    ...path,
    steps: path.steps.filter((s) => s !== step),
  }));
}

/** A sheet with a second one of an item, under an id and a tag of its own; null where there is none. */
export function duplicated(sheet: Sheet, id: string): { sheet: Sheet; id: string } | null {
  const parts = partsOf(sheet, id);
  const item = parts?.path ?? sheet.items.find((x) => x.id === id);
  if (!item) return null;
  const copy = {
    ...item,
    id: freshId(sheet, item.kind),
    tag: item.kind === 'path' ? freshLetter(sheet) : freshTag(sheet),
  };
  return {
    sheet: { ...sheet, items: [...sheet.items, copy] },
    id: copy.kind === 'path' ? `${copy.id}.start` : copy.id,
  };
}
