import * as v from 'valibot';
import { along } from '../along.ts';
import {
  boundaryUnder,
  endFields,
  pointOn,
  shareAsked,
  siOf,
  stepFields,
  vapourField,
  type StepKind,
} from '../step.ts';
import type { StepOf } from '../stepOf.ts';

const { T, p, vapourFraction, solidFraction, heat } = endFields;

const schema = v.strictObject({
  ...stepFields,
  ...vapourField,
  kind: v.literal('follow'),
  end: v.strictObject({ T, p, vapourFraction, solidFraction, heat }),
});

type Follow = StepOf<typeof schema>;

/**
 * Follows the boundary that the state lies on: q = ∫T ds. Without a fraction or a heat at the end the
 * fraction stays open and so does the heat. A hand slides the end along the boundary.
 */
export const follow = {
  kind: 'follow',
  schema,
  ends: (['T', 'p'] as const).flatMap((by) => [
    [by],
    [by, 'vapourFraction' as const],
    [by, 'solidFraction' as const],
    [by, 'heat' as const],
  ]),
  rates: ['temperatureRate', 'pressureRate'],
  run: ({ end, vapour }, from, env) => {
    const curve = boundaryUnder(env, from);
    const by = end.T === undefined ? 'p' : 'T';
    const value = by === 'T' ? siOf(env, end.T!, 'temperature') : siOf(env, end.p!, 'pressure');
    const to = pointOn(curve, by, value);
    const asked = shareAsked(env, curve, end, to);
    return along(env.m, from, { curve, to, ...asked, leaves: vapour === 'leaves' });
  },
  drag: ({ end }, from, to, env) => {
    if (from.on === null) return null;
    const curve = boundaryUnder(env, from);
    const by = end.T === undefined ? 'p' : 'T';
    const [low, high] = curve[by];
    const asked = shareAsked(env, curve, end, to);
    return {
      [by]: Math.min(high, Math.max(low, to[by])),
      ...(end.vapourFraction !== undefined && { vapourFraction: asked.share! }),
      ...(end.solidFraction !== undefined && { solidFraction: 1 - asked.share! }),
      ...(asked.heat !== null && { heat: asked.heat }),
    };
  },
} as const satisfies StepKind<Follow> & { schema: typeof schema };
