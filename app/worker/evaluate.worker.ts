import type { Results } from '../../core/sheet/results.ts';
import type { Sheet } from '../../core/sheet/schema.ts';
import { evaluateSheet } from './evaluateSheet.ts';
import { changesBetween, type Answer, type Request } from './messages.ts';
import { shared } from '../shared.ts';

let newest: Request | null = null;
let busy = false;
let last: Results | null = null;
let sheet: Sheet | null = null;

/** Works off the newest request only: what came in between is void. */
async function work(): Promise<void> {
  busy = true;
  while (newest) {
    const start = performance.now();
    const { id } = newest;
    // A message is a copy; what evaluation kept is found again by the objects it knows.
    sheet = shared(sheet, newest.sheet);
    newest = null;
    let answer: Answer;
    try {
      const results = shared(last, await evaluateSheet(sheet));
      answer = {
        id,
        ok: true,
        changes: changesBetween(last, results),
        ms: performance.now() - start,
      };
      last = results;
    } catch (error) {
      answer = { id, ok: false, message: error instanceof Error ? error.message : String(error) };
    }
    postMessage(answer);
    // Lets requests that arrived meanwhile in before the next round.
    await new Promise((resolve) => setTimeout(resolve));
  }
  busy = false;
}

self.onmessage = (event: MessageEvent<Request>) => {
  newest = event.data;
  if (!busy) void work();
};
