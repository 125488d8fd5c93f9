import type { Track } from '../../../core/sheet/results.ts';
import type { Mark, MarkView, StillView } from '../mark.ts';
import { type } from '../page.ts';
import { mmPerPoint, type Point, type Shape } from '../scene/scene.ts';

/** All tracks of one path on this map. */
interface Way {
  readonly path: string;
  readonly name: string | null;
  readonly tag: string;
  /** Place among the paths, which gives colour and dash. */
  readonly index: number;
  readonly tracks: readonly Track[];
}

/** Dash of the locus of exits of a real machine, in points. */
const locusDash: readonly number[] = [3, 2];

/** Dashes of the paths in their order, in points; a path is told by colour, dash and letter. */
const dashes: readonly (readonly number[] | null)[] = [
  null,
  [6, 3],
  [1.5, 2.5],
  [8, 2.5, 1.5, 2.5],
];

/** Colour of a path by its place among the sheet's paths. */
export const pathColour = ({ colours }: Pick<MarkView, 'colours'>, index: number): string =>
  colours.own[index % colours.own.length]!;

/** Place of a path among the sheet's paths. */
export const pathIndex = ({ sheet }: Pick<MarkView, 'sheet'>, id: string): number =>
  Math.max(
    0,
    sheet.items.filter(({ kind }) => kind === 'path').findIndex((item) => item.id === id),
  );

const placed = (track: Track, { project }: StillView): readonly Point[] =>
  track.points.map(({ T, p }) => project(T, p));

const lengthOf = (points: readonly Point[]): number =>
  points
    .slice(1)
    .reduce((sum, [x, y], i) => sum + Math.hypot(x - points[i]![0], y - points[i]![1]), 0);

/** An arrowhead half-way along a track, where the track is long enough to carry one. */
function arrow(points: readonly Point[], id: string, of: string, colour: string): Shape[] {
  const whole = lengthOf(points);
  if (whole < 7) return [];
  let left = whole / 2 + 1;
  for (let i = 1; i < points.length; i++) {
    const [ax, ay] = points[i - 1]!;
    const [bx, by] = points[i]!;
    const step = Math.hypot(bx - ax, by - ay);
    if (step === 0 || left > step) {
      left -= step;
      continue;
    }
    const u: Point = [(bx - ax) / step, (by - ay) / step];
    const tip: Point = [ax + u[0] * left, ay + u[1] * left];
    const corner = (back: number, side: number): Point => [
      tip[0] - u[0] * back - u[1] * side,
      tip[1] - u[1] * back + u[0] * side,
    ];
    return [
      {
        kind: 'poly',
        id,
        of,
        points: [[tip, corner(2.6, 1), corner(2.1, 0), corner(2.6, -1)]],
        closed: true,
        fill: { colour },
      },
    ];
  }
  return [];
}

/** Planned runs: a coloured line over a white casing, an arrowhead mid-step. */
export const paths: Mark<Way> = {
  id: 'paths',
  layer: 'paths',
  clipped: true,
  data: (view) =>
    view.results.paths
      .filter((p) => p.substance === view.map.substance && !view.view.hidden.includes(p.id))
      .map(({ id, name, tag }) => ({
        path: id,
        name,
        tag,
        index: pathIndex(view, id),
        tracks: view.map.tracks.filter((t) => t.path === id && t.points.length > 1),
      })),
  shapes: (way, view) => {
    const colour = pathColour(view, way.index);
    const dash = dashes[way.index % dashes.length];
    const lines = way.tracks.map((t) => placed(t, view));
    const common = { join: 'round' as const, cap: 'butt' as const };
    return [
      {
        kind: 'poly',
        id: `${way.path}-casing`,
        points: lines,
        closed: false,
        stroke: { colour: view.colours.paper, weight: 3.2, ...common },
      },
      ...way.tracks.map((t, i): Shape => ({
        kind: 'poly',
        id: `${t.step}-${i}`,
        of: t.step,
        points: [lines[i]!],
        closed: false,
        stroke: {
          colour,
          weight: 1.7,
          ...common,
          // The way through a real machine is not known: what is drawn are its possible exits.
          ...(t.locus ? { dash: locusDash } : dash ? { dash } : {}),
        },
        title: way.name ? `${way.tag}, ${way.name}` : way.tag,
      })),
      ...way.tracks.flatMap((t, i) => arrow(lines[i]!, `${t.step}-${i}-arrow`, t.step, colour)),
    ];
  },
  labels: (way, view) => {
    if (!way.name) return [];
    const lines = way.tracks.map((t) => placed(t, view));
    const longest = lines.sort((a, b) => lengthOf(b) - lengthOf(a))[0];
    if (!longest || lengthOf(longest) < 15) return [];
    return [
      {
        kind: 'line',
        id: way.path,
        of: way.path,
        runs: [{ text: way.name }],
        size: type.label,
        colour: pathColour(view, way.index),
        priority: 25,
        along: longest,
        side: 'either',
      },
    ];
  },
  obstacles: (way, view) => ({
    polylines: [
      { points: way.tracks.map((t) => placed(t, view)), clearance: 0.5 + 1.6 * mmPerPoint },
    ],
  }),
};
