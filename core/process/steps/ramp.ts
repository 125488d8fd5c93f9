import * as v from 'valibot';
import { boundaryCurves } from '../../map/boundary.ts';
import { StepFailure } from '../problem.ts';
import { endFields, pointOn, siOf, stepFields, vapourField, type StepKind } from '../step.ts';
import type { StepOf } from '../stepOf.ts';
import { straight } from '../straight.ts';

const { T, p, boundary } = endFields;

const schema = v.strictObject({
  ...stepFields,
  ...vapourField,
  kind: v.literal('ramp'),
  end: v.strictObject({ T, p, boundary }),
});

type Ramp = StepOf<typeof schema>;

/**
 * Straight in temperature and pressure: q = ∫T ds. It ends at both, or on a boundary at one of them:
 * of several lines of the kind there, on the one nearest to the start. A hand moves the end freely,
 * on a boundary along it.
 */
export const ramp = {
  kind: 'ramp',
  schema,
  ends: [
    ['T', 'p'],
    ['T', 'boundary'],
    ['p', 'boundary'],
  ],
  rates: ['temperatureRate', 'pressureRate'],
  run: ({ end, vapour }, from, env) => {
    const { m } = env;
    const leaves = vapour === 'leaves';
    if (end.boundary === undefined) {
      const to = { T: siOf(env, end.T!, 'temperature'), p: siOf(env, end.p!, 'pressure') };
      return straight(m, from, { to, arrival: null, heat: 'entropy', leaves });
    }
    const by = end.T === undefined ? 'p' : 'T';
    const value = by === 'T' ? siOf(env, end.T!, 'temperature') : siOf(env, end.p!, 'pressure');
    const met = boundaryCurves(m)
      .filter((c) => c.kind === end.boundary && value >= c[by][0] && value <= c[by][1])
      .map((curve) => ({ curve, point: { ...pointOn(curve, by, value), [by]: value } }))
      .sort(
        (a, b) =>
          Math.abs(Math.log(a.point.p / from.state.p)) -
          Math.abs(Math.log(b.point.p / from.state.p)),
      )[0];
    if (!met)
      throw new StepFailure({ code: 'noBoundary', boundary: end.boundary, keeps: by, value });
    return straight(m, from, {
      to: { T: met.point.T, p: met.point.p },
      arrival: { ...met, share: 'as it comes' },
      heat: 'entropy',
      leaves,
    });
  },
  drag: ({ end }, _from, to) => {
    const kind = to.snap ?? (to.snap === null ? undefined : end.boundary);
    if (kind === undefined) return { T: to.T, p: to.p };
    return end.p !== undefined && end.T === undefined
      ? { p: to.p, boundary: kind }
      : { T: to.T, boundary: kind };
  },
} as const satisfies StepKind<Ramp> & { schema: typeof schema };
