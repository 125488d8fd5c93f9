import type { Scene, Shape } from '../../../../app/figure/scene/scene.ts';

const frame = { x: 20, y: 10, width: 140, height: 90 };

const curve: Shape = {
  id: 'boiling',
  kind: 'poly',
  closed: false,
  points: [Array.from({ length: 40 }, (_, i) => [20 + 3.5 * i, 100 - (i / 4.2) ** 2] as const)],
  stroke: { colour: '#1f2a33', weight: 1.25, join: 'round' },
  title: 'boiling line',
  of: 'water/boiling',
};

/** A small page with every kind of shape on it. */
export const page: Scene = {
  width: 180,
  height: 120,
  title: 'Boiling <line> & "more"',
  description: 'Pressure over temperature',
  unplaced: [],
  layers: [
    {
      id: 'paper',
      shapes: [
        {
          id: 'paper',
          kind: 'rect',
          rect: { x: 0, y: 0, width: 180, height: 120 },
          fill: { colour: '#ffffff' },
        },
      ],
    },
    {
      id: 'boundaries',
      clip: frame,
      shapes: [
        curve,
        {
          id: 'critical',
          kind: 'circle',
          at: [100.123456, 50],
          r: 1.1,
          fill: { colour: '#ffffff' },
          stroke: { colour: '#1f2a33', weight: 1, dash: [3, 2], opacity: 0.5, cap: 'butt' },
        },
      ],
    },
    {
      id: 'frame',
      shapes: [
        { id: 'frame', kind: 'rect', rect: frame, stroke: { colour: '#1f2a33', weight: 0.75 } },
      ],
    },
    {
      id: 'labels',
      shapes: [
        {
          id: 'tag',
          kind: 'rect',
          rect: { x: 60, y: 40, width: 8, height: 5 },
          radius: 2.5,
          fill: { colour: '#b3401f', opacity: 0.9 },
        },
        {
          id: 'name',
          kind: 'text',
          at: [80, 60],
          runs: [{ text: 'boiling line' }],
          size: 8,
          anchor: 'middle',
          angle: -32.5,
          colour: '#1f2a33',
          of: 'water/boiling',
        },
        {
          id: 'axis',
          kind: 'text',
          at: [10, 60],
          runs: [
            { text: 'p', italic: true },
            { text: 'e', scale: 0.7, shift: -0.25 },
            { text: ' / bar, gauge at 1\u2009480 m' },
          ],
          size: 9,
          anchor: 'start',
          colour: '#5b6770',
          spacing: 0.1,
          title: 'gauge pressure',
        },
      ],
    },
  ],
};

/** The same page after work on it: things moved, gone, new, and of another build under their old id. */
export const changed: Scene = {
  ...page,
  width: 200,
  title: 'Another',
  layers: [
    {
      id: 'regions',
      clip: frame,
      shapes: [
        {
          id: 'liquid',
          kind: 'poly',
          closed: true,
          points: [
            [
              [20, 10],
              [90, 10],
              [20, 100],
            ],
            [],
          ],
          fill: { colour: '#eef5f4' },
        },
      ],
    },
    ...page.layers.slice(2).map((layer) =>
      layer.id === 'labels'
        ? {
            ...layer,
            shapes: layer.shapes
              .toReversed()
              .map((shape): Shape =>
                shape.kind !== 'text'
                  ? { id: shape.id, kind: 'circle', at: [3, 4], r: 2 }
                  : shape.id === 'name'
                    ? { ...shape, runs: [{ text: 'T' }, { text: 'c', shift: -0.25 }], angle: 0 }
                    : { ...shape, runs: [{ text: 'plain', bold: true }], title: undefined },
              ),
          }
        : layer,
    ),
    { id: 'notes', shapes: [] },
  ],
};
