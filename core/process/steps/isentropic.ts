import * as v from 'valibot';
import { stateFromPressureEntropy } from '../../equilibrium/givens/pressureCaloric.ts';
import { overall } from '../../equilibrium/state.ts';
import { OutOfRange } from '../../errors.ts';
import type { KeptLine } from '../keptLine.ts';
import { keptRun, known } from '../keptRun.ts';
import type { Outcome } from '../outcome.ts';
import { endFields, siOf, stepFields, type Env, type StepKind } from '../step.ts';
import type { StepOf } from '../stepOf.ts';

const { p, efficiency } = endFields;

const schema = v.strictObject({
  ...stepFields,
  kind: v.literal('isentropic'),
  end: v.strictObject({ p, efficiency }),
});

type Isentropic = StepOf<typeof schema>;

const efficiencyOf = (env: Env, { end }: Isentropic): number =>
  end.efficiency === undefined ? 1 : siOf(env, end.efficiency, 'fraction');

/**
 * Pumps, compresses or expands a flow without heat: q = 0 and w = Δh per kg. At full efficiency the
 * entropy is kept; a pump or compressor of isentropic efficiency η takes Δh′/η and an expander gives
 * η Δh′, Δh′ at constant entropy, and the states between are then not known: the way drawn is the locus
 * of such ends. A hand moves the end in pressure.
 */
export const isentropic = {
  kind: 'isentropic',
  schema,
  ends: [['p'], ['p', 'efficiency']],
  rates: ['pressureRate'],
  run: (step, from, env): Outcome => {
    const { m } = env;
    const s = known(from, 's');
    const h = known(from, 'h');
    const to = siOf(env, step.end.p!, 'pressure');
    const share = efficiencyOf(env, step);
    if (!(share > 0 && share <= 1))
      throw new OutOfRange('efficiency', share, { min: 0, max: 1 }, 'definition', '1');
    // Fails here, before the way, where the ideal machine itself does not reach its end.
    stateFromPressureEntropy(m, to, s);
    const line: KeptLine = {
      keeps: 's',
      value: s,
      ...(share < 1 && {
        exits: { h, times: to > from.state.p ? 1 / share : share },
      }),
    };
    const { state, on, ...run } = keptRun(m, from, line, to);
    const { mass } = from;
    return {
      ...run,
      end: { state, on, mass },
      heat: mass === null ? null : 0,
      heatAbsent: mass === null ? { code: 'openMass' } : null,
      work: mass === null ? null : mass * (overall(state, 'h')! - h),
      lost: null,
    };
  },
  drag: (step, _from, to, env) => ({
    p: to.p,
    ...(step.end.efficiency !== undefined && { efficiency: efficiencyOf(env, step) }),
  }),
} as const satisfies StepKind<Isentropic> & { schema: typeof schema };
