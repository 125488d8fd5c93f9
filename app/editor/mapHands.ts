import {
  useEffect,
  useRef,
  type KeyboardEvent,
  type MouseEvent,
  type PointerEvent,
  type RefObject,
} from 'react';
import type { Reading, UnitId } from '../../core/units/index.ts';
import type { View } from '../../core/sheet/schema.ts';
import type { Figure } from '../figure/figure.ts';
import { axesAt, panned, zoomed, type Ranges } from '../figure/gesture.ts';
import { pressureReading, temperatureReading, withView } from '../store/edits.ts';
import type { AppStore } from '../store/index.ts';
import { airAt } from '../store/places.ts';
import { useAppStore } from './context.ts';
import { dragTarget, type Drag } from './drag.ts';
import { placeAt } from './place.ts';

/** The reading with the fewest digits that says the same number as the one written to `step`. */
function shortest(write: (step: number) => Reading, step: number): string {
  const full = write(step);
  for (let s = step * 1e6; s > step; s /= 10) {
    const short = write(s);
    if (Math.abs(short.number - full.number) <= 1e-9 * Math.abs(full.number)) return short.text;
  }
  return full.text;
}

/** A view with axis ranges written as readings, to a thousandth of their span. */
export function withRanges(view: View, { T, p }: Ranges, local: number): View {
  const { unit, kind } = view.pressure;
  const steps: readonly [number, number] =
    view.pressure.scale === 'logarithmic'
      ? [p[0] / 200, p[1] / 200]
      : [(p[1] - p[0]) / 1000, (p[1] - p[0]) / 1000];
  const shownKind = view.pressure.scale === 'logarithmic' ? 'absolute' : kind;
  const pressure = (value: number, step: number): string =>
    value <= 0
      ? `0 ${unit}(a)`
      : shortest((s) => pressureReading(value, unit as UnitId, shownKind, local, s), step);
  const temperature = (value: number): string =>
    shortest((s) => temperatureReading(value, view.temperature.unit, s), (T[1] - T[0]) / 1000);
  return {
    ...view,
    temperature: { ...view.temperature, range: [temperature(T[0]), temperature(T[1])] },
    pressure: { ...view.pressure, range: [pressure(p[0], steps[0]), pressure(p[1], steps[1])] },
  };
}

function setRanges(
  store: AppStore,
  figure: Figure,
  ranges: Ranges,
  name: string,
  key: string,
): void {
  const { view, results, sheet } = figure.view;
  const local = airAt(sheet, results, view.pressure.site);
  store
    .getState()
    .edit(name, (s) => withView(s, view.id, (v) => withRanges(v, ranges, local)), key);
}

/** Hands on the map: wheel, drag, arrows; what lies under the pointer goes to the reading line. */
export function useMapHands(svgRef: RefObject<SVGSVGElement | null>, figure: Figure | null) {
  const store = useAppStore();
  const drag = useRef<Drag | null>(null);
  // What was selected before a first click let go of it, for a second one to build on, and what the
  // first one left selected: anything else was chosen elsewhere since.
  const before = useRef<{ selected: string | null; at: number; left: string | null }>({
    selected: null,
    at: 0,
    left: null,
  });

  const pageAt = (event: { clientX: number; clientY: number }): [number, number] => {
    const box = svgRef.current!.getBoundingClientRect();
    const { width, height } = figure!.scene;
    return [
      ((event.clientX - box.left) / box.width) * width,
      ((event.clientY - box.top) / box.height) * height,
    ];
  };

  // The wheel must be able to keep the page from scrolling, which React's own listener cannot.
  useEffect(() => {
    const svg = svgRef.current;
    if (!svg || !figure) return;
    const onWheel = (event: WheelEvent): void => {
      event.preventDefault();
      const { frame, map } = figure.view;
      const [x, y] = pageAt(event);
      const about = {
        T: Math.min(1, Math.max(0, (x - frame.x) / frame.width)),
        p: Math.min(1, Math.max(0, 1 - (y - frame.y) / frame.height)),
      };
      const factor = Math.exp(-Math.max(-200, Math.min(200, event.deltaY)) / 400);
      const ranges = zoomed(map, about, factor, axesAt(frame, x, y));
      setRanges(store, figure, ranges, 'zoom', 'zoom');
    };
    svg.addEventListener('wheel', onWheel, { passive: false });
    return () => svg.removeEventListener('wheel', onWheel);
  });

  const onPointerDown = (event: PointerEvent): void => {
    if (!figure || event.button !== 0) return;
    const target = (event.target as Element).closest<SVGElement>('[data-of]');
    const at = pageAt(event);
    drag.current = dragTarget(figure, target?.dataset.of ?? null, at);
    const { selected } = store.getState();
    if (event.timeStamp - before.current.at > 500 || selected !== before.current.left)
      before.current = { selected, at: event.timeStamp, left: null };
    store.getState().select(drag.current.item);
    store.getState().settle();
    store.getState().hold(true);
    event.currentTarget.setPointerCapture(event.pointerId);
  };
  const onPointerMove = (event: PointerEvent): void => {
    if (!figure) return;
    const at = pageAt(event);
    const { frame, plane } = figure.view;
    const inside =
      at[0] >= frame.x &&
      at[0] <= frame.x + frame.width &&
      at[1] >= frame.y &&
      at[1] <= frame.y + frame.height;
    store.getState().point(inside ? plane.invert([at[0] - frame.x, at[1] - frame.y]) : null);
    if (!drag.current) return;
    if (drag.current.kind === 'map') {
      const from = drag.current;
      const dx = (at[0] - from.at[0]) / frame.width;
      const dy = -(at[1] - from.at[1]) / frame.height;
      if (Math.hypot(dx * frame.width, dy * frame.height) < 0.6 && !from.moved) return;
      from.moved = true;
      setRanges(store, from.figure, panned(from.figure.view.map, dx, dy), 'move the map', 'pan');
    } else drag.current.move(store, figure, at, event.altKey);
  };
  const onPointerUp = (event: PointerEvent): void => {
    if (!drag.current) return;
    const was = drag.current;
    drag.current = null;
    store.getState().hintAt(null);
    store.getState().hold(false);
    event.currentTarget.releasePointerCapture(event.pointerId);
    store.getState().settle();
    if (was.kind === 'map' && !was.moved) store.getState().select(null);
    before.current.left = store.getState().selected;
  };
  const onKeyDown = (event: KeyboardEvent): void => {
    if (!figure || event.target !== event.currentTarget) return;
    const { map } = figure.view;
    const far = event.shiftKey ? 10 : 1;
    const arrows: Record<string, [number, number]> = {
      ArrowLeft: [-1, 0],
      ArrowRight: [1, 0],
      ArrowUp: [0, 1],
      ArrowDown: [0, -1],
    };
    const arrow = arrows[event.key];
    const { selected } = store.getState();
    if (arrow && !event.ctrlKey && !event.metaKey) {
      const held = selected ? dragTarget(figure, selected, null) : null;
      if (held && held.kind !== 'map') held.nudge(store, figure, arrow[0] * far, arrow[1] * far);
      else {
        const step = 0.05 * far;
        setRanges(
          store,
          figure,
          panned(map, -arrow[0] * step, -arrow[1] * step),
          'move the map',
          'pan',
        );
      }
    } else if (event.key === '+' || event.key === '=' || event.key === '-') {
      const factor = event.key === '-' ? 1 / 1.25 : 1.25;
      setRanges(
        store,
        figure,
        zoomed(map, { T: 0.5, p: 0.5 }, factor, { T: true, p: true }),
        'zoom',
        'zoom',
      );
    } else if (event.key === 'Escape') store.getState().select(null);
    else return;
    event.preventDefault();
  };
  const onDoubleClick = (event: MouseEvent): void => {
    if (!figure) return;
    const [x, y] = pageAt(event);
    const { frame } = figure.view;
    const inside =
      x > frame.x && x < frame.x + frame.width && y > frame.y && y < frame.y + frame.height;
    if (!inside) return;
    store.getState().select(before.current.selected);
    placeAt(store, figure, [x, y], event.altKey);
  };
  const onPointerLeave = (): void => store.getState().point(null);
  return { onPointerDown, onPointerMove, onPointerUp, onPointerLeave, onDoubleClick, onKeyDown };
}
