import { mkdtemp, readFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import {
  chromium,
  type Browser,
  type BrowserContext,
  type BrowserContextOptions,
  type Page,
} from 'playwright-core';
import { preview, type PreviewServer } from 'vite';
import { chromiumArguments, chromiumPath } from './chromium.ts';

/** A page, its context, and what went wrong or out on it. */
export interface Opened {
  readonly page: Page;
  readonly context: BrowserContext;
  /** Console errors and warnings (among them breaches of the content policy) and page errors. */
  readonly troubles: string[];
  /** Addresses asked for that are not on this page's own host. */
  readonly strangers: string[];
}

type More = BrowserContextOptions & {
  /** Script that runs before the page's own, and what it is called with. */
  readonly before?: () => void;
  /** A context to open one more tab in. */
  readonly in?: BrowserContext;
};

/** The built page in a real Chromium. */
export interface Harness {
  readonly url: string;
  readonly browser: Browser;
  /** A page in a context of its own; of a size, and with what else a context takes. */
  open: (path?: string, size?: { width: number; height: number }, more?: More) => Promise<Opened>;
  close: () => Promise<void>;
}

export async function harness(): Promise<Harness> {
  const server: PreviewServer = await preview({
    configFile: 'vite.config.ts',
    preview: { port: 0, host: '127.0.0.1' },
    logLevel: 'error',
  });
  const url = server.resolvedUrls!.local[0]!;
  const browser = await chromium.launch({
    executablePath: await chromiumPath(),
    args: chromiumArguments,
  });
  return {
    url,
    browser,
    open: async (path = '', size = { width: 1366, height: 768 }, more = {}) => {
      const { before, in: existing, ...options } = more;
      const context =
        existing ??
        (await browser.newContext({ viewport: size, acceptDownloads: true, ...options }));
      const page = await context.newPage();
      if (before) await page.addInitScript(before);
      const troubles: string[] = [];
      const strangers: string[] = [];
      page.on('console', (m) => {
        if (m.type() === 'error' || m.type() === 'warning') troubles.push(m.text());
      });
      page.on('pageerror', (error) => troubles.push(error.message));
      page.on('request', (request) => {
        if (!/^(blob|data):/.test(request.url()) && !request.url().startsWith(url))
          strangers.push(request.url());
      });
      await page.goto(url + path);
      return { page, context, troubles, strangers };
    },
    close: async () => {
      await browser.close();
      await server.close();
    },
  };
}

/** Waits until the page has drawn the results of its sheet. */
export async function drawn(page: Page): Promise<void> {
  await page.locator('.page svg text').first().waitFor();
  await page.waitForFunction(
    () => document.querySelector('.workplace')?.getAttribute('aria-busy') !== 'true',
  );
}

/** Clicks what starts a download and gives the file's name and text. */
export async function downloaded(page: Page, click: () => Promise<void>) {
  const [file] = await Promise.all([page.waitForEvent('download'), click()]);
  const path = join(await mkdtemp(join(tmpdir(), 'simmerline-')), file.suggestedFilename());
  await file.saveAs(path);
  return { name: file.suggestedFilename(), path, text: await readFile(path, 'utf8') };
}

/** Text with every white space an ordinary one. */
export const plain = (text: string): string => text.replace(/\s+/g, ' ').trim();

/** Text of the cells of the run table's row with a tag, its sentence left out. */
export async function cells(page: Page, tag: string): Promise<string[]> {
  const row = page.locator('.run tbody tr', {
    has: page.getByRole('button', { name: tag, exact: true }),
  });
  return (await row.locator('td:not(.sentence)').allInnerTexts()).map(plain);
}

/** Types into a figure of a sentence, and waits for what follows from it. */
export async function fill(page: Page, name: string, text: string): Promise<void> {
  await page.getByLabel(name, { exact: true }).fill(text);
  await page.keyboard.press('Enter');
  await drawn(page);
}

/** Middle of the circle drawn for an id, in CSS pixels. */
export async function centre(page: Page, id: string): Promise<{ x: number; y: number }> {
  const box = (await page.locator(`.page circle[data-of="${id}"]`).first().boundingBox())!;
  return { x: box.x + box.width / 2, y: box.y + box.height / 2 };
}

/** The number at the start of a text as the page writes it. */
export const number = (text: string): number =>
  Number.parseFloat(text.replace('\u2212', '-').replace(/[\s+]/g, ''));

/** Presses Export and gives the file. */
export const exported = (page: Page) =>
  downloaded(page, () => page.getByRole('button', { name: 'Export' }).click());
