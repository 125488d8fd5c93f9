import type { Sheet } from '../../core/sheet/schema.ts';

/** One thing done: its name for the undo button, and the sheet before it. */
export interface Done {
  readonly name: string;
  readonly sheet: Sheet;
}

/** Undo keeps references to immutable sheets, which share all that did not change. */
export interface History {
  readonly past: readonly Done[];
  readonly future: readonly Done[];
  /** Edits with the same key in a row are one step: one drag, one run of wheel turns. */
  readonly key: string | null;
}

export const noHistory: History = { past: [], future: [], key: null };
const longest = 500;

/** History after an edit named `name` that replaced `before`. */
export function recorded(h: History, name: string, before: Sheet, key: string | null): History {
  if (key !== null && key === h.key && h.past.length > 0) return { ...h, future: [] };
  return { past: [...h.past.slice(-(longest - 1)), { name, sheet: before }], future: [], key };
}

/** One step back from `now`: the sheet to show and the history then, or null at the start. */
export function undone(h: History, now: Sheet): { sheet: Sheet; history: History } | null {
  const last = h.past.at(-1);
  if (!last) return null;
  return {
    sheet: last.sheet,
    history: {
      past: h.past.slice(0, -1),
      future: [{ name: last.name, sheet: now }, ...h.future],
      key: null,
    },
  };
}

/** One step forward again, or null where nothing was undone. */
export function redone(h: History, now: Sheet): { sheet: Sheet; history: History } | null {
  const [next, ...rest] = h.future;
  if (!next) return null;
  return {
    sheet: next.sheet,
    history: { past: [...h.past, { name: next.name, sheet: now }], future: rest, key: null },
  };
}
