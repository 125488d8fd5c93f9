import { createRoot } from 'react-dom/client';
import { catalogue } from '../core/substances/catalogue.ts';
import { App } from './editor/App.tsx';
import { openFromText } from './editor/actions.ts';
import { StoreContext } from './editor/context.ts';
import { demos, demoText } from './editor/demos.ts';
import './editor/style.css';
import { browserTabs, keepSaved } from './store/autosave.ts';
import { keepEvaluated } from './store/evaluation.ts';
import { createAppStore } from './store/index.ts';
import { deviceShelf } from './store/shelf.ts';
import { evaluateSheet, substanceOf } from './worker/evaluateSheet.ts';
import { en } from './words/en.ts';

const words = en;
const store = createAppStore();
const shelf = deviceShelf();
const page = Math.floor(Math.random() * 1e9).toString(36);

keepEvaluated(
  store,
  () => new Worker(new URL('./worker/evaluate.worker.ts', import.meta.url), { type: 'module' }),
  evaluateSheet,
  { lostWorker: words.editor.lostWorker, failed: words.editor.failed },
);
keepSaved(store, shelf, browserTabs(), words.editor.autosave, page);

// The sheet last open is open again after a reload.
const lastKey = 'simmerline-open';
store.subscribe(({ sheetKey }, before) => {
  if (sheetKey === before.sheetKey) return;
  try {
    if (sheetKey) sessionStorage.setItem(lastKey, sheetKey);
    else sessionStorage.removeItem(lastKey);
  } catch {
    // Without storage the page still works; it only starts anew.
  }
});

function keptKey(): string | null {
  try {
    return sessionStorage.getItem(lastKey);
  } catch {
    return null;
  }
}

/** What to show first: the demo named in the address, the sheet last open in this tab, or the start. */
async function begin(): Promise<void> {
  const demo = demos.find((name) => name === new URLSearchParams(location.search).get('demo'));
  const last = keptKey();
  const kept = last ? await shelf.take(last).catch(() => undefined) : undefined;
  if (kept) store.getState().openSheet(kept.sheet, kept.key);
  else if (demo)
    await demoText(demo).then(
      (text) => void openFromText(store, words, demo, text),
      () => store.getState().tell('trouble', words.editor.badFile(demo, words.editor.notRead)),
    );
}

createRoot(document.getElementById('page')!).render(
  <StoreContext value={store}>
    <App shelf={shelf} />
  </StoreContext>,
);
void begin();

// Every substance is at hand soon after, so that the page works on where the net is left.
setTimeout(() => {
  for (const { id } of catalogue) substanceOf(id).catch(() => undefined);
}, 2000);
