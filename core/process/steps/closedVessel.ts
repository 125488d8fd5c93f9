import * as v from 'valibot';
import { coldest } from '../../equilibrium/givens/isobar.ts';
import { bracketedRoot } from '../../equilibrium/root.ts';
import { overall } from '../../equilibrium/state.ts';
import { OutOfRange, Unknown } from '../../errors.ts';
import { stateOn, type KeptLine } from '../keptLine.ts';
import { keptMeetings, type KeptMeeting } from '../keptMeetings.ts';
import { keptRun, known } from '../keptRun.ts';
import type { Outcome } from '../outcome.ts';
import { StepFailure } from '../problem.ts';
import type { Stand } from '../stand.ts';
import { endFields, siOf, stepFields, type Env, type SnapKind, type StepKind } from '../step.ts';
import type { StepOf } from '../stepOf.ts';

const { T, p, boundary } = endFields;

const schema = v.strictObject({
  ...stepFields,
  kind: v.literal('closedVessel'),
  end: v.strictObject({ T, p, boundary }),
});

type ClosedVessel = StepOf<typeof schema>;

const lineOf = (from: Stand): KeptLine => ({ keeps: 'v', value: known(from, 'v') });

/**
 * The meeting that a boundary as an end means: on the boundary the one at which warming leaves it (the
 * vapour or the liquid vanishes), else the nearest in temperature.
 */
function met({ m }: Env, from: Stand, kind: SnapKind): KeptMeeting {
  const line = lineOf(from);
  const { T: start } = from.state;
  const { Tmax } = m.substance.fluid.validity;
  const all = [
    ...keptMeetings(m, line, start, Tmax),
    ...keptMeetings(m, line, start, coldest(m)),
  ].filter(({ curve, u }) => curve.kind === kind && Math.abs(u / start - 1) > 1e-9);
  const warmer = all.find(({ u, curve }) => u > start && curve.id === from.on);
  const nearest = [...all].sort((a, b) => Math.abs(a.u - start) - Math.abs(b.u - start))[0];
  const found = warmer ?? nearest;
  if (!found)
    throw new StepFailure({ code: 'noBoundary', boundary: kind, keeps: 'v', value: line.value });
  return found;
}

/** The temperature at which a closed vessel comes to a pressure: warming for a higher one, cooling for a lower. */
function temperatureAt({ m }: Env, from: Stand, line: KeptLine, wanted: number): number {
  const { T: start, p: before } = from.state;
  if (wanted === before) return start;
  const up = wanted > before ? 1 : -1;
  const { Tmax, pmax, source } = m.substance.fluid.validity;
  const edge = up > 0 ? Tmax : coldest(m);
  let last: OutOfRange | Unknown | null = null;
  const gap = (u: number): number | null => {
    try {
      return stateOn(m, line, u).p - wanted;
    } catch (error) {
      if (!(error instanceof OutOfRange || error instanceof Unknown)) throw error;
      last = error;
      return null;
    }
  };
  let near = start;
  for (let step = 0.05; near !== edge; step *= 1.5) {
    let far = up > 0 ? Math.min(edge, near + step) : Math.max(edge, near - step);
    let there = gap(far);
    // Past the equations' end: as near to it as there is a state.
    for (let i = 0; there === null && i < 60; i++) {
      far = 0.5 * (near + far);
      there = gap(far);
      if (there !== null && there * up < 0) {
        near = far;
        far = near + up * step * 0.5 ** i;
        there = gap(far);
      }
    }
    if (there === null) break;
    if (there * up >= 0)
      return bracketedRoot(
        (u, out) => {
          out.value = gap(u)!;
          const by = 1e-6 * u;
          const beside = gap(u - up * by);
          out.slope = beside === null ? 0 : (out.value - beside) / (up * by);
        },
        Math.min(near, far),
        Math.max(near, far),
        { name: 'temperature of a closed vessel', tolerance: 1e-14 },
      );
    near = far;
  }
  throw last ?? new OutOfRange('p', wanted, { min: 0, max: pmax }, source, 'Pa');
}

/**
 * Heats or cools what is shut in at constant volume: w = 0 and q = Δu per kg, for liquid that fills the
 * vessel, liquid and vapour, and fluid alike. It ends at a temperature, a pressure or a boundary; from
 * a boundary that is where one of its phases has vanished. A hand moves the end in what ends it.
 */
export const closedVessel = {
  kind: 'closedVessel',
  schema,
  ends: [['T'], ['p'], ['boundary']],
  rates: ['temperatureRate', 'pressureRate'],
  run: ({ end }, from, env): Outcome => {
    const { m } = env;
    const line = lineOf(from);
    const u = known(from, 'u');
    const at = end.boundary === undefined ? null : met(env, from, end.boundary);
    const to = at
      ? at.u
      : end.T !== undefined
        ? siOf(env, end.T, 'temperature')
        : temperatureAt(env, from, line, siOf(env, end.p!, 'pressure'));
    const { state, on, ...run } = keptRun(m, from, line, to, at);
    const { mass } = from;
    const after = overall(state, 'u');
    // Both ends' own energies tell the heat; on the three-phase line the end's is open.
    const heat = mass === null || after === null ? null : mass * (after - u);
    return {
      ...run,
      end: { state, on, mass },
      heat,
      heatAbsent:
        heat !== null
          ? null
          : mass === null
            ? { code: 'openMass' }
            : { code: 'openFraction', boundary: on ?? 'saturation', at: 'end' },
      work: mass === null ? null : 0,
      lost: null,
    };
  },
  drag: ({ end }, from, to, env) => {
    if (to.snap)
      try {
        met(env, from, to.snap);
        return { boundary: to.snap };
      } catch {
        // That line is not met at this volume: the hand moves the temperature.
      }
    return end.p !== undefined ? { p: to.p } : { T: to.T };
  },
} as const satisfies StepKind<ClosedVessel> & { schema: typeof schema };
