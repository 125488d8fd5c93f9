import { memo } from 'react';
import type { PathResult, PathState, StepResult } from '../../core/sheet/results.ts';
import type { PathItem } from '../../core/sheet/schema.ts';
import type { Step } from '../../core/process/steps/index.ts';
import { format } from '../../core/units/index.ts';
import { temperatureReading } from '../store/edits.ts';
import { freshStepId, removed, withPath, withStep } from '../store/pathEdits.ts';
import type { Words } from '../words/en.ts';
import { useAppStore, useWords } from './context.ts';
import { Figured } from './Figured.tsx';
import {
  givenSlots,
  pairSlot,
  pressureUnit,
  readGiven,
  regiven,
  type TablePlace,
} from './givens.ts';
import { LogRow, type Cell } from './LogRow.tsx';
import { heatText, timeText } from './logText.ts';
import { tried } from './say.ts';
import { shownState } from './shownState.ts';
import { stepSentence, withField, type StepPlace } from './stepFields.ts';

type Start = PathItem['start'];

/** The results in a path's row: where it stands, what it met, what it cost. */
function cellsOf(
  state: PathState | undefined,
  step: StepResult | null | undefined,
  start: Start,
  place: TablePlace,
  words: Words,
): readonly Cell[] {
  const { decimal } = words;
  const shown =
    state && shownState(state, place.view, place.air, pressureUnit(start.p, place), words);
  const left =
    step?.mass !== undefined && step.mass !== null && step.mass < 1 - 1e-7
      ? `, ${words.massLeft(format(step.mass, '%', { digits: 3, decimal }))}`
      : '';
  const place4: readonly Cell[] = [
    { text: shown?.T ?? '—', number: true },
    { text: shown?.p ?? '—', number: true },
    { text: step?.problem ? words.stepProblem(step.problem) : (shown?.phase ?? '') + left },
    { text: shown?.next ?? '' },
  ];
  if (step === null) return [...place4, { text: '' }, { text: '' }, { text: '' }];
  return [
    ...place4,
    { text: (step?.encounters ?? []).map((x) => words.encounter(x)).join(', ') },
    step?.heat !== undefined && step.heat !== null
      ? { text: heatText(step.heat, decimal), number: true }
      : {
          text: '—',
          number: true,
          hint: step?.heatAbsent ? words.heatAbsent(step.heatAbsent) : undefined,
        },
    {
      text: step?.clock === null || step?.clock === undefined ? '' : timeText(step.clock, decimal),
      number: true,
    },
  ];
}

const StartRow = memo(function StartRow({
  path,
  tag,
  start,
  state,
  problem,
  colour,
  place,
}: {
  readonly path: string;
  readonly tag: string;
  readonly start: Start;
  readonly state: PathState | undefined;
  readonly problem: PathResult['problem'];
  readonly colour: number;
  readonly place: TablePlace;
}) {
  const store = useAppStore();
  const words = useWords();
  return (
    <LogRow
      id={`${path}.start`}
      tag={tag}
      colour={colour}
      cells={cellsOf(state, null, start, place, words)}
    >
      <Figured
        sentence={words.pathStart(givenSlots(start, tag, words), pairSlot(start, tag, words))}
        commit={(field, text) => {
          if (field === 'pair') {
            const given = regiven(text, state, start, place);
            store
              .getState()
              .edit(`change ${tag}`, (s) => withPath(s, path, (now) => ({ ...now, start: given })));
            return null;
          }
          const taken = readGiven(field, text, start, place, words);
          if ('trouble' in taken) return taken.trouble;
          store.getState().edit(`change ${tag}`, (s) =>
            withPath(s, path, (now) => ({
              ...now,
              start: { ...now.start, [field]: taken.ok.text },
            })),
          );
          return null;
        }}
      />
      {problem && problem.step === null && (
        <span className="trouble"> {words.stepProblem(problem.problem)}</span>
      )}
    </LogRow>
  );
});

const StepRow = memo(function StepRow({
  path,
  tag,
  substance,
  start,
  step,
  from,
  to,
  result,
  colour,
  place,
}: {
  readonly path: string;
  readonly tag: string;
  readonly substance: string;
  readonly start: Start;
  readonly step: Step;
  readonly from: PathState | undefined;
  readonly to: PathState | undefined;
  readonly result: StepResult | undefined;
  readonly colour: number;
  readonly place: TablePlace;
}) {
  const store = useAppStore();
  const words = useWords();
  const id = `${path}.${step.id}`;
  const about: StepPlace = {
    words,
    tag,
    substance,
    from,
    to,
    result,
    pressureKind: place.pressureKind,
    local: place.air,
    temperatureUnit: place.view.temperature.unit,
    pressureUnit: pressureUnit(start.p, place),
  };
  return (
    <LogRow id={id} tag={tag} colour={colour} cells={cellsOf(to, result, start, place, words)}>
      <Figured
        sentence={stepSentence(step, about)}
        commit={(field, text) => {
          const made = tried(words, () => withField(step, field, text, about));
          if ('trouble' in made) return made.trouble;
          store
            .getState()
            .edit(`change ${tag}`, (s) =>
              withPath(s, path, (now) => withStep(now, step.id, () => made.ok)),
            );
          return null;
        }}
      />
      <button
        className="remove"
        aria-label={words.editor.removeStep(tag)}
        onClick={(event) => {
          event.stopPropagation();
          store.getState().edit(`remove ${tag}`, (s) => removed(s, id));
        }}
      >
        ×
      </button>
    </LogRow>
  );
});

/** Heat taken in and heat given off, apart, for they come from different utilities. */
function totalHeat(result: PathResult | undefined, decimal: '.' | ','): string {
  if (result?.total.heat === null || result?.total.heat === undefined) return '';
  const sum = (sign: number): number =>
    result.steps.reduce((total, { heat }) => total + Math.max(0, sign * (heat ?? 0)), 0);
  const [taken, given] = [sum(1), sum(-1)];
  return [taken > 0 && heatText(taken, decimal), given > 0 && heatText(-given, decimal)]
    .filter(Boolean)
    .join(', ');
}

/** A planned run in the run table: its start, its steps, their sum. */
export const PathRows = memo(function PathRows({
  item,
  result,
  substance,
  colour,
  place,
}: {
  readonly item: PathItem;
  readonly result: PathResult | undefined;
  readonly substance: string;
  readonly colour: number;
  readonly place: TablePlace;
}) {
  const store = useAppStore();
  const words = useWords();
  const e = words.editor;
  const { decimal } = words;
  const states = new Map(result?.states.map((s) => [s.step, s]));
  const steps = new Map(result?.steps.map((s) => [s.step, s]));
  const addStep = (): void => {
    const last = result?.states.at(-1);
    const id = freshStepId(item);
    const T = temperatureReading((last?.T ?? 350) + 20, place.view.temperature.unit, 1).text;
    store.getState().edit('add a step', (s) =>
      withPath(s, item.id, (now) => ({
        ...now,
        steps: [...now.steps, { id, kind: 'constantPressure', end: { T } }],
      })),
    );
    store.getState().select(`${item.id}.${id}`);
  };
  const several = (result?.steps.length ?? 0) > 1;
  return (
    <>
      <StartRow
        path={item.id}
        tag={`${item.tag}1`}
        start={item.start}
        state={states.get(null)}
        problem={result?.problem ?? null}
        colour={colour}
        place={place}
      />
      {item.steps.map((step, i) => (
        <StepRow
          key={step.id}
          path={item.id}
          tag={`${item.tag}${i + 2}`}
          substance={substance}
          start={item.start}
          step={step}
          from={states.get(i === 0 ? null : item.steps[i - 1]!.id)}
          to={states.get(step.id)}
          result={steps.get(step.id)}
          colour={colour}
          place={place}
        />
      ))}
      <tr className="sum">
        <td />
        <td>
          <button onClick={addStep}>{e.addStep}</button>
        </td>
        <td colSpan={5} className="number">
          {several && e.total}
        </td>
        <td className="number">{several && totalHeat(result, decimal)}</td>
        <td className="number">
          {several &&
            typeof result?.total.time === 'number' &&
            timeText(result.total.time, decimal)}
        </td>
      </tr>
    </>
  );
});
