import * as v from 'valibot';
import type { StepKind } from '../step.ts';
import type { StepOf } from '../stepOf.ts';
import { closedVessel } from './closedVessel.ts';
import { constantPressure } from './constantPressure.ts';
import { constantTemperature } from './constantTemperature.ts';
import { follow } from './follow.ts';
import { heatAmount } from './heatAmount.ts';
import { hold } from './hold.ts';
import { isentropic } from './isentropic.ts';
import { ramp } from './ramp.ts';
import { throttle } from './throttle.ts';

/** Every kind of step, one line each. */
export const stepKinds = [
  constantPressure,
  constantTemperature,
  ramp,
  follow,
  hold,
  throttle,
  isentropic,
  closedVessel,
  heatAmount,
] as const;

type SchemasOf<K extends readonly { readonly schema: unknown }[]> = {
  -readonly [I in keyof K]: K[I]['schema'];
};

/** Any step, told apart by its kind. */
export const stepSchema = v.variant(
  'kind',
  stepKinds.map(({ schema }) => schema) as SchemasOf<typeof stepKinds>,
);

export type Step = StepOf<typeof stepSchema>;

/** The kind that a step is of. */
export const kindOf = (step: Step): StepKind<Step> =>
  stepKinds.find(({ kind }) => kind === step.kind) as StepKind<Step>;
