import { readFileSync } from 'node:fs';
import type { Page } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { drawn, harness, type Harness } from './harness.ts';

const axeSource = readFileSync('node_modules/axe-core/axe.min.js', 'utf8');

let h: Harness;
beforeAll(async () => {
  h = await harness();
});
afterAll(() => h.close());

/** Violations of WCAG 2.2 AA as axe-core finds them. */
async function violations(page: Page): Promise<string[]> {
  // Through the debugger, past the page's own content policy.
  await page.evaluate(axeSource);
  return page.evaluate(async () => {
    const axe = (
      globalThis as unknown as {
        axe: {
          run: (
            o: object,
          ) => Promise<{ violations: { id: string; nodes: { target: string[] }[] }[] }>;
        };
      }
    ).axe;
    const { violations } = await axe.run({
      runOnly: ['wcag2a', 'wcag2aa', 'wcag21a', 'wcag21aa', 'wcag22aa'],
    });
    return violations.map(
      ({ id, nodes }) => `${id}: ${nodes.map((n) => n.target.join(' ')).join('; ')}`,
    );
  });
}

describe('every screen passes axe-core at WCAG 2.2 AA', () => {
  it.each(['', '?demo=retort', '?demo=carbon-dioxide', '?demo=jam-pan', '?demo=ices'])(
    '%s',
    async (path) => {
      const { page, context } = await h.open(path);
      if (path) await drawn(page);
      else await page.locator('.demo svg text').first().waitFor();
      expect(await violations(page)).toEqual([]);
      await context.close();
    },
  );

  it('with an error told, a message shown and something selected', async () => {
    const { page, context } = await h.open('?demo=retort');
    await drawn(page);
    await page.getByRole('button', { name: 'A2', exact: true }).click();
    await page.getByLabel('temperature of A5', { exact: true }).fill('sixty');
    await page.keyboard.press('Enter');
    await page.getByRole('alert').waitFor();
    await page.setInputFiles('input[type=file]', {
      name: 'broken.json',
      mimeType: 'application/json',
      buffer: Buffer.from('{'),
    });
    await page.locator('.messages p').waitFor();
    expect(await violations(page)).toEqual([]);
    await context.close();
  });
});

describe('nothing is lost at', () => {
  it.each([
    ['1366 × 768', 1366, 768],
    ['1920 × 1080', 1920, 1080],
    ['a tablet', 820, 1180],
    ['200 % zoom', 683, 384],
  ])('%s', async (_, width, height) => {
    const { page, context } = await h.open('?demo=retort', { width, height });
    await drawn(page);
    const lost = await page.evaluate(() => {
      const wide = document.documentElement.scrollWidth - document.documentElement.clientWidth;
      const out = [...document.querySelectorAll('.strip button, .reading input, .page')]
        .filter((e) => {
          const { left, right, width } = e.getBoundingClientRect();
          return width === 0 || left < -1 || right > document.documentElement.clientWidth + 1;
        })
        .map((e) => e.className || e.textContent);
      return { wide, out };
    });
    expect(lost).toEqual({ wide: 0, out: [] });
    // What does not fit is reached by scrolling.
    await page.getByRole('button', { name: 'Show the run' }).scrollIntoViewIfNeeded();
    await page.getByRole('button', { name: 'Show the run' }).click({ trial: true });
    await context.close();
  });
});

it('draws with reduced motion and in forced colours', async () => {
  const { page, context } = await h.open('?demo=retort');
  await page.emulateMedia({ reducedMotion: 'reduce', forcedColors: 'active' });
  await drawn(page);
  expect(await page.locator('.page svg').textContent()).toContain('LIQUID WATER');
  await context.close();
});

it('does the whole job by keyboard alone', async () => {
  const { page, context } = await h.open('');
  await page.locator('.demo svg text').first().waitFor();
  const focused = () =>
    page.evaluate(() => {
      const e = document.activeElement;
      return e?.getAttribute('aria-label') ?? e?.textContent ?? '';
    });
  /** Tabs on until the wanted control has the focus. */
  const to = async (wanted: string): Promise<void> => {
    for (let i = 0; i < 120; i++) {
      if ((await focused()).startsWith(wanted)) return;
      await page.keyboard.press('Tab');
    }
    throw new Error(`not reached by Tab: ${wanted}`);
  };
  const type = async (text: string): Promise<void> => {
    await page.keyboard.press('Control+A');
    await page.keyboard.type(text);
    await page.keyboard.press('Enter');
    await drawn(page).catch(() => undefined);
  };
  await to('altitude or barometer');
  await page.keyboard.press('Control+A');
  await page.keyboard.type('1480 m');
  await page.keyboard.press('Enter');
  await to('Draw it');
  await page.keyboard.press('Enter');
  await drawn(page);
  await to('Plan a run');
  await page.keyboard.press('Enter');
  await drawn(page);
  await to('temperature of A1');
  await type('30 °C');
  await to('Add a step');
  await page.keyboard.press('Enter');
  await drawn(page);
  await to('temperature of A2');
  await type('80 °C');
  await expect
    .poll(() => page.locator('.run tbody tr').nth(1).locator('td').nth(1).innerText())
    .toMatch(/^80/);

  // The selected end is nudged on the map itself.
  await to('A2');
  await page.keyboard.press('Enter');
  await to('Pressure–temperature map');
  for (let i = 0; i < 5; i++) await page.keyboard.press('Shift+ArrowRight');
  await expect
    .poll(async () =>
      Number.parseFloat(
        await page.locator('.run tbody tr').nth(1).locator('td').nth(1).innerText(),
      ),
    )
    .toBeGreaterThan(80.5);
  await page.keyboard.press('Control+Z');
  await expect
    .poll(() => page.locator('.run tbody tr').nth(1).locator('td').nth(1).innerText())
    .toMatch(/^80/);
  await to('Export');
  const [download] = await Promise.all([
    page.waitForEvent('download'),
    page.keyboard.press('Enter'),
  ]);
  expect(download.suggestedFilename()).toMatch(/\.svg$/);
  await context.close();
});
