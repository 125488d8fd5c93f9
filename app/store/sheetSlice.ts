import type { StateCreator } from 'zustand/vanilla';
import type { Sheet } from '../../core/sheet/schema.ts';
import type { AppState } from './index.ts';
import { noHistory, recorded, redone, undone, type History } from './history.ts';

export interface SheetSlice {
  readonly sheet: Sheet | null;
  /** Key under which this device keeps the sheet. */
  readonly sheetKey: string | null;
  /** Whether this device keeps the sheet as it stands. */
  readonly saved: boolean;
  readonly history: History;
  /** Shows another sheet with a history of its own. */
  openSheet: (sheet: Sheet, key: string) => void;
  closeSheet: () => void;
  /** Keeps the open sheet under another key from now on. */
  rekey: (key: string) => void;
  setSaved: (saved: boolean) => void;
  /** Replaces the sheet by what `change` makes of it, undoable as `name`; the same sheet is no edit. */
  edit: (name: string, change: (sheet: Sheet) => Sheet, key?: string) => void;
  /** Ends a run of coalesced edits, so that the next one is a step of its own. */
  settle: () => void;
  undo: () => void;
  redo: () => void;
}

/** What another sheet begins with; results of the one before would stand under its name. */
const nothingYet = {
  history: noHistory,
  selected: null,
  hint: null,
  results: null,
  resultsOf: null,
} as const;

export const sheetSlice: StateCreator<AppState, [], [], SheetSlice> = (set, get) => ({
  sheet: null,
  sheetKey: null,
  saved: true,
  history: noHistory,
  openSheet: (sheet, sheetKey) => set({ sheet, sheetKey, ...nothingYet }),
  closeSheet: () => set({ sheet: null, sheetKey: null, ...nothingYet }),
  rekey: (sheetKey) => set({ sheetKey }),
  setSaved: (saved) => set({ saved }),
  edit: (name, change, key) => {
    const { sheet, history } = get();
    if (!sheet) return;
    const next = change(sheet);
    if (next !== sheet) set({ sheet: next, history: recorded(history, name, sheet, key ?? null) });
  },
  settle: () => set(({ history }) => ({ history: { ...history, key: null } })),
  undo: () => {
    const { sheet, history } = get();
    const back = sheet && undone(history, sheet);
    if (back) set(back);
  },
  redo: () => {
    const { sheet, history } = get();
    const forth = sheet && redone(history, sheet);
    if (forth) set(forth);
  },
});
