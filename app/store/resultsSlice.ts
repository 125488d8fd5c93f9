import type { StateCreator } from 'zustand/vanilla';
import type { Results } from '../../core/sheet/results.ts';
import type { Sheet } from '../../core/sheet/schema.ts';
import type { AppState } from './index.ts';

export interface ResultsSlice {
  /** What is true of `resultsOf`; the sheet may already be newer. */
  readonly results: Results | null;
  readonly resultsOf: Sheet | null;
  /** True while an evaluation is under way. */
  readonly evaluating: boolean;
  setResults: (sheet: Sheet, results: Results) => void;
  setEvaluating: (evaluating: boolean) => void;
}

export const resultsSlice: StateCreator<AppState, [], [], ResultsSlice> = (set) => ({
  results: null,
  resultsOf: null,
  evaluating: false,
  setResults: (resultsOf, results) => set({ results, resultsOf }),
  setEvaluating: (evaluating) => set({ evaluating }),
});
