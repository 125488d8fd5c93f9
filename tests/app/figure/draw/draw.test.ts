import { DOMParser } from 'linkedom';
import { describe, expect, it } from 'vitest';
import { drawScene, type DrawOptions } from '../../../../app/figure/draw.ts';
import type { Scene } from '../../../../app/figure/scene/scene.ts';
import { serialise } from '../../../../app/figure/serialise.ts';
import { changed, page } from './scenes.ts';

function blank(content = ''): Element {
  const text = `<svg xmlns="http://www.w3.org/2000/svg">${content}</svg>`;
  return new DOMParser().parseFromString(text, 'image/svg+xml')
    .documentElement as unknown as Element;
}

function fresh(scene: Scene, options?: DrawOptions): string {
  const root = blank();
  drawScene(root, scene, options);
  return serialise(root);
}

const named = (root: Element, tag: string): readonly Element[] => [
  ...root.getElementsByTagName(tag),
];

describe('drawScene', () => {
  it.each([
    ['the same scene', [page, page]],
    ['another scene', [page, changed]],
    ['another scene and back', [page, changed, page]],
    ['a scene that gains layers, clips and shapes', [changed, page]],
    ['an emptied scene', [page, { ...page, layers: [] }]],
  ] as const)('drawScene(…) once more with %s leaves what drawing afresh would', (_, scenes) => {
    const root = blank();
    for (const scene of scenes) drawScene(root, scene);
    expect(serialise(root)).toBe(fresh(scenes[scenes.length - 1] as Scene));
  });

  it('drawScene(…) keeps the elements of shapes that stay', () => {
    const root = blank();
    drawScene(root, page);
    const [path] = named(root, 'path');
    drawScene(root, { ...page, title: 'other' });
    expect(named(root, 'path')[0]).toBe(path);
  });

  it('drawScene(…) removes what the element held before', () => {
    const root = blank('<g><script>1</script></g>');
    drawScene(root, page);
    expect(serialise(root)).toBe(fresh(page));
  });

  it('drawScene(…) names the figure for a screen reader', () => {
    const root = blank();
    drawScene(root, page, { prefix: 'inset' });
    expect(root.getAttribute('role')).toBe('img');
    expect(root.getAttribute('aria-labelledby')).toBe('inset-title inset-desc');
    expect(root.firstElementChild?.textContent).toBe(page.title);
    expect(root.getAttribute('viewBox')).toBe('0 0 180 120');
    expect(root.getAttribute('width')).toBe('180mm');
  });

  it('drawScene(…) writes a line weight in points as millimetres', () => {
    const root = blank();
    drawScene(root, page);
    // 1.25 pt of 1/72 inch.
    expect(named(root, 'path')[0]?.getAttribute('stroke-width')).toBe('0.441');
  });

  it('drawScene(…) lowers a subscript by dy and comes back to the baseline', () => {
    const root = blank();
    drawScene(root, page);
    const steps = named(root, 'tspan').map((span) => Number(span.getAttribute('dy') ?? 0));
    expect(steps[1]).toBeGreaterThan(0);
    expect(steps.reduce((sum, step) => sum + step, 0)).toBeCloseTo(0, 9);
  });

  it('drawScene(…, interactive) marks what can be picked, and an export has none of it', () => {
    expect(fresh(page, { interactive: true })).toContain('data-of="water/boiling"');
    const root = blank();
    drawScene(root, page, { interactive: true });
    drawScene(root, page);
    expect(serialise(root)).toBe(fresh(page));
    expect(fresh(page)).not.toContain('data-');
  });

  it('drawScene(…) clips a layer by an id of its own', () => {
    const text = fresh(page);
    expect(text).toContain('<clipPath id="figure-clip-boundaries">');
    expect(text).toContain('clip-path="url(#figure-clip-boundaries)"');
  });
});

describe('serialise', () => {
  it('serialise(root) escapes markup and leaves out what XML cannot hold', () => {
    const text = fresh({ ...page, title: 'a<b>&"c"\u0000\ud800 ]]>', layers: [] });
    expect(text).toContain('>a&lt;b&gt;&amp;"c"\ufffd\ufffd ]]&gt;</title>');
  });

  it('serialise(root) sorts attributes and names the namespace once', () => {
    const root = blank();
    root.setAttribute('z', '1');
    root.setAttribute('a', '"\n');
    expect(serialise(root)).toBe('<svg xmlns="http://www.w3.org/2000/svg" a="&quot;&#10;" z="1"/>');
  });
});
