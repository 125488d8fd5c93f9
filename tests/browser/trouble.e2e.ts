import { mkdtemp, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { downloaded, drawn, harness, type Harness } from './harness.ts';

let h: Harness;
beforeAll(async () => {
  h = await harness();
});
afterAll(() => h.close());

async function file(name: string, text: string): Promise<string> {
  const path = join(await mkdtemp(join(tmpdir(), 'simmerline-')), name);
  await writeFile(path, text);
  return path;
}

it('refuses broken, newer, huge and hostile files with a clear message and keeps the work', async () => {
  const { page, context, troubles } = await h.open('?demo=retort');
  await drawn(page);
  const messages = page.locator('.messages');
  const give = async (name: string, text: string) =>
    page.setInputFiles('input[type=file]', await file(name, text));

  await give('broken.json', '{"version": 1, "title": "half');
  await expect.poll(() => messages.innerText()).toContain('broken.json was not opened');
  await give('newer.json', '{"version": 99}');
  await expect.poll(() => messages.innerText()).toMatch(/newer\.json was not opened.*newer/s);
  await give('huge.json', `"${'x'.repeat(41 * 1024 * 1024)}"`);
  await expect.poll(() => messages.innerText()).toContain('huge.json was not opened');
  await give(
    'hostile.svg',
    '<svg xmlns="http://www.w3.org/2000/svg" onload="document.title=\'taken\'"><script>document.title="taken"</script><metadata><simmerline-sheet>{"version":1,"__proto__":{"polluted":1}}</simmerline-sheet></metadata></svg>',
  );
  await expect.poll(() => messages.innerText()).toContain('hostile.svg was not opened');
  expect(await page.title()).toBe('Simmerline');
  expect(await page.evaluate(() => ({}) as { polluted?: number }).then((o) => o.polluted)).toBe(
    undefined,
  );
  // The sheet is still there, and still to be worked on.
  expect(await page.getByLabel('name of the sheet').inputValue()).toBe(
    'Bean stew pouches, trial 7',
  );
  expect(troubles).toEqual([]);
  await context.close();
});

it('never takes text for markup, on the page or in an export', async () => {
  const { page, context, troubles } = await h.open('?demo=jam-pan');
  await drawn(page);
  const bad = '<img src=x onerror="document.title=1"> & "quotes" ]]>';
  await page.getByRole('button', { name: '3', exact: true }).click();
  await page.getByLabel('name of 3', { exact: true }).fill(bad);
  await page.keyboard.press('Enter');
  await drawn(page);
  await expect.poll(() => page.locator('.page svg').textContent()).toContain(bad);
  expect(await page.locator('.page img, .run img').count()).toBe(0);
  const { text } = await downloaded(page, () =>
    page.getByRole('button', { name: 'Export' }).click(),
  );
  expect(text).toContain('&lt;img src=x');
  expect(text).not.toMatch(
    /<(img|script|style|foreignObject|image|use|a)[\s>]|<[^>]*\s(on\w+|href)=/,
  );
  expect(troubles).toEqual([]);
  await context.close();
});

it('tells a full storage once, keeps the work, and keeps it again when there is room', async () => {
  const { page, context } = await h.open('');
  await page.addInitScript(() => {
    const real = Object.getOwnPropertyDescriptor(IDBObjectStore.prototype, 'put')!.value as (
      ...args: unknown[]
    ) => unknown;
    (globalThis as unknown as { full: boolean }).full = true;
    IDBObjectStore.prototype.put = function (this: IDBObjectStore, ...args: unknown[]) {
      if ((globalThis as unknown as { full: boolean }).full)
        throw new DOMException('full', 'QuotaExceededError');
      return real.apply(this, args) as IDBRequest<IDBValidKey>;
    };
  });
  await page.goto(`${h.url}?demo=retort`);
  await drawn(page);
  const messages = page.locator('.messages');
  await expect.poll(() => messages.innerText()).toContain('could not keep the sheet');
  await page.evaluate(() => {
    (globalThis as unknown as { full: boolean }).full = false;
  });
  await page.getByLabel('name of the sheet').fill('Second trial');
  await page.keyboard.press('Enter');
  await expect.poll(() => messages.innerText()).toContain('kept on this device again');
  expect(await page.getByLabel('name of the sheet').inputValue()).toBe('Second trial');
  await context.close();
});

it('starts a lost worker again and draws what was asked', async () => {
  const { page, context } = await h.open('');
  await page.addInitScript(() => {
    const Real = Worker;
    let lost = 0;
    globalThis.Worker = class extends Real {
      override postMessage(...args: [unknown]): void {
        if (lost++ === 1) this.dispatchEvent(new ErrorEvent('error', { message: 'lost' }));
        else super.postMessage(...args);
      }
    };
  });
  await page.goto(`${h.url}?demo=retort`);
  await drawn(page);
  await page.getByLabel('temperature of A5', { exact: true }).fill('50 °C');
  await page.keyboard.press('Enter');
  await expect.poll(() => page.locator('.messages').innerText()).toContain('nothing was lost');
  await expect
    .poll(() => page.locator('.run tbody tr').nth(4).locator('td').nth(1).innerText())
    .toMatch(/^50/);
  await context.close();
});

it('keeps two tabs on one sheet from losing each other’s work', async () => {
  const { page, context } = await h.open('?demo=retort');
  await drawn(page);
  await expect.poll(() => page.locator('.saved').innerText()).toContain('kept');
  const other = await context.newPage();
  await other.goto(h.url);
  await other.locator('.kept button').first().click();
  await drawn(other);
  await page.getByLabel('name of the sheet').fill('From the first tab');
  await page.keyboard.press('Enter');
  await expect
    .poll(() => other.getByLabel('name of the sheet').inputValue())
    .toBe('From the first tab');
  await context.close();
});

it('asks nothing of any other place, breaks no content policy, and works on without a network', async () => {
  const { page, context, troubles } = await h.open('');
  const asked: string[] = [];
  page.on('request', (request) => asked.push(request.url()));
  await page.goto(`${h.url}?demo=carbon-dioxide`);
  await drawn(page);
  expect(asked.filter((url) => !/^(data:|blob:)/.test(url) && !url.startsWith(h.url))).toEqual([]);
  expect(
    await page.locator('meta[http-equiv="Content-Security-Policy"]').getAttribute('content'),
  ).toContain("default-src 'none'");
  await context.setOffline(true);
  await page.getByLabel('unit of temperature').selectOption('°F');
  await drawn(page);
  await expect.poll(() => page.locator('.page svg').textContent()).toContain('°F');
  await downloaded(page, () => page.getByRole('button', { name: 'Export' }).click());
  expect(troubles).toEqual([]);
  await context.close();
});
