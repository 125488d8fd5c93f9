import { withView } from '../store/edits.ts';
import { useApp, useAppStore, useWords } from './context.ts';
import { Folding } from './Folding.tsx';

/** What is on the map: boundaries and items, to choose and to hide. */
export function OnThisMap() {
  const store = useAppStore();
  const words = useWords();
  const sheet = useApp((s) => s.sheet)!;
  const results = useApp((s) => s.results);
  const selected = useApp((s) => s.selected);
  const map = results?.maps[0];
  const view = sheet.views[0]!;
  const runs = sheet.items.filter(({ kind }) => kind === 'path').map(({ id }) => id);
  const toggle = (id: string): void =>
    store.getState().edit('show or hide', (s) =>
      withView(s, view.id, (v) => ({
        ...v,
        hidden: v.hidden.includes(id) ? v.hidden.filter((x) => x !== id) : [...v.hidden, id],
      })),
    );
  const row = (id: string, mark: string, name: string, more: string, colour = 0) => (
    <li key={id} className={selected === id ? 'selected' : ''}>
      <button
        className="row"
        aria-pressed={selected === id}
        onClick={() => store.getState().select(id)}
      >
        {mark === 'line' ? (
          <i className="line-mark" aria-hidden />
        ) : (
          <i className={`tag own-${colour}`}>{mark}</i>
        )}
        <span>{name}</span>
        <span className="muted">{more}</span>
      </button>
      <button
        className="eye"
        aria-label={`${view.hidden.includes(id) ? words.editor.show : words.editor.hide} ${name}`}
        onClick={() => toggle(id)}
      >
        {view.hidden.includes(id) ? words.editor.show : words.editor.hide}
      </button>
    </li>
  );
  return (
    <Folding title={words.editor.onThisMap}>
      <ul className="things">
        {map?.boundaries.map((b) =>
          row(
            b.id,
            'line',
            words.boundary(b.of, b.kind, b.form, {
              kind: map.boundaries.filter((x) => x.kind === b.kind).length === 1,
              line: false,
            }),
            words.basisShort[b.basis],
          ),
        )}
        {sheet.items.map((item) =>
          row(
            item.id,
            item.tag,
            item.name ?? (item.kind === 'path' ? words.editor.run : words.editor.state),
            '',
            item.kind === 'path' ? runs.indexOf(item.id) % 4 : 0,
          ),
        )}
      </ul>
    </Folding>
  );
}
