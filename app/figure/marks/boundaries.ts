import type { Boundary } from '../../../core/map/boundary.ts';
import type { Mark, MarkView } from '../mark.ts';
import { type } from '../page.ts';
import type { Point } from '../scene/scene.ts';

const line = (b: Boundary, { project }: MarkView): readonly Point[] =>
  b.points.map(({ T, p }) => project(T, p));

/** The lines between phases, named along them. */
export const boundaries: Mark<Boundary> = {
  id: 'boundaries',
  layer: 'boundaries',
  clipped: true,
  data: ({ map, view }) => map.boundaries.filter(({ id }) => !view.hidden.includes(id)),
  shapes: (b, view) => [
    {
      kind: 'poly',
      id: b.id,
      of: b.id,
      points: [line(b, view)],
      closed: false,
      stroke: {
        colour: view.colours.ink,
        weight: 1.25,
        join: 'round',
        ...(b.basis === 'estimate' ? { dash: [4, 2.5] } : {}),
      },
      title: view.words.boundary(b.of, b.kind, b.form, true),
    },
  ],
  labels: (b, view) => {
    const { words, colours, map } = view;
    const fluids = new Set(map.regions.map(({ phase }) => phase));
    const text = words.boundary(b.of, b.kind, b.form, fluids.size <= 2);
    return [
      {
        kind: 'line',
        id: b.id,
        of: b.id,
        runs: [{ text: b.basis === 'estimate' ? `${text} (${words.estimated})` : text }],
        size: type.label,
        colour: colours.ink,
        priority: 30,
        along: line(b, view),
        side: 'either',
      },
    ];
  },
  obstacles: (b, view) => ({ polylines: [{ points: [line(b, view)], clearance: 0.5 }] }),
};
