import type { AppStore } from './index.ts';
import type { Kept, Shelf } from './shelf.ts';

export interface Tabs {
  /** Tells other tabs that a sheet was saved. */
  say: (key: string) => void;
  /** Calls back when another tab has saved a sheet. */
  hear: (listen: (key: string) => void) => () => void;
}

/** Tabs of this browser, by BroadcastChannel. */
export function browserTabs(): Tabs {
  const channel = new BroadcastChannel('simmerline');
  return {
    say: (key) => channel.postMessage(key),
    hear: (listen) => {
      const on = (event: MessageEvent<string>): void => listen(event.data);
      channel.addEventListener('message', on);
      return () => channel.removeEventListener('message', on);
    },
  };
}

export interface AutosaveWords {
  readonly notKept: string;
  readonly keptAgain: string;
  readonly otherTab: string;
  readonly ownCopy: string;
}

/**
 * Keeps the open sheet on the shelf `delay` ms after the last edit, and at once when the page is
 * hidden. A full or failing shelf is told once and tried again at every edit; the sheet stays open.
 * A sheet saved by another tab is taken over while this tab has nothing unsaved of its own; otherwise
 * this tab goes on under a key of its own, so neither work is lost. Returns how to stop.
 */
export function keepSaved(
  store: AppStore,
  shelf: Shelf,
  tabs: Tabs,
  words: AutosaveWords,
  page: string,
  delay = 400,
): () => void {
  let timer: ReturnType<typeof setTimeout> | null = null;
  let broken = false;
  const pending = (): boolean => timer !== null;

  const save = async (): Promise<void> => {
    if (timer) clearTimeout(timer);
    timer = null;
    const { sheet, sheetKey } = store.getState();
    if (!sheet || !sheetKey) return;
    const kept: Kept = { key: sheetKey, sheet, saved: Date.now(), by: page };
    try {
      await shelf.put(kept);
      tabs.say(sheetKey);
      if (broken) store.getState().tell('news', words.keptAgain);
      broken = false;
      store.getState().setSaved(true);
    } catch {
      if (!broken) store.getState().tell('trouble', words.notKept);
      broken = true;
      store.getState().setSaved(false);
    }
  };

  const stop = store.subscribe((now, before) => {
    if (!now.sheet || (now.sheet === before.sheet && now.sheetKey === before.sheetKey)) return;
    now.setSaved(false);
    if (timer) clearTimeout(timer);
    timer = setTimeout(() => void save(), delay);
  });
  const stopHearing = tabs.hear((key) => {
    const { sheetKey } = store.getState();
    if (key !== sheetKey) return;
    if (pending()) {
      store.getState().rekey(`${key}-${page}`);
      store.getState().tell('news', words.ownCopy);
      return;
    }
    void shelf.take(key).then((kept) => {
      if (!kept || kept.by === page || store.getState().sheetKey !== key) return;
      store.getState().edit(words.otherTab, () => kept.sheet);
      // What came from the other tab is saved already.
      if (timer) clearTimeout(timer);
      timer = null;
      store.getState().setSaved(true);
    });
  });
  const hidden = (): void => {
    if (pending()) void save();
  };
  const canHide = typeof document !== 'undefined';
  if (canHide) document.addEventListener('visibilitychange', hidden);
  return () => {
    stop();
    stopHearing();
    if (canHide) document.removeEventListener('visibilitychange', hidden);
    if (timer) clearTimeout(timer);
  };
}
