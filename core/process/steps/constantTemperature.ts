import * as v from 'valibot';
import { keeping } from '../keeping.ts';
import { endFields, stepFields, vapourField, type StepKind } from '../step.ts';
import type { StepOf } from '../stepOf.ts';

const { p, boundary, vapourFraction, solidFraction } = endFields;

const schema = v.strictObject({
  ...stepFields,
  ...vapourField,
  kind: v.literal('constantTemperature'),
  end: v.strictObject({ p, boundary, vapourFraction, solidFraction }),
});

type ConstantTemperature = StepOf<typeof schema>;

/** Changes the pressure at constant temperature: q = T Δs. A hand moves the end in pressure. */
export const constantTemperature = {
  kind: 'constantTemperature',
  schema,
  ends: [['p'], ['boundary'], ['vapourFraction'], ['solidFraction']],
  rates: ['pressureRate'],
  run: (step, from, env) => keeping(step, from, env, 'T'),
  drag: (_step, _from, to) => (to.snap ? { boundary: to.snap } : { p: to.p }),
} as const satisfies StepKind<ConstantTemperature> & { schema: typeof schema };
