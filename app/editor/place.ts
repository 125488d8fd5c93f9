import type { Step } from '../../core/process/steps/index.ts';
import type { Figure } from '../figure/figure.ts';
import type { Point } from '../figure/scene/scene.ts';
import { freshId, freshTag, pressureReading, temperatureReading } from '../store/edits.ts';
import type { AppStore } from '../store/index.ts';
import { freshStepId, partsOf, withPath } from '../store/pathEdits.ts';
import { airAt, usualUnit } from '../store/places.ts';
import { stepsAt } from './drag.ts';
import { landing, type Landing } from './snap.ts';

/** Readings of a place in the units of the view and the sheet's kind of pressure. */
function readingsAt(figure: Figure, siteId: string | undefined, { T, p }: Landing) {
  const { results, sheet, view } = figure.view;
  const local = airAt(sheet, results, siteId);
  const unit = usualUnit(sheet, view);
  const steps = stepsAt(figure, T, p);
  return {
    T: temperatureReading(T, view.temperature.unit, steps.T).text,
    p: pressureReading(p, unit, sheet.pressureKind, local, steps.p).text,
  };
}

/**
 * Puts something new where the map was clicked twice: while a run is selected a straight step of it
 * to there, else a state. On the boiling line it is boiling.
 */
export function placeAt(store: AppStore, figure: Figure, at: Point, free: boolean): void {
  const { sheet, map } = figure.view;
  const { selected } = store.getState();
  const landed = landing(figure, at, '', [], free);
  const kind = map.boundaries.find(({ id }) => id === landed.boundary)?.kind;
  const run = selected === null ? null : partsOf(sheet, selected);
  if (run) {
    const { T, p } = readingsAt(figure, run.path.site, landed);
    const id = freshStepId(run.path);
    const end = kind === undefined || kind === 'critical' ? { T, p } : { T, boundary: kind };
    const step: Step = { id, kind: 'ramp', end };
    store
      .getState()
      .edit('add a step', (s) =>
        withPath(s, run.path.id, (now) => ({ ...now, steps: [...now.steps, step] })),
      );
    store.getState().select(`${run.path.id}.${id}`);
    return;
  }
  const { T, p } = readingsAt(figure, undefined, landed);
  const id = freshId(sheet, 'state');
  const tag = freshTag(sheet);
  const given = kind === 'saturation' ? { T, vapourFraction: '0 %' } : { T, p };
  store.getState().edit(`add ${tag}`, (s) => ({
    ...s,
    items: [...s.items, { kind: 'state', id, tag, ...given }],
  }));
  store.getState().select(id);
}
