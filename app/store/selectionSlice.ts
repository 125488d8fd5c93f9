import type { StateCreator } from 'zustand/vanilla';
import type { AppState } from './index.ts';

export interface SelectionSlice {
  /** Id of the selected state, step, boundary or note. */
  readonly selected: string | null;
  select: (id: string | null) => void;
  /** Place on the map under the pointer, K and Pa. */
  readonly pointer: { readonly T: number; readonly p: number } | null;
  point: (place: { readonly T: number; readonly p: number } | null) => void;
}

export const selectionSlice: StateCreator<AppState, [], [], SelectionSlice> = (set) => ({
  selected: null,
  select: (selected) => set({ selected }),
  pointer: null,
  point: (pointer) => set({ pointer }),
});
