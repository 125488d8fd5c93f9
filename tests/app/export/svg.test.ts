import { Resvg } from '@resvg/resvg-js';
import { DOMParser } from 'linkedom';
import { describe, expect, it } from 'vitest';
import { sheetFromSvg } from '../../../app/export/sheetInSvg.ts';
import { sceneToSvg } from '../../../app/export/svg.ts';
import { layout } from '../../../app/figure/layout/layout.ts';
import type { Scene } from '../../../app/figure/scene/scene.ts';
import { changed, page } from '../figure/draw/scenes.ts';
import { crowd, frame } from '../figure/layout/crowds.ts';

const elements = new Set(
  'svg title desc defs clipPath rect g path circle text tspan metadata simmerline-sheet'.split(' '),
);
const attributes = new Set(
  (
    'xmlns viewBox width height role aria-labelledby font-family text-rendering id clip-path d x y ' +
    'cx cy r rx dy fill fill-opacity stroke stroke-width stroke-dasharray stroke-opacity ' +
    'stroke-linecap stroke-linejoin transform text-anchor letter-spacing font-size font-style font-weight'
  ).split(' '),
);

function crowded(): Scene {
  const { requests, obstacles } = crowd(11, 40, 400);
  const { shapes, unplaced } = layout(requests, obstacles, frame);
  return { ...page, layers: [...page.layers.slice(0, 3), { id: 'labels', shapes }], unplaced };
}

const scenes: readonly (readonly [string, Scene])[] = [
  ['a page', page],
  ['a changed page', changed],
  ['a crowded page', crowded()],
];

describe('sceneToSvg', () => {
  it.each(scenes)(
    'sceneToSvg(%s) uses plain elements and presentation attributes only',
    async (_, scene) => {
      const svg = await sceneToSvg(scene, { sheet: { a: 1 } });
      const { documentElement } = new DOMParser().parseFromString(svg, 'image/svg+xml');
      const all = [
        documentElement,
        ...documentElement.querySelectorAll('*'),
      ] as unknown as Element[];
      expect(all.length).toBeGreaterThan(10);
      for (const element of all) {
        expect(elements).toContain(element.localName);
        for (const { name, value } of element.attributes) {
          expect(attributes).toContain(name);
          // The one reference there is points into the file.
          expect(value.replace(/^url\(#figure-clip-\w+\)$/, '')).not.toMatch(
            /url|javascript|NaN|undefined/,
          );
          if (name !== 'xmlns') expect(value).not.toMatch(/:\/\//);
        }
      }
    },
  );

  it.each(scenes)('sceneToSvg(%s) gives the same bytes twice', async (_, scene) => {
    const options = { sheet: { name: 'demo' } };
    expect(await sceneToSvg(scene, options)).toBe(await sceneToSvg(scene, options));
  });

  it.each(scenes)('sceneToSvg(%s) can be rendered by another program', async (_, scene) => {
    const { width, height } = new Resvg(await sceneToSvg(scene, { sheet: '<&>' }));
    expect(width / height).toBeCloseTo(scene.width / scene.height, 2);
  });

  it('sceneToSvg(…) writes coordinates with at most three decimals', async () => {
    for (const number of (await sceneToSvg(crowded())).match(/\d+\.\d+/g) ?? []) {
      expect(number.split('.')[1]?.length).toBeLessThanOrEqual(3);
    }
  });

  it('sceneToSvg(…) leaves the sheet out unless it is given', async () => {
    const svg = await sceneToSvg(page);
    expect(svg).not.toContain('metadata');
    expect(() => sheetFromSvg(svg)).toThrow('noSheet');
  });
});
