import * as v from 'valibot';
import { parseReading, ReadingError } from '../units/index.ts';
import type { Encounter } from './encounter.ts';
import type { HeatAbsent, Outcome } from './outcome.ts';
import type { Part } from '../equilibrium/state.ts';
import { StepFailure, stepProblemOf, type Leg, type StepProblem } from './problem.ts';
import { standAt, standOn, type Stand } from './stand.ts';
import {
  bears,
  boundaryMetAt,
  endFields,
  fractionOf,
  pointOn,
  secondShare,
  siOf,
  type DragTarget,
  type Env,
} from './step.ts';
import type { StepOf } from './stepOf.ts';
import { kindOf, type Step } from './steps/index.ts';

const { T, p, vapourFraction, solidFraction } = endFields;

/** Where a path starts: T and p, or one of them with a fraction on a line. */
export const startSchema = v.strictObject({ T, p, vapourFraction, solidFraction });

export type Start = StepOf<typeof startSchema>;

/** The givens that pin a path's start. */
export const startGivens = [
  ['T', 'p'],
  ['T', 'vapourFraction'],
  ['T', 'solidFraction'],
  ['p', 'vapourFraction'],
  ['p', 'solidFraction'],
] as const;

/**
 * The stand of a start. A fraction means the boiling line from the triple point up and the
 * sublimation line below it; a solid fraction from the triple pressure up means the melting line,
 * and at a temperature the melting line of least pressure before the sublimation line.
 */
export function startStand(start: Start, env: Env): Stand {
  const { m } = env;
  const temperature = start.T === undefined ? null : siOf(env, start.T, 'temperature');
  const pressure = start.p === undefined ? null : siOf(env, start.p, 'pressure');
  const fraction = fractionOf(env, start);
  if (!fraction) return standAt(m, temperature!, pressure!, 1);
  const by = temperature === null ? 'p' : 'T';
  const value = temperature ?? pressure!;
  const curve = boundaryMetAt(env, by, value, bears(fraction.of));
  const point = { ...pointOn(curve, by, value), [by]: value };
  return standOn(m, curve, point, secondShare(fraction.of, fraction.value), 1);
}

/** What dragging a start to a place means, in SI: on a line it slides along it. */
export function dragStart(
  start: Start,
  to: DragTarget,
): { readonly T?: number; readonly p?: number } {
  return {
    ...(start.T !== undefined && { T: to.T }),
    ...(start.p !== undefined && { p: to.p }),
  };
}

/** A step of a path as run; everything but the readings is SI. */
export interface StepRun {
  readonly step: Step;
  readonly from: Stand | null;
  readonly end: Stand | null;
  readonly outcome: Outcome | null;
  /** The way on the map, also of a step that did not reach its end. */
  readonly legs: readonly Leg[];
  readonly encounters: readonly Encounter[];
  readonly problem: StepProblem | null;
  /** s; null where neither time nor rate tells it. */
  readonly time: number | null;
}

const withoutHeat: HeatAbsent = { code: 'notReached' };
export const heatAbsentOf = ({ outcome }: StepRun): HeatAbsent | null =>
  outcome ? outcome.heatAbsent : withoutHeat;

/** A change of phase at one point, which takes a time of its own. */
const plateau = ({ encounters, legs }: Outcome): boolean =>
  legs.every((leg) => leg.along === null) &&
  encounters.some(
    ({ code, share }) =>
      share !== 0 && !['leaves', 'reaches', 'touches', 'passesAboveCritical'].includes(code),
  );

/** A rate in K/s or Pa/s, told apart by its unit. Throws ReadingError. */
export function rateOf(text: string): {
  readonly of: 'temperatureRate' | 'pressureRate';
  readonly value: number;
} {
  try {
    return { of: 'temperatureRate', value: parseReading(text, 'temperatureRate').value };
  } catch (error) {
    if (!(error instanceof ReadingError)) throw error;
    return { of: 'pressureRate', value: parseReading(text, 'pressureRate').value };
  }
}

function timeOf(step: Step, from: Stand, outcome: Outcome, env: Env): number | null {
  if (step.time !== undefined) return siOf(env, step.time, 'time');
  // A rate says nothing of how long a phase takes to change over at one temperature and pressure.
  if (step.rate === undefined || plateau(outcome)) return null;
  const { of, value } = rateOf(step.rate);
  const key = of === 'temperatureRate' ? 'T' : 'p';
  const change = Math.abs(outcome.end.state[key] - from.state[key]);
  return change > 0 && value !== 0 ? change / Math.abs(value) : null;
}

function runStep(step: Step, from: Stand, env: Env): StepRun {
  const nothing = { step, from, end: null, outcome: null, encounters: [], time: null };
  const { T, p } = from.state;
  if (from.mass === 0) return { ...nothing, legs: [], problem: { code: 'nothingLeft', T, p } };
  try {
    const outcome = kindOf(step).run(step, from, env);
    const time = timeOf(step, from, outcome, env);
    const uneven = plateau(outcome);
    const encounters = outcome.encounters.map((e): Encounter => {
      const known = time !== null && (!uneven || e.progress === 0 || e.code === 'reaches');
      return known ? { ...e, time: e.progress * time } : e;
    });
    return {
      ...nothing,
      end: outcome.end,
      outcome,
      legs: outcome.legs,
      encounters,
      problem: null,
      time,
    };
  } catch (error) {
    return {
      ...nothing,
      legs: error instanceof StepFailure ? error.legs : [],
      problem: stepProblemOf(error),
    };
  }
}

interface Kept<V> {
  readonly from: Stand | null;
  readonly env: Env;
  readonly value: V;
}
const starts = new WeakMap<Start, Kept<Stand>>();
const steps = new WeakMap<Step, Kept<StepRun>>();

const sameEnv = (a: Env, b: Env): boolean =>
  a.m === b.m && a.local === b.local && a.pressureKind === b.pressureKind;

/** A value kept with its immutable key for as long as what it came from stays the same object. */
function kept<K extends object, V>(
  map: WeakMap<K, Kept<V>>,
  key: K,
  from: Stand | null,
  env: Env,
  make: (before: V | undefined) => V,
): V {
  const ready = map.get(key);
  if (ready && ready.from === from && sameEnv(ready.env, env)) return ready.value;
  const value = make(ready && sameEnv(ready.env, env) ? ready.value : undefined);
  map.set(key, { from, env, value });
  return value;
}

const sameFraction = (a: Part['fraction'], b: Part['fraction']): boolean =>
  typeof a === 'number' || typeof b === 'number' ? a === b : a[0] === b[0] && a[1] === b[1];

/** Whether two stands are one in every number; properties follow from the rest. */
const sameStand = (a: Stand, b: Stand): boolean =>
  a.on === b.on &&
  a.mass === b.mass &&
  a.state.T === b.state.T &&
  a.state.p === b.state.p &&
  a.state.freedom === b.state.freedom &&
  a.state.parts.length === b.state.parts.length &&
  a.state.parts.every(({ phase, solid, rho, fraction }, i) => {
    const other = b.state.parts[i]!;
    return (
      phase === other.phase &&
      solid === other.solid &&
      rho === other.rho &&
      sameFraction(fraction, other.fraction)
    );
  });

/** A step that ends where it ended before ends in the very same stand, so that the next is kept. */
function runAgain(step: Step, from: Stand, env: Env, before: StepRun | undefined): StepRun {
  const run = runStep(step, from, env);
  return run.end && before?.end && sameStand(run.end, before.end)
    ? { ...run, end: before.end }
    : run;
}

export interface PathRun {
  readonly start: Stand | null;
  /** Why there is no start. */
  readonly problem: StepProblem | null;
  readonly steps: readonly StepRun[];
}

/**
 * Runs a path's steps one after the other. A step that does not reach its end stops the path; what
 * came before stays. Steps are kept by the identity of their immutable objects, so a change
 * runs only the steps from it on.
 */
export function runPath(
  path: { readonly start: Start; readonly steps: readonly Step[] },
  env: Env,
): PathRun {
  let stand: Stand | null = null;
  let problem: StepProblem | null = null;
  try {
    stand = kept(starts, path.start, null, env, () => startStand(path.start, env));
  } catch (error) {
    problem = stepProblemOf(error);
  }
  const start = stand;
  const runs: StepRun[] = [];
  for (const step of path.steps) {
    const from = stand;
    const run: StepRun = from
      ? kept(steps, step, from, env, (before) => runAgain(step, from, env, before))
      : {
          step,
          from: null,
          end: null,
          outcome: null,
          legs: [],
          encounters: [],
          problem: { code: 'notRun' },
          time: null,
        };
    runs.push(run);
    stand = run.end;
  }
  return { start, problem, steps: runs };
}
