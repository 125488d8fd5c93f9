import { describe, expect, it } from 'vitest';
import type { Results } from '../../../core/sheet/results.ts';
import type { Sheet } from '../../../core/sheet/schema.ts';
import { shared } from '../../../app/shared.ts';
import { createAppStore } from '../../../app/store/index.ts';
import { keepEvaluated, type WorkerLike } from '../../../app/store/evaluation.ts';
import { changesBetween, type Answer, type Request } from '../../../app/worker/messages.ts';
import { blank } from './sheets.ts';

/** Results that tell which sheet they are of, with a part that never changes. */
const resultsOf = (sheet: Sheet): Results =>
  ({
    sites: [{ id: 'site-1', name: 'still', local: 1, from: 'standard' }],
    states: [{ id: 's', name: sheet.title }],
    paths: [],
    maps: [],
    cautions: [],
    formulations: {},
  }) as unknown as Results;

/** A worker that answers when the test says so. */
class FakeWorker implements WorkerLike {
  onmessage: WorkerLike['onmessage'] = null;
  onerror: WorkerLike['onerror'] = null;
  requests: Request[] = [];
  ended = false;
  private last: Results | null = null;
  postMessage(request: Request): void {
    this.requests.push(structuredClone(request));
  }
  terminate(): void {
    this.ended = true;
  }
  send(answer: Answer): void {
    this.onmessage?.({ data: structuredClone(answer) } as MessageEvent<Answer>);
  }
  /** Answers a request as the real one does; the newest by default. */
  answer(i = this.requests.length - 1): void {
    const { id, sheet } = this.requests[i]!;
    const results: Results = shared(this.last, resultsOf(sheet));
    this.send({ id, ok: true, changes: changesBetween(this.last, results), ms: 1 });
    this.last = results;
  }
  refuse(message: string, i = this.requests.length - 1): void {
    this.send({ id: this.requests[i]!.id, ok: false, message });
  }
  lose(): void {
    this.onerror?.({} as ErrorEvent);
  }
}

function started(evaluateHere = (sheet: Sheet) => Promise.resolve(resultsOf(sheet))) {
  const store = createAppStore();
  const workers: FakeWorker[] = [];
  const here: string[] = [];
  const stop = keepEvaluated(
    store,
    () => {
      const worker = new FakeWorker();
      workers.push(worker);
      return worker;
    },
    (sheet) => {
      here.push(sheet.title);
      return evaluateHere(sheet);
    },
    { lostWorker: 'lost', failed: (message) => `failed: ${message}` },
  );
  const named = (title: string): Sheet => ({ ...blank(), title });
  return {
    ...{ store, workers, here, stop },
    open: (title: string) => store.getState().openSheet(named(title), `key ${title}`),
    name: (title: string) => store.getState().edit('name', (s) => ({ ...s, title })),
    shown: () => (store.getState().results?.states[0] as { name?: string } | undefined)?.name,
    told: () => store.getState().messages.map(({ text }) => text),
  };
}

describe('keepEvaluated', () => {
  it('shows results with the sheet they are of, and is busy until the newest are there', () => {
    const { store, workers, open, name, shown } = started();
    open('a');
    expect(store.getState().evaluating).toBe(true);
    workers[0]!.answer();
    expect(shown()).toBe('a');
    expect(store.getState()).toMatchObject({ evaluating: false, resultsOf: { title: 'a' } });
    const [site] = store.getState().results!.sites;
    name('b');
    name('c');
    workers[0]!.answer(1);
    expect(store.getState()).toMatchObject({ evaluating: true, resultsOf: { title: 'b' } });
    workers[0]!.answer(2);
    expect(shown()).toBe('c');
    expect(store.getState()).toMatchObject({ evaluating: false, resultsOf: { title: 'c' } });
    // What did not change is the same object through both.
    expect(store.getState().results!.sites[0]).toBe(site);
  });

  it('the newest wins where the worker leaves out what came in between', () => {
    const { workers, open, name, shown } = started();
    open('a');
    for (const title of ['b', 'c', 'd']) name(title);
    workers[0]!.answer();
    expect(shown()).toBe('d');
    expect(workers[0]!.requests).toHaveLength(4);
  });

  it('a selection or a message asks for nothing', () => {
    const { store, workers, open } = started();
    open('a');
    store.getState().select('s');
    store.getState().tell('news', 'x');
    expect(workers[0]!.requests).toHaveLength(1);
  });

  const refusing = () => started((sheet) => Promise.reject(new Error(`no ${sheet.title}`)));
  const settled = () => new Promise((resolve) => setTimeout(resolve));

  it('what the worker cannot do the page does', async () => {
    const { workers, open, name, shown, told, here } = started();
    open('a');
    workers[0]!.answer();
    name('b');
    workers[0]!.refuse('no net');
    await settled();
    expect([shown(), here, told()]).toEqual(['b', ['b'], []]);
    name('c');
    workers[0]!.answer();
    expect([shown(), here]).toEqual(['c', ['b']]);
  });

  it('an error of both keeps the results before, and tells', async () => {
    const { store, workers, open, name, shown, told } = refusing();
    open('a');
    workers[0]!.answer();
    name('b');
    workers[0]!.refuse('no such substance');
    await settled();
    expect(shown()).toBe('a');
    expect(store.getState().evaluating).toBe(false);
    expect(told()).toEqual(['failed: no b']);
    name('c');
    workers[0]!.answer();
    expect(shown()).toBe('c');
  });

  it('an error of an older request is not told', async () => {
    const { workers, open, name, told, shown } = refusing();
    open('a');
    name('b');
    workers[0]!.refuse('bad', 0);
    workers[0]!.answer(1);
    await settled();
    expect(told()).toEqual([]);
    expect(shown()).toBe('b');
  });

  it('a sheet that fails shows nothing of the sheet open before', async () => {
    const { workers, open, shown, store } = refusing();
    open('a');
    workers[0]!.answer();
    open('b');
    workers[0]!.refuse('bad');
    await settled();
    expect(shown()).toBeUndefined();
    expect(store.getState().resultsOf).toBeNull();
  });

  it('an answer about a sheet that gave way is merged and not shown', () => {
    const { workers, open, shown } = started();
    open('a');
    open('b');
    workers[0]!.answer(0);
    expect(shown()).toBeUndefined();
    workers[0]!.answer(1);
    expect(shown()).toBe('b');
  });

  it('a lost worker is started again and asked for the newest sheet; nothing is lost', () => {
    const { workers, open, name, shown, told, store } = started();
    open('a');
    workers[0]!.answer();
    name('b');
    name('c');
    workers[0]!.lose();
    expect(workers[0]!.ended).toBe(true);
    expect(told()).toEqual(['lost']);
    expect(shown()).toBe('a');
    expect(workers[1]!.requests.map(({ sheet }) => sheet.title)).toEqual(['c']);
    // What the lost one still had to say is void: its changes build on what the new one never sent.
    workers[0]!.answer(1);
    expect(shown()).toBe('a');
    workers[1]!.answer();
    expect(shown()).toBe('c');
    name('d');
    workers[1]!.answer();
    expect(store.getState().results!.states).toHaveLength(1);
    expect(shown()).toBe('d');
  });

  it('after two restarts the page evaluates, the newest sheet winning', async () => {
    const late: (() => void)[] = [];
    const { store, workers, open, name, shown, here, told } = started(
      (sheet) => new Promise((resolve) => late.push(() => resolve(resultsOf(sheet)))),
    );
    open('a');
    for (let i = 0; i < 3; i++) workers[i]!.lose();
    expect(workers).toHaveLength(3);
    expect(told()).toEqual(['lost']);
    name('b');
    expect(here).toEqual(['a', 'b']);
    late[1]!();
    await Promise.resolve();
    await Promise.resolve();
    expect(shown()).toBe('b');
    late[0]!();
    await Promise.resolve();
    await Promise.resolve();
    expect(shown()).toBe('b');
    expect(store.getState().evaluating).toBe(false);
  });

  it('what fails in the page is told too, and only of the newest sheet', async () => {
    const { workers, open, name, told, store } = started((sheet) =>
      Promise.reject(new Error(`cannot ${sheet.title}`)),
    );
    open('a');
    for (let i = 0; i < 3; i++) workers[i]!.lose();
    name('b');
    await new Promise((resolve) => setTimeout(resolve));
    expect(told()).toEqual(['lost', 'failed: cannot b']);
    expect(store.getState().evaluating).toBe(false);
  });

  it('evaluates in the page where no worker can be started', async () => {
    const store = createAppStore();
    keepEvaluated(
      store,
      () => {
        throw new Error('no workers here');
      },
      (sheet) => Promise.resolve(resultsOf(sheet)),
      { lostWorker: 'lost', failed: (message) => message },
    );
    store.getState().openSheet({ ...blank(), title: 'a' }, 'k');
    await new Promise((resolve) => setTimeout(resolve));
    expect(store.getState().resultsOf?.title).toBe('a');
  });

  it('once stopped, asks no more', () => {
    const { workers, open, name, stop } = started();
    open('a');
    stop();
    name('b');
    expect(workers).toHaveLength(1);
    expect(workers[0]!.ended).toBe(true);
    expect(workers[0]!.requests).toHaveLength(1);
  });
});
