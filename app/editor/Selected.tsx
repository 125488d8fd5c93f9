import { useApp, useAppStore, useWords } from './context.ts';
import { stateFacts } from './stateFacts.ts';

/** What is selected, and what is true of it. */
export function Selected() {
  const store = useAppStore();
  const words = useWords();
  const e = words.editor;
  const sheet = useApp((s) => s.sheet)!;
  const results = useApp((s) => s.results);
  const selected = useApp((s) => s.selected);
  const state = results?.states.find(({ id }) => id === selected);
  const boundary = results?.maps[0]?.boundaries.find(({ id }) => id === selected);
  if (boundary)
    return (
      <section aria-live="polite">
        <h2>
          {words.boundary(boundary.of, boundary.kind, boundary.form, { kind: false, line: true })}
        </h2>
        <dl>
          <dt>{e.basis}</dt>
          <dd>{words.basis[boundary.basis]}</dd>
          <dt>{e.source}</dt>
          <dd>{boundary.source}</dd>
        </dl>
      </section>
    );
  if (!state) return null;
  const local = results?.sites.find(({ id }) => id === state.site)?.local ?? 101325;
  return (
    <section aria-live="polite">
      <h2>{e.selected(state.tag, state.name)}</h2>
      <dl>
        {stateFacts(state, sheet.views[0]!, local, words).map(([name, text]) => (
          <div key={name + text}>
            <dt>{name}</dt>
            <dd>{text}</dd>
          </div>
        ))}
      </dl>
      <p className="actions">
        <button
          onClick={() =>
            store.getState().edit(`remove ${state.tag}`, (s) => ({
              ...s,
              items: s.items.filter(({ id }) => id !== state.id),
            }))
          }
        >
          {e.remove}
        </button>
      </p>
    </section>
  );
}
