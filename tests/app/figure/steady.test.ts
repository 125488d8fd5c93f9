import { expect, it } from 'vitest';
import { composeFigure, steadyLabels } from '../../../app/figure/figure.ts';
import { evaluateSheet } from '../../../app/worker/evaluateSheet.ts';
import { en } from '../../../app/words/en.ts';
import type { Sheet } from '../../../core/sheet/schema.ts';
import { heavySheet } from '../../benchmarks/heavySheet.ts';

/** The crowded sheet with its first state somewhere else. */
const sheetAt = (T: string): Sheet => {
  const sheet = heavySheet();
  const [first, ...rest] = sheet.items;
  const moved = first?.kind === 'state' ? [{ ...first, T }] : [];
  return { ...sheet, items: [...moved, ...rest] };
};

const compose = async (sheet: Sheet, steady?: Parameters<typeof composeFigure>[4]) =>
  composeFigure(sheet, await evaluateSheet(sheet), 'main', en, steady);

it('keeps labels where they stand while one thing moves, those without room included', async () => {
  const before = await compose(sheetAt('70 °C'));
  expect(before.scene.unplaced.length).toBeGreaterThan(0);
  const after = await compose(sheetAt('75 °C'), steadyLabels(before));
  expect(after.scene.unplaced).toEqual(before.scene.unplaced);
  const boxes = new Map(after.boxes.map((placed) => [placed.id, placed.box]));
  const moved = before.boxes.filter(({ id, box }) => {
    const now = boxes.get(id)!;
    return Math.hypot(now.x - box.x, now.y - box.y) > 1e-9;
  });
  expect(moved.map(({ of }) => of)).toEqual(expect.arrayContaining(['state-0']));
  expect(new Set(moved.map(({ of }) => of))).toEqual(new Set(['state-0']));
});

it('draws the same whatever was drawn before', async () => {
  const cold = await compose(sheetAt('70 °C'));
  await compose({ ...sheetAt('90 °C'), title: 'another' }, steadyLabels(cold));
  const again = await compose(sheetAt('70 °C'));
  expect(again.scene).toEqual(cold.scene);
  const grey = sheetAt('70 °C');
  const view = { ...grey.views[0]!, colours: 'grey' as const };
  const other = await compose({ ...grey, views: [view] });
  expect(other.scene).not.toEqual(cold.scene);
  expect((await compose(sheetAt('70 °C'))).scene).toEqual(cold.scene);
});
