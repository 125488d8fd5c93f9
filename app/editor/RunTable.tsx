import type { ReactNode } from 'react';
import type { PathResult, StepResult } from '../../core/sheet/results.ts';
import type { PathItem, StateItem } from '../../core/sheet/schema.ts';
import {
  absolutePressure,
  format,
  formatReading,
  parseReading,
  type Quantity,
  type UnitId,
} from '../../core/units/index.ts';
import {
  freshId,
  freshTag,
  pressureReading,
  temperatureReading,
  withItem,
} from '../store/edits.ts';
import { freshStepId, newPath, removed, withPath, withStep } from '../store/pathEdits.ts';
import { airAt, usualUnit } from '../store/places.ts';
import type { Slot } from '../words/sentence.ts';
import { useApp, useAppStore, useWords } from './context.ts';
import { Figured } from './Figured.tsx';
import { tried } from './say.ts';
import { shownState } from './shownState.ts';
import { stepSentence, withField, type StepPlace } from './stepFields.ts';

/** One row of the log book. */
function Row({
  id,
  tag,
  colour,
  children,
  cells,
}: {
  readonly id: string;
  readonly tag: string;
  readonly colour: number;
  readonly children: ReactNode;
  readonly cells: readonly {
    readonly text: string;
    readonly number?: boolean;
    readonly hint?: string;
  }[];
}) {
  const store = useAppStore();
  const selected = useApp((s) => s.selected === id);
  return (
    <tr className={selected ? 'selected' : ''} onClick={() => store.getState().select(id)}>
      <th scope="row">
        <button
          className={`tag own-${colour}`}
          aria-pressed={selected}
          onClick={() => store.getState().select(id)}
        >
          {tag}
        </button>
      </th>
      <td className="sentence">{children}</td>
      {cells.map(({ text, number, hint }, i) => (
        <td key={i} className={number ? 'number' : i === 2 ? 'phase' : ''} title={hint}>
          {text}
        </td>
      ))}
    </tr>
  );
}

/** The readings of a state item or a start, each as a slot. */
function givenSlots(
  given: {
    readonly T?: string;
    readonly p?: string;
    readonly vapourFraction?: string;
    readonly solidFraction?: string;
  },
  tag: string,
  words: ReturnType<typeof useWords>,
): readonly Slot[] {
  const quantities = {
    T: 'temperature',
    p: 'pressure',
    vapourFraction: 'fraction',
    solidFraction: 'fraction',
  } as const;
  return (Object.keys(quantities) as (keyof typeof quantities)[])
    .filter((field) => given[field] !== undefined)
    .map((field) => ({
      field,
      text: formatReading(parseReading(given[field]!, quantities[field]), words.decimal),
      name: words.stepField(field, tag),
      quantity: quantities[field],
    }));
}

/** The run as a log book: a row a state or step, its sentence with figures to edit, then results. */
export function RunTable() {
  const store = useAppStore();
  const words = useWords();
  const e = words.editor;
  const sheet = useApp((s) => s.sheet)!;
  const results = useApp((s) => s.results);
  const view = sheet.views[0]!;
  const { decimal } = words;
  const localOf = (siteId: string | null | undefined): number => airAt(sheet, results, siteId);
  const usual = usualUnit(sheet, view);
  const unitOf = (p: string | undefined): UnitId =>
    p === undefined ? usual : parseReading(p, 'pressure').unit;

  /** A typed reading of a state's given, canonical; checked against absolute zero at its site. */
  const read = (field: string, text: string, old: string | undefined, site: string | undefined) =>
    tried(words, () => {
      const quantity: Quantity =
        field === 'T' ? 'temperature' : field === 'p' ? 'pressure' : 'fraction';
      const reading = parseReading(text, quantity, {
        defaultUnit: field === 'T' ? view.temperature.unit : field === 'p' ? unitOf(old) : '%',
        ...(field === 'p' ? { defaultKind: sheet.pressureKind } : {}),
      });
      if (field === 'p') absolutePressure(reading, localOf(site));
      return reading;
    });

  const commitState =
    (item: StateItem) =>
    (field: string, text: string): string | null => {
      const taken = read(field, text, item.p, item.site);
      if ('trouble' in taken) return taken.trouble;
      if (field === 'vapourFraction' && !(taken.ok.value >= 0 && taken.ok.value <= 1))
        return e.fractionRange;
      store
        .getState()
        .edit(`change ${item.tag}`, (s) =>
          withItem(s, item.id, (now) => ({ ...now, [field]: taken.ok.text })),
        );
      return null;
    };
  const commitStart =
    (item: PathItem) =>
    (field: string, text: string): string | null => {
      const taken = read(field, text, item.start.p, item.site);
      if ('trouble' in taken) return taken.trouble;
      if (field.endsWith('Fraction') && !(taken.ok.value >= 0 && taken.ok.value <= 1))
        return e.fractionRange;
      store.getState().edit(`change ${item.tag}1`, (s) =>
        withPath(s, item.id, (now) => ({
          ...now,
          start: { ...now.start, [field]: taken.ok.text },
        })),
      );
      return null;
    };

  /** Where a new state or run begins: the air of the place, at room temperature or on the map. */
  const beginning = () => {
    const map = results?.maps[0];
    if (!map) return null;
    const [low, high] = map.T.range;
    const room = 293.15;
    const T = room > low && room < high ? room : (low + high) / 2;
    const local = localOf(null);
    return {
      T: temperatureReading(T, view.temperature.unit, 1).text,
      p: pressureReading(local, usual, sheet.pressureKind, local, 1000).text,
    };
  };
  const addState = (): void => {
    const at = beginning();
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
    const at = beginning();
    if (!at) return;
    const path = newPath(sheet, at);
    store.getState().edit(`plan run ${path.tag}`, (s) => ({ ...s, items: [...s.items, path] }));
    store.getState().select(`${path.id}.start`);
  };
  const addStep = (item: PathItem): void => {
    const last = results?.paths.find(({ id }) => id === item.id)?.states.at(-1);
    const id = freshStepId(item);
    const T = temperatureReading((last?.T ?? 350) + 20, view.temperature.unit, 1).text;
    store.getState().edit('add a step', (s) =>
      withPath(s, item.id, (now) => ({
        ...now,
        steps: [...now.steps, { id, kind: 'constantPressure', end: { T } }],
      })),
    );
    store.getState().select(`${item.id}.${id}`);
  };

  const heatCell = (step: StepResult | undefined) =>
    step?.heat !== undefined && step.heat !== null
      ? { text: heatText(step.heat, decimal), number: true }
      : {
          text: '—',
          number: true,
          ...(step?.heatAbsent ? { hint: words.heatAbsent(step.heatAbsent) } : {}),
        };
  const clockCell = (clock: number | null | undefined) => ({
    text: clock === null || clock === undefined ? '' : timeText(clock, decimal),
    number: true,
  });

  const pathRows = (item: PathItem, index: number): ReactNode => {
    const result: PathResult | undefined = results?.paths.find(({ id }) => id === item.id);
    const local = localOf(item.site);
    const cellsOf = (step?: StepResult) => {
      const state = result?.states.find((s) => s.step === (step ? step.step : null));
      const shown = state && shownState(state, view, local, unitOf(item.start.p), words);
      const met = (step?.encounters ?? []).map((x) => words.encounter(x)).join(', ');
      const mass =
        step?.mass !== undefined && step.mass !== null && step.mass < 0.9999999
          ? `, ${words.massLeft(format(step.mass, '%', { digits: 3, decimal }))}`
          : '';
      return [
        { text: shown?.T ?? '—', number: true },
        { text: shown?.p ?? '—', number: true },
        { text: step?.problem ? words.stepProblem(step.problem) : (shown?.phase ?? '') + mass },
        { text: shown?.next ?? '' },
        { text: met },
        ...(step ? [heatCell(step), clockCell(step.clock)] : [{ text: '' }, { text: '' }]),
      ];
    };
    return [
      <Row
        key={item.id}
        id={`${item.id}.start`}
        tag={`${item.tag}1`}
        colour={index}
        cells={cellsOf()}
      >
        <Figured
          sentence={words.pathStart(givenSlots(item.start, `${item.tag}1`, words))}
          commit={commitStart(item)}
        />
        {result?.problem && result.problem.step === null && (
          <span className="trouble"> {words.stepProblem(result.problem.problem)}</span>
        )}
      </Row>,
      ...item.steps.map((step, i) => {
        const tag = `${item.tag}${i + 2}`;
        const stepResult = result?.steps.find((s) => s.step === step.id);
        const place: StepPlace = {
          words,
          tag,
          substance: item.substance ?? sheet.substances[0]!,
          path: result,
          result: stepResult,
          pressureKind: sheet.pressureKind,
          local,
          temperatureUnit: view.temperature.unit,
          pressureUnit: unitOf(item.start.p),
        };
        return (
          <Row
            key={`${item.id}.${step.id}`}
            id={`${item.id}.${step.id}`}
            tag={tag}
            colour={index}
            cells={cellsOf(stepResult)}
          >
            <Figured
              sentence={stepSentence(step, place)}
              commit={(field, text) => {
                const made = tried(words, () => withField(step, field, text, place));
                if ('trouble' in made) return made.trouble;
                store
                  .getState()
                  .edit(`change ${tag}`, (s) =>
                    withPath(s, item.id, (now) => withStep(now, step.id, () => made.ok)),
                  );
                return null;
              }}
            />
            <button
              className="remove"
              aria-label={e.removeStep(tag)}
              onClick={(event) => {
                event.stopPropagation();
                store.getState().edit(`remove ${tag}`, (s) => removed(s, `${item.id}.${step.id}`));
              }}
            >
              ×
            </button>
          </Row>
        );
      }),
      <tr key={`${item.id}-sum`} className="sum">
        <td />
        <td>
          <button onClick={() => addStep(item)}>{e.addStep}</button>
        </td>
        <td colSpan={5} className="number">
          {result && result.steps.length > 1 && e.total}
        </td>
        <td className="number">
          {result && result.steps.length > 1 && result.total.heat !== null
            ? heatText(result.total.heat, decimal)
            : ''}
        </td>
        <td className="number">
          {result && result.steps.length > 1 && result.total.time !== null
            ? timeText(result.total.time, decimal)
            : ''}
        </td>
      </tr>,
    ];
  };

  const paths = sheet.items.filter((item): item is PathItem => item.kind === 'path');
  const states = sheet.items.filter((item): item is StateItem => item.kind === 'state');
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
          {paths.map((item, i) => pathRows(item, i))}
          {states.map((item) => {
            const s = results?.states.find(({ id }) => id === item.id);
            const shown = s && shownState(s, view, localOf(s.site), unitOf(item.p), words);
            return (
              <Row
                key={item.id}
                id={item.id}
                tag={item.tag}
                colour={0}
                cells={[
                  { text: shown?.T ?? '—', number: true },
                  { text: shown?.p ?? '—', number: true },
                  { text: shown?.phase ?? '' },
                  { text: shown?.next ?? '' },
                ]}
              >
                <Figured
                  sentence={words.stateSentence(givenSlots(item, item.tag, words))}
                  commit={commitState(item)}
                />
              </Row>
            );
          })}
        </tbody>
      </table>
      <p className="actions">
        <button onClick={addPath}>{e.addPath}</button>
        <button onClick={addState}>{e.add}</button>
      </p>
    </section>
  );
}

/** Heat with its sign, kJ/kg: to ones from 100, else to tenths, small ones to hundredths. */
function heatText(heat: number, decimal: '.' | ','): string {
  const size = Math.abs(heat);
  const decimals = size >= 1e5 ? 0 : size >= 1e3 ? 1 : 2;
  const text = format(heat, 'kJ/kg', { decimals, decimal });
  return /^[−0]/.test(text) && !(heat > 0 && !text.startsWith('−') && /[1-9]/.test(text))
    ? text
    : `+${text}`;
}

/** A time in minutes, with a decimal only where it has one. */
function timeText(seconds: number, decimal: '.' | ','): string {
  const minutes = seconds / 60;
  const decimals = Math.abs(minutes - Math.round(minutes)) < 0.005 ? 0 : 1;
  return format(seconds, 'min', { decimals, decimal });
}
