import { mkdtemp, writeFile } from 'node:fs/promises';
import { readFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, expect, it } from 'vitest';
import type { Page } from 'playwright-core';
import { sheetAsText } from '../../app/export/sheetInSvg.ts';
import { cells, drawn, fill, harness, number, plain, type Harness } from './harness.ts';

let h: Harness;
beforeAll(async () => {
  h = await harness();
});
afterAll(() => h.close());

const retort = readFileSync('public/demos/retort.json', 'utf8');
const messages = async (page: Page): Promise<string> =>
  plain(await page.locator('.messages').innerText());
const T = async (page: Page, tag: string) => number((await cells(page, tag))[0]!);
const kept = (page: Page) =>
  expect
    .poll(() => page.locator('.strip .saved').innerText(), { timeout: 5000 })
    .toBe('kept on this device');

it('two tabs on one sheet: the idle one follows, and where both edit both are kept', async () => {
  const one = await h.open('?demo=retort');
  await drawn(one.page);
  await kept(one.page);
  // The second tab opens the sheet from the list on this device.
  const two = await h.open('', undefined, { in: one.context });
  await two.page.locator('.kept button').first().click();
  await drawn(two.page);
  await kept(two.page);
  // Opening it there did nothing here.
  expect(await one.page.getByRole('button', { name: 'Undo' }).isDisabled()).toBe(true);

  await fill(one.page, 'temperature of A5', '80 °C');
  await expect.poll(() => T(two.page, 'A5')).toBe(80);
  await two.page.getByRole('button', { name: 'Undo' }).click();
  await expect.poll(() => T(one.page, 'A5')).toBe(65);

  // Both at once, each before it has heard of the other.
  await one.page.getByLabel('temperature of A6', { exact: true }).fill('40 °C');
  await two.page.getByLabel('temperature of A6', { exact: true }).fill('50 °C');
  await Promise.all([one, two].map(({ page }) => page.keyboard.press('Enter')));
  const told = async () => (await messages(one.page)) + (await messages(two.page));
  await expect.poll(told, { timeout: 5000 }).toContain('Another tab changed this sheet');
  expect([await T(one.page, 'A6'), await T(two.page, 'A6')]).toEqual([40, 50]);
  await Promise.all([kept(one.page), kept(two.page)]);
  const three = await h.open('', undefined, { in: one.context });
  await expect.poll(() => three.page.locator('.kept li').count()).toBe(2);
  expect([...one.troubles, ...two.troubles, ...three.troubles]).toEqual([]);
  await one.context.close();
});

it('a full storage is told once, the work stays, and is kept as soon as there is room', async () => {
  const { page, context, troubles } = await h.open('?demo=retort', undefined, {
    before: () => {
      type Put = (
        this: IDBObjectStore,
        value: unknown,
        key?: IDBValidKey,
      ) => IDBRequest<IDBValidKey>;
      const stores = IDBObjectStore.prototype as { put: Put };
      const { put } = stores;
      stores.put = function (value, key) {
        if ('storageFreed' in globalThis) return put.call(this, value, key);
        throw new DOMException('no room', 'QuotaExceededError');
      };
    },
  });
  await drawn(page);
  await expect.poll(() => messages(page)).toContain('could not keep the sheet');
  await page.getByRole('button', { name: 'Dismiss' }).click();
  await fill(page, 'temperature of A5', '80 °C');
  expect(await T(page, 'A5')).toBe(80);
  await expect.poll(() => page.locator('.strip .saved').innerText()).not.toContain('kept');
  expect(await messages(page)).toBe('');
  await page.evaluate(() => Object.assign(globalThis, { storageFreed: true }));
  await fill(page, 'temperature of A5', '81 °C');
  await expect.poll(() => messages(page)).toContain('kept on this device again');
  await kept(page);
  await page.reload();
  await drawn(page);
  await expect.poll(() => T(page, 'A5')).toBe(81);
  expect(troubles).toEqual([]);
  await context.close();
});

it('a worker lost once is started again, and one that cannot live is done without', async () => {
  for (const every of [false, true]) {
    const { page, context } = await h.open('?demo=retort', undefined, {
      before: every
        ? () => {
            globalThis.Worker = class extends EventTarget {
              onerror: ((event: Event) => void) | null = null;
              postMessage(): void {
                setTimeout(() => this.onerror?.(new Event('error')));
              }
              terminate(): void {
                this.onerror = null;
              }
            } as unknown as typeof Worker;
          }
        : () => {
            const Real = globalThis.Worker;
            let count = 0;
            globalThis.Worker = class extends Real {
              constructor(url: string | URL, options?: WorkerOptions) {
                super(url, options);
                if (count++ === 0)
                  setTimeout(() => void this.onerror?.(new ErrorEvent('error')), 30);
              }
            };
          },
    });
    await drawn(page);
    await expect.poll(() => messages(page)).toContain('interrupted and started again');
    await fill(page, 'temperature of A5', '80 °C');
    await expect.poll(() => T(page, 'A5')).toBe(80);
    await fill(page, 'altitude at Quillmere pilot plant', '0 m');
    await expect.poll(() => page.locator('.strip').innerText()).toContain('101');
    await context.close();
  }
});

it('broken, huge and hostile files are refused in words, and the work stays', async () => {
  const { page, context, troubles } = await h.open('?demo=retort');
  await drawn(page);
  await fill(page, 'temperature of A5', '80 °C');
  const folder = await mkdtemp(join(tmpdir(), 'simmerline-'));
  const sheet = JSON.parse(retort) as Record<string, unknown> & { items: object[] };
  const files: readonly (readonly [string, string, RegExp])[] = [
    ['half.json', retort.slice(0, 700), /half\.json was not opened: This is not a sheet/],
    ['picture.svg', '<svg xmlns="http://www.w3.org/2000/svg"/>', /picture\.svg was not opened/],
    ['newer.json', retort.replace('"version": 1', '"version": 9'), /version 9/],
    ['cold.json', retort.replace('22 °C', '-300 °C'), /items\[0\]\.start\.T: .*absolute zero/],
    [
      'deep.json',
      `{"version":1,"items":${'['.repeat(2e5)}${']'.repeat(2e5)}}`,
      /deep\.json was not/,
    ],
    ['huge.json', `[${'0,'.repeat(11 * 1024 * 1024)}0]`, /huge\.json was not .*larger/],
    [
      'vast.json',
      ' '.repeat(41 * 1024 * 1024),
      /vast\.json was not opened: it is larger than 40 MB/,
    ],
    [
      'script.svg',
      `<svg xmlns="http://www.w3.org/2000/svg" onload="alert(1)"><script>alert(2)</script><metadata><simmerline-sheet><img src="x" onerror="alert(3)"/></simmerline-sheet></metadata></svg>`,
      /script\.svg was not opened/,
    ],
    [
      'items.json',
      JSON.stringify({ ...sheet, items: Array.from({ length: 501 }, () => sheet.items[0]) }),
      /items\.json was not opened/,
    ],
    ['<b>name</b>.json', 'x', /<b>name<\/b>\.json was not opened/],
  ];
  let asked = 0;
  page.on('dialog', (dialog) => {
    asked++;
    void dialog.dismiss();
  });
  for (const [name, text, told] of files) {
    const path = join(folder, encodeURIComponent(name));
    await writeFile(path, text);
    if (name.includes('<'))
      await page.setInputFiles('input[type=file]', {
        name,
        mimeType: 'application/json',
        buffer: Buffer.from(text),
      });
    else await page.setInputFiles('input[type=file]', path);
    await expect.poll(() => messages(page), { timeout: 8000 }).toMatch(told);
    expect(await page.locator('.messages b, .messages img, .messages script').count()).toBe(0);
  }
  expect(asked).toBe(0);
  expect(await T(page, 'A5')).toBe(80);
  await page.getByRole('button', { name: 'Undo' }).click();
  await expect.poll(() => T(page, 'A5')).toBe(65);
  expect(troubles).toEqual([]);
  await context.close();
});

/** Drops a file on the page as a hand from the desktop does. */
const drop = (page: Page, name: string, text: string): Promise<void> =>
  page.evaluate(
    ([n, t]) => {
      const dataTransfer = new DataTransfer();
      dataTransfer.items.add(new File([t!], n!));
      for (const kind of ['dragover', 'drop'])
        document.body.dispatchEvent(
          new DragEvent(kind, { dataTransfer, bubbles: true, cancelable: true }),
        );
    },
    [name, text],
  );

it('a file dropped on the page opens, on the start and on the workplace alike', async () => {
  const { page, context, troubles } = await h.open('');
  await drop(page, 'trial.json', retort);
  await drawn(page);
  expect(await page.getByLabel('name of the sheet').inputValue()).toBe(
    'Bean stew pouches, trial 7',
  );
  const other = retort.replace('Bean stew pouches, trial 7', 'Lentils, trial 2');
  await drop(
    page,
    'trial.svg',
    `<svg><metadata><simmerline-sheet>${sheetAsText(JSON.parse(other) as object)}</simmerline-sheet></metadata></svg>`,
  );
  await expect
    .poll(() => page.getByLabel('name of the sheet').inputValue())
    .toBe('Lentils, trial 2');
  await drawn(page);
  await drop(page, 'notes.txt', 'buy lentils');
  await expect.poll(() => messages(page)).toContain('notes.txt was not opened');
  expect(await page.getByLabel('name of the sheet').inputValue()).toBe('Lentils, trial 2');
  expect(troubles).toEqual([]);
  await context.close();
});

it('a sheet of a substance that is not known says so, and shows nothing of another sheet', async () => {
  const { page, context } = await h.open('?demo=retort');
  await drawn(page);
  await drop(page, 'x.json', retort.replace('"water"', '"constructor"'));
  await expect.poll(() => messages(page)).toContain('could not be evaluated');
  expect(await page.locator('.page svg').isVisible()).toBe(false);
  // The page lives on.
  await page.getByRole('button', { name: 'Sheets' }).click();
  await page.locator('.demo svg text').first().waitFor();
  await context.close();
});
