import { afterAll, beforeAll, expect, it } from 'vitest';
import type { Page } from 'playwright-core';
import { sheetFromSvg } from '../../app/export/sheetInSvg.ts';
import {
  cells,
  centre,
  drawn,
  exported,
  fill,
  harness,
  number,
  plain,
  type Harness,
} from './harness.ts';

let h: Harness;
beforeAll(async () => {
  h = await harness();
});
afterAll(() => h.close());

type Place = { readonly x: number; readonly y: number };

/** Takes hold at a place and moves in small steps; lets go unless told to hold on. */
async function drag(page: Page, from: Place, to: Place, letGo = true): Promise<void> {
  await page.mouse.move(from.x, from.y);
  await page.mouse.down();
  for (let i = 1; i <= 8; i++)
    await page.mouse.move(from.x + ((to.x - from.x) * i) / 8, from.y + ((to.y - from.y) * i) / 8);
  if (letGo) await page.mouse.up();
  await drawn(page);
}

const value = (page: Page, name: string) => page.getByLabel(name, { exact: true }).inputValue();

it('moves the map with the sentence and the sentence with the map, and a drag is one undo', async () => {
  const { page, context, troubles } = await h.open('?demo=retort');
  await drawn(page);
  const at = () => centre(page, 'vessel.cooling');
  const before = await at();
  await fill(page, 'temperature of A5', '80 °C');
  await expect.poll(async () => (await at()).x).toBeGreaterThan(before.x + 20);

  const from = await at();
  await drag(page, from, { x: from.x - 80, y: from.y + 40 });
  await expect.poll(async () => number(await value(page, 'temperature of A5'))).toBeLessThan(65);
  // Constant pressure: the hand moved down, the end did not.
  expect(Math.abs((await at()).y - from.y)).toBeLessThan(1);
  expect(Math.abs((await at()).x - (from.x - 80))).toBeLessThan(2);
  // What the map shows, the sentence says: 150 °C over the frame's width.
  const frame = (await page.locator('.page g[data-layer=frame] rect').boundingBox())!;
  const told = number(await value(page, 'temperature of A5'));
  expect(Math.abs(((await at()).x - frame.x) / frame.width - told / 150)).toBeLessThan(0.005);
  expect(Math.abs(number((await cells(page, 'A5'))[0]!) - told)).toBeLessThan(0.6);

  const undo = page.getByRole('button', { name: 'Undo' });
  await undo.click();
  await expect.poll(() => value(page, 'temperature of A5')).toMatch(/^80/);
  await undo.click();
  await expect.poll(() => value(page, 'temperature of A5')).toMatch(/^65/);
  expect(await undo.isDisabled()).toBe(true);
  const redo = page.getByRole('button', { name: 'Redo' });
  await redo.click();
  await redo.click();
  await expect.poll(async () => number(await value(page, 'temperature of A5'))).toBe(told);
  expect(troubles).toEqual([]);
  await context.close();
});

it('a state drawn to the boiling line snaps to it with a hint, and says so; Alt keeps it free', async () => {
  const { page, context } = await h.open('?demo=retort');
  await drawn(page);
  await page.getByRole('button', { name: 'Add a state' }).click();
  await fill(page, 'temperature of 1', '100 °C');
  await fill(page, 'pressure of 1', '250 kPa(a)');
  const id = 'state-1';
  const from = await centre(page, id);
  // At 110 °C the line lies at 143.4 kPa (IAPWS R7-97 region 4, computed): the frame is 0 to 150 °C
  // and 0 to 450 kPa.
  const frame = (await page.locator('.page g[data-layer=frame] rect').boundingBox())!;
  const place = (T: number, p: number): Place => ({
    x: frame.x + (T / 150) * frame.width,
    y: frame.y + (1 - p / 450) * frame.height,
  });
  await drag(page, from, place(110, 145), false);
  const hint = page.locator('.reading .hint');
  await expect.poll(() => hint.textContent()).toBe('on the boiling line');
  expect(await page.locator('.page .snapped').count()).toBeGreaterThan(0);
  await page.mouse.up();
  await drawn(page);
  expect(await hint.count()).toBe(0);
  await expect.poll(() => value(page, 'share of vapour of 1')).toMatch(/^0/);
  const row = page.locator('.run tbody tr', {
    has: page.getByRole('button', { name: '1', exact: true }),
  });
  await expect.poll(() => row.innerText()).toContain('On the boiling line');
  const T = number(await value(page, 'temperature of 1'));
  expect(Math.abs(T - 110)).toBeLessThan(1);

  await page.keyboard.down('Alt');
  await drag(page, await centre(page, id), place(118, 186));
  await page.keyboard.up('Alt');
  await expect.poll(() => page.getByLabel('share of vapour of 1', { exact: true }).count()).toBe(0);
  expect(number(await value(page, 'pressure of 1'))).toBeGreaterThan(0);
  await context.close();
});

it('the end of a step drawn to the boiling line ends there, and a start takes its run along', async () => {
  const { page, context } = await h.open('?demo=retort');
  await drawn(page);
  const end = await centre(page, 'vessel.cooling');
  await drag(page, end, { x: end.x - 30, y: end.y });
  const cooled = await cells(page, 'A5');
  const start = await centre(page, 'vessel.start');
  await drag(page, start, { x: start.x + 40, y: start.y - 30 });
  await expect.poll(async () => number(await value(page, 'temperature of A1'))).toBeGreaterThan(25);
  expect(number(await value(page, 'pressure of A1'))).toBeGreaterThan(0);
  expect((await cells(page, 'A5')).slice(0, 2)).toEqual(cooled.slice(0, 2));

  // Heated at the 259.8 kPa of 1.75 bar(g) it boils at 128.7 °C (IAPWS R7-97 region 4, computed).
  const frame = (await page.locator('.page g[data-layer=frame] rect').boundingBox())!;
  const from = await centre(page, 'vessel.cooling');
  const line = { x: frame.x + (128.6 / 150) * frame.width, y: from.y };
  await drag(page, from, line, false);
  await expect.poll(() => page.locator('.reading .hint').textContent()).toBe('on the boiling line');
  await page.mouse.up();
  await drawn(page);
  await expect.poll(() => value(page, 'end of step of A5')).toBe('saturation');
  await expect.poll(async () => number((await cells(page, 'A5'))[0]!)).toBeCloseTo(128.7, 0);
  expect((await cells(page, 'A5'))[4]).toBe('reaches boiling');
  await context.close();
});

it('a label that was moved stays where it was put, on the page and in the export', async () => {
  const { page, context } = await h.open('?demo=retort');
  await drawn(page);
  const label = page.locator('.page svg text', { hasText: 'vessel' }).first();
  const box = (await label.boundingBox())!;
  const from = { x: box.x + box.width / 2, y: box.y + box.height / 2 };
  await drag(page, from, { x: from.x + 60, y: from.y + 45 });
  const moved = (await label.boundingBox())!;
  expect(Math.abs(moved.x + moved.width / 2 - from.x - 60)).toBeLessThan(8);
  expect(Math.abs(moved.y + moved.height / 2 - from.y - 45)).toBeLessThan(8);
  const at = await label.evaluate((e) => [e.getAttribute('x'), e.getAttribute('y')]);

  const { text } = await exported(page);
  const { views } = sheetFromSvg(text) as { views: { labelOffsets: object }[] };
  expect(Object.keys(views[0]!.labelOffsets)).toHaveLength(1);
  const inFile = await page.evaluate((svg) => {
    const texts = [
      ...new DOMParser().parseFromString(svg, 'image/svg+xml').querySelectorAll('text'),
    ];
    const found = texts.find((t) => t.textContent === 'vessel')!;
    return [found.getAttribute('x'), found.getAttribute('y')];
  }, text);
  expect(inFile).toEqual(at);

  // Other edits leave it there, undo takes it back.
  await fill(page, 'temperature of A5', '60 °C');
  expect(await label.evaluate((e) => [e.getAttribute('x'), e.getAttribute('y')])).toEqual(at);
  await page.getByRole('button', { name: 'Undo' }).click();
  await page.getByRole('button', { name: 'Undo' }).click();
  await drawn(page);
  await expect.poll(async () => Math.abs((await label.boundingBox())!.x - box.x)).toBeLessThan(0.5);
  await context.close();
});

it('a double click places a state where the hand is, and a step of the selected run', async () => {
  const { page, context } = await h.open('?demo=retort');
  await drawn(page);
  const frame = (await page.locator('.page g[data-layer=frame] rect').boundingBox())!;
  const [x, y] = [frame.x + 0.2 * frame.width, frame.y + 0.2 * frame.height];
  await page.mouse.dblclick(x, y);
  await drawn(page);
  // 0.2 · 150 °C.
  await expect.poll(async () => number(await value(page, 'temperature of 1'))).toBeCloseTo(30, 0);
  await page.getByRole('button', { name: 'A6', exact: true }).click();
  await page.mouse.dblclick(x + 60, y + 25);
  await drawn(page);
  await expect.poll(() => page.getByLabel('temperature of A7', { exact: true }).count()).toBe(1);
  const at = await centre(page, 'vessel.step-1');
  expect(Math.hypot(at.x - x - 60, at.y - y - 25)).toBeLessThan(3);
  await context.close();
});

it('moving the sheet to another place keeps readings and moves absolute pressures', async () => {
  const { page, context } = await h.open('?demo=retort');
  await drawn(page);
  const facts = page.locator('.side dl > div');
  const pressure = async () =>
    plain(await facts.filter({ hasText: 'Pressure' }).first().innerText());
  await page.getByRole('button', { name: 'A1', exact: true }).click();
  // ISO 2533 at 1480 m: 84.76 kPa (computed); at 0 m its reference, 101.325 kPa.
  await expect.poll(pressure).toContain('84.76 kPa(a)');
  const [up, sentences] = [
    await centre(page, 'vessel.start'),
    await page
      .locator('.run .figure')
      .evaluateAll((all) => all.map((e) => (e as HTMLInputElement).value)),
  ];
  await fill(page, 'altitude at Quillmere pilot plant', '0 m');
  await expect.poll(pressure).toContain('101.3 kPa(a)');
  expect(
    await page
      .locator('.run .figure')
      .evaluateAll((all) => all.map((e) => (e as HTMLInputElement).value)),
  ).toEqual(sentences);
  const down = await centre(page, 'vessel.start');
  const frame = (await page.locator('.page g[data-layer=frame] rect').boundingBox())!;
  // 101.325 − 84.76 kPa of the 450 kPa of the axis.
  expect(Math.abs((up.y - down.y) / frame.height - 16.565 / 450)).toBeLessThan(0.002);
  expect(Math.abs(up.x - down.x)).toBeLessThan(0.5);
  expect(await page.locator('.page svg').textContent()).toContain('101.3');
  await context.close();

  // Two sites on one sheet: a state read elsewhere boils as it does there.
  const jam = await h.open('?demo=jam-pan');
  await drawn(jam.page);
  const T = async (tag: string) => number((await cells(jam.page, tag))[0]!);
  expect(await T('1')).toBeGreaterThan((await T('2')) + 3);
  await jam.page.getByRole('button', { name: '2', exact: true }).click();
  const reading = () => jam.page.getByLabel('pressure of 2', { exact: true }).inputValue();
  const before = await reading();
  await jam.page.getByLabel('site of 2').selectOption({ label: 'Low Meadow works' });
  await drawn(jam.page);
  await expect.poll(() => T('2')).toBe(await T('1'));
  expect(await reading()).toBe(before);
  await fill(jam.page, 'altitude at Low Meadow works', '0 m');
  // 373.1243 K at 101.325 kPa: IAPWS R6-95.
  await expect.poll(() => T('2')).toBe(100);
  await fill(jam.page, 'barometer at Low Meadow works', '100 kPa');
  // 372.755919 K at 0.1 MPa: IAPWS R7-97, table 36.
  await expect.poll(() => T('2')).toBe(99.6);
  await jam.context.close();
});
