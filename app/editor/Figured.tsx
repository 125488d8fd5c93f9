import { useId, useState, type KeyboardEvent } from 'react';
import type { Sentence, Slot } from '../words/sentence.ts';

/** What a commit answers: null when taken, else what is wrong in words. */
export type Commit = (field: string, text: string) => string | null;

/**
 * A figure in a sentence: typed text stays a draft until Enter or leaving; a refused draft stays to
 * be mended, with the reason beside it; Escape brings the old figure back.
 */
function Figure({ slot, commit }: { readonly slot: Slot; readonly commit: Commit }) {
  const [draft, setDraft] = useState<string | null>(null);
  const [trouble, setTrouble] = useState<string | null>(null);
  const troubleId = useId();
  // A figure that changed by undo or drag starts without an old draft, and keeps the focus.
  const [of, setOf] = useState(slot.text);
  if (of !== slot.text) {
    setOf(slot.text);
    setDraft(null);
    setTrouble(null);
  }
  if (slot.choices) {
    return (
      <select
        className={slot.quiet ? 'figure caret' : 'figure'}
        aria-label={slot.name}
        value={slot.text}
        onChange={(e) => void commit(slot.field, e.target.value)}
      >
        {slot.choices.map(({ value, label }) => (
          <option key={value} value={value}>
            {label}
          </option>
        ))}
      </select>
    );
  }
  const shown = draft ?? slot.text;
  const settle = (): void => {
    if (draft === null) return;
    if (draft.trim() === slot.text.trim()) {
      setDraft(null);
      setTrouble(null);
      return;
    }
    const problem = commit(slot.field, draft);
    setTrouble(problem);
    if (problem === null) setDraft(null);
  };
  const onKeyDown = (e: KeyboardEvent<HTMLInputElement>): void => {
    if (e.key === 'Enter') settle();
    else if (e.key === 'Escape') {
      setDraft(null);
      setTrouble(null);
    } else return;
    e.stopPropagation();
  };
  return (
    <span className="figure-holder">
      <input
        className="figure"
        aria-label={slot.name}
        aria-invalid={trouble !== null}
        aria-describedby={trouble ? troubleId : undefined}
        value={shown}
        placeholder={slot.hint}
        size={Math.max(2, (shown || slot.hint || '').length)}
        maxLength={200}
        spellCheck={false}
        autoComplete="off"
        onFocus={(e) => e.target.select()}
        onChange={(e) => setDraft(e.target.value)}
        onBlur={settle}
        onKeyDown={onKeyDown}
      />
      {trouble && (
        <span className="figure-trouble" id={troubleId} role="alert">
          {trouble}
        </span>
      )}
    </span>
  );
}

/** A sentence with its figures as fields. */
export function Figured({
  sentence,
  commit,
}: {
  readonly sentence: Sentence;
  readonly commit: Commit;
}) {
  return (
    <>
      {sentence.map((piece, i) =>
        typeof piece === 'string' ? (
          <span key={i}>{piece}</span>
        ) : (
          <Figure key={piece.field} slot={piece} commit={commit} />
        ),
      )}
    </>
  );
}
