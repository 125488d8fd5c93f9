import type { StateItem } from '../../core/sheet/schema.ts';
import { parseReading, type Reading } from '../../core/units/index.ts';
import type { Figure } from '../figure/figure.ts';
import { cornersOf } from '../figure/layout/box.ts';
import { anchorOf } from '../figure/layout/moved.ts';
import type { Point } from '../figure/scene/scene.ts';
import { pressureReading, temperatureReading, withItem, withView } from '../store/edits.ts';
import type { AppStore } from '../store/index.ts';

/** What a hand holds: the map itself, or a thing that can be moved or nudged. */
export type Drag =
  | {
      readonly kind: 'map';
      readonly item: string | null;
      readonly at: Point;
      readonly figure: Figure;
      moved: boolean;
    }
  | Held;

interface Held {
  readonly kind: 'thing';
  readonly item: string;
  /** Moves the thing to a place on the page. */
  readonly move: (store: AppStore, figure: Figure, at: Point) => void;
  /** Moves it by small steps right and up. */
  readonly nudge: (store: AppStore, figure: Figure, right: number, up: number) => void;
}

/** Smallest move worth writing down, in mm on the page. */
const pageStep = 0.25;

/** Steps of temperature (K) and pressure (Pa) that a page step means at a place. */
export function stepsAt(figure: Figure, T: number, p: number): { T: number; p: number } {
  const { plane } = figure.view;
  const [x, y] = plane.project({ T, p })!;
  const next = plane.invert([x + pageStep, y - pageStep]);
  return { T: Math.abs(next.T - T), p: Math.abs(next.p - p) };
}

const unitOf = (text: string, quantity: 'temperature' | 'pressure'): Reading =>
  parseReading(text, quantity);

/** A state item moved to (T, p): its readings keep their units and kinds, a state on a line slides along it. */
function movedState(item: StateItem, figure: Figure, T: number, p: number): StateItem {
  const { results, sheet } = figure.view;
  const siteId = item.site ?? sheet.sites[0]?.id;
  const local = results.sites.find(({ id }) => id === siteId)?.local ?? 101325;
  const steps = stepsAt(figure, T, p);
  const out: { -readonly [K in keyof StateItem]: StateItem[K] } = { ...item };
  if (item.T !== undefined)
    out.T = temperatureReading(T, unitOf(item.T, 'temperature').unit, steps.T).text;
  if (item.p !== undefined) {
    const old = unitOf(item.p, 'pressure');
    const kind = old.kind === undefined || old.kind === 'unstated' ? sheet.pressureKind : old.kind;
    out.p = pressureReading(p, old.unit, kind, local, steps.p).text;
  }
  return out;
}

function heldState(item: StateItem): Held {
  const put = (store: AppStore, figure: Figure, T: number, p: number): void =>
    store
      .getState()
      .edit(
        `move ${item.tag}`,
        (sheet) =>
          withItem(sheet, item.id, (now) =>
            now.kind === 'state' ? movedState(now, figure, T, p) : now,
          ),
        `move ${item.id}`,
      );
  return {
    kind: 'thing',
    item: item.id,
    move: (store, figure, [x, y]) => {
      const { frame, plane } = figure.view;
      const inside = (v: number, low: number, size: number): number =>
        Math.min(low + size, Math.max(low, v));
      const { T, p } = plane.invert([
        inside(x, frame.x, frame.width) - frame.x,
        inside(y, frame.y, frame.height - 0.01) - frame.y,
      ]);
      put(store, figure, T, p);
    },
    nudge: (store, figure, right, up) => {
      const state = figure.view.results.states.find(({ id }) => id === item.id);
      if (!state) return;
      const { plane } = figure.view;
      const [x, y] = plane.project({ T: state.T, p: state.p })!;
      const { T, p } = plane.invert([x + right * pageStep, y - up * pageStep]);
      put(store, figure, right ? T : state.T, up ? p : state.p);
    },
  };
}

function heldLabel(id: string, item: string, grip: Point): Held {
  const put = (store: AppStore, figure: Figure, centre: (anchor: Point) => Point): void => {
    const request = figure.requests.find((r) => r.id === id);
    if (!request) return;
    const anchor = anchorOf(request, figure.view.frame);
    const [x, y] = centre(anchor);
    const round = (v: number): number => Math.round(v * 10) / 10;
    const offset: [number, number] = [round(x - anchor[0]), round(y - anchor[1])];
    store.getState().edit(
      'move a label',
      (sheet) =>
        withView(sheet, figure.view.view.id, (v) => ({
          ...v,
          labelOffsets: { ...v.labelOffsets, [id]: offset },
        })),
      `label ${id}`,
    );
  };
  return {
    kind: 'thing',
    item,
    move: (store, figure, [x, y]) => put(store, figure, () => [x - grip[0], y - grip[1]]),
    nudge: () => undefined,
  };
}

/** What is under a hand: a label by its box, a thing by the id it was drawn with, else the map. */
export function dragTarget(figure: Figure, of: string | null, at: Point | null): Drag {
  if (at) {
    const label = figure.boxes.find(({ box }) => {
      const corners = cornersOf(box);
      return corners.every((a, i) => {
        const b = corners[(i + 1) % corners.length]!;
        return (b[0] - a[0]) * (at[1] - a[1]) - (b[1] - a[1]) * (at[0] - a[0]) >= -1e-9;
      });
    });
    if (label) {
      const { x, y } = label.box;
      return heldLabel(label.id, label.of ?? label.id, [at[0] - x, at[1] - y]);
    }
  }
  const item = figure.view.sheet.items.find(({ id }) => id === of);
  if (item?.kind === 'state') return heldState(item);
  return { kind: 'map', item: of, at: at ?? [0, 0], figure, moved: false };
}
