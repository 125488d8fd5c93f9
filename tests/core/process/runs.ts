import { medium, type Medium } from '../../../core/equilibrium/medium.ts';
import { runPath, type PathRun, type Start, type StepRun } from '../../../core/process/path.ts';
import type { Env } from '../../../core/process/step.ts';
import type { Step } from '../../../core/process/steps/index.ts';
import { carbonDioxide } from '../../../core/substances/carbon-dioxide.ts';
import { water } from '../../../core/substances/water.ts';

export const waterEnv: Env = { m: medium(water), local: 101325, pressureKind: 'absolute' };
export const carbonEnv: Env = { m: medium(carbonDioxide), local: 101325, pressureKind: 'absolute' };

type Bare = Step extends infer S ? (S extends Step ? Omit<S, 'id'> : never) : never;

/** Steps with ids, as a sheet has them. */
export const stepsOf = (...bare: readonly Bare[]): readonly Step[] =>
  bare.map((step, i) => ({ ...step, id: `s${i}` }));

export const run = (env: Env, start: Start, ...bare: readonly Bare[]): PathRun =>
  runPath({ start, steps: stepsOf(...bare) }, env);

/** A step that must have reached its end. */
export function done(of: PathRun, i: number) {
  const step: StepRun | undefined = of.steps[i];
  if (!step?.outcome || !step.end)
    throw new Error(`step ${i}: ${JSON.stringify(step?.problem ?? of.problem)}`);
  return { ...step.outcome, from: step.from!, encounters: step.encounters, time: step.time };
}

/** Readings with every digit. */
export const K = (T: number): string => `${T.toFixed(10)} K`;
export const Pa = (p: number): string => `${p.toFixed(6)} Pa(a)`;

/** The scale on which heats are compared: R·Tc, J/kg. */
export const heatScale = (m: Medium): number => m.fluid.R * m.critical.T;
