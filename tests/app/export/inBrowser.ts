// What the browser test runs in the page.
import { sceneToSvg } from '../../../app/export/svg.ts';
import { layout } from '../../../app/figure/layout/layout.ts';
import type { Scene } from '../../../app/figure/scene/scene.ts';
import { changed, page } from '../figure/draw/scenes.ts';
import { crowd, frame } from '../figure/layout/crowds.ts';

/** The same pages, drawn wherever this runs. */
export async function exported(): Promise<readonly string[]> {
  const { requests, obstacles } = crowd(5, 40, 400);
  const { shapes, unplaced } = layout(requests, obstacles, frame);
  const crowded: Scene = { ...page, layers: [{ id: 'labels', shapes }], unplaced };
  return Promise.all(
    [page, changed, crowded].map((scene) => sceneToSvg(scene, { sheet: { text: '<😀>\u2028' } })),
  );
}
