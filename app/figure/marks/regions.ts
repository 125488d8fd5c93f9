import type { Region } from '../../../core/map/regions.ts';
import type { Mark } from '../mark.ts';
import { type } from '../page.ts';
import type { Point } from '../scene/scene.ts';

/** Fields of the phases, tinted and named. */
export const regions: Mark<Region> = {
  id: 'regions',
  layer: 'regions',
  clipped: true,
  data: ({ map }) => map.regions,
  shapes: (r, { view, colours, frame, words }) => {
    const tint = view.fields === 'none' ? null : colours.fields[view.fields][r.phase];
    if (!tint) return [];
    return [
      {
        kind: 'poly',
        id: r.id,
        points: [r.ring.map(([x, y]): Point => [x + frame.x, y + frame.y])],
        closed: true,
        fill: { colour: tint },
        title: words.phase(r.phase, r.solid),
      },
    ];
  },
  labels: (r, { map, colours, frame, words }) => {
    // A sliver along the frame is seen, not named.
    const narrow = ([0, 1] as const).some((axis) => {
      const values = r.ring.map((place) => place[axis]);
      return Math.max(...values) - Math.min(...values) < 2.5;
    });
    if (narrow) return [];
    return [
      {
        kind: 'area',
        id: r.id,
        runs: [{ text: words.region(map.substance, r.phase, r.solid) }],
        size: type.region,
        spacing: 0.16,
        colour: colours.muted,
        priority: 40,
        ring: r.ring.map(([x, y]): Point => [x + frame.x, y + frame.y]),
      },
    ];
  },
};
