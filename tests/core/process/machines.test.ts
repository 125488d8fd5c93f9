import { describe, expect, it } from 'vitest';
import { stablePhase } from '../../../core/equilibrium/phase.ts';
import { overall, type State } from '../../../core/equilibrium/state.ts';
import { scale, temperaturePressurePlane } from '../../../core/map/plane.ts';
import { stateOn } from '../../../core/process/keptLine.ts';
import { keptTrack } from '../../../core/process/keptTrack.ts';
import type { Env } from '../../../core/process/step.ts';
import { kindOf } from '../../../core/process/steps/index.ts';
import { random } from '../../random.ts';
import { carbonEnv, done, heatScale, K, Pa, run, stepsOf, waterEnv } from './runs.ts';

const atm = 101325;
const gauge = (bar: number): string => Pa(bar * 1e5 + atm);
const vapour = (state: State): number =>
  (state.parts.find(({ phase }) => phase === 'vapour')?.fraction as number | undefined) ?? 0;
const solid = (state: State): number =>
  (state.parts.find(({ phase }) => phase === 'solid')?.fraction as number | undefined) ?? 0;

describe('throttle', () => {
  // Flash steam, mass %, computed from IAPWS R6-95, not published; beside it a handbook's rounded table (recalled).
  it.each([
    [3, 0, 8.25, 8.3],
    [5, 0, 11.15, 11.2],
    [7, 0, 13.39, 13.4],
    [10, 0, 16.05, 16.1],
    [10, 1, 12.53, 12.5],
    [15, 0, 19.48, 19.5],
  ])('condensate from %s to %s bar(g) flashes %s %%', (from, to, computed, handbook) => {
    const of = run(
      waterEnv,
      { p: gauge(from), vapourFraction: '0' },
      { kind: 'throttle', end: { p: gauge(to) } },
    );
    const { end, encounters, legs, heat, work } = done(of, 0);
    expect(Math.abs(100 * vapour(end.state) - computed)).toBeLessThan(0.006);
    expect(Math.abs(100 * vapour(end.state) - handbook)).toBeLessThan(0.06);
    expect(encounters.map(({ code, kind }) => [code, kind])).toEqual([['boils', 'follows']]);
    expect(encounters[0]!.share).toBeCloseTo(vapour(end.state), 6);
    expect(legs.map(({ along }) => along)).toEqual(['saturation']);
    expect([heat, work, end.on]).toEqual([0, 0, 'saturation']);
  });

  // Superheat after let-down of dry saturated steam, K, computed from IAPWS R6-95, not published.
  it.each([
    [10, 3, 18.8],
    [7, 2, 19.7],
    [10, 0, 52.1],
  ])('dry steam from %s to %s bar(g) is superheated by %s K', (from, to, superheat) => {
    const of = run(
      waterEnv,
      { p: gauge(from), vapourFraction: '1' },
      { kind: 'throttle', end: { p: gauge(to) } },
    );
    const { end, phases } = done(of, 0);
    const boiling = run(waterEnv, { p: gauge(to), vapourFraction: '1' }).start!.state.T;
    expect(Math.abs(end.state.T - boiling - superheat)).toBeLessThan(0.06);
    expect(phases.map(({ phase }) => phase)).toEqual(['vapour']);
    if (from === 10 && to === 3) expect(Math.abs(end.state.T - 273.15 - 162.5)).toBeLessThan(0.06);
  });

  it('wet steam of 0.979 at 10 bar(g) is just dry at 3 bar(g), of 0.95 leaves at 0.973 (computed, not published)', () => {
    const dry = run(
      waterEnv,
      { p: gauge(10), vapourFraction: '0.95' },
      { kind: 'throttle', end: { p: gauge(3) } },
    );
    expect(Math.abs(vapour(done(dry, 0).end.state) - 0.973)).toBeLessThan(6e-4);
    const to = run(
      waterEnv,
      { p: gauge(10), vapourFraction: '0.979' },
      { kind: 'throttle', end: { boundary: 'saturation' } },
    );
    const { end } = done(to, 0);
    expect(Math.abs(end.state.p - (3e5 + atm))).toBeLessThan(0.2e5);
    expect(end.state.parts.map(({ phase, fraction }) => [phase, fraction])).toEqual([
      ['vapour', 1],
    ]);
  });

  // Snow from saturated liquid carbon dioxide at 1 atm: made with a heat of sublimation of 574 kJ/kg, so good to
  // two digits; vapour on reaching the triple pressure. Computed from Span and Wagner 1996, not published.
  it.each([
    [-40, 0.54, 0.09],
    [-30, 0.5, 0.15],
    [-20, 0.47, 0.21],
    [-10, 0.43, 0.28],
    [0, 0.39, 0.34],
    [20, 0.29, 0.5],
  ])('carbon dioxide from %s °C to 1 atm is %s snow', (t, snow, flashed) => {
    const of = run(
      carbonEnv,
      { T: K(t + 273.15), vapourFraction: '0' },
      { kind: 'throttle', end: { p: Pa(atm) } },
    );
    const { end, encounters, legs } = done(of, 0);
    expect(Math.abs(solid(end.state) - snow)).toBeLessThan(0.0101);
    expect(encounters.map(({ code }) => code).slice(0, 3)).toEqual(['boils', 'boils', 'freezes']);
    expect(Math.abs(encounters[0]!.share! - flashed)).toBeLessThan(0.0051);
    for (const { T, p } of encounters.slice(1, 3)) {
      expect(T).toBeCloseTo(carbonEnv.m.triple.T, 6);
      expect(p).toBeCloseTo(carbonEnv.m.triple.p, 0);
    }
    expect(legs.map(({ along }) => along)).toEqual(['saturation', 'sublimation']);
    // In two steps, with a pause at the triple pressure where the fractions are open.
    const two = run(
      carbonEnv,
      { T: K(t + 273.15), vapourFraction: '0' },
      { kind: 'throttle', end: { p: Pa(carbonEnv.m.triple.p) } },
      { kind: 'throttle', end: { p: Pa(atm) } },
    );
    expect(done(two, 0).end.state.freedom).toBe(1);
    expect(solid(done(two, 1).end.state)).toBeCloseTo(solid(end.state), 6);
  });

  it('dips into the dome and out again where steam has its highest enthalpy', () => {
    // Saturated steam has at most 2803 kJ/kg, near 235 °C: W. Wagner, A. Pruß 2002, table 13.1 (recalled).
    const of = run(
      waterEnv,
      { p: '100 bar(a)', T: '320 °C' },
      { kind: 'throttle', end: { p: '1 bar(a)' } },
    );
    const h = overall(of.start!.state, 'h')!;
    expect(h).toBeGreaterThan(2.7e6);
    expect(h).toBeLessThan(2.8032e6);
    const { encounters, phases } = done(of, 0);
    expect(phases.map(({ phase }) => phase)).toEqual(['vapour', 'vapour'].slice(0, phases.length));
    expect(encounters.map(({ boundary }) => boundary)).toContain('saturation');
  });

  it('refuses to raise the pressure, and slides along its line under a hand', () => {
    const of = run(
      waterEnv,
      { p: gauge(10), vapourFraction: '1' },
      { kind: 'throttle', end: { p: gauge(12) } },
    );
    expect(of.steps[0]!.problem).toMatchObject({ code: 'outOfRange', quantity: 'p' });
    const [step] = stepsOf({ kind: 'throttle', end: { p: gauge(3) } });
    const drag = (to: { T: number; p: number; snap?: 'saturation' | 'melting' }) =>
      kindOf(step!).drag(step!, of.start!, to, waterEnv);
    expect(drag({ T: 500, p: 2e5 })).toEqual({ p: 2e5 });
    expect(drag({ T: 500, p: 2e7 })).toEqual({ p: of.start!.state.p });
    expect(drag({ T: 500, p: 2e5, snap: 'melting' })).toEqual({ p: 2e5 });
  });
});

describe('pump, compressor and expander', () => {
  it('saturated steam from 10 to 0 bar(g) leaves an ideal expander 0.867 dry (computed, not published)', () => {
    const of = run(
      waterEnv,
      { p: gauge(10), vapourFraction: '1' },
      { kind: 'isentropic', end: { p: gauge(0) } },
      { kind: 'isentropic', end: { p: gauge(10) } },
    );
    expect(Math.abs(vapour(done(of, 0).end.state) - 0.867)).toBeLessThan(6e-4);
    expect(done(of, 0).encounters.map(({ code }) => code)).toEqual(['condenses']);
    expect(done(of, 0).work! + done(of, 1).work!).toBeCloseTo(0, 4);
    expect(done(of, 1).end.state.T).toBeCloseTo(of.start!.state.T, 6);
  });

  // Adiabatic rise of water, K, from 25 °C: computed from IAPWS R6-95, not published.
  it.each([
    [100, 2.26],
    [200, 5.12],
    [300, 8.25],
    [400, 11.46],
    [500, 14.69],
    [600, 17.88],
  ])('water at 25 °C warms under %s MPa by %s K', (MPa, rise) => {
    const of = run(
      waterEnv,
      { T: '25 °C', p: Pa(atm) },
      { kind: 'isentropic', end: { p: `${MPa} MPa(a)` } },
    );
    const { end, from } = done(of, 0);
    expect(Math.abs(end.state.T - from.state.T - rise)).toBeLessThan(0.0051);
  });

  it('an efficiency below one costs a pump more and gives an expander less', () => {
    const pump = (efficiency?: string) =>
      done(
        run(
          waterEnv,
          { T: '300 K', p: '1 bar(a)' },
          { kind: 'isentropic', end: { p: '100 bar(a)', ...(efficiency && { efficiency }) } },
        ),
        0,
      );
    expect(pump('50 %').work! / pump().work!).toBeCloseTo(2, 9);
    const expander = (efficiency?: string) =>
      done(
        run(
          waterEnv,
          { T: '700 K', p: '40 bar(a)' },
          { kind: 'isentropic', end: { p: '1 bar(a)', ...(efficiency && { efficiency }) } },
        ),
        0,
      );
    expect(expander('80 %').work! / expander().work!).toBeCloseTo(0.8, 9);
    expect(expander('80 %').legs.every(({ locus }) => locus)).toBe(true);
    expect(expander().legs.some(({ locus }) => locus)).toBe(false);
    const bad = run(
      waterEnv,
      { T: '700 K', p: '40 bar(a)' },
      { kind: 'isentropic', end: { p: '1 bar(a)', efficiency: '0' } },
    );
    expect(bad.steps[0]!.problem).toMatchObject({ code: 'outOfRange', quantity: 'efficiency' });
  });
});

describe('closed vessel', () => {
  // From saturated liquid, bar: computed from the equations of state, not published.
  it.each([
    ['carbon dioxide', carbonEnv, -20, 0, 210.5, 230.2],
    ['carbon dioxide', carbonEnv, 0, 10, 74.2, 109.1],
  ] as const)('%s full of liquid rises from %s °C', (_, env, t0, t1, rise, to) => {
    void _;
    const of = run(
      env,
      { T: K(t0 + 273.15), vapourFraction: '0' },
      { kind: 'closedVessel', end: { T: K(t1 + 273.15) } },
    );
    const { end, from } = done(of, 0);
    expect(Math.abs((end.state.p - from.state.p) / 1e5 - rise)).toBeLessThan(0.06);
    expect(Math.abs(end.state.p / 1e5 - to)).toBeLessThan(0.06);
  });

  it('water at 1 atm rises 239 bar from 20 to 50 °C (computed), and from 1 °C first loses pressure', () => {
    const of = run(
      waterEnv,
      { T: '20 °C', p: Pa(atm) },
      { kind: 'closedVessel', end: { T: '50 °C' } },
    );
    expect(Math.abs((done(of, 0).end.state.p - atm) / 1e5 - 239)).toBeLessThan(0.6);
    const cold = run(
      waterEnv,
      { T: '1 °C', p: '20 bar(a)' },
      { kind: 'closedVessel', end: { T: '2 °C' } },
      { kind: 'closedVessel', end: { p: '30 bar(a)' } },
    );
    expect(done(cold, 0).end.state.p).toBeLessThan(20e5);
    expect(done(cold, 1).end.state.p).toBeCloseTo(30e5, 0);
    expect(done(cold, 1).end.state.T).toBeGreaterThan(273.15 + 4);
  });

  it('a pocket of vapour vanishes, and then the pressure runs away', () => {
    const of = run(
      carbonEnv,
      { T: '-20 °C', vapourFraction: '0.02' },
      { kind: 'closedVessel', end: { boundary: 'saturation' } },
      { kind: 'closedVessel', end: { p: '200 bar(a)' } },
    );
    const full = done(of, 0);
    expect(full.encounters.map(({ code }) => code)).toEqual(['condenses']);
    expect(full.end.state.parts.map(({ phase }) => phase)).toEqual(['liquid']);
    const v = overall(of.start!.state, 'v')!;
    expect(overall(full.end.state, 'v')! / v).toBeCloseTo(1, 9);
    expect(done(of, 1).end.state.p).toBeCloseTo(200e5, 0);
    expect(done(of, 1).encounters.map(({ code }) => code)).toContain('leaves');
  });

  it('half full of water freezes through at the triple point', () => {
    const of = run(
      waterEnv,
      { T: '300 K', vapourFraction: '0.1' },
      { kind: 'closedVessel', end: { T: '260 K' } },
    );
    const { end, encounters, heat } = done(of, 0);
    expect(end.state.parts.map(({ phase }) => phase).sort()).toEqual(['solid', 'vapour']);
    expect(encounters.map(({ code }) => code)).toContain('freezes');
    expect(heat).toBeLessThan(0);
  });
});

describe('heat by an amount', () => {
  it('boils the share that its latent heat gives, with the heat of W. Wagner, A. Pruß 2002, table 13.1', () => {
    // 400 K: h′ = 532.953, h″ = 2715.70 kJ/kg.
    const of = run(
      waterEnv,
      { T: '400 K', vapourFraction: '0' },
      { kind: 'heatAmount', end: { heat: `${(2715.7 - 532.953) / 4} kJ/kg` } },
    );
    const { end, heat, encounters } = done(of, 0);
    expect(Math.abs(vapour(end.state) - 0.25)).toBeLessThan(2e-6 + 1e-5);
    expect(heat).toBeCloseTo((2715700 - 532953) / 4, 6);
    expect(encounters.map(({ code }) => code)).toEqual(['boils']);
  });

  it('there and back, in parts or whole, comes to the same', () => {
    const of = run(
      waterEnv,
      { T: '-10 °C', p: Pa(atm) },
      { kind: 'heatAmount', end: { heat: '500 kJ/kg' } },
      { kind: 'heatAmount', end: { heat: '1000 kJ/kg' } },
      { kind: 'heatAmount', end: { heat: '-1500 kJ/kg' } },
    );
    expect(done(of, 0).encounters.map(({ code }) => code)).toEqual(['melts']);
    expect(done(of, 2).end.state.T).toBeCloseTo(263.15, 6);
    expect(overall(done(of, 2).end.state, 'h')!).toBeCloseTo(overall(of.start!.state, 'h')!, 3);
  });
});

const envs: readonly (readonly [
  string,
  Env,
  readonly [number, number],
  readonly [number, number],
])[] = [
  ['water', waterEnv, [275, 900], [2e3, 60e6]],
  ['carbon dioxide', carbonEnv, [220, 500], [2e5, 40e6]],
];

describe.each(envs)('laws of machines of %s', (_, env, [Tlow, Thigh], [plow, phigh]) => {
  const next = random(11);
  const anyP = () => plow * (phigh / plow) ** next();
  const scale0 = heatScale(env.m);
  const { R } = env.m.fluid;
  const starts = Array.from({ length: 60 }, () => ({
    T: K(Tlow + next() * (Thigh - Tlow)),
    p: Pa(anyP()),
  }));
  const plane = temperaturePressurePlane({
    T: scale('linear', [150, 1300]),
    p: scale('logarithmic', [10, 1e9]),
    width: 150,
    height: 100,
  });

  it('throttles keep the enthalpy to 1e-9 R·Tc at every vertex, and entropy does not fall', () => {
    let met = 0;
    for (const start of starts) {
      const of = run(env, start, { kind: 'throttle', end: { p: Pa(plow) } });
      if (of.steps[0]!.problem) continue;
      const { end, from, legs, heat, work } = done(of, 0);
      const h = overall(from.state, 'h')!;
      expect(Math.abs(overall(end.state, 'h')! - h)).toBeLessThan(1e-9 * scale0);
      expect(Math.abs(heat! + work! - (overall(end.state, 'h')! - h))).toBeLessThan(1e-6 * scale0);
      expect(overall(end.state, 's')! - overall(from.state, 's')!).toBeGreaterThan(-1e-9 * R);
      for (const leg of legs) {
        if (!leg.kept) continue;
        const points = keptTrack(env.m, leg, leg.kept, plane);
        for (const { p, T } of points.slice(1, -1)) {
          const there = stateOn(env.m, leg.kept, p);
          expect(there.T).toBe(T);
          expect(Math.abs(overall(there, 'h')! - h)).toBeLessThan(1e-9 * scale0);
        }
        met++;
      }
    }
    expect(met).toBeGreaterThan(30);
  });

  it('ideal machines keep the entropy, w = ∫v dp; others do not lose any', () => {
    let met = 0;
    for (const start of starts) {
      const of = run(env, start, { kind: 'isentropic', end: { p: Pa(anyP()) } });
      if (of.steps[0]!.problem) continue;
      const { end, from, work, legs } = done(of, 0);
      const s = overall(from.state, 's')!;
      expect(Math.abs(overall(end.state, 's')! - s)).toBeLessThan(1e-9 * Math.max(R, Math.abs(s)));
      // Simpson in ln p between the places where a phase comes or goes.
      let area = 0;
      for (const leg of legs) {
        const [a, b] = [leg.from.p, leg.to.p];
        const n = 400;
        for (let i = 0; i <= n; i++) {
          const p = a * (b / a) ** Math.min(1 - 1e-7, Math.max(1e-7, i / n));
          const v = overall(stateOn(env.m, { keeps: 's', value: s }, p), 'v')!;
          area += (v * p * Math.log(b / a) * (i === 0 || i === n ? 1 : i % 2 ? 4 : 2)) / (3 * n);
        }
      }
      expect(Math.abs(work! - area), JSON.stringify([start, end.state.p, legs])).toBeLessThan(
        1e-6 * scale0 + 1e-7 * Math.abs(work!),
      );
      met++;
      const real = run(env, start, {
        kind: 'isentropic',
        end: { p: Pa(end.state.p), efficiency: '70 %' },
      });
      if (real.steps[0]!.problem) continue;
      expect(overall(done(real, 0).end.state, 's')! - s).toBeGreaterThan(-1e-9 * R);
    }
    expect(met).toBeGreaterThan(25);
  });

  it('closed vessels keep the volume to 1e-9, q = ∫cv dT where one phase fills them', () => {
    let met = 0;
    for (const start of starts) {
      const of = run(env, start, {
        kind: 'closedVessel',
        end: { T: K(Tlow + next() * (Thigh - Tlow)) },
      });
      if (of.steps[0]!.problem) continue;
      const { end, from, heat, work } = done(of, 0);
      const v = overall(from.state, 'v')!;
      expect(Math.abs(overall(end.state, 'v')! / v - 1)).toBeLessThan(1e-9);
      const rise = overall(end.state, 'u')! - overall(from.state, 'u')!;
      expect(Math.abs(heat! + work! - rise)).toBeLessThan(1e-6 * scale0);
      const back = run(
        env,
        start,
        { kind: 'closedVessel', end: { T: K(end.state.T) } },
        { kind: 'closedVessel', end: { T: start.T } },
      );
      expect(Math.abs(done(back, 1).heat! + done(back, 0).heat!)).toBeLessThan(1e-7 * scale0);
      met++;
    }
    expect(met).toBeGreaterThan(25);
  });

  it('meets the boundaries that sampling meets', () => {
    for (const start of starts.slice(0, 30)) {
      const of = run(env, start, { kind: 'throttle', end: { p: Pa(plow) } });
      if (of.steps[0]!.problem) continue;
      const { from, encounters } = done(of, 0);
      const h = overall(from.state, 'h')!;
      const seen: number[] = [];
      const n = 400;
      for (let i = 1; i < n; i++) {
        const p = from.state.p * (plow / from.state.p) ** (i / n);
        const { parts } = stateOn(env.m, { keeps: 'h', value: h }, p);
        if (seen.at(-1) !== parts.length) seen.push(parts.length);
        if (parts.length === 1)
          expect(stablePhase(env.m, parts[0]!.T, p).phase).toBe(parts[0]!.phase);
      }
      const two = seen.filter((count) => count === 2).length;
      expect(encounters.filter(({ kind }) => kind === 'follows').length).toBeGreaterThanOrEqual(
        two,
      );
    }
  });
});
