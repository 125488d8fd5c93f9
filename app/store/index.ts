import { createStore, type StoreApi } from 'zustand/vanilla';
import { messageSlice, type MessageSlice } from './messageSlice.ts';
import { resultsSlice, type ResultsSlice } from './resultsSlice.ts';
import { selectionSlice, type SelectionSlice } from './selectionSlice.ts';
import { sheetSlice, type SheetSlice } from './sheetSlice.ts';

export type AppState = SheetSlice & SelectionSlice & ResultsSlice & MessageSlice;
export type AppStore = StoreApi<AppState>;

/** A store of its own for every page and every test. */
export const createAppStore = (): AppStore =>
  createStore<AppState>()((...api) => ({
    ...sheetSlice(...api),
    ...selectionSlice(...api),
    ...resultsSlice(...api),
    ...messageSlice(...api),
  }));
