import * as v from 'valibot';
import { OutOfRange } from '../../errors.ts';
import { keptMeetings } from '../keptMeetings.ts';
import { keptRun, known } from '../keptRun.ts';
import type { KeptLine } from '../keptLine.ts';
import type { Outcome } from '../outcome.ts';
import { StepFailure } from '../problem.ts';
import type { Stand } from '../stand.ts';
import { endFields, siOf, stepFields, type Env, type SnapKind, type StepKind } from '../step.ts';
import type { StepOf } from '../stepOf.ts';

const { p, boundary } = endFields;

const schema = v.strictObject({
  ...stepFields,
  kind: v.literal('throttle'),
  end: v.strictObject({ p, boundary }),
});

type Throttle = StepOf<typeof schema>;

const lineOf = (from: Stand): KeptLine => ({ keeps: 'h', value: known(from, 'h') });

/** Least pressure (Pa) to which a boundary is looked for. */
const lowest = 1e-30;

/** The first meeting with a boundary of a kind at falling pressure. */
function met({ m }: Env, from: Stand, kind: SnapKind) {
  const found = keptMeetings(m, lineOf(from), from.state.p, lowest).find(
    ({ curve, u }) => curve.kind === kind && u < from.state.p * (1 - 1e-9),
  );
  if (!found)
    throw new StepFailure({
      code: 'noBoundary',
      boundary: kind,
      keeps: 'h',
      value: known(from, 'h'),
    });
  return found;
}

/**
 * Lets the pressure fall through a valve at constant enthalpy: q = 0 and w = 0 per kg of flow, so Δh = 0;
 * speeds before and behind are taken as small. A hand slides the end along the line of its enthalpy.
 */
export const throttle = {
  kind: 'throttle',
  schema,
  ends: [['p'], ['boundary']],
  rates: ['pressureRate'],
  run: ({ end }, from, env): Outcome => {
    const { m } = env;
    const line = lineOf(from);
    const at = end.boundary === undefined ? null : met(env, from, end.boundary);
    const to = at ? at.u : siOf(env, end.p!, 'pressure');
    if (!(to <= from.state.p))
      throw new OutOfRange('p', to, { min: 0, max: from.state.p }, 'definition', 'Pa');
    const { state, on, ...run } = keptRun(m, from, line, to, at);
    const open = from.mass === null;
    return {
      ...run,
      end: { state, on, mass: from.mass },
      heat: open ? null : 0,
      heatAbsent: open ? { code: 'openMass' } : null,
      work: open ? null : 0,
      lost: null,
    };
  },
  drag: (_step, from, to, env) => {
    if (to.snap)
      try {
        met(env, from, to.snap);
        return { boundary: to.snap };
      } catch {
        // That line is not met at this enthalpy: the hand moves the pressure.
      }
    return { p: Math.min(to.p, from.state.p) };
  },
} as const satisfies StepKind<Throttle> & { schema: typeof schema };
