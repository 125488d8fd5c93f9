import { createContext, useContext } from 'react';
import { useStore } from 'zustand';
import type { AppState, AppStore } from '../store/index.ts';
import { en, type Words } from '../words/en.ts';

export const StoreContext = createContext<AppStore | null>(null);

/** The page's store itself, for actions. */
export function useAppStore(): AppStore {
  const store = useContext(StoreContext);
  if (!store) throw new Error('no store above this component');
  return store;
}

/** A part of the store's state; the component draws again when it changes. */
export const useApp = <T>(pick: (state: AppState) => T): T => useStore(useAppStore(), pick);

/** Words of the page's language. */
export const useWords = (): Words => en;
