import { readFileSync } from 'node:fs';
import { afterAll, beforeAll, expect, it } from 'vitest';
import type { Page } from 'playwright-core';
import { demos } from '../../app/editor/demos.ts';
import { cells, drawn, fill, harness, number, plain, type Harness } from './harness.ts';

let h: Harness;
beforeAll(async () => {
  h = await harness();
});
afterAll(() => h.close());

const axe = readFileSync('node_modules/axe-core/axe.min.js', 'utf8');

interface Axe {
  run: (
    on: Document,
    options: object,
  ) => Promise<{
    violations: { id: string; nodes: { html: string; failureSummary: string }[] }[];
    passes: unknown[];
  }>;
}

/** What axe-core finds against WCAG 2.2 A and AA; it must have looked at something. */
async function barriers(page: Page): Promise<readonly string[]> {
  await page.evaluate(axe);
  return page.evaluate(async () => {
    const { axe } = globalThis as unknown as { axe: Axe };
    const { violations, passes } = await axe.run(document, {
      runOnly: ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'],
      resultTypes: ['violations'],
    });
    if (passes.length < 5) return ['nothing was looked at'];
    return violations.flatMap(({ id, nodes }) =>
      nodes.map(({ html, failureSummary }) => `${id}: ${html.slice(0, 160)} ${failureSummary}`),
    );
  });
}

const sizes = [
  [1366, 768],
  [1920, 1080],
  [820, 1180],
  // 1366 × 768 at 200 %.
  [683, 384],
] as const;

/** Controls that a size leaves out at the side or shrinks to nothing. */
const lost = (page: Page): Promise<readonly string[]> =>
  page.evaluate(() => {
    const out: string[] = [];
    const wide = document.documentElement.scrollWidth;
    if (wide > innerWidth) out.push(`the page is ${wide} wide`);
    for (const e of document.querySelectorAll(
      'button, input:not([type=file]), select, [tabindex]',
    )) {
      const { left, right, width, height } = e.getBoundingClientRect();
      const name = e.getAttribute('aria-label') ?? e.textContent;
      // The run table scrolls by itself where it must.
      const { scrollWidth = innerWidth } = e.closest('.run') ?? {};
      if (width < 1 || height < 1) out.push(`${name} has no size`);
      else if (left < -0.5 || right > Math.max(innerWidth, scrollWidth) + 0.5)
        out.push(`${name} lies outside`);
    }
    return out;
  });

it('the start has no barriers, at any size', async () => {
  const { page, context } = await h.open('');
  await expect
    .poll(() =>
      page
        .locator('.demo svg')
        .filter({ has: page.locator('text') })
        .count(),
    )
    .toBe(demos.length);
  // With a sheet kept here, a refused figure and an answer.
  await page.locator('.demo').first().click();
  await drawn(page);
  await page.getByRole('button', { name: 'Sheets' }).click();
  await page.locator('.kept').waitFor();
  await page.getByLabel('altitude or barometer of the plant').fill('on the hill');
  await page.keyboard.press('Enter');
  await page.getByRole('alert').waitFor();
  await page.getByLabel('a reading of your gauge or thermometer').fill('1.2 bar(g)');
  expect(await barriers(page)).toEqual([]);
  for (const [width, height] of sizes) {
    await page.setViewportSize({ width, height });
    await expect.poll(() => lost(page), { message: `${width} × ${height}` }).toEqual([]);
  }
  await context.close();
});

it.each(demos)(
  'the workplace with the demo %s has no barriers, and loses no control at any size',
  async (demo) => {
    const { page, context, troubles } = await h.open(`?demo=${demo}`);
    await drawn(page);
    expect(await barriers(page)).toEqual([]);
    for (const [width, height] of sizes) {
      await page.setViewportSize({ width, height });
      await expect.poll(() => lost(page), { message: `${width} × ${height}` }).toEqual([]);
      // The map keeps a size that can be read.
      await expect
        .poll(async () => (await page.locator('.page').boundingBox())!.width)
        .toBeGreaterThan(250);
    }
    expect(troubles).toEqual([]);
    await context.close();
  },
);

it('refused figures, selections and messages are no barriers either', async () => {
  const { page, context } = await h.open('?demo=retort');
  await drawn(page);
  await page.getByRole('button', { name: 'A3', exact: true }).click();
  await fill(page, 'temperature of A1', '-300 °C');
  await page.getByRole('alert').waitFor();
  await page.setInputFiles('input[type=file]', {
    name: 'x.json',
    mimeType: 'application/json',
    buffer: Buffer.from('x'),
  });
  await page.locator('.messages p').waitFor();
  // Told to those who do not see it.
  expect(await page.locator('.messages').getAttribute('aria-live')).toBe('polite');
  await page.setViewportSize({ width: 683, height: 384 });
  expect(await barriers(page)).toEqual([]);
  await expect.poll(() => lost(page)).toEqual([]);
  await page.getByRole('button', { name: 'Dismiss' }).click();
  await page.getByRole('button', { name: 'boiling line' }).first().click();
  expect(await barriers(page)).toEqual([]);
  await context.close();
});

it('draws with forced colours, less motion and a dark scheme, and nothing moves by itself', async () => {
  const { page, context, troubles } = await h.open('?demo=retort', undefined, {
    forcedColors: 'active',
    reducedMotion: 'reduce',
    colorScheme: 'dark',
  });
  await drawn(page);
  expect(await page.evaluate(() => document.getAnimations().length)).toBe(0);
  // The map keeps its own colours: it is the page that will be printed.
  const line = page.locator('.page g[data-layer=boundaries] path').last();
  const stroke = await line.evaluate((e) => [getComputedStyle(e).stroke, e.getAttribute('stroke')]);
  expect(stroke[1]).toBeTruthy();
  // Buttons and figures have edges that can be seen where backgrounds are taken away.
  for (const name of ['Export', 'A1']) {
    const button = page.getByRole('button', { name, exact: true });
    const width = await button.evaluate((e) => getComputedStyle(e).borderTopWidth);
    expect(Number.parseFloat(width)).toBeGreaterThan(0);
  }
  expect(await lost(page)).toEqual([]);
  expect(troubles).toEqual([]);
  await context.close();
});

it('tells the map in words: its lines, its points and its states, as they change', async () => {
  const { page, context } = await h.open('?demo=retort');
  await drawn(page);
  const told = page.getByRole('region', { name: 'The map in words' });
  const text = async () => plain((await told.textContent()) ?? '');
  const first = await text();
  expect(first).toContain('Temperature from 0.0 °C to 150.0 °C, pressure from 0 kPa(a) to 450');
  expect(first).toContain('boiling line, from ');
  expect(first).toMatch(/triple point, 0\.0 °C and 0\.6117 kPa\(a\)/);
  expect(await told.locator('li', { hasText: /^A[1-6]/ }).count()).toBe(6);
  await fill(page, 'temperature of A5', '80 °C');
  // As the run table tells it.
  const [T, p, phase, next] = await cells(page, 'A5');
  expect(number(T!)).toBe(80);
  await expect.poll(text).toContain(`A5, ${T} and ${p}, ${phase}, ${next}.`);
  await page.getByRole('button', { name: 'hide boiling line' }).click();
  await drawn(page);
  await expect.poll(text).not.toContain('boiling line, from');
  await page.getByRole('button', { name: 'Add a state' }).click();
  await drawn(page);
  await expect.poll(() => told.locator('li', { hasText: /^1, 20/ }).count()).toBe(1);
  await context.close();
});
