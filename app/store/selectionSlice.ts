import type { StateCreator } from 'zustand/vanilla';
import type { AppState } from './index.ts';

export interface SelectionSlice {
  /** Id of the selected state, step, boundary or note. */
  readonly selected: string | null;
  select: (id: string | null) => void;
  /** Place on the map under the pointer, K and Pa. */
  readonly pointer: { readonly T: number; readonly p: number } | null;
  /** True while a hand holds something on the map; labels stay where they are meanwhile. */
  readonly holding: boolean;
  hold: (holding: boolean) => void;
  /** What a held thing has snapped to. */
  readonly hint: { readonly text: string; readonly boundary: string | null } | null;
  hintAt: (hint: SelectionSlice['hint']) => void;
  point: (place: { readonly T: number; readonly p: number } | null) => void;
}

export const selectionSlice: StateCreator<AppState, [], [], SelectionSlice> = (set) => ({
  selected: null,
  select: (selected) => set({ selected }),
  pointer: null,
  holding: false,
  hold: (holding) => set({ holding }),
  hint: null,
  hintAt: (hint) => set({ hint }),
  point: (pointer) => set({ pointer }),
});
