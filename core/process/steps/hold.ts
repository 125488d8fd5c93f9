import * as v from 'valibot';
import { along } from '../along.ts';
import { curveOf } from '../stand.ts';
import {
  boundaryUnder,
  endFields,
  shareAsked,
  stepFields,
  vapourField,
  type StepKind,
} from '../step.ts';
import type { StepOf } from '../stepOf.ts';
import { straight } from '../straight.ts';

const { vapourFraction, solidFraction, heat } = endFields;

const schema = v.strictObject({
  ...stepFields,
  ...vapourField,
  kind: v.literal('hold'),
  end: v.strictObject({ vapourFraction, solidFraction, heat }),
});

type Hold = StepOf<typeof schema>;

/**
 * Stays where it is. On a boundary it may go to a fraction or take in a heat; without either the
 * fraction is open. Off all boundaries nothing changes. It has no end to drag.
 */
export const hold = {
  kind: 'hold',
  schema,
  ends: [[], ['vapourFraction'], ['solidFraction'], ['heat']],
  rates: [],
  run: ({ end, vapour }, from, env) => {
    const asks = Object.values(end).some((value) => value !== undefined);
    const leaves = vapour === 'leaves';
    const { T, p } = from.state;
    if (from.on === null && !asks)
      return straight(env.m, from, { to: { T, p }, arrival: null, heat: 'enthalpy', leaves });
    const curve = asks ? boundaryUnder(env, from) : curveOf(env.m, from.on!);
    const to = {
      T,
      p,
      sides: curve.atTemperature(Math.min(curve.T[1], Math.max(curve.T[0], T))).sides,
    };
    return along(env.m, from, { curve, to, ...shareAsked(env, curve, end, to), leaves });
  },
  drag: () => null,
} as const satisfies StepKind<Hold> & { schema: typeof schema };
