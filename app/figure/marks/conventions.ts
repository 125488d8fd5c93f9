import type { MapPoint } from '../../../core/sheet/results.ts';
import type { Mark, StillView } from '../mark.ts';
import type { Point } from '../scene/scene.ts';

/** Upwards at the critical temperature, to the right at the critical pressure. */
function dashes({ T, p }: MapPoint, { map, project }: StillView): readonly (readonly Point[])[] {
  const at = project(T, p);
  const top = Math.min(map.p.range[1], map.validity.pmax);
  // The melting line may come down to the critical temperature; the dashes end there.
  const melting = map.boundaries
    .filter((b) => b.kind === 'melting')
    .flatMap((b) => b.points)
    .find((point) => point.T >= T);
  const up = project(T, Math.min(top, melting?.p ?? top));
  const right = project(Math.min(map.T.range[1], map.validity.T[1]), p);
  return [
    [at, up],
    [at, right],
  ];
}

/** Dashes at the critical temperature and pressure: a convention, lighter than a boundary. */
export const conventions: Mark<MapPoint> = {
  id: 'conventions',
  layer: 'boundaries',
  clipped: true,
  data: ({ map }) => map.points.filter(({ kind }) => kind === 'critical'),
  shapes: (point, view) => [
    {
      kind: 'poly',
      id: point.id,
      points: dashes(point, view),
      closed: false,
      stroke: { colour: view.colours.muted, weight: 0.6, dash: [3, 2.4] },
    },
  ],
  obstacles: (point, view) => ({ polylines: [{ points: dashes(point, view), clearance: 0.4 }] }),
};
