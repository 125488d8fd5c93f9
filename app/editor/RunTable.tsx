import {
  absolutePressure,
  format,
  formatDifference,
  formatReading,
  parseReading,
  pressureAs,
  type UnitId,
} from '../../core/units/index.ts';
import type { StateItem } from '../../core/sheet/schema.ts';
import {
  freshId,
  freshTag,
  temperatureReading,
  pressureReading,
  withItem,
} from '../store/edits.ts';
import { useApp, useAppStore, useWords } from './context.ts';
import { Figured } from './Figured.tsx';
import { tried } from './say.ts';

/** The run as a log book: a row a state, its sentence with figures to edit, then aligned results. */
export function RunTable() {
  const store = useAppStore();
  const words = useWords();
  const e = words.editor;
  const sheet = useApp((s) => s.sheet)!;
  const results = useApp((s) => s.results);
  const selected = useApp((s) => s.selected);
  const view = sheet.views[0]!;
  const { decimal } = words;
  const localOf = (siteId: string | null | undefined): number =>
    results?.sites.find(({ id }) => id === (siteId ?? sheet.sites[0]?.id))?.local ?? 101325;

  const commit =
    (item: StateItem) =>
    (field: string, text: string): string | null => {
      const read = tried(words, () => {
        if (field === 'p') {
          const old = item.p === undefined ? undefined : parseReading(item.p, 'pressure');
          const reading = parseReading(text, 'pressure', {
            defaultKind: sheet.pressureKind,
            ...(old ? { defaultUnit: old.unit } : {}),
          });
          absolutePressure(reading, localOf(item.site));
          return reading.text;
        }
        if (field === 'T')
          return parseReading(text, 'temperature', { defaultUnit: view.temperature.unit }).text;
        const fraction = parseReading(text, 'fraction', { defaultUnit: '%' });
        return fraction.value >= 0 && fraction.value <= 1 ? fraction.text : null;
      });
      if ('trouble' in read) return read.trouble;
      if (read.ok === null) return e.fractionRange;
      const taken = read.ok;
      store
        .getState()
        .edit(`change ${item.tag}`, (s) =>
          withItem(s, item.id, (now) => ({ ...now, [field]: taken })),
        );
      return null;
    };

  const add = (): void => {
    const map = results?.maps[0];
    if (!map) return;
    const T = (map.T.range[0] + map.T.range[1]) / 2;
    const p =
      view.pressure.scale === 'logarithmic'
        ? Math.sqrt(map.p.range[0] * map.p.range[1])
        : (map.p.range[0] + map.p.range[1]) / 2;
    const kind = sheet.pressureKind;
    const unit = (
      kind === view.pressure.kind ? view.pressure.unit : (view.second?.unit ?? view.pressure.unit)
    ) as UnitId;
    const id = freshId(sheet, 'state');
    const tag = freshTag(sheet);
    store.getState().edit(`add ${tag}`, (s) => ({
      ...s,
      items: [
        ...s.items,
        {
          kind: 'state',
          id,
          tag,
          T: temperatureReading(T, view.temperature.unit, (map.T.range[1] - map.T.range[0]) / 200)
            .text,
          p: pressureReading(p, unit, kind, localOf(null), p / 100).text,
        },
      ],
    }));
    store.getState().select(id);
  };

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
          </tr>
        </thead>
        <tbody>
          {sheet.items.map((item) => {
            if (item.kind !== 'state') return null;
            const s = results?.states.find(({ id }) => id === item.id);
            const next =
              s?.margins.find((m) => m.boundary !== null && m.direction === 'warmer') ??
              s?.margins.find((m) => m.boundary !== null);
            const unit = (
              item.p !== undefined
                ? parseReading(item.p, 'pressure').unit
                : (view.second?.unit ?? view.pressure.unit)
            ) as UnitId;
            return (
              <tr
                key={item.id}
                className={selected === item.id ? 'selected' : ''}
                onClick={() => store.getState().select(item.id)}
              >
                <th scope="row">
                  <button
                    className="tag"
                    aria-pressed={selected === item.id}
                    onClick={() => store.getState().select(item.id)}
                  >
                    {item.tag}
                  </button>
                </th>
                <td>
                  <Figured
                    sentence={words.stateSentence(shown(item, decimal), item.tag)}
                    commit={commit(item)}
                  />
                </td>
                <td className="number">
                  {s
                    ? format(s.T, view.temperature.unit, {
                        ...(s.error.T > 0 ? { uncertainty: s.error.T } : { decimals: 1 }),
                        decimal,
                      })
                    : '—'}
                </td>
                <td className="number">
                  {s
                    ? format(pressureAs(s.kind, s.p, localOf(s.site)), unit, {
                        ...(s.error.p > 0 ? { uncertainty: s.error.p } : { digits: 4 }),
                        kind: s.kind,
                        decimal,
                      })
                    : '—'}
                </td>
                <td>
                  {s?.problem
                    ? words.problem(s.problem)
                    : s?.touches
                      ? words.cannotTell(words.boundaryKind(s.touches))
                      : s?.state?.parts
                          .map((part) => words.phase(part.phase, part.solid))
                          .join(' + ')}
                </td>
                <td>
                  {s?.state && next?.boundary
                    ? words.margin(
                        next.direction,
                        next.kind,
                        s.state.parts[0]!.phase,
                        next.direction === 'warmer' || next.direction === 'colder'
                          ? formatDifference(next.distance, view.temperature.unit, {
                              ...(s.error.T > 0 ? { uncertainty: s.error.T } : { digits: 3 }),
                              decimal,
                            })
                          : format(next.distance, view.pressure.unit as UnitId, {
                              digits: 3,
                              decimal,
                            }),
                      )
                    : s?.state
                      ? words.noMargin.none
                      : ''}
                </td>
              </tr>
            );
          })}
        </tbody>
      </table>
      <p className="actions">
        <button onClick={add}>{e.add}</button>
      </p>
    </section>
  );
}

/** An item's readings as they are shown: true minus, thin spaces, the language's decimal mark. */
function shown(
  item: StateItem,
  decimal: '.' | ',',
): { T?: string; p?: string; vapourFraction?: string } {
  const text = (given: string | undefined, quantity: 'temperature' | 'pressure' | 'fraction') =>
    given === undefined ? undefined : formatReading(parseReading(given, quantity), decimal);
  const out: { T?: string; p?: string; vapourFraction?: string } = {};
  const T = text(item.T, 'temperature');
  const p = text(item.p, 'pressure');
  const x = text(item.vapourFraction, 'fraction');
  if (T !== undefined) out.T = T;
  if (p !== undefined) out.p = p;
  if (x !== undefined) out.vapourFraction = x;
  return out;
}
