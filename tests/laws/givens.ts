import { OutOfRange, Undetermined, Unknown } from '../../core/errors.ts';
import { stateFromDensityEnergy } from '../../core/equilibrium/givens/densityEnergy.ts';
import {
  stateFromPressureEnthalpy,
  stateFromPressureEntropy,
} from '../../core/equilibrium/givens/pressureCaloric.ts';
import { statesFromPressureDensity } from '../../core/equilibrium/givens/pressureDensity.ts';
import {
  stateFromPressureSubcooling,
  stateFromPressureSuperheat,
} from '../../core/equilibrium/givens/superheat.ts';
import { stateFromTemperatureDensity } from '../../core/equilibrium/givens/temperatureDensity.ts';
import { statesFromTemperatureEntropy } from '../../core/equilibrium/givens/temperatureEntropy.ts';
import { triplePhases } from '../../core/equilibrium/givens/rungs.ts';
import type { Medium } from '../../core/equilibrium/medium.ts';
import { saturationAtPressure } from '../../core/equilibrium/saturation.ts';
import {
  mixedState,
  overall,
  phaseProperties,
  stateAt,
  type State,
} from '../../core/equilibrium/state.ts';
import { boundaryCurves } from '../../core/map/boundary.ts';
import { pressure } from '../../core/models/fluidProperties.ts';
import { between, boundaryPointOf, drawTp, evenly, oneOf, type Random } from './draw.ts';
import type { Finding, Law } from './laws.ts';

const always = (): boolean => true;

/** Within this of the critical temperature (K) the critical point may answer. */
const cap = 1e-4;

interface Drawn {
  readonly state: State;
  readonly told: string;
}

/** A share from 0 to 1, often at or by one of its ends. */
const share = (r: Random): number => {
  const kind = r();
  if (kind < 0.1) return 0;
  if (kind < 0.2) return 1;
  if (kind < 0.4) return 10 ** between(r, -9, -1);
  return kind < 0.6 ? 1 - 10 ** between(r, -9, -1) : r();
};

/** A state of one or two phases whose properties are all known; null where the draw meets none. */
function draw(m: Medium, r: Random): Drawn | null {
  if (r() < 0.45) {
    const curve = oneOf(r, boundaryCurves(m));
    const at = boundaryPointOf(r, curve);
    const [a, b] = at.sides;
    if (!a || !b || !phaseProperties(m, a) || !phaseProperties(m, b)) return null;
    if (curve.kind === 'saturation' && m.critical.T - at.T < 2 * cap) return null;
    // This close to the triple point the three-phase line answers.
    if (Math.abs(at.p / m.triple.p - 1) < 2e-9 || Math.abs(at.T / m.triple.T - 1) < 2e-9)
      return null;
    const x = share(r);
    const state = mixedState(m, [a, b], x);
    return { state, told: `${m.substance.id} ${curve.id} ${at.T} K ${at.p} Pa share ${x}` };
  }
  const { T, p, place } = drawTp(m, r);
  if (p < 1e-30 || Math.abs(T / m.triple.T - 1) < 2e-9 || Math.abs(p / m.triple.p - 1) < 2e-9)
    return null;
  try {
    const state = stateAt(m, T, p);
    if (state.parts[0]!.properties === null) return null;
    return { state, told: `${m.substance.id} ${place} ${T} K ${p} Pa ${state.parts[0]!.phase}` };
  } catch (error) {
    if (error instanceof Undetermined || error instanceof Unknown) return null;
    throw error;
  }
}

const main = (state: State): string =>
  state.parts
    .filter(({ fraction }) => typeof fraction !== 'number' || (fraction > 1e-8 && fraction < 1))
    .map(({ phase }) => phase)
    .sort()
    .join('+') || state.parts.map(({ phase }) => phase).join('+');

/** Pressures that the parts' own equations give. */
function pressures(m: Medium, { parts }: State): readonly number[] {
  return parts
    .filter(({ phase, rho }) => phase !== 'solid' && rho !== null)
    .map(({ T, rho }) => pressure(m.fluid.evaluate(T, rho!)));
}

function agree(
  m: Medium,
  out: Finding,
  { state, told }: Drawn,
  found: State,
  what: string,
  [dT, dp]: readonly [number, number],
): void {
  const where = (of: string) => () =>
    `${what} ${of}: ${told}; found ${found.T} K ${found.p} Pa ${JSON.stringify(found.parts.map(({ phase, fraction, rho }) => [phase, fraction, rho]))}`;
  for (const p of pressures(m, found)) out.hold(p - found.p, 1e-9 * found.p + 1e-4, where('own p'));
  const critical = m.critical.T;
  if (Math.abs(state.T - critical) < cap) {
    out.hold(found.T - critical, 2 * cap, where('critical T'));
    return;
  }
  out.hold(found.T - state.T, dT + 1e-30, where('T'));
  out.hold(found.p - state.p, dp + 1e-60, where('p'));
  // By the very edge either side of a boundary is right.
  if (state.parts.length === 1 && found.parts.length === 1) {
    const [a, b] = [state.parts[0]!, found.parts[0]!];
    const same = a.phase === b.phase || Math.abs(b.rho! / a.rho! - 1) < 1e-6;
    out.claim(same, where('phase'));
  } else if (state.parts.length === 2 && found.parts.length === 2)
    out.claim(
      main(state) === main(found) ||
        Math.min(...found.parts.map(({ fraction }) => fraction as number)) < 1e-6,
      where('phases'),
    );
}

const isobaric =
  (of: 'h' | 's', solve: typeof stateFromPressureEnthalpy): Law['trial'] =>
  (m, r, out) => {
    const drawn = draw(m, r);
    if (!drawn) return;
    const { state } = drawn;
    const value = overall(state, of)!;
    const scale = m.fluid.R * (of === 'h' ? m.critical.T : 1);
    const found = solve(m, state.p, value);
    const where = () =>
      `${of}: ${drawn.told}; found ${found.T} K ${JSON.stringify(found.parts.map(({ phase, fraction }) => [phase, fraction]))}`;
    out.hold(overall(found, of)! - value, 1e-9 * scale, where);
    out.claim(found.p === state.p, where);
    // T by the solved boundary, good to its own digits; by the critical point cp is large and h exact.
    const slack = 1e-9 * state.T + 1e-6 * cap;
    agree(m, out, drawn, found, of, [slack, 0]);
  };

const temperatureDensity: Law['trial'] = (m, r, out) => {
  const drawn = draw(m, r);
  if (!drawn) return;
  const { state } = drawn;
  const rho = 1 / overall(state, 'v')!;
  const found = stateFromTemperatureDensity(m, state.T, rho);
  const where = () => `T, ρ: ${drawn.told}`;
  out.hold(overall(found, 'v')! * rho - 1, 1e-12, where);
  out.claim(found.T === state.T, where);
  // A melting pressure is solved to a millipascal, a liquid's from its density to the rounding.
  const only = state.parts.length === 1 ? state.parts[0]! : null;
  const stiff = only && only.phase !== 'vapour' ? 3e-13 * m.fluid.R * state.T * rho * 50 : 0;
  const solid = state.parts.some(({ phase }) => phase === 'solid');
  agree(m, out, drawn, found, 'T, ρ', [0, 2e-9 * state.p + (solid ? 1e-2 : 1e-4) + stiff]);
};

const densityEnergy: Law['trial'] = (m, r, out) => {
  const drawn = draw(m, r);
  if (!drawn || r() < 0.8) return;
  const { state } = drawn;
  const rho = 1 / overall(state, 'v')!;
  const u = overall(state, 'u')!;
  const found = stateFromDensityEnergy(m, rho, u);
  const where = () => `ρ, u: ${drawn.told}; found ${found.T} K`;
  out.hold(overall(found, 'u')! - u, 1e-9 * m.fluid.R * m.critical.T, where);
  out.hold(overall(found, 'v')! * rho - 1, 1e-9, where);
  if (Math.abs(state.T - m.critical.T) > 0.01) out.hold(found.T - state.T, 1e-6, where);
};

const several: Law['trial'] = (m, r, out) => {
  if (r() < 0.7) return;
  const drawn = draw(m, r);
  if (!drawn) return;
  const { state, told } = drawn;
  if (Math.abs(state.T - m.critical.T) < 0.02) return;
  const rho = 1 / overall(state, 'v')!;
  const s = overall(state, 's')!;
  const byDensity = statesFromPressureDensity(m, state.p, rho);
  const byEntropy = statesFromTemperatureEntropy(m, state.T, s);
  const edge = state.parts.length === 2 || state.parts.some(({ fraction }) => fraction === 1);
  out.claim(edge, () => told);
  const nearT = Math.min(...byDensity.map(({ T }) => Math.abs(T - state.T)));
  // About a densest point the temperature is a square root of the density.
  out.hold(nearT, 2e-4, () => `p, ρ: ${told}; ${JSON.stringify(byDensity.map(({ T }) => T))}`);
  for (const found of byDensity)
    out.hold(overall(found, 'v')! * rho - 1, 1e-9, () => `p, ρ returns ρ: ${told} ${found.T} K`);
  for (const found of byEntropy)
    out.hold(
      (overall(found, 's')! - s) / m.fluid.R,
      1e-9,
      () => `T, s returns s: ${told} ${found.p} Pa`,
    );
  const nearS = Math.min(
    ...byEntropy.map((found) =>
      // Thin vapour leaves a solid's entropy as it is: pressures below 1 kPa are all one to it.
      state.parts[0]!.phase === 'solid' && Math.abs(found.p - state.p) < 1e3
        ? 0
        : Math.abs(overall(found, 'v')! / overall(state, 'v')! - 1),
    ),
  );
  out.hold(nearS, 1e-4, () => `T, s: ${told}; ${JSON.stringify(byEntropy.map(({ p }) => p))}`);
};

const tripleLine: Law['trial'] = (m, r, out) => {
  const phases = triplePhases(m);
  const all = phases.map((phase) => phaseProperties(m, phase));
  if (all.some((one) => one === null)) return;
  const raw = [r(), r(), r()].map((x) => (r() < 0.15 ? 0 : x));
  const sum = raw[0]! + raw[1]! + raw[2]!;
  if (!(sum > 0)) return;
  const shares = raw.map((x) => x / sum);
  const mix = (of: 'h' | 's' | 'u' | 'v'): number =>
    shares.reduce((total, x, i) => total + x * (of === 'v' ? 1 / all[i]!.rho : all[i]![of]), 0);
  const where = (what: string) => () => `${what} ${m.substance.id} ${JSON.stringify(shares)}`;
  const { T, p } = m.triple;
  const single = shares.filter((x) => x > 0).length === 1;
  for (const [what, found] of [
    ['p, h', stateFromPressureEnthalpy(m, p, mix('h'))],
    ['p, s', stateFromPressureEntropy(m, p, mix('s'))],
    ['T, ρ', stateFromTemperatureDensity(m, T, 1 / mix('v'))],
  ] as const) {
    out.claim(found.T === T && found.p === p, where(what));
    if (single) continue;
    for (const [i, { phase }] of phases.entries()) {
      const part = found.parts.find((one) => one.phase === phase);
      const [low, high] =
        part === undefined
          ? [0, 0]
          : typeof part.fraction === 'number'
            ? [part.fraction, part.fraction]
            : part.fraction;
      out.claim(
        shares[i]! >= low - 1e-9 && shares[i]! <= high + 1e-9,
        () => `${where(what)()} ${phase} ${low} to ${high}`,
      );
    }
  }
  const found = stateFromDensityEnergy(m, 1 / mix('v'), mix('u'));
  for (const [i, { phase }] of phases.entries()) {
    const part = found.parts.find((one) => one.phase === phase);
    out.hold(
      ((part?.fraction as number | undefined) ?? 0) - shares[i]!,
      1e-6,
      where(`ρ, u ${phase}`),
    );
  }
};

const superheat: Law['trial'] = (m, r, out) => {
  const p = evenly(r, m.triple.p * 1.001, m.critical.p * 0.9999);
  const s = saturationAtPressure(m, p);
  const kelvin = evenly(r, 1e-3, 100);
  const where = (what: string) => () => `${what} ${m.substance.id} ${p} Pa ${kelvin} K`;
  if (s.T + kelvin < m.substance.fluid.validity.Tmax) {
    const warm = stateFromPressureSuperheat(m, p, kelvin);
    out.hold(warm.T - s.T - kelvin, 1e-9, where('superheat'));
    out.claim(warm.parts[0]!.phase === 'vapour' && warm.parts.length === 1, where('vapour'));
  }
  try {
    const cold = stateFromPressureSubcooling(m, p, kelvin);
    out.hold(s.T - kelvin - cold.T, 1e-9, where('subcooling'));
    out.claim(cold.parts[0]!.phase === 'liquid' && cold.parts.length === 1, where('liquid'));
  } catch (error) {
    out.claim(error instanceof OutOfRange && error.quantity === 'subcooling', where(String(error)));
  }
};

const outside: Law['trial'] = (m, r, out) => {
  const p = evenly(r, 1, m.substance.fluid.validity.pmax);
  const { Tmax } = m.substance.fluid.validity;
  const T = between(r, m.triple.T, Tmax);
  const hot = overall(stateAt(m, Tmax, p), 'h')!;
  const scale = m.fluid.R * m.critical.T;
  for (const ask of [
    () => stateFromPressureEnthalpy(m, p, hot + scale * evenly(r, 1e-6, 100)),
    () => stateFromPressureEnthalpy(m, -p, hot),
    () => stateFromPressureEnthalpy(m, p, NaN),
    () => stateFromPressureEnthalpy(m, p, hot - 1000 * scale),
    () => stateFromPressureEntropy(m, p, Infinity),
    () => stateFromPressureEntropy(m, m.substance.fluid.validity.pmax * 1.001, 0),
    () => stateFromTemperatureDensity(m, Tmax * 1.001, 1),
    () => stateFromTemperatureDensity(m, T, -1),
    () => stateFromTemperatureDensity(m, T, 1e5),
    () => stateFromDensityEnergy(m, NaN, 0),
    () => stateFromDensityEnergy(m, 1, hot + 100 * scale),
    () => statesFromPressureDensity(m, p, 1e5),
    () => statesFromTemperatureEntropy(m, T, 1e9),
    () => stateFromPressureSuperheat(m, m.critical.p * 1.01, 1),
    () => stateFromPressureSubcooling(m, m.critical.p * 0.5, -1),
  ]) {
    let told: unknown = null;
    try {
      told = ask();
    } catch (error) {
      told = error;
    }
    out.claim(
      told instanceof OutOfRange || told instanceof Unknown,
      () => `${ask.toString()} ${String(told)}`,
    );
  }
};

/** Laws of states from two givens. */
export const givenLaws: readonly Law[] = [
  {
    name: '(p, h) gives the state back',
    of: always,
    trial: isobaric('h', stateFromPressureEnthalpy),
  },
  {
    name: '(p, s) gives the state back',
    of: always,
    trial: isobaric('s', stateFromPressureEntropy),
  },
  { name: '(T, ρ) gives the state back', of: always, trial: temperatureDensity },
  { name: '(ρ, u) gives the state back', of: always, trial: densityEnergy },
  { name: '(p, ρ) and (T, s) have the state among their answers', of: always, trial: several },
  {
    name: 'on the three-phase line ranges hold the fractions, and (ρ, u) fixes them',
    of: (m) => m.solids.size > 0,
    trial: tripleLine,
  },
  { name: 'superheat and subcooling count from the boiling point', of: always, trial: superheat },
  { name: 'givens outside are refused by name', of: always, trial: outside },
];
