import { scale, temperaturePressurePlane } from '../../core/map/plane.ts';
import type { Results } from '../../core/sheet/results.ts';
import type { Sheet } from '../../core/sheet/schema.ts';
import type { Words } from '../words/en.ts';
import { printColours } from './colours.ts';
import { layout, type PlacedBox } from './layout/layout.ts';
import { anchorOf } from './layout/moved.ts';
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
  type Scene,
  type SceneLayer,
  type Shape,
} from './scene/scene.ts';

/** What a mark makes of a view, its kind of data forgotten. */
const applied =
  <D>(mark: Mark<D>) =>
  (view: MarkView) => {
    const data = mark.data(view);
    return {
      layer: mark.layer,
      clipped: mark.clipped,
      shapes: data.flatMap((d) => mark.shapes(d, view)),
      labels: data.flatMap((d) => mark.labels?.(d, view) ?? []),
      obstacles: data.map((d) => mark.obstacles?.(d, view) ?? {}),
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

/** Where labels stand from their anchors, to be kept while something is dragged. */
export type Steady = ReadonlyMap<string, Point>;

/** The labels of a figure as they stand now. */
export function steadyLabels({ boxes, requests, view }: Figure): Steady {
  const asked = new Map(requests.map((request) => [request.id, request]));
  return new Map(
    boxes.map(({ id, box }): [string, Point] => {
      const [x, y] = anchorOf(asked.get(id)!, view.frame);
      return [id, [box.x - x, box.y - y]];
    }),
  );
}

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
  const { frame } = page;
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

  const made = marks.map((mark) => mark(markView));
  const drawn = new Map<LayerId, { shapes: Shape[]; clipped: boolean }>();
  const into = (layer: LayerId, clipped = false) => {
    const known = drawn.get(layer) ?? { shapes: [], clipped };
    drawn.set(layer, known);
    return known.shapes;
  };
  for (const { layer, clipped, shapes } of made) into(layer, clipped).push(...shapes);
  const requests = made
    .flatMap(({ labels }) => labels)
    .filter(({ id }) => !view.hidden.includes(`label-${id}`))
    .map((request) => {
      const offset = view.labelOffsets[request.id] ?? steady?.get(request.id);
      return offset ? { ...request, offset } : request;
    });
  const met = made.flatMap(({ obstacles }) => obstacles);
  const obstacles = {
    polylines: met.flatMap(({ polylines }) => polylines ?? []),
    boxes: met.flatMap(({ boxes }) => boxes ?? []),
    circles: met.flatMap(({ circles }) => circles ?? []),
  };
  const placed = layout(requests, obstacles, frame);

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
      unplaced: placed.unplaced,
    },
    view: markView,
    boxes: placed.boxes,
    requests,
  };
}
