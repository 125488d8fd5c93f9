import type { MapPoint } from '../../../core/sheet/results.ts';
import { format, type UnitId } from '../../../core/units/index.ts';
import type { Mark } from '../mark.ts';
import { type } from '../page.ts';

interface Placed extends MapPoint {
  /** Whether the user gave its label a place. */
  readonly isMoved: boolean;
}

/** Triple and critical points, as open circles. */
export const points: Mark<Placed> = {
  id: 'points',
  layer: 'points',
  clipped: false,
  data: ({ map, view }) =>
    map.points
      .filter(({ id }) => !view.hidden.includes(id))
      .map((point) => ({ ...point, isMoved: view.labelOffsets[point.id] !== undefined })),
  shapes: ({ id, kind, phases, T, p }, { project, colours, words }) => [
    {
      kind: 'circle',
      id,
      of: id,
      at: project(T, p),
      r: 1,
      stroke: { colour: colours.ink, weight: 0.9 },
      fill: { colour: colours.paper },
      title: kind === 'critical' ? words.criticalPoint : words.triplePoint(phases),
    },
  ],
  labels: ({ id, kind, phases, T, p, isMoved }, { project, colours, words, view, frame }) => {
    const [x, y] = project(T, p);
    const edge = Math.min(
      x - frame.x,
      frame.x + frame.width - x,
      y - frame.y,
      frame.y + frame.height - y,
    );
    // In the corner of a work figure the point is only where the map happens to begin.
    if (edge < 0.8 && kind === 'triple' && !isMoved) return [];
    const name = kind === 'critical' ? words.criticalPoint : words.triplePoint(phases);
    const unit = view.pressure.unit as UnitId;
    const { decimal } = words;
    const where = `${format(T, view.temperature.unit, { decimals: 2, decimal })}, ${format(p, unit, { digits: 4, decimal })}`;
    return [
      {
        kind: 'point',
        id,
        of: id,
        at: project(T, p),
        gap: 1.8,
        runs: [{ text: phases.includes('vapour') ? `${name} ${where}` : name }],
        size: phases.includes('vapour') ? type.label : 7,
        colour: phases.includes('vapour') ? colours.ink : colours.muted,
        priority: phases.includes('vapour') ? 20 : 50,
      },
    ];
  },
  obstacles: ({ T, p }, { project }) => ({ circles: [{ at: project(T, p), r: 1.4 }] }),
};
