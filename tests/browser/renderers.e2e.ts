import { readdirSync, readFileSync } from 'node:fs';
import { Resvg } from '@resvg/resvg-js';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { openText } from '../../app/export/openText.ts';
import { sceneToSvg } from '../../app/export/svg.ts';
import { composeFigure } from '../../app/figure/figure.ts';
import { evaluateSheet } from '../../app/worker/evaluateSheet.ts';
import { en } from '../../app/words/en.ts';
import { harness, type Harness } from './harness.ts';

const fonts = ['Regular', 'Italic', 'Bold'].map((face) => `public/fonts/Inter-${face}`);
const width = 950;

let h: Harness;
beforeAll(async () => {
  h = await harness();
});
afterAll(() => h.close());

/** Pixels of a picture shrunk by `k`, so that each renderer's smoothing of edges averages out. */
function shrunk(pixels: Uint8Array, w: number, height: number, k: number): Float64Array {
  const columns = Math.floor(w / k);
  const rows = Math.floor(height / k);
  const out = new Float64Array(columns * rows);
  for (let y = 0; y < rows * k; y++)
    for (let x = 0; x < columns * k; x++) {
      const i = 4 * (y * w + x);
      const grey = 0.299 * pixels[i]! + 0.587 * pixels[i + 1]! + 0.114 * pixels[i + 2]!;
      out[Math.floor(y / k) * columns + Math.floor(x / k)]! += grey / (k * k);
    }
  return out;
}

describe('exported SVG looks alike in Chromium and in resvg', () => {
  const demos = readdirSync('public/demos').filter((name) => name.endsWith('.json'));
  // Averages over 4 × 4 pixels of 0.2 mm: hinting moves edges by under a pixel, a missing or moved
  // label, line or field changes whole cells.
  it.each(demos)(
    '%s: 99.5 % of cells within 48 of 255, mean difference below 1.5',
    async (name) => {
      const opened = openText(readFileSync(`public/demos/${name}`, 'utf8'));
      if (!opened.ok) throw new Error(JSON.stringify(opened.issues));
      const results = await evaluateSheet(opened.sheet);
      const { scene } = composeFigure(opened.sheet, results, opened.sheet.views[0]!.id, en);
      const svg = await sceneToSvg(scene, { sheet: opened.sheet });

      const other = new Resvg(svg, {
        background: 'white',
        font: {
          fontFiles: fonts.map((stem) => `${stem}.ttf`),
          loadSystemFonts: false,
          defaultFontFamily: 'Inter',
        },
        fitTo: { mode: 'width', value: width },
      }).render();
      const { height } = other;

      const { page, context } = await h.open('', { width, height });
      const faces = fonts.map((stem) => ({
        face: stem.split('-')[1]!,
        data: readFileSync(`${stem}.woff2`).toString('base64'),
      }));
      const encoded = await page.evaluate(
        async ({ svg, faces, width, height }) => {
          const css = faces
            .map(
              ({ face, data }) =>
                `@font-face{font-family:Inter;src:url(data:font/woff2;base64,${data});font-weight:${face === 'Bold' ? 700 : 400};font-style:${face === 'Italic' ? 'italic' : 'normal'}}`,
            )
            .join('');
          const styled = svg.replace(/<\/svg>\s*$/, `<style>${css}</style></svg>`);
          const image = new Image();
          image.src = `data:image/svg+xml;charset=utf-8,${encodeURIComponent(styled)}`;
          await image.decode();
          const canvas = Object.assign(document.createElement('canvas'), { width, height });
          const context = canvas.getContext('2d')!;
          context.fillStyle = 'white';
          context.fillRect(0, 0, width, height);
          context.drawImage(image, 0, 0, width, height);
          const { data } = context.getImageData(0, 0, width, height);
          let text = '';
          for (let i = 0; i < data.length; i += 8192)
            text += String.fromCharCode(...data.subarray(i, i + 8192));
          return btoa(text);
        },
        { svg, faces, width, height },
      );
      await context.close();

      const a = shrunk(new Uint8Array(Buffer.from(encoded, 'base64')), width, height, 4);
      const b = shrunk(other.pixels, width, height, 4);
      const differences = Array.from(a, (v, i) => Math.abs(v - b[i]!));
      const far = differences.filter((d) => d > 48).length;
      const mean = differences.reduce((sum, d) => sum + d, 0) / differences.length;
      // A picture of nothing would agree with nothing.
      expect(Math.min(...a)).toBeLessThan(120);
      expect(far / differences.length).toBeLessThan(0.005);
      expect(mean).toBeLessThan(1.5);
    },
  );
});
