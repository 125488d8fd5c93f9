import { afterAll, beforeAll, expect, it } from 'vitest';
import { sheetFromSvg } from '../../app/export/sheetInSvg.ts';
import { downloaded, drawn, harness, type Harness } from './harness.ts';

let h: Harness;
beforeAll(async () => {
  h = await harness();
});
afterAll(() => h.close());

it('opens a demo, reads its labels, switches to a logarithmic axis, zooms, exports, and opens the export as the same sheet', async () => {
  const { page, context, troubles } = await h.open('?demo=retort');
  await drawn(page);
  const figure = page.locator('.page svg');
  await expect.poll(() => figure.textContent()).toContain('boiling line');
  const text = await figure.textContent();
  for (const label of ['A1', 'A2', 'A3', 'A4', 'LIQUID WATER', 'STEAM', 'absolute'])
    expect(text).toContain(label);
  // ISO 2533 at 1480 m, geopotential: 84.76 kPa, computed, not published.
  expect(text).toContain('84.76');

  await page.getByLabel('scale of pressure').selectOption('logarithmic');
  // Ticks of a logarithmic axis, and none of them zero.
  const numbers = () =>
    page.evaluate(() =>
      [...document.querySelectorAll('.page svg text[text-anchor=end]')].map((t) =>
        Number((t.textContent ?? '').replace(/\s/g, '')),
      ),
    );
  await expect.poll(numbers).toEqual(expect.arrayContaining([10, 100, 1000]));
  expect(await numbers()).not.toContain(0);
  const before = await page.getByLabel('highest temperature on the map').inputValue();
  const box = (await figure.boundingBox())!;
  await page.mouse.move(box.x + box.width / 2, box.y + box.height / 3);
  for (let i = 0; i < 3; i++) await page.mouse.wheel(0, -120);
  await expect
    .poll(async () => Number(await page.getByLabel('highest temperature on the map').inputValue()))
    .toBeLessThan(Number(before));
  await drawn(page);

  const file = await downloaded(page, () => page.getByRole('button', { name: 'Export' }).click());
  expect(file.name).toBe('Bean-stew-pouches-trial-7.svg');
  const carried = sheetFromSvg(file.text) as { title: string; items: unknown[] };
  expect(carried.title).toBe('Bean stew pouches, trial 7');

  const other = await h.open('');
  await other.page.setInputFiles('input[type=file]', file.path);
  await drawn(other.page);
  const again = await downloaded(other.page, () =>
    other.page.getByRole('button', { name: 'Export' }).click(),
  );
  expect(sheetFromSvg(again.text)).toEqual(carried);
  expect(again.text).toBe(file.text);
  expect(troubles).toEqual([]);
  expect(other.troubles).toEqual([]);
  await context.close();
  await other.context.close();
});
