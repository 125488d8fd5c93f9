/*
 * What a user waits for, measured in Chromium: `npm run bench:browser`. Figures for the record, each
 * beside its goal; a goal missed is said, not thrown.
 */
import { mkdtemp, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { gzipSync } from 'node:zlib';
import type { Page } from 'playwright-core';
import { build } from 'vite';
import { drawn, harness, type Harness } from '../browser/harness.ts';
import { heavySheet } from './heavySheet.ts';
import { report } from './report.ts';

/** A frame, in ms, less what the browser itself needs of 1/60 s. */
const frame = 8;
const moves = 60;

const share = (list: readonly number[], k: number): number =>
  [...list].sort((a, b) => a - b)[Math.min(list.length - 1, Math.floor(k * list.length))]!;

/** Waits until the page has nothing left to evaluate or draw; a move is worked off in the next frame. */
async function settled(page: Page): Promise<void> {
  await page.evaluate(() => new Promise((done) => requestAnimationFrame(() => setTimeout(done))));
  await page.waitForFunction(
    () => document.querySelector('.workplace')?.getAttribute('aria-busy') !== 'true',
  );
}

/** Leads the point drawn for `of` round in small circles and reports what each move took. */
async function drag(page: Page, name: string, of: string): Promise<void> {
  const box = (await page.locator(`.page svg circle[data-of="${of}"]`).boundingBox())!;
  const [x, y] = [box.x + box.width / 2, box.y + box.height / 2];
  await page.mouse.move(x, y);
  await page.mouse.down();
  await settled(page);
  const each = new Map<string, number[]>();
  for (let i = 0; i < moves; i++) {
    await page.evaluate(() => {
      globalThis.simmerlineTimes = [];
    });
    const angle = (i / 15) * 2 * Math.PI;
    await page.mouse.move(x + 12 - 12 * Math.cos(angle), y + 12 * Math.sin(angle));
    await settled(page);
    const times = await page.evaluate(() => globalThis.simmerlineTimes ?? []);
    const sums = new Map<string, number>();
    for (const { name: part, ms } of times) sums.set(part, (sums.get(part) ?? 0) + ms);
    // The first moves run code that no engine has made fast yet.
    if (sums.has('evaluate') && i >= 5) {
      sums.set(
        'whole',
        ['evaluate', 'compose', 'draw'].reduce((sum, part) => sum + (sums.get(part) ?? 0), 0),
      );
      for (const [part, ms] of sums) each.set(part, [...(each.get(part) ?? []), ms]);
    }
  }
  await page.mouse.up();
  await settled(page);
  const whole = each.get('whole') ?? [];
  if (whole.length < moves / 2)
    throw new Error(`${name}: only ${whole.length} moves changed a thing`);
  report(`${name}: a move, median`, share(whole, 0.5) / frame, 1, ' frames');
  report(`${name}: a move, 95th percentile`, share(whole, 0.95) / frame, 1, ' frames');
  for (const [part, list] of each)
    console.log(
      `  ${part}: median ${share(list, 0.5).toFixed(1)} ms, 95 % ${share(list, 0.95).toFixed(1)} ms`,
    );
}

async function drags(h: Harness): Promise<void> {
  const demo = await h.open('?demo=retort');
  await drawn(demo.page);
  await drag(demo.page, 'demo, the end of its cooling', 'vessel.cooling');
  await demo.context.close();

  const path = join(await mkdtemp(join(tmpdir(), 'simmerline-')), 'heavy.json');
  await writeFile(path, JSON.stringify(heavySheet()));
  for (const [name, of] of [
    ['a free state', 'state-7'],
    ['the first step of twenty', 'path-0.s0'],
    ['a late step of twenty', 'path-1.s16'],
  ] as const) {
    const { page, context } = await h.open('');
    await page.setInputFiles('input[type=file]', path);
    await drawn(page);
    await drag(page, `heavy sheet, ${name}`, of);
    await context.close();
  }
}

/** Compressed script of a first load, and the time to the drawn demo. */
async function load(h: Harness): Promise<void> {
  const times: number[] = [];
  let bytes = 0;
  for (let i = 0; i < 5; i++) {
    const context = await h.browser.newContext({ viewport: { width: 1366, height: 768 } });
    const page = await context.newPage();
    const scripts: Promise<Buffer>[] = [];
    page.on('response', (response) => {
      if (/javascript/.test(response.headers()['content-type'] ?? ''))
        scripts.push(response.body());
    });
    await page.addInitScript(() => {
      new MutationObserver((_, observer) => {
        if (!document.querySelector('.page svg text')) return;
        observer.disconnect();
        performance.mark('drawn');
      }).observe(document, { childList: true, subtree: true });
    });
    await page.goto(`${h.url}?demo=retort`);
    await drawn(page);
    times.push(await page.evaluate(() => performance.getEntriesByName('drawn')[0]!.startTime));
    bytes = (await Promise.all(scripts)).reduce((sum, body) => sum + gzipSync(body).length, 0);
    await context.close();
  }
  report('script at first load, gzip', bytes / 1000, 220, ' kB');
  report('from navigation to the drawn demo, median', share(times, 0.5), 1000, ' ms');
}

if (!process.argv.includes('--built'))
  await build({ configFile: 'vite.config.ts', logLevel: 'warn' });
const h = await harness();
try {
  await load(h);
  await drags(h);
} finally {
  await h.close();
}
