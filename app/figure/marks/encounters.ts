import type { Encounter } from '../../../core/process/encounter.ts';
import { format } from '../../../core/units/index.ts';
import type { Mark } from '../mark.ts';
import { type } from '../page.ts';
import type { Point } from '../scene/scene.ts';
import { pathColour, pathIndex } from './paths.ts';

interface Met {
  readonly id: string;
  /** Colour of its path. */
  readonly own: string;
  readonly step: string;
  readonly encounter: Encounter;
}

const size = 1.25;

/** Where a run crosses a boundary: an open diamond on the boundary, and what happens there. */
export const encounters: Mark<Met> = {
  id: 'encounters',
  layer: 'encounters',
  clipped: false,
  data: (view) => {
    const { map, results } = view;
    const [Tlow, Thigh] = map.T.range;
    const [plow, phigh] = map.p.range;
    return results.paths
      .filter((p) => p.substance === map.substance && !view.view.hidden.includes(p.id))
      .flatMap((path) =>
        path.steps.flatMap((step) =>
          step.encounters.map((encounter, i) => ({
            id: `${step.id}-met-${i}`,
            own: pathColour(view, pathIndex(view, path.id)),
            step: step.id,
            encounter,
          })),
        ),
      )
      .filter(
        ({ encounter: { kind, T, p } }) =>
          kind === 'crosses' && T >= Tlow && T <= Thigh && p >= plow && p <= phigh,
      );
  },
  shapes: ({ id, own, step, encounter }, view) => {
    const [x, y] = view.project(encounter.T, encounter.p);
    const corners: readonly Point[] = [
      [x, y - size],
      [x + size, y],
      [x, y + size],
      [x - size, y],
    ];
    return [
      {
        kind: 'poly',
        id,
        of: step,
        points: [corners],
        closed: true,
        fill: { colour: view.colours.paper },
        stroke: { colour: own, weight: 1 },
        title: view.words.encounter(encounter),
      },
    ];
  },
  labels: ({ id, own, step, encounter }, view) => [
    {
      kind: 'point',
      id,
      of: step,
      at: view.project(encounter.T, encounter.p),
      gap: 2,
      plate: true,
      runs: [
        {
          text: view.words.encounterAt(
            view.words.encounter(encounter),
            format(encounter.T, view.view.temperature.unit, {
              decimals: 1,
              decimal: view.words.decimal,
            }),
          ),
        },
      ],
      size: type.label,
      colour: own,
      priority: 18,
    },
  ],
  obstacles: ({ encounter }, { project }) => ({
    circles: [{ at: project(encounter.T, encounter.p), r: 1.6 }],
  }),
};
