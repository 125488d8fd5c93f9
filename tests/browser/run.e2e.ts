import { afterAll, beforeAll, expect, it } from 'vitest';
import type { Page } from 'playwright-core';
import { sheetFromSvg } from '../../app/export/sheetInSvg.ts';
import { downloaded, drawn, harness, type Harness } from './harness.ts';

let h: Harness;
beforeAll(async () => {
  h = await harness();
});
afterAll(() => h.close());

/** Text of the cells of the run table's row with a tag. */
const cells = (page: Page, tag: string): Promise<string[]> =>
  page
    .locator('.run tbody tr', { has: page.getByRole('button', { name: tag, exact: true }) })
    .locator('td:not(.sentence)')
    .allInnerTexts();

async function fill(page: Page, name: string, text: string): Promise<void> {
  await page.getByLabel(name, { exact: true }).fill(text);
  await page.keyboard.press('Enter');
  await drawn(page);
}

it('plans a two-step run at altitude from a blank start, tells it, exports it, and finds it after a reload', async () => {
  const { page, context, troubles } = await h.open('');
  await page.getByLabel('altitude or barometer of the plant').fill('1480 m');
  await page.keyboard.press('Enter');
  await page.getByRole('button', { name: 'Draw it' }).click();
  await drawn(page);
  await page.getByRole('button', { name: 'Plan a run' }).click();
  await fill(page, 'temperature of A1', '25 °C');
  await fill(page, 'pressure of A1', '0 bar(g)');
  await page.getByRole('button', { name: 'Add a step' }).click();
  await page.getByLabel('end of step of A2').selectOption('saturation');
  await drawn(page);
  await page.getByRole('button', { name: 'Add a step' }).click();
  await page.getByLabel('end of step of A3').selectOption('vapourFraction');
  await drawn(page);
  await fill(page, 'share of vapour of A3', '100 %');
  await fill(page, 'time or rate of A2', '12 min');

  // 84.76 kPa by ISO 2533 at 1480 m (computed, not published). IAPWS R7-97 region 4 there: 95.04 °C
  // (computed from the equation). h(25 °C) = 104.9 kJ/kg, h′ = 398.2 kJ/kg and the heat of
  // vaporisation 2 269.5 kJ/kg at 95.04 °C: IAPWS R6-95, interpolated in its table 13.1 of Wagner
  // and Pruß 2002 (recalled); hence 293.3 and 2 269.5 kJ/kg.
  const a2 = await cells(page, 'A2');
  expect(a2[0]).toMatch(/^95\.0/);
  expect(a2[4]).toContain('boiling');
  expect(Math.abs(Number(a2[5]!.replace(/[^\d.]/g, '')) - 293.3)).toBeLessThan(1);
  const a3 = await cells(page, 'A3');
  expect(a3[4]).toContain('boils');
  expect(Math.abs(Number(a3[5]!.replace(/[^\d.]/g, '')) - 2269.5)).toBeLessThan(2);

  const file = await downloaded(page, () => page.getByRole('button', { name: 'Export' }).click());
  const carried = sheetFromSvg(file.text) as { items: { steps: unknown[] }[] };
  expect(carried.items[0]!.steps).toHaveLength(2);
  expect(file.text).toContain('84.76');

  const other = await h.open('');
  await other.page.setInputFiles('input[type=file]', file.path);
  await drawn(other.page);
  expect(await cells(other.page, 'A3')).toEqual(a3);
  await other.context.close();

  await page.reload();
  await drawn(page);
  await expect.poll(() => cells(page, 'A3')).toEqual(a3);
  await context.close();
  expect(troubles).toEqual([]);
});

it('moves the map with the sentence and the sentence with the map, and undoes all the way', async () => {
  const { page, context } = await h.open('?demo=retort');
  await drawn(page);
  const dot = page.locator('.page circle[data-of="vessel.cooling"]');
  const centre = async () => {
    const box = (await dot.boundingBox())!;
    return { x: box.x + box.width / 2, y: box.y + box.height / 2 };
  };
  const before = await centre();
  await fill(page, 'temperature of A5', '80 °C');
  await expect.poll(async () => (await centre()).x).toBeGreaterThan(before.x + 20);

  const from = await centre();
  await page.mouse.move(from.x, from.y);
  await page.mouse.down();
  for (let i = 1; i <= 8; i++) await page.mouse.move(from.x - 10 * i, from.y + 3);
  await page.mouse.up();
  await drawn(page);
  const field = page.getByLabel('temperature of A5', { exact: true });
  await expect.poll(async () => Number.parseFloat(await field.inputValue())).toBeLessThan(65);
  // Constant pressure: the hand moved down, the end did not.
  expect(Math.abs((await centre()).y - from.y)).toBeLessThan(1);

  const undo = page.getByRole('button', { name: 'Undo' });
  await undo.click();
  await expect.poll(() => field.inputValue()).toMatch(/^80/);
  await undo.click();
  await expect.poll(() => field.inputValue()).toMatch(/^65/);
  expect(await undo.isDisabled()).toBe(true);
  const redo = page.getByRole('button', { name: 'Redo' });
  await redo.click();
  await redo.click();
  await expect.poll(async () => Number.parseFloat(await field.inputValue())).toBeLessThan(65);
  await context.close();
});
