import { useRef, useState } from 'react';
import { localPressure } from '../../core/sheet/site.ts';
import { catalogue } from '../../core/substances/catalogue.ts';
import { parseReading, ReadingError } from '../../core/units/index.ts';
import { newSheet, type Start } from '../store/newSheet.ts';
import type { Words } from '../words/en.ts';
import { newKey } from './actions.ts';
import { useAppStore, useWords } from './context.ts';
import { Figured } from './Figured.tsx';
import { tried } from './say.ts';
import { SubstanceSearch } from './SubstanceSearch.tsx';

/** An altitude or a barometer reading, whichever the text is. */
function placeOf(words: Words, text: string): { ok: Start['place'] } | { trouble: string } {
  return tried(words, () => {
    let place: Start['place'];
    try {
      place = { altitude: parseReading(text, 'altitude', { defaultUnit: 'm' }).text };
    } catch (error) {
      if (!(error instanceof ReadingError) || error.code !== 'wrongQuantity') throw error;
      place = { barometer: parseReading(text, 'pressure', { defaultKind: 'absolute' }).text };
    }
    localPressure({ id: 'site-1', name: '', ...place });
    return place;
  });
}

/** The blank start: three things in one sentence. */
export function NewMap() {
  const store = useAppStore();
  const words = useWords();
  const e = words.editor;
  const [start, setStart] = useState({ substance: 'water', where: '0 m', kind: 'gauge' });
  const section = useRef<HTMLElement>(null);
  const list = catalogue.map(({ id }) => ({ value: id, label: words.substance(id) }));
  return (
    <section className="new-map" ref={section}>
      <h2>{e.newMap}</h2>
      <p>
        <Figured
          sentence={words.startSentence(start, list)}
          commit={(field, text) => {
            if (field === 'where') {
              const place = placeOf(words, text);
              if ('trouble' in place) return place.trouble;
            }
            setStart((now) => ({ ...now, [field]: text }));
            return null;
          }}
        />
      </p>
      <SubstanceSearch onPick={(substance) => setStart((now) => ({ ...now, substance }))} />
      <p className="actions">
        <button
          className="strong"
          onClick={() => {
            // A refused figure is mended first: the map would stand elsewhere than it says.
            const refused = section.current?.querySelector<HTMLElement>('[aria-invalid=true]');
            if (refused) return refused.focus();
            const place = placeOf(words, start.where);
            if ('trouble' in place) return;
            store.getState().openSheet(
              newSheet({
                substance: start.substance,
                place: place.ok,
                kind: start.kind === 'gauge' ? 'gauge' : 'absolute',
                siteName: e.newSite(1),
              }),
              newKey(),
            );
          }}
        >
          {e.drawIt}
        </button>
      </p>
    </section>
  );
}
