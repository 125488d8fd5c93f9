import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { createAppStore } from '../../../app/store/index.ts';
import { blank } from './sheets.ts';

const titled = () => {
  const store = createAppStore();
  store.getState().openSheet(blank(), 'k');
  const { edit } = store.getState();
  return {
    store,
    title: () => store.getState().sheet!.title,
    name: (title: string, key?: string) => edit(`name ${title}`, (s) => ({ ...s, title }), key),
  };
};

describe('undo', () => {
  it('undo() takes edits of one key in a row back as one step', () => {
    const { store, title, name } = titled();
    name('a');
    for (const t of ['b', 'c', 'd']) name(t, 'drag');
    expect(store.getState().history.past).toHaveLength(2);
    store.getState().undo();
    expect(title()).toBe('a');
    store.getState().undo();
    expect(title()).toBe('');
  });

  it.each<[string, (t: ReturnType<typeof titled>) => void]>([
    ['settled', ({ store }) => store.getState().settle()],
    ['broken by another edit', ({ name }) => name('x')],
    ['of another key', ({ name }) => name('x', 'other')],
    ['undone', ({ store, name }) => (name('x', 'drag'), store.getState().undo())],
  ])('edits of one key are two steps once %s', (_, between) => {
    const t = titled();
    t.name('a');
    t.name('b', 'drag');
    between(t);
    const { length } = t.store.getState().history.past;
    t.name('c', 'drag');
    expect(t.store.getState().history.past).toHaveLength(length + 1);
  });

  it('an edit clears what could be done again, one that changes nothing does not', () => {
    const { store, title, name } = titled();
    name('a');
    name('b');
    store.getState().undo();
    store.getState().edit('nothing', (s) => s);
    expect(store.getState().history.future.map((d) => d.name)).toEqual(['name b']);
    store.getState().redo();
    expect(title()).toBe('b');
    store.getState().undo();
    name('c');
    expect(store.getState().history.future).toEqual([]);
    store.getState().redo();
    expect(title()).toBe('c');
  });

  it('500 steps are kept, the newest', () => {
    const { store, title, name } = titled();
    for (let i = 1; i <= 620; i++) name(String(i));
    expect(store.getState().history.past).toHaveLength(500);
    while (store.getState().history.past.length > 0) store.getState().undo();
    expect(title()).toBe('120');
    while (store.getState().history.future.length > 0) store.getState().redo();
    expect(title()).toBe('620');
  });

  it('another sheet begins with a history, a selection and results of its own', () => {
    const { store, name } = titled();
    name('a');
    store.getState().select('x');
    store.getState().setResults(store.getState().sheet!, {} as never);
    store.getState().openSheet(blank(), 'other');
    expect(store.getState()).toMatchObject({
      history: { past: [], future: [] },
      selected: null,
      results: null,
      resultsOf: null,
    });
  });

  it('edits, undo() and redo() in any order agree with a plain list of sheets', () => {
    const deed = fc.oneof(
      fc.record({ do: fc.constant('edit' as const), key: fc.constantFrom(undefined, 'p', 'q') }),
      fc.constant({ do: 'undo' as const, key: undefined }),
      fc.constant({ do: 'redo' as const, key: undefined }),
      fc.constant({ do: 'settle' as const, key: undefined }),
    );
    fc.assert(
      fc.property(fc.array(deed, { maxLength: 60 }), (deeds) => {
        const { store, title, name } = titled();
        // The model: titles one could stand at, where one stands, and the key that may go on.
        let list = [''];
        let at = 0;
        let open: string | null = null;
        deeds.forEach((d, i) => {
          if (d.do === 'edit') {
            name(String(i), d.key);
            if (d.key !== undefined && d.key === open && at > 0)
              list = [...list.slice(0, at), String(i)];
            else {
              list = [...list.slice(0, at + 1), String(i)];
              at++;
            }
            open = d.key ?? null;
          } else {
            store.getState()[d.do]();
            const to = at + (d.do === 'undo' ? -1 : d.do === 'redo' ? 1 : 0);
            if (d.do === 'settle' || list[to] !== undefined) open = null;
            if (list[to] !== undefined) at = to;
          }
          expect(title()).toBe(list[at]);
        });
        expect(store.getState().history.past).toHaveLength(at);
        expect(store.getState().history.future).toHaveLength(list.length - 1 - at);
      }),
      { numRuns: 300 },
    );
  });
});
