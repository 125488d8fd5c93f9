import { mkdtemp, readFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { chromium, type Browser, type BrowserContext, type Page } from 'playwright-core';
import { preview, type PreviewServer } from 'vite';
import { chromiumArguments, chromiumPath } from './chromium.ts';

/** The built page in a real Chromium. */
export interface Harness {
  readonly url: string;
  readonly browser: Browser;
  /** A page of its own context; console errors and page errors are gathered in `troubles`. */
  open: (
    path?: string,
    size?: { width: number; height: number },
  ) => Promise<{ page: Page; context: BrowserContext; troubles: string[] }>;
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
    open: async (path = '', size = { width: 1366, height: 768 }) => {
      const context = await browser.newContext({ viewport: size, acceptDownloads: true });
      const page = await context.newPage();
      const troubles: string[] = [];
      page.on('console', (m) => {
        if (m.type() === 'error' || m.type() === 'warning') troubles.push(m.text());
      });
      page.on('pageerror', (error) => troubles.push(error.message));
      await page.goto(url + path);
      return { page, context, troubles };
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
