import { afterAll, beforeAll, expect, it } from 'vitest';
import type { Page } from 'playwright-core';
import { sheetFromSvg } from '../../app/export/sheetInSvg.ts';
import { cells, downloaded, drawn, harness, number, type Harness } from './harness.ts';

let h: Harness;
beforeAll(async () => {
  h = await harness();
});
afterAll(() => h.close());

/** What has the focus: its label, or its text. */
const focused = (page: Page): Promise<string> =>
  page.evaluate(() => {
    const e = document.activeElement;
    return e?.getAttribute('aria-label') ?? e?.textContent ?? '';
  });

/** Presses Tab (or Shift+Tab) until the focus is on what bears the name, and shows that it is there. */
async function tabTo(page: Page, name: string | RegExp, key = 'Tab'): Promise<void> {
  const passed: string[] = [];
  for (let i = 0; i < 80; i++) {
    await page.keyboard.press(key);
    const now = await focused(page);
    if (typeof name === 'string' ? now === name : name.test(now)) {
      const ring = await page.evaluate(
        () => getComputedStyle(document.activeElement!).outlineStyle,
      );
      expect(ring, `a visible focus on ${now}`).not.toBe('none');
      return;
    }
    passed.push(now);
  }
  throw new Error(`${String(name)} is not reached by ${key}: ${passed.join(' | ')}`);
}

/** Types over the figure that has the focus. */
async function type(page: Page, text: string): Promise<void> {
  await page.keyboard.press('Control+a');
  await page.keyboard.type(text);
  await page.keyboard.press('Enter');
}

it('does the whole job by keyboard alone', async () => {
  const { page, context, troubles } = await h.open('');
  await page.locator('.demo svg text').first().waitFor();
  await tabTo(page, 'altitude or barometer of the plant');
  await type(page, '1480 m');
  await tabTo(page, 'Draw it');
  await page.keyboard.press('Enter');
  await drawn(page);
  await tabTo(page, 'Plan a run');
  await page.keyboard.press('Space');
  await drawn(page);

  await tabTo(page, 'temperature of A1', 'Shift+Tab');
  await type(page, '25 °C');
  await drawn(page);
  // A figure keeps the focus when it is taken, so that Tab goes on from there.
  expect(await focused(page)).toBe('temperature of A1');
  await page.keyboard.press('Tab');
  expect(await focused(page)).toBe('pressure of A1');
  await type(page, '0 bar(g)');
  await drawn(page);
  expect(await focused(page)).toBe('pressure of A1');

  await tabTo(page, 'Add a step');
  await page.keyboard.press('Enter');
  await drawn(page);
  await tabTo(page, 'end of step of A2', 'Shift+Tab');
  await page.keyboard.type('the boiling');
  await drawn(page);
  expect(await page.getByLabel('end of step of A2').inputValue()).toBe('saturation');
  expect(await focused(page)).toBe('end of step of A2');
  await tabTo(page, 'Add a step');
  await page.keyboard.press('Enter');
  await drawn(page);
  await tabTo(page, 'end of step of A3', 'Shift+Tab');
  await page.keyboard.type('a share of vap');
  await drawn(page);
  await tabTo(page, 'share of vapour of A3', 'Shift+Tab');
  await type(page, '100 %');
  await tabTo(page, 'time or rate of A3');
  await type(page, '30 min');
  await drawn(page);

  // The numbers of the run, as in the run done by mouse.
  const [a2, a3] = [await cells(page, 'A2'), await cells(page, 'A3')];
  expect(Math.abs(number(a2[5]!) - 293.3)).toBeLessThan(1);
  expect(Math.abs(number(a3[5]!) - 2269.5)).toBeLessThan(2);

  // Choose the start, go to the map, nudge it: a small step, then a tenfold one.
  await tabTo(page, 'A1', 'Shift+Tab');
  await page.keyboard.press('Enter');
  await tabTo(page, /^Pressure–temperature map/, 'Shift+Tab');
  const T = async () => number(await page.getByLabel('temperature of A1').inputValue());
  const before = await T();
  await page.keyboard.press('ArrowRight');
  await drawn(page);
  await expect.poll(T).toBeGreaterThan(before);
  const small = (await T()) - before;
  await page.keyboard.press('Shift+ArrowRight');
  await drawn(page);
  await expect.poll(T).toBeGreaterThan(before + 8 * small);
  // Both nudges in a row are one thing done.
  await page.keyboard.press('Control+z');
  await drawn(page);
  await expect.poll(T).toBe(before);
  await page.keyboard.press('Control+Shift+Z');
  await drawn(page);
  await expect.poll(T).toBeGreaterThan(before);
  await page.keyboard.press('Control+z');

  // Let go, then the arrows move the map and plus draws nearer.
  await page.keyboard.press('Escape');
  const low = async () =>
    number(await page.getByLabel('lowest temperature on the map').inputValue());
  const lowest = await low();
  await page.keyboard.press('ArrowRight');
  await drawn(page);
  await expect.poll(low).toBeGreaterThan(lowest);
  await page.keyboard.press('Control+z');
  await drawn(page);
  await expect.poll(low).toBe(lowest);

  // A second run is made and taken away again.
  await tabTo(page, 'A2');
  await page.keyboard.press('Enter');
  await page.keyboard.press('Control+d');
  await drawn(page);
  await expect.poll(() => page.getByRole('button', { name: 'B3', exact: true }).count()).toBe(1);
  await page.keyboard.press('Control+z');
  await drawn(page);
  await expect.poll(() => page.getByRole('button', { name: 'B3', exact: true }).count()).toBe(0);

  await tabTo(page, 'Export', 'Shift+Tab');
  const file = await downloaded(page, () => page.keyboard.press('Enter'));
  const sheet = sheetFromSvg(file.text) as { items: { steps: { time?: string }[] }[] };
  expect(sheet.items[0]!.steps.map(({ time }) => time)).toEqual([undefined, '30 min']);
  expect(troubles).toEqual([]);
  await context.close();
});

it('a refused figure keeps the focus and the text, says why, and Escape brings the old one back', async () => {
  const { page, context } = await h.open('?demo=retort');
  await drawn(page);
  await tabTo(page, 'temperature of A1');
  await type(page, '-300 °C');
  expect(await focused(page)).toBe('temperature of A1');
  const field = page.getByLabel('temperature of A1', { exact: true });
  expect(await field.getAttribute('aria-invalid')).toBe('true');
  expect(await page.getByRole('alert').textContent()).toContain('absolute zero');
  expect(await field.inputValue()).toBe('-300 °C');
  await page.keyboard.press('Escape');
  expect(number(await field.inputValue())).toBe(22);
  expect(await page.getByRole('alert').count()).toBe(0);
  expect(await page.getByRole('button', { name: 'Undo' }).isDisabled()).toBe(true);
  await context.close();

  // A new map is not drawn at another place than the sentence says.
  const start = await h.open('');
  await tabTo(start.page, 'altitude or barometer of the plant');
  await type(start.page, 'on the hill');
  await tabTo(start.page, 'Draw it');
  await start.page.keyboard.press('Enter');
  expect(await focused(start.page)).toBe('altitude or barometer of the plant');
  expect(await start.page.locator('.workplace').count()).toBe(0);
  await type(start.page, '620 hPa');
  await tabTo(start.page, 'Draw it');
  await start.page.keyboard.press('Enter');
  await drawn(start.page);
  expect(await start.page.locator('.strip').innerText()).toContain('62');
  await start.context.close();
});
