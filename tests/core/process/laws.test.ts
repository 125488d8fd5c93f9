import { describe, expect, it } from 'vitest';
import { stablePhase, type PhaseName } from '../../../core/equilibrium/phase.ts';
import { overall } from '../../../core/equilibrium/state.ts';
import { changeOf } from '../../../core/process/encounter.ts';
import { curveOf } from '../../../core/process/stand.ts';
import { straight } from '../../../core/process/straight.ts';
import type { Env } from '../../../core/process/step.ts';
import type { StepRun } from '../../../core/process/path.ts';
import { random } from '../../random.ts';
import { carbonEnv, done, heatScale, K, Pa, run, waterEnv } from './runs.ts';

const envs: readonly (readonly [
  string,
  Env,
  readonly [number, number],
  readonly [number, number],
])[] = [
  ['water', waterEnv, [230, 760], [20, 60e6]],
  ['carbon dioxide', carbonEnv, [160, 420], [2e4, 40e6]],
];

const area = (f: (k: number) => number, n: number): number => {
  // Simpson's rule on [0, 1], ends held inside.
  let sum = 0;
  for (let i = 0; i <= n; i++)
    sum += f(Math.min(1 - 1e-6, Math.max(1e-6, i / n))) * (i === 0 || i === n ? 1 : i % 2 ? 4 : 2);
  return sum / (3 * n);
};

/** Work done on a run straight in T and p by its own definition: −∫p dv = −[pv] + ∫v dp. */
function workByVolume(env: Env, { outcome, from }: StepRun): number {
  const { end, legs, encounters } = outcome!;
  const v0 = overall(from!.state, 'v')!;
  const v1 = overall(end.state, 'v')!;
  let work = from!.state.p * v0 - end.state.p * v1;
  const leg = legs[0];
  if (!leg || leg.from.p === leg.to.p) return work;
  const at = (k: number) => ({
    T: leg.from.T + k * (leg.to.T - leg.from.T),
    p: leg.from.p + k * (leg.to.p - leg.from.p),
  });
  const cuts = [0, ...encounters.map(({ progress }) => progress).filter((k) => k > 0 && k < 1), 1];
  for (let i = 0; i + 1 < cuts.length; i++) {
    const [a, b] = [cuts[i]!, cuts[i + 1]!];
    // Even in ln p where the volume goes as 1/p.
    const [pa, pb] = [at(a).p, at(b).p];
    work += area((u) => {
      const p = pa * (pb / pa) ** u;
      const k = (p - leg.from.p) / (leg.to.p - leg.from.p);
      return (p / stablePhase(env.m, at(k).T, p).rho!) * Math.log(pb / pa);
    }, 600);
  }
  return work;
}

describe.each(envs)('seeded random runs of %s', (_name, env, [Tlow, Thigh], [plow, phigh]) => {
  const next = random(20);
  const anyT = () => Tlow + next() * (Thigh - Tlow);
  const anyP = () => plow * (phigh / plow) ** next();
  const runs = Array.from({ length: 40 }, () =>
    run(
      env,
      { T: K(anyT()), p: Pa(anyP()) },
      { kind: 'constantPressure', end: { T: K(anyT()) } },
      { kind: 'constantTemperature', end: { p: Pa(anyP()) } },
      { kind: 'ramp', end: { T: K(anyT()), p: Pa(anyP()) } },
      { kind: 'constantPressure', end: { T: K(anyT()) } },
    ),
  );
  const steps = runs.flatMap(({ steps }) => steps).filter(({ outcome }) => outcome?.heat != null);
  const scale = heatScale(env.m);

  it('are mostly completed', () => {
    expect(steps.length).toBeGreaterThan(100);
    expect(steps.flatMap(({ encounters }) => encounters).length).toBeGreaterThan(40);
  });

  it('balance: q + w = Δu on every step, with w = −∫p dv of its own', () => {
    for (const step of steps) {
      const { heat, end } = step.outcome!;
      const rise = overall(end.state, 'u')! - overall(step.from!.state, 'u')!;
      expect(Math.abs(heat! + workByVolume(env, step) - rise)).toBeLessThan(2e-5 * scale);
    }
  });

  it('take q = Δh at constant pressure, and ∫T ds agrees to 1e-6 R·Tc', () => {
    for (const { step, outcome, from } of steps) {
      if (step.kind !== 'constantPressure') continue;
      const { heat, end } = outcome!;
      const byEntropy = straight(env.m, from!, {
        to: end.state,
        arrival: null,
        heat: 'entropy',
        leaves: false,
      }).heat!;
      expect(Math.abs(byEntropy - heat!)).toBeLessThan(1e-6 * scale);
      expect(heat).toBe(overall(end.state, 'h')! - overall(from!.state, 'h')!);
    }
  });

  it('take q = T Δs at constant temperature', () => {
    for (const { step, outcome, from } of steps) {
      if (step.kind !== 'constantTemperature') continue;
      const { heat, end } = outcome!;
      const expected = end.state.T * (overall(end.state, 's')! - overall(from!.state, 's')!);
      expect(Math.abs(heat! - expected)).toBeLessThan(1e-9 * scale);
    }
  });

  it('meet the boundaries that brute force meets', () => {
    const n = 1200;
    for (const { outcome, legs, encounters } of steps) {
      const leg = legs[0];
      if (!outcome || !leg) continue;
      const seen: string[] = [];
      let lastPhase: PhaseName | null = null;
      for (let i = 1; i < n; i++) {
        const k = i / n;
        const { phase } = stablePhase(
          env.m,
          leg.from.T + k * (leg.to.T - leg.from.T),
          leg.from.p + k * (leg.to.p - leg.from.p),
        );
        if (lastPhase && phase !== lastPhase)
          seen.push(changeOf(lastPhase, phase) ?? 'passesAboveCritical');
        lastPhase = phase;
      }
      const inside = encounters.filter(({ progress }) => progress > 1 / n && progress < 1 - 1 / n);
      // Two lines met between two samples show as one change.
      const crowded = inside.some((e, i) => i > 0 && e.progress - inside[i - 1]!.progress < 1 / n);
      if (!crowded) expect(inside.map(({ code }) => code)).toEqual(seen);
      for (const e of inside.filter(({ boundary }) => boundary !== 'critical')) {
        const curve = curveOf(env.m, e.boundary);
        const at = curve.along === 'T' ? curve.atTemperature(e.T) : curve.atPressure(e.p);
        expect(Math.abs(at.T / e.T - 1)).toBeLessThan(1e-9);
        expect(Math.abs(at.p / e.p - 1)).toBeLessThan(1e-9);
      }
    }
  });

  it('reversed, give the heat back', () => {
    for (const { step, outcome, from } of steps) {
      const back = straight(env.m, outcome!.end, {
        to: from!.state,
        arrival: null,
        heat: step.kind === 'constantPressure' ? 'enthalpy' : 'entropy',
        leaves: false,
      });
      expect(Math.abs(back.heat! + outcome!.heat!)).toBeLessThan(1e-7 * scale);
      expect(back.encounters.length).toBe(outcome!.encounters.length);
    }
  });

  it('have fractions that sum to one', () => {
    for (const { outcome } of steps)
      expect(
        outcome!.end.state.parts.reduce((sum, { fraction }) => sum + (fraction as number), 0),
      ).toBeCloseTo(1, 12);
  });
});

describe('runs along the lines', () => {
  const cases = [
    { env: waterEnv, T: [300, 420], along: 'boiling line', start: 'vapourFraction' as const },
    { env: waterEnv, T: [220, 270], along: 'sublimation line', start: 'vapourFraction' as const },
    { env: carbonEnv, T: [220, 295], along: 'boiling line', start: 'vapourFraction' as const },
    { env: carbonEnv, T: [180, 215], along: 'sublimation line', start: 'vapourFraction' as const },
    { env: waterEnv, T: [255, 272], along: 'melting line', start: 'solidFraction' as const },
    { env: carbonEnv, T: [220, 260], along: 'melting line', start: 'solidFraction' as const },
  ];
  const next = random(7);

  it.each(cases)('balance on the $along ($T K)', ({ env, T: [a, b], start }) => {
    for (let i = 0; i < 6; i++) {
      const [x0, x1] = [next(), next()];
      const [T0, T1] = i % 2 ? [a!, b!] : [b!, a!];
      const of = run(
        env,
        { T: K(T0), [start]: String(x0) },
        { kind: 'follow', end: { T: K(T1), [start]: String(x1) } },
      );
      const { heat, end, from, encounters } = done(of, 0);
      const curve = curveOf(env.m, from.on!);
      const [y0, y1] = start === 'vapourFraction' ? [x0, x1] : [1 - x0, 1 - x1];
      // −∫p dv = −[pv] + ∫v (dp/dT) dT, in the pressure itself.
      const n = 2000;
      let vdp = 0;
      let last = curve.atTemperature(from.state.T);
      const v = (k: number, at: typeof last): number => {
        const y = y0 + k * (y1 - y0);
        return (1 - y) / at.sides[0]!.rho! + y / at.sides[1]!.rho!;
      };
      for (let k = 1; k <= n; k++) {
        const at = curve.atTemperature(from.state.T + (k / n) * (end.state.T - from.state.T), last);
        vdp += 0.5 * (v((k - 1) / n, last) + v(k / n, at)) * (at.p - last.p);
        last = at;
      }
      const work =
        from.state.p * overall(from.state, 'v')! - end.state.p * overall(end.state, 'v')! + vdp;
      const rise = overall(end.state, 'u')! - overall(from.state, 'u')!;
      expect(Math.abs(heat! + work - rise)).toBeLessThan(1e-5 * heatScale(env.m));
      expect(encounters.length).toBe(1);
      expect(encounters[0]!.kind).toBe('follows');
      expect(encounters[0]!.share).toBeCloseTo(Math.abs(x1 - x0), 12);
    }
  });

  it('without heat keep their entropy, and half and half are the whole', () => {
    const start = { T: '450 K', vapourFraction: '0.1' };
    const whole = done(
      run(waterEnv, start, { kind: 'follow', end: { T: '330 K', heat: '0 J/kg' } }),
      0,
    );
    expect(overall(whole.end.state, 's')!).toBeCloseTo(overall(whole.from.state, 's')!, 8);
    const halves = run(
      waterEnv,
      start,
      { kind: 'follow', end: { T: '390 K', heat: '0 J/kg' } },
      { kind: 'follow', end: { T: '330 K', heat: '0 J/kg' } },
    );
    expect(overall(done(halves, 1).end.state, 'h')!).toBeCloseTo(overall(whole.end.state, 'h')!, 4);
  });

  it('with vapour leaving conserve mass and energy', () => {
    for (const heat of ['0 kJ/kg', '40 kJ/kg']) {
      const of = run(
        waterEnv,
        { T: '350 K', vapourFraction: '0.05' },
        { kind: 'follow', end: { T: '290 K', heat }, vapour: 'leaves' },
      );
      const { heat: q, work, lost, end, from } = done(of, 0);
      expect(end.mass! + lost!.mass!).toBeCloseTo(1, 12);
      const left = end.mass! * overall(end.state, 'u')! + lost!.enthalpy!;
      expect(left - overall(from.state, 'u')!).toBeCloseTo(q! + work!, 5);
      // The work is that of what stays, −∫p d(mv): with the liquid's volume tiny, that of the vapour
      // driven out at the start.
      const vented = 0.05 * from.state.p * (1 / from.state.parts[1]!.rho!);
      expect(Math.abs(work! - vented)).toBeLessThan(5);
      // The same in two steps, since heat is spread evenly over the temperature.
      const half = `${Number(heat.split(' ')[0]) / 2} kJ/kg`;
      const two = run(
        waterEnv,
        { T: '350 K', vapourFraction: '0.05' },
        { kind: 'follow', end: { T: '320 K', heat: half }, vapour: 'leaves' },
        { kind: 'follow', end: { T: '290 K', heat: half }, vapour: 'leaves' },
      );
      expect(done(two, 1).end.mass!).toBeCloseTo(end.mass!, 7);
    }
  });

  it('with vapour leaving by a share, balance by −∫p d(mv)', () => {
    const of = run(
      waterEnv,
      { T: '400 K', vapourFraction: '0' },
      { kind: 'follow', end: { T: '330 K', vapourFraction: '0.3' }, vapour: 'leaves' },
    );
    const { heat, lost, end, from } = done(of, 0);
    const curve = curveOf(waterEnv.m, 'saturation');
    const n = 4000;
    let work = 0;
    let last = curve.atTemperature(400);
    const mass = (k: number): number => 1 - (0.3 * k) / n;
    for (let k = 1; k <= n; k++) {
      const at = curve.atTemperature(400 - (70 * k) / n, last);
      const V = mass(k) / at.sides[0]!.rho! - mass(k - 1) / last.sides[0]!.rho!;
      work -= 0.5 * (at.p + last.p) * V;
      last = at;
    }
    const H = lost!.enthalpy!;
    expect(
      Math.abs(heat! + work - H - (0.7 * overall(end.state, 'u')! - overall(from.state, 'u')!)),
    ).toBeLessThan(0.3);
    expect(end.mass).toBeCloseTo(0.7, 12);
    expect(lost!.mass).toBeCloseTo(0.3, 12);
  });
});
