import { scale, type Scale } from '../../../core/map/plane.ts';
import { formatReading, parseReading, type UnitId } from '../../../core/units/index.ts';
import { mmPerPoint, type Point, type Shape, type TextRun } from '../scene/scene.ts';
import type { Mark, MarkView, StillView } from '../mark.ts';
import { type } from '../page.ts';
import { axisTicks, type Reading, type Tick } from '../ticks.ts';
import { em, measure } from '../type/measure.ts';

/** One scale at one side of the frame. */
interface Axis {
  readonly id: string;
  readonly side: 'bottom' | 'left' | 'right';
  readonly ticks: readonly Tick[];
  readonly title: readonly TextRun[];
  readonly colour: 'ink' | 'muted';
  readonly grid: boolean;
}

/** "p / kPa (absolute)", "p_e / bar, gauge at 1 480 m", "t / °C": ISO 80000-1, 80000-4 and -5. */
function pressureTitle(
  unit: string,
  kind: 'absolute' | 'gauge',
  siteId: string | undefined,
  { sheet, words }: MarkView,
): readonly TextRun[] {
  if (kind === 'absolute')
    return [{ text: 'p', italic: true }, { text: ` / ${unit} (${words.axis.absolute})` }];
  const site = siteId === undefined ? sheet.sites[0] : sheet.sites.find(({ id }) => id === siteId);
  const where =
    site?.altitude !== undefined && site.barometer === undefined
      ? formatReading(parseReading(site.altitude, 'altitude'), words.decimal)
      : (site?.name ?? null);
  return [
    { text: 'p', italic: true },
    { text: 'e', scale: 0.75, shift: -0.22 },
    { text: ` / ${unit}, ${words.axis.gauge(where)}` },
  ];
}

/** Ticks along the page's width: 10 mm apart, or as far as their numbers are wide. */
function spacedTicks(s: Scale, length: number, reading: Reading): readonly Tick[] {
  let spacing = 10;
  for (;;) {
    const ticks = axisTicks(s, length, spacing, reading);
    const widest = Math.max(0, ...ticks.map(({ label }) => measure(label ?? [], type.tick)));
    if (widest + 2 <= spacing || spacing > length) return ticks;
    spacing = widest + 2.1;
  }
}

/** Axes by the view that they were made for: grid and axes are two marks of them. */
const known = new WeakMap<MarkView, readonly Axis[]>();

function axesOf(v: MarkView): readonly Axis[] {
  const made = known.get(v) ?? makeAxes(v);
  known.set(v, made);
  return made;
}

function makeAxes(v: MarkView): readonly Axis[] {
  const { view, map, words, results, sheet } = v;
  const T = scale(map.T.kind, map.T.range);
  const p = scale(map.p.kind, map.p.range);
  const decimal = words.decimal;
  const local = (id: string | undefined): number =>
    results.sites.find((s) => s.id === (id ?? sheet.sites[0]?.id))?.local ?? 101325;
  const offset = view.pressure.kind === 'gauge' ? local(view.pressure.site) : 0;
  const axes: Axis[] = [
    {
      id: 'temperature',
      side: 'bottom',
      ticks: spacedTicks(T, map.width, { unit: view.temperature.unit, offset: 0, decimal }),
      title: [
        {
          text:
            view.temperature.unit === 'K' ? words.axis.temperature.K : words.axis.temperature.other,
          italic: true,
        },
        { text: ` / ${view.temperature.unit}` },
      ],
      colour: 'ink',
      grid: true,
    },
    {
      id: 'pressure',
      side: 'left',
      ticks: axisTicks(p, map.height, 8, { unit: view.pressure.unit as UnitId, offset, decimal }),
      title: pressureTitle(view.pressure.unit, view.pressure.kind, view.pressure.site, v),
      colour: 'ink',
      grid: true,
    },
  ];
  if (view.second)
    axes.push({
      id: 'second',
      side: 'right',
      // At least 8 pt from tick to tick.
      ticks: axisTicks(p, map.height, view.pressure.scale === 'linear' ? 8 : 4.5, {
        unit: view.second.unit as UnitId,
        offset: view.second.kind === 'gauge' ? local(view.second.site) : 0,
        decimal,
      }),
      title: pressureTitle(view.second.unit, view.second.kind, view.second.site, v),
      colour: 'muted',
      grid: false,
    });
  return axes;
}

function spot(axis: Axis, share: number, { frame }: StillView): Point {
  if (axis.side === 'bottom') return [frame.x + share * frame.width, frame.y + frame.height];
  return [
    axis.side === 'left' ? frame.x : frame.x + frame.width,
    frame.y + (1 - share) * frame.height,
  ];
}

/** Hairlines at the labelled ticks of the main axes. */
export const grid: Mark<Axis> = {
  id: 'grid',
  layer: 'grid',
  clipped: false,
  data: (v) => axesOf(v).filter((axis) => axis.grid),
  shapes: (axis, v) => [
    {
      kind: 'poly',
      id: `grid-${axis.id}`,
      closed: false,
      points: axis.ticks
        .filter(({ label, share }) => label && share > 1e-6 && share < 1 - 1e-6)
        .map(({ share }) => {
          const [x, y] = spot(axis, share, v);
          const other: Point =
            axis.side === 'bottom' ? [x, v.frame.y] : [v.frame.x + v.frame.width, y];
          return [[x, y], other];
        }),
      stroke: { colour: v.colours.ink, weight: 0.35, opacity: 0.1 },
    },
  ],
};

/** Ticks inside the frame, their numbers, and the titles. */
export const axes: Mark<Axis> = {
  id: 'axes',
  layer: 'axes',
  clipped: false,
  data: axesOf,
  shapes: (axis, v) => {
    const colour = v.colours[axis.colour];
    const outwards = axis.side === 'right';
    const tick = ({ share, label }: Tick): readonly Point[] => {
      const [x, y] = spot(axis, share, v);
      const length = label ? 1.8 : 1;
      if (axis.side === 'bottom')
        return [
          [x, y],
          [x, y - length],
        ];
      return [
        [x, y],
        [x + length, y],
      ];
    };
    const lines = (major: boolean, weight: number): Shape => ({
      kind: 'poly',
      id: `ticks-${axis.id}-${major ? 'major' : 'minor'}`,
      closed: false,
      points: axis.ticks.filter(({ label }) => (label !== null) === major).map(tick),
      stroke: { colour, weight },
    });
    const half = (em.capHeight * type.tick * mmPerPoint) / 2;
    const numbers = axis.ticks
      .filter((t): t is Tick & { label: readonly TextRun[] } => t.label !== null)
      .map((t, i): Shape => {
        const [x, y] = spot(axis, t.share, v);
        const at: Point =
          axis.side === 'bottom'
            ? [x, y + 4.3]
            : axis.side === 'left'
              ? [x - 1.6, y + half]
              : [x + (outwards ? 2.4 : 1.6), y + half];
        return {
          kind: 'text',
          id: `tick-${axis.id}-${i}`,
          at,
          runs: t.label,
          size: type.tick,
          anchor: axis.side === 'bottom' ? 'middle' : axis.side === 'left' ? 'end' : 'start',
          colour,
        };
      });
    const widest = Math.max(
      0,
      ...axis.ticks.map(({ label }) => (label ? measure(label, type.tick) : 0)),
    );
    const { frame } = v;
    const size = axis.side === 'right' ? type.tick : type.title;
    // A title longer than its axis is high goes on downwards, not off the page.
    const height = Math.max(frame.y + frame.height / 2, measure(axis.title, size) / 2 + 1);
    const middle: Point =
      axis.side === 'bottom'
        ? [frame.x + frame.width / 2, frame.y + frame.height + 10]
        : axis.side === 'left'
          ? [Math.max(4, frame.x - widest - 4.2), height]
          : [frame.x + frame.width + widest + 5.2, height];
    const title: Shape = {
      kind: 'text',
      id: `title-${axis.id}`,
      at: middle,
      runs: axis.title,
      size,
      anchor: 'middle',
      colour,
      ...(axis.side === 'bottom' ? {} : { angle: axis.side === 'left' ? -90 : 90 }),
    };
    return [lines(false, 0.35), lines(true, 0.6), ...numbers, title];
  }, // Ticks stand inside the frame, where labels would meet them.
  obstacles: (axis, v) => ({
    boxes:
      axis.side === 'right'
        ? []
        : axis.ticks
            .filter(({ label }) => label !== null)
            .map(({ share }) => {
              const [x, y] = spot(axis, share, v);
              return axis.side === 'bottom'
                ? { x: x - 0.3, y: y - 2, width: 0.6, height: 2 }
                : { x, y: y - 0.3, width: 2, height: 0.6 };
            }),
  }),
};
