import type { Words } from '../../words/en.ts';
import type { Mark } from '../mark.ts';
import type { Point, Rect } from '../scene/scene.ts';

const spacing = 2.6;

/** 45° hatching of a rectangle, in lines that keep their places from one rectangle to the next. */
function hatch({ x, y, width, height }: Rect): Point[][] {
  const lines: Point[][] = [];
  const first = Math.ceil((x + y) / spacing) * spacing;
  for (let s = first; s < x + width + y + height; s += spacing) {
    const x0 = Math.max(x, s - (y + height));
    const x1 = Math.min(x + width, s - y);
    if (x1 > x0)
      lines.push([
        [x0, s - x0],
        [x1, s - x1],
      ]);
  }
  return lines;
}

/** On the cold side the end is often that nobody has published the solid's lines. */
const told = (id: string, absent: readonly unknown[], words: Words): string =>
  id === 'beyond-cold' && absent.length > 0 ? words.notPublished : words.noSource;

/** Where the published equations end: hatched, so that nothing there looks known. */
export const beyond: Mark<Rect & { readonly id: string }> = {
  id: 'beyond',
  layer: 'regions',
  clipped: true,
  data: ({ map, frame, project }) => {
    const [Tlow, Thigh] = map.validity.T;
    const [left] = project(Math.max(Tlow, map.T.range[0]), map.p.range[1]);
    const [right] = project(Math.min(Thigh, map.T.range[1]), map.p.range[1]);
    const [, top] = project(map.T.range[0], Math.min(map.validity.pmax, map.p.range[1]));
    const inner = { x: left, width: right - left };
    return [
      { id: 'beyond-cold', x: frame.x, y: frame.y, width: left - frame.x, height: frame.height },
      {
        id: 'beyond-hot',
        x: right,
        y: frame.y,
        width: frame.x + frame.width - right,
        height: frame.height,
      },
      { id: 'beyond-pressure', ...inner, y: frame.y, height: top - frame.y },
    ].filter(({ width, height }) => width > 0.05 && height > 0.05);
  },
  shapes: (r, { map, colours, words }) => [
    {
      kind: 'poly',
      id: r.id,
      points: hatch(r),
      closed: false,
      stroke: { colour: colours.muted, weight: 0.35, opacity: 0.6 },
      title: told(r.id, map.absent, words),
    },
  ],
  labels: (r, { map, colours, words }) => [
    {
      kind: 'area',
      id: r.id,
      runs: [{ text: told(r.id, map.absent, words) }],
      size: 7,
      colour: colours.muted,
      priority: 45,
      plate: true,
      ring: [
        [r.x, r.y],
        [r.x + r.width, r.y],
        [r.x + r.width, r.y + r.height],
        [r.x, r.y + r.height],
      ],
    },
  ],
};
