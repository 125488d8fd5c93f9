import { useEffect, useRef, useState } from 'react';
import { openText } from '../export/openText.ts';
import { composeFigure } from '../figure/figure.ts';
import { drawScene } from '../figure/draw.ts';
import { evaluateSheet } from '../worker/evaluateSheet.ts';
import type { Kept, Shelf } from '../store/shelf.ts';
import { newKey } from './actions.ts';
import { useAppStore, useWords } from './context.ts';
import { demos, demoText } from './demos.ts';
import { NewMap } from './NewMap.tsx';
import { OpenButton } from './OpenButton.tsx';

/** A demo sheet as a live picture. */
function Demo({ name }: { readonly name: string }) {
  const store = useAppStore();
  const words = useWords();
  const svg = useRef<SVGSVGElement>(null);
  const [title, setTitle] = useState(name);
  const [text, setText] = useState<string | null>(null);
  useEffect(() => {
    let wanted = true;
    void (async () => {
      const source = await demoText(name);
      const opened = openText(source);
      if (!opened.ok || !wanted) return;
      setText(source);
      setTitle(opened.sheet.title);
      const results = await evaluateSheet(opened.sheet);
      if (!svg.current) return;
      const { scene } = composeFigure(opened.sheet, results, opened.sheet.views[0]!.id, words);
      drawScene(svg.current, scene, { prefix: `demo-${name}` });
    })().catch(() => undefined); // Without its file a demo stays a button that cannot be pressed.
    return () => {
      wanted = false;
    };
  }, [name, words]);
  return (
    <li>
      <button
        className="demo"
        disabled={text === null}
        onClick={() => {
          const opened = openText(text ?? '');
          if (opened.ok) store.getState().openSheet(opened.sheet, newKey());
        }}
      >
        <svg ref={svg} aria-hidden viewBox="0 0 190 132" />
        <span>{title}</span>
      </button>
    </li>
  );
}

/** Where a page without a sheet begins: sheets kept here, demos, files. */
export function StartScreen({ shelf }: { readonly shelf: Shelf }) {
  const store = useAppStore();
  const words = useWords();
  const e = words.editor;
  const [kept, setKept] = useState<readonly Kept[]>([]);
  useEffect(() => {
    shelf.list().then(setKept, () => setKept([]));
  }, [shelf]);
  return (
    <main className="start">
      <h1>{e.tool}</h1>
      <NewMap />
      {kept.length > 0 && (
        <section>
          <h2>{e.keptSheets}</h2>
          <ul className="kept">
            {kept.map(({ key, sheet, saved }) => (
              <li key={key}>
                <button onClick={() => store.getState().openSheet(sheet, key)}>
                  {sheet.title || e.untitled}
                </button>
                <span className="muted">
                  {sheet.substances.map((id) => words.substance(id)).join(', ')},{' '}
                  {new Date(saved).toLocaleString(words.language)}
                </span>
                <button
                  onClick={() => {
                    const copy: Kept = {
                      key: newKey(),
                      sheet: { ...sheet, title: e.copyOf(sheet.title) },
                      saved: Date.now(),
                      by: 'copy',
                    };
                    shelf.put(copy).then(
                      () => setKept([copy, ...kept]),
                      () => store.getState().tell('trouble', e.copyNotKept),
                    );
                  }}
                >
                  {e.copy}
                </button>
                <button
                  aria-label={e.removeSheet(sheet.title)}
                  onClick={() =>
                    void shelf.remove(key).then(() => setKept(kept.filter((k) => k.key !== key)))
                  }
                >
                  {e.remove}
                </button>
              </li>
            ))}
          </ul>
        </section>
      )}
      <section>
        <h2>{e.demos}</h2>
        <p className="muted">{e.demosIntro}</p>
        <ul className="demos">
          {demos.map((name) => (
            <Demo key={name} name={name} />
          ))}
        </ul>
      </section>
      <p className="actions">
        <OpenButton label={e.openFile} />
      </p>
    </main>
  );
}
