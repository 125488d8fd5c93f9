import * as v from 'valibot';
import { stateFromPressureEnthalpy } from '../../equilibrium/givens/pressureCaloric.ts';
import { overall, stateAt } from '../../equilibrium/state.ts';
import { OutOfRange, Undetermined, Unknown } from '../../errors.ts';
import { along } from '../along.ts';
import { boundaryOf, known } from '../keptRun.ts';
import type { Outcome } from '../outcome.ts';
import { StepFailure } from '../problem.ts';
import { shareOf } from '../stand.ts';
import { endFields, pointOn, siOf, stepFields, type StepKind } from '../step.ts';
import type { StepOf } from '../stepOf.ts';
import { straight } from '../straight.ts';

const { heat } = endFields;

const schema = v.strictObject({
  ...stepFields,
  kind: v.literal('heatAmount'),
  end: v.strictObject({ heat }),
});

type HeatAmount = StepOf<typeof schema>;

/**
 * Takes in an amount of heat at constant pressure: Δh = q; negative cools. Given per kg at the path's
 * start. A hand moves the end in temperature.
 */
export const heatAmount = {
  kind: 'heatAmount',
  schema,
  ends: [['heat']],
  rates: [],
  run: ({ end }, from, env): Outcome => {
    const { m } = env;
    const { p } = from.state;
    const { mass } = from;
    const q = siOf(env, end.heat!, 'specificEnergy');
    if (mass === null || mass === 0)
      throw new StepFailure({ code: 'nothingLeft', T: from.state.T, p });
    const state = stateFromPressureEnthalpy(m, p, known(from, 'h') + q / mass);
    const given = { heat: q, heatAbsent: null };
    const { T } = state;
    if (state.parts.length === 1) {
      const run = { to: { T, p }, arrival: null, heat: 'enthalpy', leaves: false } as const;
      const outcome = straight(m, from, run);
      const work = outcome.work === null ? null : outcome.work + (outcome.heat ?? q) - q;
      return { ...outcome, ...given, work, end: { ...outcome.end, state } };
    }
    const curve = boundaryOf(m, state)!;
    const point = { ...pointOn(curve, 'p', Math.min(curve.p[1], Math.max(curve.p[0], p))), T, p };
    const share = shareOf(curve, state);
    const outcome =
      typeof share === 'number' && state.parts.length === 2
        ? from.on === curve.id
          ? along(m, from, {
              curve,
              to: { ...point, T: from.state.T },
              share,
              heat: null,
              leaves: false,
            })
          : straight(m, from, {
              to: { T, p },
              arrival: { curve, point, share },
              heat: 'enthalpy',
              leaves: false,
            })
        : straight(m, from, {
            to: { T, p },
            arrival: { curve, point, share: 'as it comes' },
            heat: 'enthalpy',
            leaves: false,
          });
    const { v: v1 } = state.known ?? {};
    const open = state.freedom > 0 && v1 === undefined;
    const work = open || outcome.work === null ? null : outcome.work + (outcome.heat ?? q) - q;
    return { ...outcome, ...given, work, end: { state, on: curve.id, mass } };
  },
  drag: (_step, from, to, env) => {
    const start = overall(from.state, 'h');
    if (start === null || from.mass === null) return null;
    try {
      return { heat: from.mass * (overall(stateAt(env.m, to.T, from.state.p), 'h')! - start) };
    } catch (error) {
      // On a line, or where nothing is known, a temperature tells no amount of heat.
      if (error instanceof Undetermined || error instanceof Unknown || error instanceof OutOfRange)
        return null;
      throw error;
    }
  },
} as const satisfies StepKind<HeatAmount> & { schema: typeof schema };
