import { describe, expect, it } from 'vitest';
import { saturationAtPressure } from '../../../core/equilibrium/saturation.ts';
import { encountersOfSamples } from '../../../core/process/noise.ts';
import { dragStart, runPath } from '../../../core/process/path.ts';
import { curveOf } from '../../../core/process/stand.ts';
import type { DraggedEnd } from '../../../core/process/step.ts';
import { kindOf, stepKinds, type Step } from '../../../core/process/steps/index.ts';
import { random } from '../../random.ts';
import { carbonEnv, done, K, Pa, run, stepsOf, waterEnv } from './runs.ts';

const liquid = { T: '20 °C', p: '1 bar(a)' };
const boiling = { p: '1 bar(a)', vapourFraction: '0.25' };
const codes = (of: ReturnType<typeof run>, i: number) =>
  done(of, i).encounters.map(({ kind, code, share }) => [kind, code, share]);

describe('encounters of planned steps', () => {
  it('liquid to the boiling line reaches it, and boils when the next step goes on', () => {
    const of = run(
      waterEnv,
      liquid,
      { kind: 'constantPressure', end: { boundary: 'saturation' } },
      { kind: 'constantPressure', end: { T: '150 °C' } },
    );
    expect(codes(of, 0)).toEqual([['touches', 'reaches', 0]]);
    expect(codes(of, 1)).toEqual([['crosses', 'boils', 1]]);
  });

  it('steam just condensed leaves the boiling line without a change', () => {
    const of = run(
      waterEnv,
      { p: '1 bar(a)', vapourFraction: '1' },
      { kind: 'constantPressure', end: { T: '150 °C' } },
    );
    expect(codes(of, 0)).toEqual([['touches', 'leaves', 0]]);
  });

  it('ice heated through to steam melts and boils in one step', () => {
    const of = run(
      waterEnv,
      { T: '-10 °C', p: '1 bar(a)' },
      { kind: 'constantPressure', end: { T: '120 °C' } },
    );
    expect(codes(of, 0).map(([, code]) => code)).toEqual(['melts', 'boils']);
    expect(done(of, 0).phases.map(({ phase }) => phase)).toEqual(['solid', 'liquid', 'vapour']);
  });

  it('round the critical point nothing boils', () => {
    const of = run(
      carbonEnv,
      { T: '20 °C', p: '60 bar(a)' },
      { kind: 'constantTemperature', end: { p: '100 bar(a)' } },
      { kind: 'constantPressure', end: { T: '60 °C' } },
      { kind: 'constantTemperature', end: { p: '60 bar(a)' } },
    );
    expect([0, 1, 2].map((i) => codes(of, i).map(([, code]) => code))).toEqual([
      [],
      ['passesAboveCritical'],
      ['passesAboveCritical'],
    ]);
  });

  it('a ramp may meet the boiling line twice, and once where it is made to touch', () => {
    // The chord between two points of the convex line lies above it: vapour, liquid, vapour.
    const of = run(
      waterEnv,
      { T: '370 K', p: Pa(89e3) },
      { kind: 'ramp', end: { T: '430 K', p: Pa(560e3) } },
    );
    expect(codes(of, 0).map(([, code]) => code)).toEqual(['condenses', 'boils']);
    const curve = curveOf(waterEnv.m, 'saturation');
    const at = curve.atTemperature(400);
    const slope = (curve.atTemperature(400.001).p - curve.atTemperature(399.999).p) / 0.002;
    const touching = run(
      waterEnv,
      { T: '397 K', p: Pa(at.p - 3 * slope) },
      { kind: 'ramp', end: { T: '405 K', p: Pa(at.p + 5 * slope) } },
    );
    const met = done(touching, 0).encounters;
    expect(met.length).toBeLessThanOrEqual(2);
    for (const { T } of met) expect(Math.abs(T - 400)).toBeLessThan(0.05);
  });

  it('times of encounters follow where the step goes evenly', () => {
    const of = run(
      carbonEnv,
      { T: '20 °C', p: '100 bar(a)' },
      { kind: 'constantPressure', end: { T: '60 °C' }, rate: '2 K/min' },
    );
    expect(done(of, 0).time).toBeCloseTo(1200, 6);
    expect(done(of, 0).encounters[0]!.time).toBeCloseTo(((304.1282 - 293.15) / 2) * 60, 6);
  });

  it('a rate gives no time to a step that boils at one temperature', () => {
    const of = run(waterEnv, liquid, {
      kind: 'constantPressure',
      end: { T: '150 °C' },
      rate: '2 K/min',
    });
    expect(done(of, 0).time).toBeNull();
  });
});

describe('what is open stays open, with the reason', () => {
  it('follow without a fraction', () => {
    const of = run(
      waterEnv,
      boiling,
      { kind: 'follow', end: { T: '130 °C' } },
      { kind: 'constantPressure', end: { T: '150 °C' } },
    );
    const first = done(of, 0);
    expect(first.heat).toBeNull();
    expect(first.heatAbsent).toEqual({ code: 'openFraction', boundary: 'saturation', at: 'end' });
    expect(first.end.state.freedom).toBe(1);
    expect(first.end.state.parts.map(({ fraction }) => fraction)).toEqual([
      [0, 1],
      [0, 1],
    ]);
    const second = done(of, 1);
    expect(second.heatAbsent).toEqual({
      code: 'openFraction',
      boundary: 'saturation',
      at: 'start',
    });
    expect(second.end.state.freedom).toBe(0);
  });

  it('ice of unresolved form has no heat', () => {
    const of = run(
      waterEnv,
      { T: '270 K', p: '500 MPa(a)' },
      { kind: 'constantPressure', end: { T: '200 K' } },
    );
    expect(done(of, 0).heatAbsent).toEqual({
      code: 'noEquation',
      phase: { phase: 'solid', solid: null },
    });
  });

  it('vapour of an open share leaves an open mass', () => {
    const of = run(
      waterEnv,
      boiling,
      { kind: 'follow', end: { T: '80 °C' }, vapour: 'leaves' },
      { kind: 'constantPressure', end: { T: '20 °C' } },
    );
    expect(done(of, 0).end.mass).toBeNull();
    expect(done(of, 1).heatAbsent).toEqual({ code: 'openMass' });
  });
});

describe('steps that cannot be completed stop the path and say why', () => {
  const problems = (of: ReturnType<typeof run>) => of.steps.map(({ problem }) => problem?.code);

  it('no boiling line above the critical pressure', () => {
    const of = run(
      waterEnv,
      { T: '20 °C', p: '300 bar(a)' },
      { kind: 'constantPressure', end: { T: '30 °C' } },
      { kind: 'constantPressure', end: { boundary: 'saturation' } },
      { kind: 'hold', end: {} },
    );
    expect(problems(of)).toEqual([undefined, 'noBoundary', 'notRun']);
    expect(of.steps[0]!.outcome!.heat).toBeGreaterThan(0);
  });

  it('a temperature past the equations', () => {
    expect(
      problems(run(waterEnv, liquid, { kind: 'constantPressure', end: { T: '2000 °C' } })),
    ).toEqual(['outOfRange']);
  });

  it('following without a line, a fraction without its phase', () => {
    expect(problems(run(waterEnv, liquid, { kind: 'follow', end: { T: '50 °C' } }))).toEqual([
      'notOnBoundary',
    ]);
    expect(problems(run(waterEnv, boiling, { kind: 'hold', end: { solidFraction: '1' } }))).toEqual(
      ['noSuchPhase'],
    );
  });

  it('more heat than there is to boil, and less than nothing', () => {
    const of = run(waterEnv, boiling, { kind: 'hold', end: { heat: '3 MJ/kg' } });
    expect(of.steps[0]!.problem).toMatchObject({ code: 'heatRange', heat: 3e6 });
    const { least, most } = of.steps[0]!.problem as { least: number; most: number };
    const L = 2257.4e3; // near 1 bar
    expect(least / (-0.25 * L)).toBeCloseTo(1, 2);
    expect(most / (0.75 * L)).toBeCloseTo(1, 2);
  });

  it('vapour that left does not condense back, and nothing is left after it all boiled off', () => {
    const back = run(waterEnv, boiling, {
      kind: 'hold',
      end: { vapourFraction: '0.1' },
      vapour: 'leaves',
    });
    expect(back.steps[0]!.problem).toEqual({ code: 'nothingCondensesBack', least: 0.25 });
    const dry = run(waterEnv, liquid, {
      kind: 'constantPressure',
      end: { T: '120 °C' },
      vapour: 'leaves',
    });
    expect(dry.steps[0]!.problem!.code).toBe('nothingLeft');
    expect(dry.steps[0]!.legs[0]!.to.T).toBeCloseTo(saturationAtPressure(waterEnv.m, 1e5).T, 9);
    const after = run(
      waterEnv,
      boiling,
      { kind: 'hold', end: { vapourFraction: '1' }, vapour: 'leaves' },
      { kind: 'hold', end: {} },
    );
    expect(problems(after)).toEqual([undefined, 'nothingLeft']);
    expect(done(after, 0).lost!.mass).toBe(1);
  });
});

describe('dragging a step end, then running it again, ends where the step allows', () => {
  const text = (dragged: DraggedEnd): Step['end'] => ({
    ...(dragged.T !== undefined && { T: K(dragged.T) }),
    ...(dragged.p !== undefined && { p: Pa(dragged.p) }),
    ...(dragged.boundary && { boundary: dragged.boundary }),
    ...(dragged.vapourFraction !== undefined && {
      vapourFraction: String(dragged.vapourFraction),
    }),
  });
  const target = { T: 390, p: 150e3 };

  it.each([
    ['constantPressure', liquid, { T: '30 °C' }, { T: 390, p: 1e5 }],
    ['constantTemperature', liquid, { p: '2 bar(a)' }, { T: 293.15, p: 150e3 }],
    ['ramp', liquid, { T: '30 °C', p: '2 bar(a)' }, target],
    ['follow', boiling, { T: '105 °C', vapourFraction: '0.5' }, { T: 390 }],
    ['follow', boiling, { p: '1.2 bar(a)' }, { p: 150e3 }],
  ] as const)('%s', (kind, start, end, expected) => {
    const [step] = stepsOf({ kind, end } as never);
    const before = runPath({ start, steps: [step!] }, waterEnv);
    const dragged = kindOf(step!).drag(step!, before.start!, target, waterEnv)!;
    const after = run(waterEnv, start, { kind, end: text(dragged) } as never);
    const { state } = done(after, 0).end;
    for (const key of ['T', 'p'] as const)
      if (key in expected)
        expect(state[key] / (expected as Record<'T' | 'p', number>)[key]).toBeCloseTo(1, 9);
    if ('vapourFraction' in end) expect(state.parts[1]!.fraction).toBeCloseTo(0.5, 12);
  });

  it('takes hold of a boundary where the hand did', () => {
    const [step] = stepsOf({ kind: 'constantPressure', end: { T: '30 °C' } });
    const { start } = runPath({ start: liquid, steps: [] }, waterEnv);
    expect(kindOf(step!).drag(step!, start!, { ...target, snap: 'saturation' }, waterEnv)).toEqual({
      boundary: 'saturation',
    });
  });

  it('a hold has no end to drag; a start on a line slides along it', () => {
    const [step] = stepsOf({ kind: 'hold', end: {} });
    const { start } = runPath({ start: liquid, steps: [] }, waterEnv);
    expect(kindOf(step!).drag(step!, start!, target, waterEnv)).toBeNull();
    expect(dragStart(boiling, target)).toEqual({ p: 150e3 });
    expect(dragStart(liquid, target)).toEqual({ T: 390, p: 150e3 });
  });
});

describe('runPath(…) keeps what did not change', () => {
  it('runs only the changed step and those after it', () => {
    const steps = stepsOf(
      { kind: 'constantPressure', end: { T: '50 °C' } },
      { kind: 'constantPressure', end: { T: '60 °C' } },
      { kind: 'constantPressure', end: { T: '70 °C' } },
    );
    const a = runPath({ start: liquid, steps }, waterEnv);
    const changed = steps.with(1, { ...steps[1]!, end: { T: '65 °C' } } as Step);
    const b = runPath({ start: liquid, steps: changed }, waterEnv);
    expect(b.steps[0]).toBe(a.steps[0]);
    expect(b.steps[1]).not.toBe(a.steps[1]);
    expect(b.steps[2]).not.toBe(a.steps[2]);
    // Another site's air makes every step another.
    const c = runPath({ start: liquid, steps: changed }, { ...waterEnv, local: 8e4 });
    expect(c.steps[0]).not.toBe(b.steps[0]);
  });
});

describe('encountersOfSamples(…)', () => {
  const next = random(3);
  const noisy = (T: (k: number) => number, p: (k: number) => number, n = 200) =>
    Array.from({ length: n }, (_, i) => ({
      T: T(i / (n - 1)) + (next() - 0.5) * 0.4,
      p: p(i / (n - 1)) + (next() - 0.5) * 400,
    }));
  const tolerance = { T: 0.5, p: 500 };
  const curve = curveOf(waterEnv.m, 'saturation');

  it('gives one encounter for a noisy run along the boiling line', () => {
    const T = (k: number) =>
      k < 0.2 ? 350 + 100 * k : k > 0.8 ? 390 + 100 * (k - 0.8) : 370 + 33 * (k - 0.2);
    const p = (k: number) =>
      k < 0.2 || k > 0.8
        ? k < 0.2
          ? curve.atTemperature(370).p
          : curve.atTemperature(389.8).p
        : curve.atTemperature(T(k)).p;
    const met = encountersOfSamples(waterEnv.m, noisy(T, p), tolerance);
    expect(met.map(({ kind, code }) => [kind, code])).toEqual([['follows', 'boils']]);
    expect(met[0]!.T).toBeCloseTo(370, 0);
  });

  it('gives one crossing for a noisy crossing, solved on the boundary', () => {
    const met = encountersOfSamples(
      waterEnv.m,
      noisy(
        (k) => 360 + 30 * k,
        () => 1e5,
        40,
      ),
      { T: 0.3, p: 300 },
    );
    expect(met.map(({ kind, code }) => [kind, code])).toEqual([['crosses', 'boils']]);
    expect(curve.atTemperature(met[0]!.T).p / met[0]!.p).toBeCloseTo(1, 9);
  });

  it('gives nothing for noise far from any line', () => {
    expect(
      encountersOfSamples(
        waterEnv.m,
        noisy(
          () => 320,
          () => 1e5,
        ),
        tolerance,
      ),
    ).toEqual([]);
  });

  it('throws at the door where the tolerance is not positive', () => {
    expect(() => encountersOfSamples(waterEnv.m, [], { T: 0, p: 1 })).toThrow(RangeError);
  });
});

describe('stepKinds', () => {
  it('are told apart by their kind, each with ends', () => {
    expect(new Set(stepKinds.map(({ kind }) => kind)).size).toBe(stepKinds.length);
    for (const { ends } of stepKinds) expect(ends.length).toBeGreaterThan(0);
  });
});
