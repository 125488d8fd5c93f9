import { lazy, Suspense, useState } from 'react';
import { format, formatReading, parseReading } from '../../core/units/index.ts';
import { exportSvg, saveFile } from './actions.ts';
import { useApp, useAppStore, useWords } from './context.ts';
import { Figured } from './Figured.tsx';
import { OpenButton } from './OpenButton.tsx';

/** Loaded with its checks only when asked for. */
const SubstanceCard = lazy(async () => ({
  default: (await import('./SubstanceCard.tsx')).SubstanceCard,
}));

/** The strip above: what sheet this is, undo and redo, files. */
export function Strip() {
  const store = useAppStore();
  const words = useWords();
  const e = words.editor;
  const sheet = useApp((s) => s.sheet);
  const results = useApp((s) => s.results);
  const history = useApp((s) => s.history);
  const saved = useApp((s) => s.saved);
  const [card, setCard] = useState(false);
  if (!sheet) return null;
  const substance = sheet.views[0]!.substance ?? sheet.substances[0]!;
  const site = sheet.sites[0];
  const local = results?.sites[0]?.local;
  const about = [
    site &&
      (site.altitude
        ? `${site.name}, ${formatReading(parseReading(site.altitude, 'altitude'))}`
        : site.name),
    local !== undefined && format(local, 'kPa', { digits: 3, kind: 'absolute' }),
  ].filter(Boolean);
  return (
    <header className="strip">
      <h1 className="sheet-title">
        <Figured
          sentence={[{ field: 'title', text: sheet.title, name: e.title, hint: e.untitled }]}
          commit={(_, text) => {
            store.getState().edit('rename the sheet', (s) => ({ ...s, title: text.slice(0, 200) }));
            return null;
          }}
        />
      </h1>
      <p className="about">
        <button className="plain" onClick={() => setCard(true)}>
          {words.substance(substance)}
        </button>
        {about.map((text) => ` · ${text}`).join('')}
      </p>
      {card && (
        <Suspense fallback={null}>
          <SubstanceCard id={substance} onClose={() => setCard(false)} />
        </Suspense>
      )}
      <span className="saved" role="status">
        {saved ? e.kept : e.keeping}
      </span>
      <button
        onClick={() => store.getState().undo()}
        disabled={history.past.length === 0}
        title={history.past.length > 0 ? e.undoOf(history.past.at(-1)!.name) : undefined}
      >
        {e.undo}
      </button>
      <button
        onClick={() => store.getState().redo()}
        disabled={history.future.length === 0}
        title={history.future.length > 0 ? e.redoOf(history.future[0]!.name) : undefined}
      >
        {e.redo}
      </button>
      <button onClick={() => store.getState().closeSheet()}>{e.sheets}</button>
      <OpenButton label={e.open} />
      <button onClick={() => saveFile(store)}>{e.save}</button>
      <button className="strong" onClick={() => void exportSvg(store, words)}>
        {e.export}
      </button>
    </header>
  );
}
