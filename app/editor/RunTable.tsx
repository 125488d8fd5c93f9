import { useState } from 'react';
import type { Results } from '../../core/sheet/results.ts';
import type { PathItem, Sheet, StateItem, View } from '../../core/sheet/schema.ts';
import { freshId, freshTag, pressureReading, temperatureReading } from '../store/edits.ts';
import { newPath } from '../store/pathEdits.ts';
import { airAt, usualUnit } from '../store/places.ts';
import { useApp, useAppStore, useWords } from './context.ts';
import type { TablePlace } from './givens.ts';
import { PathRows } from './PathRows.tsx';
import { StateRow } from './StateRow.tsx';

const places = new WeakMap<View, Map<string, TablePlace>>();

/** The place of rows at a site: the same object while nothing in it changed, so that rows stay. */
function placeOf(sheet: Sheet, results: Results | null, siteId: string | undefined): TablePlace {
  const view = sheet.views[0]!;
  const { pressureKind } = sheet;
  const usual = usualUnit(sheet, view);
  const air = airAt(sheet, results, siteId);
  const onView = places.get(view) ?? new Map<string, TablePlace>();
  places.set(view, onView);
  const key = `${pressureKind} ${usual} ${air}`;
  const ready = onView.get(key) ?? { view, pressureKind, usual, air };
  onView.set(key, ready);
  return ready;
}

/** Where a new state or run begins: the air of the place, at room temperature or on the map. */
function beginning(
  sheet: Sheet,
  results: Results,
): { readonly T: string; readonly p: string } | null {
  const map = results.maps[0];
  if (!map) return null;
  const view = sheet.views[0]!;
  const [low, high] = map.T.range;
  const room = 293.15;
  const T = room > low && room < high ? room : (low + high) / 2;
  const air = airAt(sheet, results);
  return {
    T: temperatureReading(T, view.temperature.unit, 1).text,
    p: pressureReading(air, usualUnit(sheet, view), sheet.pressureKind, air, 1000).text,
  };
}

/** The run as a log book: a row a state or step, its sentence with figures to edit, then results. */
export function RunTable() {
  const store = useAppStore();
  const words = useWords();
  const e = words.editor;
  const sheet = useApp((s) => s.sheet)!;
  const results = useApp((s) => s.results);
  const view = sheet.views[0]!;
  const [folded, setFolded] = useState(false);

  const addState = (): void => {
    const at = results && beginning(sheet, results);
    if (!at) return;
    const id = freshId(sheet, 'state');
    const tag = freshTag(sheet);
    store.getState().edit(`add ${tag}`, (s) => ({
      ...s,
      items: [...s.items, { kind: 'state', id, tag, ...at }],
    }));
    store.getState().select(id);
  };
  const addPath = (): void => {
    const at = results && beginning(sheet, results);
    if (!at) return;
    const path = newPath(sheet, at);
    store.getState().edit(`plan run ${path.tag}`, (s) => ({ ...s, items: [...s.items, path] }));
    store.getState().select(`${path.id}.start`);
  };

  const paths = sheet.items.filter((item): item is PathItem => item.kind === 'path');
  const states = sheet.items.filter((item): item is StateItem => item.kind === 'state');
  if (folded)
    return (
      <p className="run folded">
        <button onClick={() => setFolded(false)}>{e.unfold}</button>
      </p>
    );
  return (
    <section className="run" aria-label={e.runTable}>
      <table>
        <thead>
          <tr>
            <th scope="col">{e.state}</th>
            <th scope="col">{e.whatIsDone}</th>
            <th scope="col" className="number">
              <i>{view.temperature.unit === 'K' ? 'T' : 't'}</i>
            </th>
            <th scope="col" className="number">
              <i>p</i>
            </th>
            <th scope="col">{e.phase}</th>
            <th scope="col">{e.next}</th>
            <th scope="col">{e.meets}</th>
            <th scope="col" className="number">
              {e.heat}
            </th>
            <th scope="col" className="number">
              {e.clock}
            </th>
          </tr>
        </thead>
        <tbody>
          {paths.map((item, i) => (
            <PathRows
              key={item.id}
              item={item}
              result={results?.paths.find(({ id }) => id === item.id)}
              substance={item.substance ?? sheet.substances[0]!}
              colour={i % 4}
              place={placeOf(sheet, results, item.site)}
            />
          ))}
          {states.map((item) => (
            <StateRow
              key={item.id}
              item={item}
              result={results?.states.find(({ id }) => id === item.id)}
              place={placeOf(sheet, results, item.site)}
            />
          ))}
        </tbody>
      </table>
      <p className="actions">
        <button onClick={addPath}>{e.addPath}</button>
        <button onClick={addState}>{e.add}</button>
        <button onClick={() => setFolded(true)}>{e.fold}</button>
      </p>
    </section>
  );
}
