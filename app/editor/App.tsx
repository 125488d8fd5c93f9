import { useEffect, type ReactNode } from 'react';
import type { Shelf } from '../store/shelf.ts';
import { duplicated, removed } from '../store/pathEdits.ts';
import { openFile } from './actions.ts';
import { Bench } from './Bench.tsx';
import { useApp, useAppStore, useWords } from './context.ts';
import { Guard } from './Guard.tsx';
import { MapSummary } from './MapSummary.tsx';
import { Messages } from './Messages.tsx';
import { ReadingLine } from './ReadingLine.tsx';
import { RunTable } from './RunTable.tsx';
import { SideColumn } from './SideColumn.tsx';
import { StartScreen } from './StartScreen.tsx';
import { Strip } from './Strip.tsx';

/** Keys that work anywhere, and files dropped on the page. */
function usePageHands(): void {
  const store = useAppStore();
  const words = useWords();
  useEffect(() => {
    const onKey = (event: KeyboardEvent): void => {
      const typing = event.target instanceof HTMLElement && event.target.matches('input, select');
      const command = event.ctrlKey || event.metaKey;
      const key = event.key.toLowerCase();
      if (command && key === 'z' && !typing) {
        if (event.shiftKey) store.getState().redo();
        else store.getState().undo();
      } else if (command && key === 'y' && !typing) store.getState().redo();
      else if (command && key === 'd' && !typing) {
        const { sheet, selected } = store.getState();
        const made = sheet && selected ? duplicated(sheet, selected) : null;
        if (!made) return;
        store.getState().edit('duplicate', () => made.sheet);
        store.getState().select(made.id);
      } else if ((event.key === 'Delete' || event.key === 'Backspace') && !typing) {
        const { selected, sheet } = store.getState();
        if (!sheet || selected === null || removed(sheet, selected) === sheet) return;
        store.getState().edit('remove', (s) => removed(s, selected));
      } else return;
      event.preventDefault();
    };
    const onOver = (event: DragEvent): void => event.preventDefault();
    const onDrop = (event: DragEvent): void => {
      event.preventDefault();
      const file = event.dataTransfer?.files[0];
      if (file) void openFile(store, words, file);
    };
    window.addEventListener('keydown', onKey);
    window.addEventListener('dragover', onOver);
    window.addEventListener('drop', onDrop);
    return () => {
      window.removeEventListener('keydown', onKey);
      window.removeEventListener('dragover', onOver);
      window.removeEventListener('drop', onDrop);
    };
  }, [store, words]);
}

/** Its own component, so that being busy draws nothing else again. */
function Workplace({ children }: { readonly children: ReactNode }) {
  const busy = useApp((s) => s.evaluating);
  return (
    <div className="workplace" aria-busy={busy}>
      {children}
    </div>
  );
}

export function App({ shelf }: { readonly shelf: Shelf }) {
  const open = useApp((s) => s.sheet !== null);
  const store = useAppStore();
  const words = useWords();
  usePageHands();
  if (!open)
    return (
      <div className="no-sheet">
        <ReadingLine />
        <StartScreen shelf={shelf} />
        <Messages />
      </div>
    );
  return (
    <Guard
      say={words.editor.broke}
      back={words.editor.sheets}
      onBack={() => store.getState().closeSheet()}
    >
      <Workplace>
        <Strip />
        <main>
          <Bench />
          <MapSummary />
          <ReadingLine />
          <RunTable />
        </main>
        <SideColumn />
        <Messages />
      </Workplace>
    </Guard>
  );
}
