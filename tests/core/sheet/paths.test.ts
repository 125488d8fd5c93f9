import { describe, expect, it } from 'vitest';
import { evaluate } from '../../../core/sheet/evaluate.ts';
import { readSheet } from '../../../core/sheet/read.ts';
import type { PathItem, Sheet } from '../../../core/sheet/schema.ts';
import { carbonDioxide } from '../../../core/substances/carbon-dioxide.ts';
import { water } from '../../../core/substances/water.ts';
import { scale, temperaturePressurePlane } from '../../../core/map/plane.ts';

const substances = new Map([water, carbonDioxide].map((s) => [s.id, s]));
const frame = () => ({ width: 150, height: 100 });

const come: PathItem = {
  id: 'come-up',
  kind: 'path',
  tag: 'A',
  start: { T: '20 °C', p: '0 bar(g)' },
  steps: [
    { id: 'heat', kind: 'constantPressure', end: { boundary: 'saturation' }, time: '18 min' },
    { id: 'boil', kind: 'hold', end: { vapourFraction: '10 %' }, time: '5 min' },
    { id: 'rise', kind: 'follow', end: { p: '1.2 bar(g)', vapourFraction: '10 %' }, time: '7 min' },
  ],
};

const sheet = (...items: readonly unknown[]) => ({
  version: 1,
  made: { tool: 'test', formulations: {} },
  title: '',
  pressureKind: 'gauge',
  substances: ['water', 'carbon-dioxide'],
  sites: [
    { id: 'high', name: 'High', altitude: '1500 m', probe: '0.5 K' },
    { id: 'sea', name: 'Sea', altitude: '0 m' },
  ],
  items,
  views: [
    {
      id: 'main',
      page: { width: '190 mm', height: '132 mm' },
      temperature: { unit: '°C', scale: 'linear', range: null },
      pressure: { unit: 'bar', kind: 'absolute', scale: 'logarithmic', range: null },
      second: null,
      fields: 'faint',
      colours: 'colour',
      hidden: [],
      labelOffsets: {},
    },
  ],
  data: {},
});

const read = (...items: readonly unknown[]): Sheet => {
  const result = readSheet(sheet(...items));
  if (!result.ok) throw new Error(JSON.stringify(result.issues));
  return result.sheet;
};
const results = (...items: readonly unknown[]) => evaluate(read(...items), substances, frame);

describe('evaluate(…) of a path', () => {
  it('gives its states letter and number, permanent ids, clock and margins', () => {
    const [path] = results(come).paths;
    expect(path!.states.map(({ tag, id }) => [tag, id])).toEqual([
      ['A1', 'come-up.start'],
      ['A2', 'come-up.heat'],
      ['A3', 'come-up.boil'],
      ['A4', 'come-up.rise'],
    ]);
    expect(path!.steps.map(({ clock }) => clock)).toEqual([1080, 1380, 1800]);
    expect(path!.total.time).toBe(1800);
    expect(path!.problem).toBeNull();
    expect(path!.states[1]!.on).toBe('saturation');
    for (const { margins } of path!.states.slice(1))
      expect(margins.some(({ boundary }) => boundary === 'saturation')).toBe(false);
    expect(path!.states[0]!.error.T).toBe(0.5);
    expect(path!.total.heat).toBeGreaterThan(300e3);
  });

  it('is plain data', () => {
    const whole = results(come);
    expect(structuredClone(whole)).toEqual(whole);
    expect(JSON.stringify(whole)).not.toContain('null,null,null,null,null,null,null,null');
  });

  it('opens the map on the run and draws it there', () => {
    const whole = results(come);
    const [map] = whole.maps;
    expect(map!.outside).toEqual([]);
    for (const { T, p } of whole.paths[0]!.states) {
      expect(T > map!.T.range[0] && T < map!.T.range[1]).toBe(true);
      expect(p > map!.p.range[0] && p < map!.p.range[1]).toBe(true);
    }
    expect(map!.tracks.map(({ step, along }) => [step, along])).toEqual([
      ['come-up.heat', null],
      ['come-up.rise', 'saturation'],
    ]);
  });

  it('moving the site keeps the readings and moves the absolute pressures', () => {
    const [high] = results(come).paths;
    const [sea] = results({ ...come, site: 'sea' }).paths;
    // ISO 2533: 84.56 kPa at 1500 m; the differences must be those of the two sites alone.
    const shift = sea!.states[0]!.p - high!.states[0]!.p;
    expect(Math.abs(shift - (101325 - 84556))).toBeLessThan(5);
    expect(sea!.states[3]!.p - high!.states[3]!.p).toBeCloseTo(shift, 6);
    expect(sea!.states[1]!.T - high!.states[1]!.T).toBeGreaterThan(4.9);
    expect(sea!.states[3]!.kind).toBe('gauge');
  });

  it('calls for cautions where it stands', () => {
    const codes = (items: readonly unknown[]) => results(...items).cautions;
    const pressure = codes([come]).find(({ code }) => code === 'pressure vessel');
    expect(pressure!.at).toEqual(['come-up.rise']);
    const dry = codes([
      {
        id: 'let-down',
        kind: 'path',
        tag: 'B',
        substance: 'carbon-dioxide',
        start: { T: '-30 °C', p: '20 bar(a)' },
        // Through solid carbon dioxide and out again.
        steps: [
          { id: 'drop', kind: 'ramp', end: { T: '-58 °C', p: '6 bar(a)' } },
          { id: 'rise', kind: 'ramp', end: { T: '-40 °C', p: '1 bar(a)' } },
        ],
      },
    ]).find(({ code }) => code === 'dry ice blocks lines');
    expect(dry!.at.length).toBe(new Set(dry!.at).size);
    expect(dry!.at.some((id) => id.startsWith('let-down.'))).toBe(true);
  });

  it('stops at a step that cannot be completed and keeps what came before', () => {
    const [path] = results({
      ...come,
      steps: [
        ...come.steps,
        { id: 'cold', kind: 'follow', end: { T: '-20 °C' } },
        { id: 'then', kind: 'hold', end: {} },
      ],
    }).paths;
    expect(path!.states.length).toBe(4);
    expect(path!.problem).toMatchObject({ step: 'cold', problem: { code: 'outOfRange' } });
    expect(path!.steps.map(({ problem }) => problem?.code)).toEqual([
      undefined,
      undefined,
      undefined,
      'outOfRange',
      'notRun',
    ]);
    expect(path!.total.heat).toBeNull();
  });

  it('a start that has no state is told, and nothing runs', () => {
    const [path] = results({ ...come, start: { T: '3000 °C', p: '1 bar(a)' } }).paths;
    expect(path!.states).toEqual([]);
    expect(path!.problem).toMatchObject({ step: null, problem: { code: 'outOfRange' } });
  });
});

describe('tracks on a map', () => {
  it('lie within 0.03 mm of the straight run on logarithmic and reciprocal axes', () => {
    const whole = evaluate(
      {
        ...read({
          ...come,
          start: { T: '20 °C', p: '0.1 bar(a)' },
          steps: [{ id: 'far', kind: 'ramp', end: { T: '300 °C', p: '200 bar(a)' } }],
        }),
        views: [
          {
            ...read().views[0]!,
            temperature: { unit: '°C', scale: 'reciprocal', range: ['0 °C', '350 °C'] },
          },
        ],
      },
      substances,
      frame,
    );
    const [map] = whole.maps;
    const plane = temperaturePressurePlane({
      T: scale(map!.T.kind, map!.T.range),
      p: scale(map!.p.kind, map!.p.range),
      width: map!.width,
      height: map!.height,
    });
    const { points } = map!.tracks[0]!;
    expect(points.length).toBeGreaterThan(10);
    const [A, B] = [points[0]!, points.at(-1)!];
    let worst = 0;
    for (let i = 0; i <= 4000; i++) {
      const T = A.T + (i / 4000) * (B.T - A.T);
      const [x, y] = plane.project({ T, p: A.p + (i / 4000) * (B.p - A.p) })!;
      let least = Infinity;
      for (let k = 0; k + 1 < points.length; k++) {
        const [a, b] = [plane.project(points[k]!)!, plane.project(points[k + 1]!)!];
        const [dx, dy] = [b[0] - a[0], b[1] - a[1]];
        const t = Math.min(
          1,
          Math.max(0, ((x - a[0]) * dx + (y - a[1]) * dy) / (dx * dx + dy * dy)),
        );
        least = Math.min(least, Math.hypot(x - a[0] - t * dx, y - a[1] - t * dy));
      }
      worst = Math.max(worst, least);
    }
    expect(worst).toBeLessThan(0.03);
  });
});

describe('readSheet(…) of a path', () => {
  const places = (item: unknown): readonly string[] => {
    const result = readSheet(sheet(item));
    return result.ok ? [] : result.issues.map(({ place, code }) => `${place}: ${code}`);
  };
  const withStep = (step: unknown): unknown => ({ ...come, steps: [step] });

  it('takes every end that its kind declares', () => {
    expect(places(come)).toEqual([]);
  });

  it.each([
    [
      'an end of too little',
      { id: 'a', kind: 'ramp', end: { T: '20 °C' } },
      ['items[0].steps[0].end: givens'],
    ],
    [
      'an end of too much',
      { id: 'a', kind: 'constantPressure', end: { T: '20 °C', boundary: 'melting' } },
      ['items[0].steps[0].end: givens'],
    ],
    [
      'a reading that is none',
      { id: 'a', kind: 'constantPressure', end: { T: 'warm' } },
      ['items[0].steps[0].end.T: reading'],
    ],
    [
      'a pressure below zero',
      { id: 'a', kind: 'constantTemperature', end: { p: '-2 bar(g)' } },
      ['items[0].steps[0].end.p: reading'],
    ],
    [
      'a fraction above one',
      { id: 'a', kind: 'hold', end: { vapourFraction: '120 %' } },
      ['items[0].steps[0].end.vapourFraction: shape'],
    ],
    [
      'time and rate together',
      { id: 'a', kind: 'constantPressure', end: { T: '30 °C' }, time: '1 min', rate: '1 K/min' },
      ['items[0].steps[0]: givens'],
    ],
    [
      'a rate of the wrong quantity',
      { id: 'a', kind: 'constantPressure', end: { T: '30 °C' }, rate: '1 bar/min' },
      ['items[0].steps[0].rate: givens'],
    ],
    [
      'an end that the kind does not have',
      { id: 'a', kind: 'hold', end: { T: '20 °C' } },
      ['items[0].steps[0].end.T: shape'],
    ],
    ['an unknown kind', { id: 'a', kind: 'boil', end: {} }, ['items[0].steps[0].kind: shape']],
    [
      'the id kept for the start',
      { id: 'start', kind: 'hold', end: {} },
      ['items[0].steps[0].id: shape'],
    ],
  ])('refuses %s, naming the place', (_what, step, expected) => {
    expect(places(withStep(step))).toEqual(expected);
  });

  it('refuses two steps of one id and a start of one given', () => {
    const hold = { id: 'a', kind: 'hold', end: {} };
    expect(places({ ...come, steps: [hold, hold] })).toEqual(['items[0].steps[1].id: twice']);
    expect(places({ ...come, start: { T: '20 °C' } })).toEqual(['items[0].start: givens']);
  });
});
