import { scale, temperaturePressurePlane } from '../../core/map/plane.ts';
import type { Results } from '../../core/sheet/results.ts';
import type { Sheet } from '../../core/sheet/schema.ts';
import { shared } from '../shared.ts';
import type { Words } from '../words/en.ts';
import { printColours } from './colours.ts';
import { layout, unplacedOf, type PlacedBox } from './layout/layout.ts';
import { anchorOf } from './layout/moved.ts';
import type { Obstacles } from './layout/obstacles.ts';
import type { LabelRequest } from './layout/request.ts';
import type { Mark, MarkView } from './mark.ts';
import { axes, grid } from './marks/axes.ts';
import { beyond } from './marks/beyond.ts';
import { boundaries } from './marks/boundaries.ts';
import { conventions } from './marks/conventions.ts';
import { encounters } from './marks/encounters.ts';
import { paths } from './marks/paths.ts';
import { points } from './marks/points.ts';
import { regions } from './marks/regions.ts';
import { states } from './marks/states.ts';
import { captionText, pageOf, type } from './page.ts';
import {
  layers,
  type LayerId,
  type Point,
  type Rect,
  type Scene,
  type SceneLayer,
  type Shape,
} from './scene/scene.ts';

/** What a mark makes of one of its data. */
interface Made {
  readonly shapes: readonly Shape[];
  readonly labels: readonly LabelRequest[];
  readonly obstacles: Obstacles;
}

/** All of a `StillView`, told by identity. */
const stillParts = ({ view, map, frame, colours, words }: MarkView): readonly unknown[] => [
  ...[view.temperature, view.pressure, view.second, view.fields, frame, colours, words],
  ...[map.view, map.substance, map.T, map.p, map.width, map.height, map.validity],
  ...[map.boundaries, map.regions, map.points],
];

/**
 * What a mark makes of a view, its kind of data forgotten. While the view stands still, data equal to
 * the last ones give the very same shapes and requests.
 */
const applied = <D extends object>(mark: Mark<D>) => {
  let last: { still: readonly unknown[]; data: readonly D[]; made: WeakMap<D, Made> } | null = null;
  return (view: MarkView, still: readonly unknown[]) => {
    const before = last?.still.every((part, i) => part === still[i]) ? last : null;
    const data = before ? shared(before.data, mark.data(view)) : mark.data(view);
    const known = before?.made ?? new WeakMap<D, Made>();
    last = { still, data, made: known };
    const made = data.map((d): Made => {
      const ready = known.get(d) ?? {
        shapes: mark.shapes(d, view),
        labels: mark.labels?.(d, view) ?? [],
        obstacles: mark.obstacles?.(d, view) ?? {},
      };
      known.set(d, ready);
      return ready;
    });
    return { layer: mark.layer, clipped: mark.clipped, made };
  };
};

/** Every mark of a figure, one line each; the layer says where it is drawn. */
const marks = [
  applied(beyond),
  applied(regions),
  applied(grid),
  applied(conventions),
  applied(boundaries),
  applied(points),
  applied(paths),
  applied(encounters),
  applied(states),
  applied(axes),
];

/** A figure with what the page needs to know of it beyond the scene. */
export interface Figure {
  readonly scene: Scene;
  readonly view: MarkView;
  /** Where labels stand, for taking hold of them. */
  readonly boxes: readonly PlacedBox[];
  readonly requests: readonly LabelRequest[];
}

/** Where labels stand from their anchors, null for those without room, to be kept while something is dragged. */
export type Steady = ReadonlyMap<string, Point | null>;

/** The labels of a figure as they stand now. */
export function steadyLabels({ boxes, requests, scene, view }: Figure): Steady {
  const asked = new Map(requests.map((request) => [request.id, request]));
  return new Map([
    ...boxes.map(({ id, box }): [string, Point] => {
      const [x, y] = anchorOf(asked.get(id)!, view.frame);
      return [id, [box.x - x, box.y - y]];
    }),
    ...scene.unplaced.map(({ id }): [string, null] => [id, null]),
  ]);
}

/** Requests with the places that they were last given. */
const offsets = new WeakMap<LabelRequest, LabelRequest>();

function withOffset(request: LabelRequest, offset: Point): LabelRequest {
  const ready = offsets.get(request);
  if (ready?.offset === offset) return ready;
  const made = { ...request, offset };
  offsets.set(request, made);
  return made;
}

/** The last frame, so that an equal one is the same object. */
let lastFrame: Rect | null = null;

/**
 * The figure of one view of a sheet: results become marks, marks shapes and label requests, layout
 * places the labels, and all of it lies on the page in mm. Pure; the same for screen and export.
 * `steady` keeps labels in place during a drag; nothing else does.
 */
export function composeFigure(
  sheet: Sheet,
  results: Results,
  viewId: string,
  words: Words,
  steady?: Steady,
): Figure {
  const view = sheet.views.find(({ id }) => id === viewId) ?? sheet.views[0]!;
  const map = results.maps.find((m) => m.view === view.id)!;
  const page = pageOf(view, captionText(view, sheet, results, words));
  const frame = shared(lastFrame, page.frame);
  lastFrame = frame;
  const plane = temperaturePressurePlane({
    T: scale(map.T.kind, map.T.range),
    p: scale(map.p.kind, map.p.range),
    width: map.width,
    height: map.height,
  });
  const colours = printColours[view.colours];
  const markView: MarkView = {
    sheet,
    view,
    results,
    map,
    plane,
    frame,
    project: (T, p) => {
      const [x, y] = plane.project({ T, p })!;
      return [frame.x + x, frame.y + y];
    },
    colours,
    words,
  };

  const still = stillParts(markView);
  const drawings = marks.map((mark) => mark(markView, still));
  const drawn = new Map<LayerId, { shapes: Shape[]; clipped: boolean }>();
  const into = (layer: LayerId, clipped = false) => {
    const known = drawn.get(layer) ?? { shapes: [], clipped };
    drawn.set(layer, known);
    return known.shapes;
  };
  for (const { layer, clipped, made } of drawings)
    into(layer, clipped).push(...made.flatMap(({ shapes }) => shapes));
  const all = drawings.flatMap(({ made }) => made);
  const requests = all
    .flatMap(({ labels }) => labels)
    .filter(({ id }) => !view.hidden.includes(`label-${id}`))
    .map((request) => {
      // Ids are the user's: one may read like something that every object has.
      const moved = Object.hasOwn(view.labelOffsets, request.id);
      const offset = moved ? view.labelOffsets[request.id] : steady?.get(request.id);
      return offset ? withOffset(request, offset) : request;
    });
  const met = all.map(({ obstacles }) => obstacles);
  const obstacles = {
    polylines: met.flatMap(({ polylines }) => polylines ?? []),
    boxes: met.flatMap(({ boxes }) => boxes ?? []),
    circles: met.flatMap(({ circles }) => circles ?? []),
  };
  // What had no room when the hand took hold is not searched for anew at every move.
  const isWaiting = ({ id }: LabelRequest): boolean => steady?.get(id) === null;
  const placed = layout(
    requests.filter((request) => !isWaiting(request)),
    obstacles,
    frame,
  );
  const waiting = requests.filter(isWaiting).map(unplacedOf);

  into('paper').push({
    kind: 'rect',
    id: 'paper',
    rect: { x: 0, y: 0, width: page.width, height: page.height },
    fill: { colour: colours.paper },
  });
  into('frame').push({
    kind: 'rect',
    id: 'frame',
    rect: frame,
    stroke: { colour: colours.ink, weight: 0.75 },
  });
  into('labels').push(...placed.shapes);
  into('cautions').push(
    ...page.caption.map(({ text, weight, y }, i): Shape => ({
      kind: 'text',
      id: `caption-${i}`,
      at: [page.captionLeft, y],
      runs: [{ text }],
      size: type.caption,
      anchor: 'start',
      colour: weight === 'caution' ? colours.ink : colours.muted,
    })),
  );

  const sceneLayers = layers.flatMap((id): SceneLayer[] => {
    const layer = drawn.get(id);
    return layer ? [{ id, shapes: layer.shapes, ...(layer.clipped ? { clip: frame } : {}) }] : [];
  });
  return {
    scene: {
      width: page.width,
      height: page.height,
      title: sheet.title,
      description: words.description(
        words.substance(map.substance),
        results.states.length + results.paths.reduce((n, p) => n + p.states.length, 0),
      ),
      layers: sceneLayers,
      unplaced: [...placed.unplaced, ...waiting],
    },
    view: markView,
    boxes: placed.boxes,
    requests,
  };
}
