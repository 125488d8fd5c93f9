import { chromium, type Browser } from 'playwright-core';
import { build } from 'vite';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { chromiumArguments, chromiumPath } from '../../browser/chromium.ts';
import { exported } from './inBrowser.ts';

let browser: Browser;
let code: string;
let chunks: number;
beforeAll(async () => {
  const built = await build({
    configFile: false,
    logLevel: 'error',
    publicDir: false,
    build: {
      write: false,
      minify: false,
      lib: { entry: 'tests/app/export/inBrowser.ts', formats: ['iife'], name: 'drawn' },
    },
  });
  const [first] = Array.isArray(built) ? built : [built];
  const chunk = first && 'output' in first ? first.output[0] : undefined;
  if (!chunk) throw new Error('nothing built');
  code = chunk.code;
  chunks = first && 'output' in first ? first.output.length : 0;
  browser = await chromium.launch({
    executablePath: await chromiumPath(),
    args: chromiumArguments,
  });
});
afterAll(() => browser.close());

describe('sceneToSvg in a browser', () => {
  it('sceneToSvg(…) gives the bytes that it gives in Node', async () => {
    const page = await browser.newPage();
    await page.addScriptTag({ content: code });
    const there = await page.evaluate(() =>
      (globalThis as unknown as { drawn: { exported(): Promise<string[]> } }).drawn.exported(),
    );
    expect(there).toEqual(await exported());
  });

  it('sceneToSvg(…) is a picture that a browser shows', async () => {
    const page = await browser.newPage();
    const [svg] = await exported();
    const size = await page.evaluate(async (text) => {
      const image = new Image();
      image.src = `data:image/svg+xml,${encodeURIComponent(text ?? '')}`;
      await image.decode();
      return [image.naturalWidth, image.naturalHeight];
    }, svg);
    // 180 mm × 120 mm at 96 pixels an inch.
    expect(size).toEqual([680, 454]);
  });

  it('the headless document stays out of the page', () => {
    // The one file holds drawing, layout and these tests' pages; a DOM in it would treble its size.
    expect(chunks).toBe(1);
    expect(code.length).toBeLessThan(200_000);
  });
});
