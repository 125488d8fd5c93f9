import { readFile } from 'node:fs/promises';
import { chromium, type Browser } from 'playwright-core';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { mmPerPoint } from '../../../../app/figure/scene/scene.ts';
import { measure, room } from '../../../../app/figure/type/measure.ts';
import { chromiumArguments, chromiumPath } from '../../../browser/chromium.ts';
import { lines } from './lines.ts';

let browser: Browser;
beforeAll(async () => {
  browser = await chromium.launch({
    executablePath: await chromiumPath(),
    args: chromiumArguments,
  });
});
afterAll(() => browser.close());

describe('measure in a browser', () => {
  it('measure(…) is within 3 % of the text lengths of Chromium, and its room covers them', async () => {
    const faces = await Promise.all(
      (
        [
          ['Regular', 'normal', 400],
          ['Italic', 'italic', 400],
          ['Bold', 'normal', 700],
        ] as const
      ).map(async ([name, style, weight]) => {
        const font = await readFile(`public/fonts/Inter-${name}.woff2`, 'base64');
        return `@font-face{font-family:Inter;font-style:${style};font-weight:${weight};src:url(data:font/woff2;base64,${font})}`;
      }),
    );
    const texts = lines.map(([run]) => {
      const style = `font-style="${run?.italic ? 'italic' : 'normal'}" font-weight="${run?.bold ? 700 : 400}"`;
      return `<text y="100" font-size="100" ${style}>${run?.text}</text>`;
    });
    const page = await browser.newPage();
    await page.setContent(
      `<style>${faces.join('')}</style><svg font-family="Inter" text-rendering="geometricPrecision">${texts.join('')}</svg>`,
    );
    const lengths = await page.evaluate(async () => {
      const all = [...document.querySelectorAll('text')];
      await document.fonts.ready;
      await Promise.all([...document.fonts].map((font) => font.load()));
      return all.map((text) => text.getComputedTextLength());
    });
    expect(lengths).toHaveLength(lines.length);
    for (const [i, length] of lengths.entries()) {
      const expected = measure(lines[i] ?? [], 100 / mmPerPoint);
      expect(Math.abs(expected / length - 1), lines[i]?.[0]?.text).toBeLessThan(0.03);
      expect(expected * room).toBeGreaterThan(length);
    }
  });
});
