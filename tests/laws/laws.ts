import { OutOfRange, Undetermined, Unknown } from '../../core/errors.ts';
import { densityAt } from '../../core/equilibrium/density.ts';
import type { Medium } from '../../core/equilibrium/medium.ts';
import { stablePhase, type PhaseState } from '../../core/equilibrium/phase.ts';
import {
  criticalCap,
  saturationAt,
  saturationAtPressure,
  saturationSlope,
} from '../../core/equilibrium/saturation.ts';
import {
  meltingPoint,
  meltingPointAtPressure,
  meltingPressureRange,
  seam,
} from '../../core/equilibrium/solidLines.ts';
import { phaseProperties, stateAt } from '../../core/equilibrium/state.ts';
import { boundaryCurves, type BoundaryCurve, type BoundaryPoint } from '../../core/map/boundary.ts';
import { entropy, gibbs, pressure } from '../../core/models/fluidProperties.ts';
import type { ResidualTerm } from '../../core/substances/substance.ts';
import { difference } from './difference.ts';
import {
  between,
  boundaryPointOf,
  domain,
  drawTp,
  evenly,
  oneOf,
  sign,
  temperatureOn,
  type Random,
} from './draw.ts';

/**
 * What a law found: how often it was put to the test, and where it was broken. `worst` is the largest
 * error against its bound, so that a bound can be seen to be close or far.
 */
export class Finding {
  tested = 0;
  worst = 0;
  readonly broken: string[] = [];

  /** Counts one trial: the error must not pass the bound; NaN breaks it. */
  hold(error: number, bound: number, where: () => string): void {
    this.tested++;
    const share = Math.abs(error) / bound;
    if (share > this.worst) this.worst = share;
    if (!(share <= 1)) this.broken.push(`${where()}: ${error} against ${bound}`);
  }
  /** Counts one trial that is true or not. */
  claim(holds: boolean, where: () => string): void {
    this.hold(holds ? 0 : Infinity, 1, where);
  }
}

/** One law of nature or of the house, tried at one random place of a substance. */
export interface Law {
  readonly name: string;
  readonly of: (m: Medium) => boolean;
  readonly trial: (m: Medium, r: Random, out: Finding) => void;
}

const always = (): boolean => true;
const hasSolids = (m: Medium): boolean => m.solids.size > 0;
const show = (at: object): string => JSON.stringify(at);

const isNonanalytic = (t: ResidualTerm): t is Extract<ResidualTerm, { kind: 'nonanalytic' }> =>
  t.kind === 'nonanalytic';

/** Largest steps in ln δ and ln τ that keep clear of the lines where derivatives are not smooth. */
function steps(m: Medium, delta: number, tau: number): readonly [d: number, t: number] {
  let d = 4e-4;
  let t = 4e-4;
  for (const { A, B, a, beta } of m.substance.fluid.residual.filter(isNonanalytic)) {
    const x = Math.abs(delta - 1);
    const theta = 1 - tau + A * x ** (1 / beta);
    const clear = Math.abs(theta) + Math.sqrt(B) * x ** a;
    d = Math.min(d, 0.025 * x, (0.025 * clear) / ((A / beta) * x ** (1 / beta - 1)));
    t = Math.min(t, 0.025 * clear);
  }
  return [d, t];
}

function drawTrho(m: Medium, r: Random): { T: number; rho: number } {
  const { validity } = m.substance.fluid;
  const near = (x: number): number => x * (1 + sign(r) * 10 ** between(r, -3, -0.5));
  const kind = r();
  if (kind < 0.3) return { T: near(m.critical.T), rho: near(m.critical.rho) };
  if (kind < 0.6)
    return {
      T: between(r, validity.vapourTmin, validity.Tmax),
      rho: evenly(r, 1e-12, 0.1) * m.critical.rho,
    };
  return { T: between(r, m.triple.T, validity.Tmax), rho: r() * 1.15 * m.triple.rhoL };
}

const helmholtz: Law = {
  name: 'derivatives of the Helmholtz energy are those of differences',
  of: always,
  trial(m, r, out) {
    const { T, rho } = drawTrho(m, r);
    const { fluid } = m;
    const low = m.substance.fluid.ideal.lowTemperature?.T;
    // A third derivative jumps where the low-temperature term begins.
    if (low && Math.abs(T / low - 1) < 4e-3) return;
    const { aR, aRd, aRdd, aRt, aRtt, aRdt, a0t, a0tt, delta, tau } = fluid.evaluate(T, rho);
    const [hd, ht] = steps(m, delta, tau);
    // Rounding leaves 1e-15 of the value over the step.
    if (Math.min(hd, ht) < 1e-6) return;
    const overDensity = (f: () => number): number =>
      difference((x) => (fluid.evaluate(T, rho * Math.exp(x)), f()), 0, hd);
    const overTau = (f: () => number): number =>
      difference((x) => (fluid.evaluate(T * Math.exp(-x), rho), f()), 0, ht);
    const scale = [aR, aRd, aRdd, aRt, aRtt, aRdt].reduce((s, x) => s + Math.abs(x), 0);
    const bound = (h: number): number => scale * (2e-8 + 5e-14 / h);
    const where = (what: string) => () => `${what} ${m.substance.id} ${show({ T, rho })}`;
    out.hold(overDensity(() => fluid.aR) - aRd, bound(hd), where('aRd'));
    out.hold(overDensity(() => fluid.aRd) - aRd - aRdd, bound(hd), where('aRdd'));
    out.hold(overDensity(() => fluid.aRt) - aRdt, bound(hd), where('aRdt over density'));
    out.hold(overTau(() => fluid.aR) - aRt, bound(ht), where('aRt'));
    out.hold(overTau(() => fluid.aRt) - aRt - aRtt, bound(ht), where('aRtt'));
    out.hold(overTau(() => fluid.aRd) - aRdt, bound(ht), where('aRdt over temperature'));
    const ideal = 1e-9 * (Math.abs(fluid.a0) + Math.abs(a0t) + Math.abs(a0tt)) + 1e-14 / ht;
    out.hold(overTau(() => fluid.a0) - a0t, ideal, where('a0t'));
    out.hold(overTau(() => fluid.a0t) - a0t - a0tt, ideal, where('a0tt'));
  },
};

const solids: Law = {
  name: 'derivatives of a solid’s Gibbs energy are those of differences',
  of: hasSolids,
  trial(m, r, out) {
    const { model, equation } = oneOf(r, [...m.solids.values()]);
    const { Tmin, Tmax, pmax } = equation.validity;
    const T = between(r, Math.max(Tmin, 2), Tmax);
    const p = r() < 0.5 ? between(r, 0, pmax) : evenly(r, 1e-6, pmax);
    const { gT, gp, gTT, gTp, gpp } = { ...model(T, p) };
    const hT = 2e-3 * T;
    const hp = 1e-2 * (pmax / 100 + p);
    const overT = (f: 'g' | 'gT' | 'gp'): number => difference((x) => model(x, p)[f], T, hT);
    const overP = (f: 'g' | 'gT' | 'gp'): number => difference((x) => model(T, x)[f], p, hp);
    const where = (what: string) => () => `${what} ${equation.solid} ${show({ T, p })}`;
    const g = Math.abs(model(T, p).g) + 1e5;
    out.hold(overT('g') - gT, 1e-9 * (Math.abs(gT) + 100) + (1e-14 * g) / T, where('gT'));
    out.hold(overT('gT') - gTT, 1e-7 * Math.abs(gTT) + 1e-9, where('gTT'));
    out.hold(overT('gp') - gTp, 1e-7 * (Math.abs(gTp) + (1e-4 * gp) / T), where('gTp over T'));
    out.hold(overP('g') - gp, 1e-9 * gp, where('gp'));
    out.hold(overP('gp') - gpp, 1e-7 * Math.abs(gpp), where('gpp'));
    const mixed = 1e-7 * Math.abs(gTp) + (1e-14 * (Math.abs(gT) + 10)) / hp;
    out.hold(overP('gT') - gTp, mixed, where('gTp over p'));
  },
};

interface Side {
  readonly g: number;
  readonly s: number;
  readonly v: number;
  readonly p: number | null;
}

/** One side of a boundary evaluated by its own equation, null where there is none. */
function sideOf(m: Medium, at: PhaseState | null): Side | null {
  if (!at || at.rho === null) return null;
  if (at.phase === 'solid') {
    const solid = at.solid === null ? undefined : m.solids.get(at.solid);
    if (!solid) return null;
    const { g, gT, gp } = solid.model(at.T, at.p);
    return { g, s: -gT, v: gp, p: null };
  }
  m.fluid.evaluate(at.T, at.rho);
  return { g: gibbs(m.fluid), s: entropy(m.fluid), v: 1 / at.rho, p: pressure(m.fluid) };
}

const solved = (m: Medium): readonly BoundaryCurve[] =>
  boundaryCurves(m).filter(({ basis }) => basis === 'equilibrium');

const capped = (m: Medium, at: BoundaryPoint): boolean => m.critical.T - at.T < criticalCap;

const equalGibbs: Law = {
  name: 'both sides of an equilibrium have one pressure and one Gibbs energy',
  of: always,
  trial(m, r, out) {
    const curve = oneOf(r, solved(m));
    const at = boundaryPointOf(r, curve);
    if (curve.kind === 'saturation' && capped(m, at)) return;
    const where = (what: string) => () => `${what} ${curve.id} ${m.substance.id} ${at.T} K`;
    const [a, b] = at.sides.map((side) => sideOf(m, side));
    out.claim(!!a && !!b, where('both sides are known'));
    if (!a || !b) return;
    const RT = m.fluid.R * at.T;
    // Gibbs energies of the liquid carry the rounding of their large terms.
    out.hold((a.g - b.g) / RT, 2e-11 + (1e-3 * Math.min(a.v, b.v)) / RT, where('g'));
    for (const { p } of [a, b]) if (p !== null) out.hold(p - at.p, 1e-9 * at.p + 1e-4, where('p'));
  },
};

const clapeyron: Law = {
  name: 'the slope of an equilibrium is Δs/Δv',
  of: always,
  trial(m, r, out) {
    const curve = oneOf(r, solved(m));
    const T = temperatureOn(r, curve);
    const [low, high] = curve.T;
    // Towards the critical point the slope itself bends without end.
    const top = curve.kind === 'saturation' ? m.critical.T - T : Infinity;
    const h = Math.min(3e-4 * T, 0.05 * top);
    if (T - 3 * h < low || T + 3 * h > high || top < 0.01) return;
    const at = curve.atTemperature(T);
    const [a, b] = at.sides.map((side) => sideOf(m, side)!);
    const slope = (b!.s - a!.s) / (b!.v - a!.v);
    const where = (what: string) => () => `${what} ${curve.id} ${m.substance.id} ${T} K`;
    // A melting pressure is solved to a millipascal, vapour pressures to their digits.
    const noise = curve.kind === 'melting' ? 3e-3 / h : (1e-12 * at.p) / h;
    const followed = difference((x) => curve.atTemperature(x).p, T, h);
    const cancelled = top < 1 ? 1e-8 / top : 0;
    out.hold(followed - slope, Math.abs(slope) * (2e-7 + cancelled) + noise, where('Δs/Δv'));
    if (curve.kind === 'saturation') {
      const s = saturationAt(m, T);
      out.hold(saturationSlope(m, s) / slope - 1, 1e-8 + cancelled, where('saturationSlope'));
    }
  },
};

/** The stable phase, or the typed reason that there is none; anything else is thrown on. */
function answer(m: Medium, T: number, p: number): PhaseState | Undetermined | Unknown {
  try {
    return stablePhase(m, T, p);
  } catch (error) {
    if (error instanceof Undetermined || error instanceof Unknown) return error;
    throw error;
  }
}

const roundTrip: Law = {
  name: '(T, p) → ρ → p returns, with no failure and no NaN, inside validity',
  of: always,
  trial(m, r, out) {
    const { T, p, place } = drawTp(m, r);
    const where = () => `${m.substance.id} ${place} ${show({ T, p })}`;
    let at;
    try {
      at = answer(m, T, p);
    } catch (error) {
      out.claim(false, () => `${where()} ${String(error)}`);
      return;
    }
    if (at instanceof Unknown) {
      const tops = m.substance.melting.map((line) => meltingPressureRange(m, line)[1]);
      const uncharted = m.substance.absent.length > 0 || p > Math.max(...tops);
      out.claim(uncharted, () => `${where()} ${at.message}`);
      return;
    }
    if (at instanceof Undetermined) {
      const curve = boundaryCurves(m).find(({ id }) => id === at.boundary);
      out.claim(curve !== undefined, () => `${where()} ${at.message}`);
      return;
    }
    if (at.phase === 'solid') {
      const solid = at.solid === null ? undefined : m.solids.get(at.solid);
      if (at.rho !== null) out.hold(at.rho * solid!.model(T, p).gp - 1, 1e-14, where);
      else {
        const { validity } = solid?.equation ?? {};
        out.claim(!validity || T < validity.Tmin || p > validity.pmax, where);
      }
    } else {
      m.fluid.evaluate(T, at.rho!);
      out.hold(pressure(m.fluid) - p, 1e-9 * p + 1e-4, where);
      out.claim(1 + 2 * m.fluid.aRd + m.fluid.aRdd > 0, () => `${where()} unstable`);
    }
    const properties = phaseProperties(m, at);
    if (properties)
      for (const [name, x] of Object.entries(properties) as [string, number | null][])
        out.claim(x === null || Number.isFinite(x), () => `${where()} ${name} = ${x}`);
  },
};

const bothSides: Law = {
  name: 'a hair off a boundary lies the phase of that side',
  of: always,
  trial(m, r, out) {
    const curve = oneOf(r, boundaryCurves(m));
    const at = boundaryPointOf(r, curve);
    const { validity } = m.substance.fluid;
    const d = domain(m);
    const away = 10 ** between(r, -7.5, -4);
    // Near an end another boundary is as close as the hair.
    const ends = [...curve.T, m.triple.T, m.critical.T];
    if (ends.some((T) => Math.abs(at.T - T) < 20 * away * T)) return;
    const where = (what: string) => () =>
      `${what} ${curve.id} ${m.substance.id} ${show({ T: at.T, p: at.p, away })}`;
    for (const [i, step] of [
      [0, -away],
      [1, away],
    ] as const) {
      const expected = at.sides[i];
      // Sides are in the order cold, warm; liquid and vapour likewise.
      const T = at.T * (1 + step);
      if (!expected || at.p > validity.pmax || T < d.T[0] || T > d.T[1]) continue;
      const found = answer(m, T, at.p);
      const told = (): string => `${where('phase')()} ${String(i)} ${show(found)}`;
      if (found instanceof Error) {
        out.claim(false, told);
        continue;
      }
      out.claim(found.phase === expected.phase && found.solid === expected.solid, told);
      if (expected.rho !== null && found.rho !== null)
        out.hold(found.rho / expected.rho - 1, 0.5, where('ρ'));
      if (curve.kind === 'saturation' && found.rho !== null) {
        const s = saturationAt(m, T);
        // Under a thousandth of a pascal the liquid's density rounds before its pressure tells.
        const rounds = 1 - 1e-13;
        out.claim(
          i === 0 ? found.rho >= s.rhoL * rounds : found.rho * rounds <= s.rhoV,
          where('outside the dome'),
        );
      }
    }
  },
};

/** Gibbs energy of a fluid branch at (T, p), null where the branch does not reach. */
function branchGibbs(m: Medium, T: number, p: number, branch: 'liquid' | 'vapour'): number | null {
  try {
    m.fluid.evaluate(T, densityAt(m, T, p, branch));
    return gibbs(m.fluid);
  } catch {
    return null;
  }
}

const lowestGibbs: Law = {
  name: 'the stable phase is the one of lowest Gibbs energy',
  of: hasSolids,
  trial(m, r, out) {
    const { T, p, place } = drawTp(m, r);
    const line = m.substance.melting.find(({ route }) => route === 'equilibrium');
    const [name, solid] = [...m.solids][0]!;
    const { validity } = solid.equation;
    if (line && p > meltingPressureRange(m, line)[1]) return;
    if (T < validity.Tmin || p > validity.pmax || p < 1e-25) return;
    const found = answer(m, T, p);
    if (found instanceof Error) return;
    const candidates = new Map<string, number>();
    if (T <= validity.Tmax) candidates.set(name, solid.model(T, p).g);
    const liquid = T >= m.substance.fluid.validity.Tmin ? branchGibbs(m, T, p, 'liquid') : null;
    if (liquid !== null) candidates.set('liquid', liquid);
    const vapour = branchGibbs(m, T, p, 'vapour');
    if (vapour !== null) candidates.set('vapour', vapour);
    const is = found.solid ?? (found.phase === 'supercritical' ? 'liquid' : found.phase);
    const lowest = Math.min(...candidates.values());
    const own = candidates.get(is);
    const where = () => `${m.substance.id} ${place} ${show({ T, p, is })} ${show([...candidates])}`;
    out.claim(own !== undefined, where);
    if (own !== undefined) out.hold((own - lowest) / (m.fluid.R * T), 1e-10, where);
  },
};

const inverse: Law = {
  name: 'a boundary found by temperature is found again by pressure, with or without a neighbour',
  of: always,
  trial(m, r, out) {
    const curve = oneOf(r, boundaryCurves(m));
    const at = boundaryPointOf(r, curve);
    const where = (what: string) => () => `${what} ${curve.id} ${m.substance.id} ${at.T} K`;
    const near = boundaryPointOf(r, curve);
    const p = Math.min(curve.p[1], Math.max(curve.p[0], at.p));
    // A melting pressure is solved to a millipascal; in temperature that is its slope's share.
    const [low, high] = curve.T;
    const other = curve.atTemperature(at.T > 0.5 * (low + high) ? at.T - 0.01 : at.T + 0.01);
    const slope = Math.abs((other.p - at.p) / (other.T - at.T));
    const bound = 2e-11 * at.T + (curve.kind === 'melting' ? 3e-3 / slope : 0);
    const cap = curve.kind === 'saturation' && m.critical.T - at.T < 0.01 ? 1e-4 : 0;
    out.hold(curve.atPressure(p).T - at.T, bound + cap, where('by pressure'));
    out.hold(curve.atPressure(p, near).T - at.T, bound + cap, where('by pressure, near another'));
    const again = curve.atTemperature(at.T, near);
    out.hold(
      again.p - at.p,
      1e-11 * at.p + (curve.kind === 'melting' ? 3e-3 : 0),
      where('near another'),
    );
    for (const i of [0, 1] as const) {
      const [a, b] = [again.sides[i]?.rho, at.sides[i]?.rho];
      const tolerance =
        1e-9 + (cap ? 1e-6 : 0) + 1e-10 / (Math.abs(1 - at.T / m.critical.T) + 1e-6);
      if (a && b) out.hold(a / b - 1, tolerance, where('density, near another'));
    }
  },
};

const monotone: Law = {
  name: 'saturation pressure and vapour density rise with temperature, liquid density falls',
  of: always,
  trial(m, r, out) {
    const curve = boundaryCurves(m).find(({ kind }) => kind === 'saturation')!;
    const T = temperatureOn(r, curve);
    const gap = Math.max(1e-6 * T, evenly(r, 1e-6, 1) * (m.critical.T - T));
    const U = Math.min(T + gap, m.critical.T);
    if (U <= T) return;
    const [a, b] = [saturationAt(m, T), saturationAt(m, U)];
    const where = () => `${m.substance.id} ${T} K to ${U} K`;
    out.claim(b.p > a.p || m.critical.T - T < criticalCap, where);
    // Within a millikelvin of the top densities are good to a few 1e-9.
    const slack = 1 + (m.critical.T - T < 0.01 ? 1e-7 : 0);
    out.claim(b.rhoV * slack >= a.rhoV, where);
    // Water is densest near 4 °C (common practice, no source).
    const densest = m.substance.id === 'water' ? 277.2 : 0;
    if (T > densest) out.claim(b.rhoL <= a.rhoL * slack, where);
    out.claim(a.rhoL >= m.critical.rho && a.rhoV <= m.critical.rho, where);
  },
};

const givenPressure: Law = {
  name: 'saturationAtPressure undoes saturationAt',
  of: always,
  trial(m, r, out) {
    const p =
      r() < 0.5 ? between(r, m.triple.p, m.critical.p) : evenly(r, m.triple.p, m.critical.p);
    const s = saturationAtPressure(m, p);
    const where = () => `${m.substance.id} ${p} Pa`;
    out.claim(s.T >= m.triple.T && s.T <= m.critical.T, where);
    if (m.critical.T - s.T >= criticalCap) out.hold(saturationAt(m, s.T).p / p - 1, 1e-12, where);
  },
};

const outside: Law = {
  name: 'outside validity a typed error names the quantity and its range',
  of: always,
  trial(m, r, out) {
    const d = domain(m);
    const T = between(r, ...d.T);
    const p = evenly(r, 1, d.p[1]);
    const bad = oneOf(r, [
      [d.T[1] * (1 + evenly(r, 1e-9, 10)), p, 'T'],
      [d.T[0] * (1 - evenly(r, 1e-9, 1)), p, 'T'],
      [-T, p, 'T'],
      [NaN, p, 'T'],
      [Infinity, p, 'T'],
      [T, d.p[1] * (1 + evenly(r, 1e-9, 10)), 'p'],
      [T, -p, 'p'],
      [T, 0, 'p'],
      [T, NaN, 'p'],
      [T, Infinity, 'p'],
    ] as const);
    const where = () => `${m.substance.id} ${show({ T: bad[0], p: bad[1] })}`;
    try {
      stateAt(m, bad[0], bad[1]);
      out.claim(false, where);
    } catch (error) {
      out.claim(
        error instanceof OutOfRange &&
          error.quantity === bad[2] &&
          Object.is(error.value, bad[bad[2] === 'T' ? 0 : 1]) &&
          error.range.max > error.range.min &&
          error.source !== '',
        () => `${where()} ${String(error)}`,
      );
    }
  },
};

const seams: Law = {
  name: 'at the seam of two melting lines no pressure is lost and no temperature jumps',
  of: (m) => m.substance.melting.length > 1,
  trial(m, r, out) {
    const i = Math.floor(r() * (m.substance.melting.length - 1));
    const [a, b] = [m.substance.melting[i]!, m.substance.melting[i + 1]!];
    const end = meltingPressureRange(m, a)[1];
    const begin = meltingPressureRange(m, b)[0];
    const where = () => `${a.id} to ${b.id}`;
    out.hold(begin / end - 1, seam, where);
    const p = end * (1 + sign(r) * evenly(r, 1e-9, 3e-5));
    if (p > m.substance.fluid.validity.pmax) return;
    const T = meltingPoint(m, b, b.range.Tmin).T;
    for (const step of [-1, -0.01, 0.01, 1]) {
      const found = answer(m, T + step, p);
      const told = () => `${where()} ${show({ T: T + step, p })} ${show(found)}`;
      out.claim(!(found instanceof Error), told);
      if (!(found instanceof Error)) out.claim((found.phase === 'solid') === step < 0, told);
    }
    for (const line of [a, b]) {
      const [low, high] = meltingPressureRange(m, line);
      const inside = Math.min(high, Math.max(low, p));
      out.hold(meltingPointAtPressure(m, line, inside).T - T, 5e-3, where);
    }
  },
};

export const laws: readonly Law[] = [
  helmholtz,
  solids,
  equalGibbs,
  clapeyron,
  roundTrip,
  bothSides,
  lowestGibbs,
  inverse,
  monotone,
  givenPressure,
  outside,
  seams,
];
