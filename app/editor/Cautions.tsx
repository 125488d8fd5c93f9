import { useApp, useWords } from './context.ts';

/** The cautions that this sheet calls for, where they cannot be overlooked. */
export function Cautions() {
  const words = useWords();
  const results = useApp((s) => s.results);
  const special = results?.cautions.filter(({ at }) => at.length > 0) ?? [];
  if (special.length === 0) return null;
  return (
    <section className="cautions" aria-label={words.editor.cautions}>
      {special.map(({ code }) => (
        <p key={code}>{words.caution[code]}</p>
      ))}
    </section>
  );
}
