import type { MapPoint } from '../../../core/sheet/results.ts';
import type { Mark } from '../mark.ts';

/** Dashes at the critical temperature and pressure: a convention, lighter than a boundary. */
export const conventions: Mark<MapPoint> = {
  id: 'conventions',
  layer: 'boundaries',
  clipped: true,
  data: ({ map }) => map.points.filter(({ kind }) => kind === 'critical'),
  shapes: ({ id, T, p }, { map, project, colours }) => {
    const stroke = { colour: colours.muted, weight: 0.6, dash: [3, 2.4] };
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
      { kind: 'poly', id: `${id}-isotherm`, points: [[at, up]], closed: false, stroke },
      { kind: 'poly', id: `${id}-isobar`, points: [[at, right]], closed: false, stroke },
    ];
  },
};
