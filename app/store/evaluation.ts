import type { Results } from '../../core/sheet/results.ts';
import type { Sheet } from '../../core/sheet/schema.ts';
import { withChanges, type Answer, type Request } from '../worker/messages.ts';
import type { AppStore } from './index.ts';

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
 * worker is started again, and after two losses the page evaluates by itself. Returns how to stop.
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
  const begin = (): WorkerLike => {
    const made = startWorker();
    made.onmessage = ({ data }) => {
      if (!asked || data.id > asked.id) return;
      if (!data.ok) {
        if (data.id === asked.id) fail(data.message);
        return;
      }
      // Changes build on each other, so older answers are merged though not shown.
      const { results } = store.getState();
      const merged = withChanges(fresh ? null : results, data.changes);
      fresh = false;
      const sheet = sheets.get(data.id)!;
      for (const id of sheets.keys()) if (id <= data.id) sheets.delete(id);
      store.getState().setResults(sheet, merged);
      store.getState().setEvaluating(data.id !== asked.id);
    };
    made.onerror = () => {
      made.terminate();
      worker = null;
      restarts++;
      store.getState().tell('trouble', say.lostWorker);
      if (asked) ask(asked.sheet);
    };
    return made;
  };
  let fresh = true;
  const sheets = new Map<number, Sheet>();

  const ask = (sheet: Sheet): void => {
    asked = { id: ++count, sheet };
    store.getState().setEvaluating(true);
    if (restarts > mostRestarts) {
      const { id } = asked;
      evaluateHere(sheet).then(
        (results) => {
          if (asked?.id !== id) return;
          store.getState().setResults(sheet, results);
          store.getState().setEvaluating(false);
        },
        (error: unknown) => fail(error instanceof Error ? error.message : String(error)),
      );
      return;
    }
    if (!worker) {
      worker = begin();
      fresh = true;
      sheets.clear();
    }
    sheets.set(asked.id, sheet);
    worker.postMessage(asked);
  };

  const stop = store.subscribe(({ sheet }, before) => {
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
