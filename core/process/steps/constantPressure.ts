import * as v from 'valibot';
import { keeping } from '../keeping.ts';
import { endFields, stepFields, vapourField, type StepKind } from '../step.ts';
import type { StepOf } from '../stepOf.ts';

const { T, boundary, vapourFraction, solidFraction } = endFields;

const schema = v.strictObject({
  ...stepFields,
  ...vapourField,
  kind: v.literal('constantPressure'),
  end: v.strictObject({ T, boundary, vapourFraction, solidFraction }),
});

type ConstantPressure = StepOf<typeof schema>;

/** Heats or cools at constant pressure: q = Δh. A hand moves the end in temperature. */
export const constantPressure = {
  kind: 'constantPressure',
  schema,
  ends: [['T'], ['boundary'], ['vapourFraction'], ['solidFraction']],
  rates: ['temperatureRate'],
  run: (step, from, env) => keeping(step, from, env, 'p'),
  drag: (_step, _from, to) => (to.snap ? { boundary: to.snap } : { T: to.T }),
} as const satisfies StepKind<ConstantPressure> & { schema: typeof schema };
