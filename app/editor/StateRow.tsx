import { memo } from 'react';
import type { StateResult } from '../../core/sheet/results.ts';
import type { StateItem } from '../../core/sheet/schema.ts';
import { withItem } from '../store/edits.ts';
import { useAppStore, useWords } from './context.ts';
import { Figured } from './Figured.tsx';
import {
  givenSlots,
  pairSlot,
  pressureUnit,
  readGiven,
  regiven,
  withoutGivens,
  type TablePlace,
} from './givens.ts';
import { LogRow } from './LogRow.tsx';
import { shownState } from './shownState.ts';

/** A free state in the run table. */
export const StateRow = memo(function StateRow({
  item,
  result,
  place,
}: {
  readonly item: StateItem;
  readonly result: StateResult | undefined;
  readonly place: TablePlace;
}) {
  const store = useAppStore();
  const words = useWords();
  const shown =
    result && shownState(result, place.view, place.air, pressureUnit(item.p, place), words);
  return (
    <LogRow
      id={item.id}
      tag={item.tag}
      colour={0}
      cells={[
        { text: shown?.T ?? '—', number: true },
        { text: shown?.p ?? '—', number: true },
        { text: shown?.phase ?? '' },
        { text: shown?.next ?? '' },
        { text: '' },
        { text: '' },
        { text: '' },
      ]}
    >
      <Figured
        sentence={words.stateSentence(
          givenSlots(item, item.tag, words),
          pairSlot(item, item.tag, words),
        )}
        commit={(field, text) => {
          if (field === 'pair') {
            const given = regiven(text, result, item, place);
            store
              .getState()
              .edit(`change ${item.tag}`, (s) =>
                withItem(s, item.id, () => ({ ...withoutGivens(item), ...given })),
              );
            return null;
          }
          const taken = readGiven(field, text, item, place, words);
          if ('trouble' in taken) return taken.trouble;
          store
            .getState()
            .edit(`change ${item.tag}`, (s) =>
              withItem(s, item.id, (now) => ({ ...now, [field]: taken.ok.text })),
            );
          return null;
        }}
      />
    </LogRow>
  );
});
