import { format, parseReading, pressureAs, type UnitId } from '../../core/units/index.ts';
import { airAt, usualUnit } from '../store/places.ts';
import { useApp, useWords } from './context.ts';
import { shownState } from './shownState.ts';

/** What the map shows, told in words: its axes, lines, points and states. Read aloud, not seen. */
export function MapSummary() {
  const words = useWords();
  const w = words.summary;
  // While a hand holds something it would only cost time.
  const sheet = useApp((s) => (s.holding ? null : s.resultsOf));
  const results = useApp((s) => (s.holding ? null : s.results));
  const map = results?.maps[0];
  if (!sheet || !results || !map) return null;
  const view = sheet.views[0]!;
  const { decimal } = words;
  const unit = view.pressure.unit as UnitId;
  const kind = map.p.kind === 'logarithmic' ? 'absolute' : view.pressure.kind;
  const air = airAt(sheet, results, view.pressure.site);
  const T = (value: number): string =>
    format(value, view.temperature.unit, { decimals: 1, decimal });
  const p = (value: number): string =>
    format(pressureAs(kind, value, air), unit, { digits: 4, kind, decimal });
  const place = (at: { readonly T: number; readonly p: number }): string =>
    w.place(T(at.T), p(at.p));
  const lines = map.boundaries.filter(
    ({ id, points }) => points.length > 0 && !view.hidden.includes(id),
  );
  /** The unit in which the run table shows an item's pressures. */
  const unitOf = (id: string): UnitId => {
    const item = sheet.items.find((one) => one.id === id);
    const given = item?.kind === 'path' ? item.start.p : item?.p;
    return given === undefined ? usualUnit(sheet, view) : parseReading(given, 'pressure').unit;
  };
  const states = [...results.paths.flatMap((path) => path.states), ...results.states];
  return (
    <section className="unseen" aria-label={w.title}>
      <h2>{w.title}</h2>
      <p>
        {w.axes(
          w.span(T(map.T.range[0]), T(map.T.range[1])),
          w.span(p(map.p.range[0]), p(map.p.range[1])),
        )}
      </p>
      <h3>{w.lines}</h3>
      <ul>
        {lines.map((b) => (
          <li key={b.id}>
            {w.line(
              words.boundary(b.of, b.kind, b.form, {
                kind: lines.filter((x) => x.kind === b.kind).length === 1,
                line: false,
              }),
              place(b.points[0]!),
              place(b.points.at(-1)!),
            )}
          </li>
        ))}
      </ul>
      {map.points.length > 0 && (
        <>
          <h3>{w.points}</h3>
          <ul>
            {map.points.map((point) => (
              <li key={point.id}>
                {w.item([
                  point.kind === 'triple' ? words.triplePoint(point.phases) : words.criticalPoint,
                  place(point),
                ])}
              </li>
            ))}
          </ul>
        </>
      )}
      <h3>{w.states}</h3>
      {states.length === 0 && <p>{w.noStates}</p>}
      <ul>
        {states.map((s) => {
          const local = airAt(sheet, results, s.site);
          const shown = shownState(s, view, local, unitOf(s.id.split('.')[0]!), words);
          return (
            <li key={s.id}>
              {w.item([
                s.name === null ? s.tag : words.editor.selected(s.tag, s.name),
                w.place(shown.T, shown.p),
                shown.phase,
                shown.next,
                map.outside.includes(s.id) ? w.outside : '',
              ])}
            </li>
          );
        })}
      </ul>
    </section>
  );
}
