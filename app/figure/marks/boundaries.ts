import type { Boundary } from '../../../core/map/boundary.ts';
import type { Mark, StillView } from '../mark.ts';
import { type } from '../page.ts';
import type { Point } from '../scene/scene.ts';

const line = (b: Boundary, { project }: StillView): readonly Point[] =>
  b.points.map(({ T, p }) => project(T, p));

/** A line too short to carry a name, or one that only runs along the frame. */
function isFaint(points: readonly Point[], { frame }: StillView): boolean {
  let length = 0;
  for (let i = 1; i < points.length; i++)
    length += Math.hypot(points[i]![0] - points[i - 1]![0], points[i]![1] - points[i - 1]![1]);
  const away = (at: number, low: number, size: number): number =>
    Math.min(at - low, low + size - at);
  return (
    length < 8 ||
    points.every(([x]) => away(x, frame.x, frame.width) < 1) ||
    points.every(([, y]) => away(y, frame.y, frame.height) < 1)
  );
}

const nameOf = (b: Boundary, { words, map }: StillView): string => {
  const kin = map.boundaries.filter(({ kind }) => kind === b.kind);
  const fluids = new Set(map.regions.map(({ phase }) => phase));
  return words.boundary(b.of, b.kind, b.form, {
    kind: new Set(kin.map(({ form }) => form)).size === 1,
    line: fluids.size <= 2,
  });
};

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
      title: nameOf(b, view),
    },
  ],
  labels: (b, view) => {
    const { words, colours } = view;
    const along = line(b, view);
    if (isFaint(along, view)) return [];
    const text = nameOf(b, view);
    return [
      {
        kind: 'line',
        id: b.id,
        of: b.id,
        runs: [{ text: b.basis === 'estimate' ? `${text} (${words.estimated})` : text }],
        size: type.label,
        colour: colours.ink,
        priority: 30,
        along,
        side: 'either',
      },
    ];
  },
  obstacles: (b, view) => ({ polylines: [{ points: [line(b, view)], clearance: 0.5 }] }),
};
