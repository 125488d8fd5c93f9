import type { PathState, StateResult } from '../../../core/sheet/results.ts';
import { format } from '../../../core/units/index.ts';
import type { Mark, MarkView, StillView } from '../mark.ts';
import { type } from '../page.ts';
import type { LabelRequest } from '../layout/request.ts';
import type { Shape } from '../scene/scene.ts';
import { pathColour, pathIndex } from './paths.ts';

/** A state with the colour of the path that it belongs to. */
interface Coloured {
  readonly s: StateResult | PathState;
  readonly own: string;
}

const inside = (s: StateResult, { map }: MarkView): boolean => !map.outside.includes(s.id);

/** What a path's state on a line is told by: "boiling, 121.1 °C". */
function noteOf(s: StateResult | PathState, { words, view }: StillView): string | null {
  if (!('on' in s) || s.on === null) return null;
  const at = format(s.T, view.temperature.unit, { decimals: 1, decimal: words.decimal });
  return words.stateNote(words.onLine(s.on), at);
}

/** States: a dot at the true point, its error box, a tag on a short leader, and its name. */
export const states: Mark<Coloured> = {
  id: 'states',
  layer: 'states',
  clipped: false,
  data: (view) => {
    const free = view.results.states.map((s) => ({ s, own: pathColour(view, 0), of: s.id }));
    const onPaths = view.results.paths.flatMap((path) =>
      path.states.map((s) => ({ s, own: pathColour(view, pathIndex(view, path.id)), of: path.id })),
    );
    return [...free, ...onPaths].filter(
      ({ s, of }) =>
        s.substance === view.map.substance &&
        !view.view.hidden.includes(s.id) &&
        !view.view.hidden.includes(of) &&
        inside(s, view),
    );
  },
  shapes: ({ s, own }, { project, colours, frame }) => {
    const at = project(s.T, s.p);
    const shapes: Shape[] = [];
    if (s.error.T > 0 || s.error.p > 0) {
      const [x0, y1] = project(s.T - s.error.T, Math.max(s.p - s.error.p, 1e-12));
      const [x1, y0] = project(s.T + s.error.T, s.p + s.error.p);
      const left = Math.max(frame.x, x0);
      const top = Math.max(frame.y, y0);
      const width = Math.min(frame.x + frame.width, x1) - left;
      const height = Math.min(frame.y + frame.height, y1) - top;
      // A box smaller than its dot says nothing.
      if (width > 1.2 || height > 1.2)
        shapes.push({
          kind: 'rect',
          id: `${s.id}-box`,
          rect: { x: left, y: top, width: Math.max(width, 0.01), height: Math.max(height, 0.01) },
          stroke: { colour: own, weight: 0.5 },
          fill: { colour: own, opacity: 0.08 },
        });
    }
    shapes.push({
      kind: 'circle',
      id: s.id,
      of: s.id,
      at,
      r: 0.85,
      fill: { colour: own },
      stroke: { colour: colours.paper, weight: 0.9 },
      title: s.name ? `${s.tag} ${s.name}` : s.tag,
    });
    return shapes;
  },
  labels: ({ s, own }, view) => {
    const { project, colours } = view;
    const at = project(s.T, s.p);
    const tag: LabelRequest = {
      kind: 'point',
      id: s.id,
      of: s.id,
      at,
      gap: 3,
      leader: true,
      tag: own,
      runs: [{ text: s.tag, bold: true }],
      size: type.label,
      colour: colours.paper,
      priority: 10,
    };
    const text = s.name ?? noteOf(s, view);
    if (!text) return [tag];
    return [
      tag,
      {
        kind: 'point',
        id: `${s.id}-name`,
        of: s.id,
        at,
        gap: 1.6,
        leader: true,
        plate: true,
        runs: [{ text }],
        size: type.label,
        colour: own,
        priority: 12,
      },
    ];
  },
  obstacles: ({ s }, { project }) => ({ circles: [{ at: project(s.T, s.p), r: 1.2 }] }),
};
