import type { Sheet } from '../../core/sheet/schema.ts';
import { shared } from '../shared.ts';
import type { AppStore } from './index.ts';
import { stampOf, type Kept, type Shelf } from './shelf.ts';

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
 * hidden or another sheet takes its place. A full or failing shelf is told once and tried again at
 * every edit; the sheet stays open. A sheet saved by another tab is taken over while this tab has
 * nothing unsaved of its own; otherwise this tab goes on under a key of its own, so neither work is
 * lost. Returns how to stop.
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
  /** The sheet as the shelf has it. */
  let shelved: Sheet | null = null;
  /** What this tab last knew to lie on the shelf. */
  let known: { readonly key: string; readonly stamp: string } | null = null;
  const ownKey = (key: string): string => `${key}-${page}`;
  const goOnAlone = (key: string): void => {
    store.getState().rekey(ownKey(key));
    store.getState().tell('news', words.ownCopy);
  };
  const forgetTimer = (): void => {
    if (timer) clearTimeout(timer);
    timer = null;
  };
  const unsaved = (): boolean => timer !== null || store.getState().sheet !== shelved;

  const put = async (sheet: Sheet, key: string): Promise<void> => {
    const kept: Kept = { key, sheet, saved: Date.now(), by: page };
    try {
      if (!(await shelf.put(kept, known?.key === key ? known.stamp : null))) {
        // Another tab was first, and this one has not heard of it yet or is gone on already.
        if (store.getState().sheetKey === key) goOnAlone(key);
        else await shelf.put({ ...kept, key: ownKey(key) });
        return;
      }
      known = { key, stamp: stampOf(kept) };
      tabs.say(key);
      if (broken) store.getState().tell('news', words.keptAgain);
      broken = false;
      // What was edited meanwhile has its own turn.
      if (store.getState().sheet !== sheet || store.getState().sheetKey !== key) return;
      shelved = sheet;
      store.getState().setSaved(true);
    } catch {
      if (!broken) store.getState().tell('trouble', words.notKept);
      broken = true;
      store.getState().setSaved(false);
    }
  };
  /** Sheets are put one after the other, each knowing what the one before left. */
  let turn = Promise.resolve();
  const save = (sheet: Sheet | null, key: string | null): void => {
    forgetTimer();
    if (sheet && key) turn = turn.then(() => put(sheet, key));
  };
  const saveNow = (): void => {
    const { sheet, sheetKey } = store.getState();
    save(sheet, sheetKey);
  };

  const stop = store.subscribe((now, before) => {
    if (now.sheet === before.sheet && now.sheetKey === before.sheetKey) return;
    // A sheet that gives way to another, or to none, has no later turn.
    const gaveWay = now.sheetKey !== before.sheetKey && now.sheet !== before.sheet;
    if (gaveWay && timer) save(before.sheet, before.sheetKey);
    if (!now.sheet) return;
    now.setSaved(false);
    forgetTimer();
    timer = setTimeout(saveNow, delay);
  });
  const stopHearing = tabs.hear((key) => {
    if (key !== store.getState().sheetKey) return;
    if (unsaved()) return goOnAlone(key);
    const take = async (): Promise<void> => {
      const kept = await shelf.take(key);
      const { sheet, sheetKey, edit, setSaved } = store.getState();
      if (!kept || kept.by === page || !sheet || sheetKey !== key) return;
      // Only opened there, not changed.
      const theirs = shared(sheet, kept.sheet);
      if (theirs === sheet && !unsaved()) known = { key, stamp: stampOf(kept) };
      if (theirs === sheet) return;
      if (unsaved()) return goOnAlone(key);
      edit(words.otherTab, () => theirs);
      // What came from the other tab is saved already.
      forgetTimer();
      known = { key, stamp: stampOf(kept) };
      shelved = theirs;
      setSaved(true);
    };
    take().catch(() => undefined);
  });
  const hidden = (): void => {
    if (timer) saveNow();
  };
  const canHide = typeof document !== 'undefined';
  if (canHide) {
    document.addEventListener('visibilitychange', hidden);
    window.addEventListener('pagehide', hidden);
  }
  return () => {
    stop();
    stopHearing();
    if (canHide) {
      document.removeEventListener('visibilitychange', hidden);
      window.removeEventListener('pagehide', hidden);
    }
    forgetTimer();
  };
}
