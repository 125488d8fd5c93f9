import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { keepSaved, type Tabs } from '../../../app/store/autosave.ts';
import { createAppStore } from '../../../app/store/index.ts';
import { stampOf, type Kept, type Shelf } from '../../../app/store/shelf.ts';
import { blank } from './sheets.ts';

beforeEach(() => void vi.useFakeTimers());
afterEach(() => void vi.useRealTimers());

const words = {
  notKept: 'not kept',
  keptAgain: 'kept again',
  otherTab: 'from another tab',
  ownCopy: 'own copy',
};

/** One device: a shelf, and tabs that hear each other. */
function device() {
  const kept = new Map<string, Kept>();
  const puts: Kept[] = [];
  const listeners = new Map<string, (key: string) => void>();
  const stand = { isFull: false, wait: null as Promise<void> | null };
  const shelf: Shelf = {
    put: async (k, known = null) => {
      await stand.wait;
      if (stand.isFull) throw new DOMException('full', 'QuotaExceededError');
      const old = kept.get(k.key);
      if (known !== null && old && stampOf(old) !== known) return false;
      puts.push(structuredClone(k));
      kept.set(k.key, structuredClone(k));
      return true;
    },
    take: (key) => Promise.resolve(structuredClone(kept.get(key))),
    remove: (key) => Promise.resolve(void kept.delete(key)),
    list: () => Promise.resolve([...kept.values()]),
  };
  const tab = (page: string) => {
    const store = createAppStore();
    const tabs: Tabs = {
      say: (key) => listeners.forEach((listen, of) => of !== page && listen(key)),
      hear: (listen) => {
        listeners.set(page, listen);
        return () => listeners.delete(page);
      },
    };
    const stop = keepSaved(store, shelf, tabs, words, page);
    return {
      ...{ store, stop },
      name: (title: string) => store.getState().edit('name', (s) => ({ ...s, title })),
      title: () => store.getState().sheet?.title,
      told: () => store.getState().messages.map(({ text }) => text),
    };
  };
  return { kept, puts, shelf, stand, tab };
}

const pass = (ms = 0) => vi.advanceTimersByTimeAsync(ms);

describe('keepSaved', () => {
  it('keeps the sheet 400 ms after the last of many edits, once', async () => {
    const { puts, tab } = device();
    const { store, name } = tab('one');
    store.getState().openSheet(blank(), 'k');
    for (const title of ['a', 'b', 'c']) {
      name(title);
      await pass(300);
    }
    expect(puts).toEqual([]);
    expect(store.getState().saved).toBe(false);
    await pass(100);
    expect(puts.map(({ key, sheet }) => [key, sheet.title])).toEqual([['k', 'c']]);
    expect(store.getState().saved).toBe(true);
  });

  it('undo is kept like an edit; a selection is not', async () => {
    const { puts, tab } = device();
    const { store, name } = tab('one');
    store.getState().openSheet(blank(), 'k');
    name('a');
    await pass(400);
    store.getState().select('x');
    await pass(1000);
    store.getState().undo();
    await pass(400);
    expect(puts.map(({ sheet }) => sheet.title)).toEqual(['a', '']);
  });

  type Tab = ReturnType<ReturnType<typeof device>['tab']>;
  it.each<[string, (tab: Tab) => void, readonly string[]]>([
    ['is closed', ({ store }) => store.getState().closeSheet(), ['k']],
    [
      'gives way to another',
      ({ store }) => store.getState().openSheet(blank(), 'other'),
      ['k', 'other'],
    ],
  ])('an edit just before the sheet %s is kept', async (_, act, keys) => {
    const { kept, tab } = device();
    const one = tab('one');
    one.store.getState().openSheet(blank(), 'k');
    one.name('last word');
    act(one);
    await pass(1000);
    expect(kept.get('k')!.sheet.title).toBe('last word');
    expect([...kept.keys()]).toEqual(keys);
  });

  it('a full storage is told once, tried again at every edit, and told when it works again', async () => {
    const { kept, stand, tab } = device();
    const { store, name, told, title } = tab('one');
    stand.isFull = true;
    store.getState().openSheet(blank(), 'k');
    for (const t of ['a', 'b']) {
      name(t);
      await pass(400);
    }
    expect(told()).toEqual(['not kept']);
    store.getState().dismiss(store.getState().messages[0]!.id);
    name('c');
    await pass(400);
    expect(told()).toEqual([]);
    expect(store.getState().saved).toBe(false);
    expect(title()).toBe('c');
    stand.isFull = false;
    name('d');
    await pass(400);
    expect(told()).toEqual(['kept again']);
    expect(kept.get('k')!.sheet.title).toBe('d');
    expect(store.getState().saved).toBe(true);
  });

  it('does not claim to have kept what was edited while it was busy keeping', async () => {
    const { stand, tab } = device();
    const { store, name } = tab('one');
    let go = (): void => undefined;
    stand.wait = new Promise((resolve) => (go = resolve));
    store.getState().openSheet(blank(), 'k');
    await pass(400);
    name('later');
    stand.wait = null;
    go();
    await pass(0);
    expect(store.getState().saved).toBe(false);
    await pass(400);
    expect(store.getState().saved).toBe(true);
  });

  it('another tab takes over what was kept while it has nothing of its own, and can undo it', async () => {
    const { puts, tab } = device();
    const [one, two] = [tab('one'), tab('two')];
    one.store.getState().openSheet(blank(), 'k');
    await pass(400);
    two.store.getState().openSheet(blank(), 'k');
    await pass(400);
    const { length } = puts;
    one.name('by one');
    await pass(400);
    expect(two.title()).toBe('by one');
    expect(two.store.getState().history.past.map((d) => d.name)).toEqual(['from another tab']);
    expect(two.store.getState().saved).toBe(true);
    await pass(2000);
    // No ping-pong: what was taken over is not kept anew.
    expect(puts).toHaveLength(length + 1);
    two.name('by two');
    await pass(400);
    expect(one.title()).toBe('by two');
    two.store.getState().undo();
    two.store.getState().undo();
    expect(two.title()).toBe('');
  });

  it('a sheet merely opened in another tab leaves no trace in this one', async () => {
    const { tab } = device();
    const [one, two] = [tab('one'), tab('two')];
    one.store.getState().openSheet(blank(), 'k');
    one.name('mine');
    await pass(400);
    const { sheet, history } = one.store.getState();
    two.store.getState().openSheet(structuredClone(sheet!), 'k');
    await pass(400);
    expect(one.store.getState().sheet).toBe(sheet);
    expect(one.store.getState().history).toBe(history);
  });

  it('where both edited, each goes on with its own and both are kept', async () => {
    const { kept, tab } = device();
    const [one, two] = [tab('one'), tab('two')];
    one.store.getState().openSheet(blank(), 'k');
    await pass(400);
    two.store.getState().openSheet(blank(), 'k');
    await pass(400);
    one.name('by one');
    await pass(200);
    two.name('by two');
    await pass(1000);
    expect([one.title(), two.title()]).toEqual(['by one', 'by two']);
    expect(two.told()).toEqual(['own copy']);
    expect(one.told()).toEqual([]);
    expect([...kept].map(([key, { sheet }]) => [key, sheet.title])).toEqual([
      ['k', 'by one'],
      ['k-two', 'by two'],
    ]);
    // From now on they are two sheets.
    one.name('more');
    await pass(1000);
    expect(two.title()).toBe('by two');
  });

  it('where both edited and a slow storage had taken neither yet, both are kept all the same', async () => {
    const { kept, stand, tab } = device();
    const [one, two] = [tab('one'), tab('two')];
    one.store.getState().openSheet(blank(), 'k');
    await pass(400);
    two.store.getState().openSheet(blank(), 'k');
    await pass(400);
    let go = (): void => undefined;
    stand.wait = new Promise((resolve) => (go = resolve));
    one.name('by one');
    two.name('by two');
    // Both are on their way to the shelf before either has heard of the other.
    await pass(500);
    stand.wait = null;
    go();
    await pass(1000);
    expect([one.title(), two.title()]).toEqual(['by one', 'by two']);
    expect([...kept.values()].map(({ sheet }) => sheet.title).sort()).toEqual(['by one', 'by two']);
    expect([...one.told(), ...two.told()]).toEqual(['own copy']);
  });

  it('with a full storage this tab is not overrun by another one', async () => {
    const { stand, tab } = device();
    const [one, two] = [tab('one'), tab('two')];
    one.store.getState().openSheet(blank(), 'k');
    two.store.getState().openSheet(blank(), 'k');
    await pass(400);
    stand.isFull = true;
    two.name('by two');
    await pass(400);
    stand.isFull = false;
    one.name('by one');
    await pass(400);
    expect(two.title()).toBe('by two');
    expect(two.told()).toContain('own copy');
  });

  it('another sheet of another tab is none of this tab’s business', async () => {
    const { tab } = device();
    const [one, two] = [tab('one'), tab('two')];
    one.store.getState().openSheet(blank(), 'k');
    two.store.getState().openSheet(blank(), 'l');
    await pass(400);
    one.name('by one');
    await pass(400);
    expect(two.title()).toBe('');
    expect(two.store.getState().history.past).toEqual([]);
  });

  it('once stopped, keeps no more and hears no more', async () => {
    const { puts, tab } = device();
    const [one, two] = [tab('one'), tab('two')];
    one.store.getState().openSheet(blank(), 'k');
    two.store.getState().openSheet(blank(), 'k');
    await pass(400);
    two.stop();
    two.name('unheard');
    const { length } = puts;
    one.name('by one');
    await pass(1000);
    expect(puts).toHaveLength(length + 1);
    expect(two.title()).toBe('unheard');
  });
});
