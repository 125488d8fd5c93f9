import type { Results } from '../../core/sheet/results.ts';
import type { Sheet } from '../../core/sheet/schema.ts';
import { withChanges, type Answer, type Request } from '../worker/messages.ts';
import type { AppStore } from './index.ts';
import { timed, took, tookUntilIdle } from './times.ts';

/** What a worker must do; a test passes its own. */
export interface WorkerLike {
  postMessage: (request: Request) => void;
  terminate: () => void;
  onmessage: ((event: MessageEvent<Answer>) => void) | null;
  onerror: ((event: ErrorEvent) => void) | null;
}

/** Restarts allowed before evaluation moves to the page itself. */
const mostRestarts = 2;

/**
 * Keeps the store's results up with its sheet, off the main thread: the newest sheet wins, a lost
 * worker is started again, and lost once more after two restarts the page evaluates by itself, as it
 * does where the worker fails. Returns how to stop.
 */
export function keepEvaluated(
  store: AppStore,
  startWorker: () => WorkerLike,
  evaluateHere: (sheet: Sheet) => Promise<Results>,
  say: { lostWorker: string; failed: (message: string) => string },
): () => void {
  let worker: WorkerLike | null = null;
  let restarts = 0;
  let asked: { id: number; sheet: Sheet } | null = null;
  let count = 0;

  const fail = (message: string): void => {
    store.getState().setEvaluating(false);
    store.getState().tell('trouble', say.failed(message));
  };
  const inPage = ({ id, sheet }: { id: number; sheet: Sheet }): void => {
    evaluateHere(sheet).then(
      (results) => {
        if (asked?.id !== id) return;
        if (store.getState().sheet === sheet) store.getState().setResults(sheet, results);
        store.getState().setEvaluating(false);
      },
      (error: unknown) => {
        if (asked?.id === id) fail(error instanceof Error ? error.message : String(error));
      },
    );
  };
  const begin = (): WorkerLike => {
    const made = startWorker();
    made.onmessage = ({ data }) => {
      if (made !== worker || !asked || data.id > asked.id) return;
      if (!data.ok) {
        // Whatever the worker lacks (a file it cannot fetch without a net), the page may have.
        if (data.id === asked.id) inPage(asked);
        return;
      }
      // Changes build on each other, so older answers are merged though not shown.
      took('evaluate', data.ms);
      tookUntilIdle('page');
      const merged = timed('merge', () => withChanges(last, data.changes));
      last = merged;
      const sheet = sheets.get(data.id);
      for (const id of sheets.keys()) if (id <= data.id) sheets.delete(id);
      if (sheet) store.getState().setResults(sheet, merged);
      store.getState().setEvaluating(data.id !== asked.id);
    };
    made.onerror = () => {
      if (made !== worker) return;
      made.terminate();
      lost();
      if (asked) ask(asked.sheet);
    };
    return made;
  };
  const lost = (): void => {
    worker = null;
    restarts++;
    store.getState().tell('trouble', say.lostWorker);
  };
  /** What the worker's next changes build on. */
  let last: Results | null = null;
  /** Sheets asked about; of those that gave way to another, answers are merged and not shown. */
  const sheets = new Map<number, Sheet>();

  const ask = (sheet: Sheet): void => {
    asked = { id: ++count, sheet };
    store.getState().setEvaluating(true);
    if (restarts > mostRestarts) return inPage(asked);
    if (!worker) {
      last = null;
      sheets.clear();
      try {
        worker = begin();
      } catch {
        lost();
        return ask(sheet);
      }
    }
    sheets.set(asked.id, sheet);
    worker.postMessage(asked);
  };

  const stop = store.subscribe(({ sheet, sheetKey }, before) => {
    if (sheet !== before.sheet && sheetKey !== before.sheetKey) sheets.clear();
    if (sheet && sheet !== before.sheet) ask(sheet);
  });
  const { sheet } = store.getState();
  if (sheet) ask(sheet);
  return () => {
    stop();
    worker?.terminate();
    worker = null;
  };
}
