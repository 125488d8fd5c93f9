import type { StateResult } from '../../../core/sheet/results.ts';
import type { Mark, MarkView } from '../mark.ts';
import { type } from '../page.ts';
import type { LabelRequest } from '../layout/request.ts';
import type { Shape } from '../scene/scene.ts';

const inside = (s: StateResult, { map }: MarkView): boolean => !map.outside.includes(s.id);

/** States: a dot at the true point, its error box, a tag on a short leader, and its name. */
export const states: Mark<StateResult> = {
  id: 'states',
  layer: 'states',
  clipped: false,
  data: (view) =>
    view.results.states.filter(
      (s) =>
        s.substance === view.map.substance && !view.view.hidden.includes(s.id) && inside(s, view),
    ),
  shapes: (s, { project, colours, frame }) => {
    const at = project(s.T, s.p);
    const own = colours.own[0]!;
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
  labels: (s, { project, colours }) => {
    const at = project(s.T, s.p);
    const tag: LabelRequest = {
      kind: 'point',
      id: s.id,
      of: s.id,
      at,
      gap: 3,
      leader: true,
      tag: colours.own[0]!,
      runs: [{ text: s.tag, bold: true }],
      size: type.label,
      colour: colours.paper,
      priority: 10,
    };
    if (!s.name) return [tag];
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
        runs: [{ text: s.name }],
        size: type.label,
        colour: colours.own[0]!,
        priority: 12,
      },
    ];
  },
  obstacles: (s, { project }) => ({ circles: [{ at: project(s.T, s.p), r: 1.2 }] }),
};
