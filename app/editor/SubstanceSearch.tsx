import { useId, useState } from 'react';
import { blendNamed, findSubstances } from '../../core/substances/catalogue.ts';
import { useWords } from './context.ts';

/**
 * A field that finds a substance by name, formula, ISO 817 or CAS number: candidates stand below it
 * as buttons, a blend is refused with its reason.
 */
export function SubstanceSearch({ onPick }: { readonly onPick: (id: string) => void }) {
  const words = useWords();
  const { card } = words;
  const [text, setText] = useState('');
  const answer = useId();
  const blend = blendNamed(text);
  const found = blend || text.trim() === '' ? [] : findSubstances(text);
  const pick = (id: string): void => {
    setText('');
    onPick(id);
  };
  return (
    <div className="substance-search" role="search">
      <input
        type="search"
        aria-label={card.search}
        aria-describedby={answer}
        placeholder={card.searchHint}
        value={text}
        maxLength={100}
        spellCheck={false}
        autoComplete="off"
        onChange={(event) => setText(event.target.value)}
        onKeyDown={(event) => {
          if (event.key === 'Enter' && found.length === 1) pick(found[0]!.id);
        }}
      />
      <span id={answer} role="status">
        {blend
          ? words.blend(text, blend)
          : text.trim() !== '' && found.length === 0
            ? card.notFound(text)
            : ''}
      </span>
      {found.length > 0 && (
        <ul>
          {found.map(({ id, formula, refrigerant }) => (
            <li key={id}>
              <button onClick={() => pick(id)}>
                {card.candidate(words.substance(id), formula, refrigerant)}
              </button>
            </li>
          ))}
        </ul>
      )}
    </div>
  );
}
