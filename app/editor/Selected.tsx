import { format } from '../../core/units/index.ts';
import type { StepResult } from '../../core/sheet/results.ts';
import { withItem } from '../store/edits.ts';
import { airAt } from '../store/places.ts';
import { duplicated, partsOf, removed } from '../store/pathEdits.ts';
import type { Words } from '../words/en.ts';
import { useApp, useAppStore, useWords } from './context.ts';
import { Figured } from './Figured.tsx';
import { heatText } from './logText.ts';
import { stateFacts } from './stateFacts.ts';
import { useMedium } from './useMedium.ts';

/** What a step costs and meets, in rows. */
function stepFacts(step: StepResult, words: Words): readonly (readonly [string, string])[] {
  const e = words.editor;
  const { decimal } = words;
  const energy = (value: number): string => heatText(value, decimal);
  return [
    ...step.encounters.map((x): [string, string] => [
      e.meets,
      words.encounterAt(words.encounter(x), format(x.T, '°C', { decimals: 1, decimal })),
    ]),
    [
      e.heat,
      step.heat === null
        ? step.heatAbsent
          ? words.heatAbsent(step.heatAbsent)
          : ''
        : energy(step.heat),
    ],
    ...(step.work === null ? [] : [[e.work, energy(step.work)] as const]),
    ...(step.lost?.mass
      ? [[e.left, format(step.lost.mass, '%', { digits: 3, decimal })] as const]
      : []),
    ...(step.problem ? [[e.trouble, words.stepProblem(step.problem)] as const] : []),
  ];
}

/** What the user calls a selected state or run, and at which site it is read. */
function ItemSaying({ id }: { readonly id: string }) {
  const store = useAppStore();
  const words = useWords();
  const sheet = useApp((s) => s.sheet)!;
  const item = partsOf(sheet, id)?.path ?? sheet.items.find((x) => x.id === id);
  if (!item) return null;
  return (
    <p className="site">
      <Figured
        sentence={words.itemSentence(
          { tag: item.tag, name: item.name ?? '', site: item.site ?? sheet.sites[0]?.id ?? '' },
          sheet.sites.map((site) => ({ value: site.id, label: site.name })),
        )}
        commit={(field, text) => {
          store.getState().edit(`change ${item.tag}`, (s) =>
            withItem(s, item.id, (now) => {
              if (field === 'site') return { ...now, site: text };
              const { name: old, ...rest } = now;
              const name = text.trim().slice(0, 200);
              return name === '' && old !== undefined ? rest : { ...rest, ...(name && { name }) };
            }),
          );
          return null;
        }}
      />
    </p>
  );
}

/** What is selected, and what is true of it. */
export function Selected() {
  const store = useAppStore();
  const words = useWords();
  const e = words.editor;
  const sheet = useApp((s) => s.sheet)!;
  const results = useApp((s) => s.results);
  const selected = useApp((s) => s.selected);
  const ready = useMedium(sheet.views[0]!.substance ?? sheet.substances[0]!);
  if (!results || selected === null) return null;
  const boundary = results.maps[0]?.boundaries.find(({ id }) => id === selected);
  if (boundary)
    return (
      <section aria-live="polite">
        <h2>
          {words.boundary(boundary.of, boundary.kind, boundary.form, { kind: false, line: true })}
        </h2>
        <dl>
          <div>
            <dt>{e.basis}</dt>
            <dd>{words.basis[boundary.basis]}</dd>
          </div>
          <div>
            <dt>{e.source}</dt>
            <dd>{boundary.source}</dd>
          </div>
        </dl>
      </section>
    );
  const onPaths = results.paths.flatMap((path) => path.states);
  const state = [...results.states, ...onPaths].find(({ id }) => id === selected);
  const step = results.paths.flatMap((path) => path.steps).find(({ id }) => id === selected);
  if (!state && !step) return null;
  const local = airAt(sheet, results, state?.site);
  const facts = [
    ...(state ? stateFacts(state, sheet.views[0]!, local, words, ready) : []),
    ...(step ? stepFacts(step, words) : []),
  ];
  const removable = removed(sheet, selected) !== sheet;
  return (
    <section aria-live="polite">
      <h2>{state ? e.selected(state.tag, state.name) : e.step}</h2>
      <ItemSaying id={selected} />
      <dl>
        {facts.map(([name, text], i) => (
          <div key={`${name}${i}`}>
            <dt>{name}</dt>
            <dd>{text}</dd>
          </div>
        ))}
      </dl>
      {removable && (
        <p className="actions">
          <button
            onClick={() => {
              const made = duplicated(sheet, selected);
              if (!made) return;
              store.getState().edit(`duplicate ${state?.tag ?? ''}`, () => made.sheet);
              store.getState().select(made.id);
            }}
          >
            {e.duplicate}
          </button>
          <button
            onClick={() =>
              store.getState().edit(`remove ${state?.tag ?? e.step}`, (s) => removed(s, selected))
            }
          >
            {e.remove}
          </button>
        </p>
      )}
    </section>
  );
}
