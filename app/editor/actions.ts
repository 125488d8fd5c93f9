import { composeFigure } from '../figure/figure.ts';
import { sceneToSvg } from '../export/svg.ts';
import { download, fileName } from '../export/files.ts';
import { openText } from '../export/openText.ts';
import { evaluateSheet } from '../worker/evaluateSheet.ts';
import type { AppStore } from '../store/index.ts';
import type { Words } from '../words/en.ts';
import type { Sheet } from '../../core/sheet/schema.ts';
import { sayIssues } from './say.ts';

/** A key under which a newly opened sheet is kept. */
export const newKey = (): string =>
  `${Date.now().toString(36)}-${Math.floor(Math.random() * 1e9).toString(36)}`;

/** Opens a sheet from a file's text; a refusal is told and leaves what is open alone. */
export function openFromText(store: AppStore, words: Words, name: string, text: string): boolean {
  const opened = openText(text);
  if (!opened.ok) {
    store.getState().tell('trouble', words.editor.badFile(name, sayIssues(words, opened.issues)));
    return false;
  }
  store.getState().openSheet(opened.sheet, newKey());
  return true;
}

/** Largest file looked at; a sheet in an export has at most half of it. */
const largestFile = 40 * 1024 * 1024;

export async function openFile(store: AppStore, words: Words, file: File): Promise<void> {
  if (file.size > largestFile) {
    store.getState().tell('trouble', words.editor.badFile(file.name, words.editor.tooLarge));
    return;
  }
  const text = await file.text().catch(() => null);
  if (text === null)
    store.getState().tell('trouble', words.editor.badFile(file.name, words.editor.notRead));
  else openFromText(store, words, file.name, text);
}

/** The sheet with what made it, as it is saved and exported. */
export function signed(
  sheet: Sheet,
  formulations: Readonly<Record<string, readonly string[]>>,
): Sheet {
  return {
    ...sheet,
    made: {
      tool: __SIMMERLINE_VERSION__,
      formulations: Object.fromEntries(
        Object.entries(formulations).map(([id, list]) => [id, list.join('; ')]),
      ),
    },
  };
}

export async function exportSvg(store: AppStore, words: Words): Promise<void> {
  const { sheet } = store.getState();
  if (!sheet) return;
  // What is exported is evaluated from the sheet as it stands, not from what is on screen.
  const results = await evaluateSheet(sheet).catch((error: unknown) => {
    const why = error instanceof Error ? error.message : String(error);
    store.getState().tell('trouble', words.editor.failed(why));
    return null;
  });
  if (!results) return;
  const { scene } = composeFigure(sheet, results, sheet.views[0]!.id, words);
  const svg = await sceneToSvg(scene, { sheet: signed(sheet, results.formulations) });
  const name = fileName(sheet.title, 'svg');
  download(name, svg, 'image/svg+xml');
  store.getState().tell('news', words.editor.exported(name));
}

export function saveFile(store: AppStore): void {
  const { sheet, results } = store.getState();
  if (!sheet) return;
  const text = JSON.stringify(signed(sheet, results?.formulations ?? {}), null, 2);
  download(fileName(sheet.title, 'json'), `${text}\n`, 'application/json');
}
