import { medium } from '../../core/equilibrium/medium.ts';
import { dragStart, runPath } from '../../core/process/path.ts';
import type { DraggedEnd, SnapKind } from '../../core/process/step.ts';
import { kindOf, type Step } from '../../core/process/steps/index.ts';
import type { PathItem, StateItem } from '../../core/sheet/schema.ts';
import { parseReading, readingFromSI } from '../../core/units/index.ts';
import type { Figure } from '../figure/figure.ts';
import { cornersOf } from '../figure/layout/box.ts';
import { anchorOf } from '../figure/layout/moved.ts';
import type { Point } from '../figure/scene/scene.ts';
import { pressureReading, temperatureReading, withItem, withView } from '../store/edits.ts';
import type { AppStore } from '../store/index.ts';
import { partsOf, withPath, withStep } from '../store/pathEdits.ts';
import { airAt, usualUnit } from '../store/places.ts';
import { loadedSubstance } from '../worker/evaluateSheet.ts';
import { landing, type Landing, type Peer } from './snap.ts';

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
  /** Moves the thing to a place on the page; `free` switches snapping off. */
  readonly move: (store: AppStore, figure: Figure, at: Point, free: boolean) => void;
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

/** What writes SI values as readings of an item's own units, kinds and site, to the page's resolution. */
function writer(figure: Figure, siteId: string | undefined, given: { T?: string; p?: string }) {
  const { results, sheet, view } = figure.view;
  const local = airAt(sheet, results, siteId);
  const old = given.p === undefined ? null : parseReading(given.p, 'pressure');
  const kind =
    old === null || old.kind === undefined || old.kind === 'unstated'
      ? sheet.pressureKind
      : old.kind;
  const usual = usualUnit(sheet, view);
  const unit =
    given.T === undefined ? view.temperature.unit : parseReading(given.T, 'temperature').unit;
  return {
    T: (T: number, step: number) => temperatureReading(T, unit, step).text,
    p: (p: number, step: number) => pressureReading(p, old?.unit ?? usual, kind, local, step).text,
  };
}

/** Points that a dragged thing can be level with. */
const peersOf = ({ view: { results } }: Figure): readonly Peer[] => [
  ...results.states,
  ...results.paths.flatMap((path) => path.states),
];

/** Tells the page where a held thing has come to lie. */
function hint(store: AppStore, figure: Figure, at: Landing | null): void {
  if (!at) return store.getState().hintAt(null);
  const { words } = figure.view;
  const level = [
    ...(at.level.T ? [words.editor.levelT(at.level.T)] : []),
    ...(at.level.p ? [words.editor.levelP(at.level.p)] : []),
  ];
  const text = at.boundary ? words.onThe(words.boundaryKind(at.boundary)) : level.join(', ');
  store.getState().hintAt(text === '' ? null : { text, boundary: at.boundary });
}

/** A held point: lands where the hand is, by `put`; nudging moves it from where it stands. */
function heldPoint(
  id: string,
  item: string,
  put: (store: AppStore, figure: Figure, at: Landing) => void,
): Held {
  return {
    kind: 'thing',
    item,
    move: (store, figure, at, free) => {
      const landed = landing(figure, at, id, peersOf(figure), free);
      hint(store, figure, landed);
      put(store, figure, landed);
    },
    nudge: (store, figure, right, up) => {
      const at = peersOf(figure).find((peer) => peer.id === id);
      if (!at) return;
      const { plane } = figure.view;
      const [x, y] = plane.project({ T: at.T, p: at.p })!;
      const next = plane.invert([x + right * pageStep, y - up * pageStep]);
      put(store, figure, {
        T: right ? next.T : at.T,
        p: up ? next.p : at.p,
        boundary: null,
        level: { T: null, p: null },
      });
    },
  };
}

const snapOf = (figure: Figure, at: Landing): SnapKind | null => {
  const kind = figure.view.map.boundaries.find(({ id }) => id === at.boundary)?.kind;
  return kind === undefined || kind === 'critical' ? null : kind;
};

/** A state moved: on the boiling line it becomes boiling, off it again it has T and p. */
function movedState(item: StateItem, figure: Figure, at: Landing): StateItem {
  const write = writer(figure, item.site, item);
  const steps = stepsAt(figure, at.T, at.p);
  const { T: oldT, p: oldP, vapourFraction, ...rest } = item;
  const T = write.T(at.T, steps.T);
  const p = write.p(at.p, steps.p);
  if (snapOf(figure, at) === 'saturation') {
    const fraction = vapourFraction ?? '0 %';
    return oldT === undefined && oldP !== undefined
      ? { ...rest, p, vapourFraction: fraction }
      : { ...rest, T, vapourFraction: fraction };
  }
  return { ...rest, T, p };
}

function heldState(item: StateItem): Held {
  return heldPoint(item.id, item.id, (store, figure, at) =>
    store
      .getState()
      .edit(
        `move ${item.tag}`,
        (sheet) =>
          withItem(sheet, item.id, (now) =>
            now.kind === 'state' ? movedState(now, figure, at) : now,
          ),
        `move ${item.id}`,
      ),
  );
}

function heldStart(path: PathItem): Held {
  const id = `${path.id}.start`;
  return heldPoint(id, id, (store, figure, at) => {
    const write = writer(figure, path.site, path.start);
    const steps = stepsAt(figure, at.T, at.p);
    const { T, p } = dragStart(path.start, at);
    store.getState().edit(
      `move ${path.tag}1`,
      (sheet) =>
        withPath(sheet, path.id, (now) => ({
          ...now,
          start: {
            ...now.start,
            ...(T === undefined ? {} : { T: write.T(T, steps.T) }),
            ...(p === undefined ? {} : { p: write.p(p, steps.p) }),
          },
        })),
      `move ${id}`,
    );
  });
}

/** A dragged end as readings. */
function written(
  end: DraggedEnd,
  write: ReturnType<typeof writer>,
  steps: { T: number; p: number },
): Step['end'] {
  const { T, p, boundary, vapourFraction, solidFraction, heat, efficiency } = end;
  const share = (x: number): string => readingFromSI('fraction', x, 1, '%').text;
  return {
    ...(T === undefined ? {} : { T: write.T(T, steps.T) }),
    ...(p === undefined ? {} : { p: write.p(p, steps.p) }),
    ...(boundary === undefined ? {} : { boundary }),
    ...(vapourFraction === undefined ? {} : { vapourFraction: share(vapourFraction) }),
    ...(solidFraction === undefined ? {} : { solidFraction: share(solidFraction) }),
    ...(heat === undefined ? {} : { heat: readingFromSI('specificEnergy', heat, 1, 'kJ/kg').text }),
    ...(efficiency === undefined ? {} : { efficiency: share(efficiency) }),
  };
}

function heldStep(path: PathItem, step: Step): Held {
  const id = `${path.id}.${step.id}`;
  return heldPoint(id, id, (store, figure, at) => {
    const { sheet, results } = figure.view;
    const substance = loadedSubstance(path.substance ?? sheet.substances[0]!);
    const now = sheet.items.find((item) => item.id === path.id);
    if (!substance || now?.kind !== 'path') return;
    const local = airAt(sheet, results, path.site);
    const env = { m: medium(substance), local, pressureKind: sheet.pressureKind };
    const run = runPath(now, env).steps.find((s) => s.step.id === step.id);
    if (!run?.from) return;
    // An end on a line keeps to its line; the sentence takes it off.
    const snap = snapOf(figure, at);
    const target = { T: at.T, p: at.p, ...(snap === null ? {} : { snap }) };
    const end = kindOf(run.step).drag(run.step, run.from, target, env);
    if (!end) return;
    const old = run.step.end as { readonly T?: string; readonly p?: string };
    const write = writer(figure, path.site, {
      ...((old.T ?? path.start.T) ? { T: (old.T ?? path.start.T)! } : {}),
      ...((old.p ?? path.start.p) ? { p: (old.p ?? path.start.p)! } : {}),
    });
    const taken = written(end, write, stepsAt(figure, at.T, at.p));
    store
      .getState()
      .edit(
        `move the end of a step`,
        (s) =>
          withPath(s, path.id, (p) =>
            withStep(p, step.id, (before) => ({ ...before, end: taken }) as Step),
          ),
        `move ${id}`,
      );
  });
}

function heldLabel(id: string, item: string, grip: Point): Held {
  return {
    kind: 'thing',
    item,
    move: (store, figure, [x, y]) => {
      const request = figure.requests.find((r) => r.id === id);
      if (!request) return;
      const anchor = anchorOf(request, figure.view.frame);
      const round = (v: number): number => Math.round(v * 10) / 10;
      const offset: [number, number] = [
        round(x - grip[0] - anchor[0]),
        round(y - grip[1] - anchor[1]),
      ];
      store.getState().edit(
        'move a label',
        (sheet) =>
          withView(sheet, figure.view.view.id, (v) => ({
            ...v,
            labelOffsets: { ...v.labelOffsets, [id]: offset },
          })),
        `label ${id}`,
      );
    },
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
  const { sheet } = figure.view;
  const item = sheet.items.find(({ id }) => id === of);
  if (item?.kind === 'state') return heldState(item);
  const parts = of === null ? null : partsOf(sheet, of);
  if (parts) return parts.step ? heldStep(parts.path, parts.step) : heldStart(parts.path);
  return { kind: 'map', item: of, at: at ?? [0, 0], figure, moved: false };
}
