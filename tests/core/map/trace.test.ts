import { describe, expect, it } from 'vitest';
import { boundaryCurves } from '../../../core/map/boundary.ts';
import { scale, temperaturePressurePlane, type Place } from '../../../core/map/plane.ts';
import { trace, traceTolerance } from '../../../core/map/trace.ts';
import { distance, distanceToLine, frames, media, share, told } from './frames.ts';

const dense = 20;

describe.each(media)('trace(…) of %s', (name, m) => {
  const planes = frames(m, 2026, share(m, 90));

  it('stays within 0.03 mm of a 20 times denser trace', () => {
    const found: string[] = [];
    let compared = 0;
    for (const plane of planes)
      for (const curve of boundaryCurves(m)) {
        const line = trace(curve, plane);
        if (!line) continue;
        const places = line.points.map((point) => plane.project(point)!);
        const axis = curve.along === 'T' ? plane.T : plane.p;
        const [low, high] = curve[curve.along];
        for (let i = 1; i < places.length; i++) {
          const a = line.points[i - 1]!;
          const sa = axis.share(a[curve.along]);
          const sb = axis.share(line.points[i]![curve.along]);
          for (let k = 1; k < dense; k++) {
            const value = Math.min(high, Math.max(low, axis.value(sa + ((sb - sa) * k) / dense)));
            const point =
              curve.along === 'T' ? curve.atTemperature(value, a) : curve.atPressure(value, a);
            const place = plane.project(point)!;
            let off = distance(place, places[i - 1]!, places[i]!);
            if (off > traceTolerance) off = distanceToLine(place, places);
            compared++;
            if (!(off <= traceTolerance))
              found.push(`${curve.id} ${off} mm at T=${point.T}, p=${point.p}: ${told(plane)}`);
          }
        }
      }
    expect(found.slice(0, 5)).toEqual([]);
    expect(compared).toBeGreaterThan(2000);
  });

  it('leaves nothing of a boundary out of the frame that lies in it', () => {
    const found: string[] = [];
    let inside = 0;
    for (const plane of planes)
      for (const curve of boundaryCurves(m)) {
        const line = trace(curve, plane);
        const places: readonly Place[] = line?.points.map((point) => plane.project(point)!) ?? [];
        for (let k = 0; k <= 60; k++) {
          const T = curve.T[0] + ((curve.T[1] - curve.T[0]) * k) / 60;
          const point = curve.atTemperature(Math.min(curve.T[1], T));
          const place = plane.project(point)!;
          const [x, y] = place;
          if (x < 0.05 || y < 0.05 || x > plane.width - 0.05 || y > plane.height - 0.05) continue;
          inside++;
          const off = distanceToLine(place, places);
          if (!(off <= traceTolerance))
            found.push(`${curve.id} ${off} mm at T=${T}: ${told(plane)}`);
        }
      }
    expect(found.slice(0, 5)).toEqual([]);
    expect(inside).toBeGreaterThan(60);
  });

  it('ends on the frame or where the curve ends, and has its vertices in the frame', () => {
    const found: string[] = [];
    for (const plane of planes)
      for (const curve of boundaryCurves(m)) {
        const line = trace(curve, plane);
        if (!line) continue;
        expect(line.points.length).toBeGreaterThanOrEqual(2);
        const { width, height } = plane;
        const ends = [line.points[0]!, line.points.at(-1)!];
        for (const end of ends) {
          const [x, y] = plane.project(end)!;
          const onFrame = Math.min(...[x, y, x - width, y - height].map(Math.abs)) < 1e-6;
          const endOfCurve = [0, 1].some((i) => Math.abs(end.T - curve.T[i]!) < 1e-9 * end.T);
          if (!onFrame && !endOfCurve)
            found.push(`${curve.id} ends at (${x}, ${y}) mm: ${told(plane)}`);
        }
        for (const point of line.points) {
          const [x, y] = plane.project(point)!;
          if (!(x >= -1e-6 && y >= -1e-6 && x <= width + 1e-6 && y <= height + 1e-6))
            found.push(`${curve.id} leaves the frame at (${x}, ${y}) mm: ${told(plane)}`);
        }
      }
    expect(found.slice(0, 5)).toEqual([]);
  });

  it('has every vertex on the boundary as it is solved afresh', () => {
    const found: string[] = [];
    for (const plane of planes.slice(0, 30))
      for (const curve of boundaryCurves(m))
        for (const { T, p } of trace(curve, plane)?.points ?? []) {
          const fresh =
            curve.along === 'T'
              ? curve.atTemperature(Math.min(curve.T[1], Math.max(curve.T[0], T)))
              : curve.atPressure(Math.min(curve.p[1], Math.max(curve.p[0], p)));
          // Seen on paper: a hundred-thousandth of a millimetre.
          const [x, y] = plane.project({ T, p })!;
          const [X, Y] = plane.project(fresh)!;
          const off = Math.hypot(x - X, y - Y);
          if (!(off < 1e-5))
            found.push(`${curve.id} off by ${off} mm at T=${T}, p=${p}: ${told(plane)}`);
        }
    expect(found.slice(0, 5)).toEqual([]);
  });

  it('says on both sides what the curve says, and is finite', () => {
    for (const plane of planes)
      for (const curve of boundaryCurves(m))
        for (const { T, p, sides } of trace(curve, plane)?.points ?? []) {
          expect(Number.isFinite(T) && Number.isFinite(p)).toBe(true);
          for (const side of sides)
            expect(side === null || side.rho === null || side.rho > 0).toBe(true);
        }
  });

  it('takes at most 20 evaluations a vertex over the whole map', () => {
    let vertices = 0;
    const before = m.fluid.count;
    for (const plane of planes.filter((_, i) => i % 3 === 0))
      for (const curve of boundaryCurves(m)) vertices += trace(curve, plane)?.points.length ?? 0;
    const each = (m.fluid.count - before) / vertices;
    console.info(`${name}: ${each.toFixed(1)} evaluations a vertex, ${vertices} vertices`);
    expect(each).toBeGreaterThan(1);
    expect(each).toBeLessThan(20);
  });
});

/** Where tracing to 4 × 0.8 × tolerance once left the curve by up to 0.049 mm: about inflections. */
const inflections = [
  [
    'water',
    [174.34226801153272, 871.9201153592742],
    [0.3145153528377223, 271213022.95175517],
    387.7,
    245.4,
  ],
  [
    'water',
    [97.38315842114389, 1189.5828891560418],
    [0.0014897823953558575, 273590244.36403537],
    330.4,
    341.0,
  ],
] as const;

it.each(inflections)(
  'trace(…) of %s keeps to the curve about an inflection, T %j K',
  (name, T, p, width, height) => {
    const m = media.find(([known]) => known === name)![1];
    const plane = temperaturePressurePlane({
      T: scale('reciprocal', T),
      p: scale('logarithmic', p),
      width,
      height,
    });
    const curve = boundaryCurves(m).find(({ kind }) => kind === 'saturation')!;
    const places = trace(curve, plane)!.points.map((point) => plane.project(point)!);
    let worst = 0;
    for (let k = 1; k < 1000; k++) {
      const point = curve.atTemperature(curve.T[0] + ((curve.T[1] - curve.T[0]) * k) / 1000);
      worst = Math.max(worst, distanceToLine(plane.project(point)!, places));
    }
    expect(worst).toBeLessThanOrEqual(traceTolerance);
    expect(worst).toBeGreaterThan(0);
  },
);
