import { along } from './along.ts';
import type { Outcome } from './outcome.ts';
import {
  bears,
  boundaryMet,
  fractionOf,
  pointOn,
  secondShare,
  siOf,
  type Env,
  type SnapKind,
} from './step.ts';
import { straight } from './straight.ts';
import type { Stand } from './stand.ts';

/** A step that keeps its pressure or its temperature while the other changes. */
export interface Keeping {
  readonly vapour?: 'stays' | 'leaves';
  readonly end: {
    readonly T?: string;
    readonly p?: string;
    readonly boundary?: SnapKind;
    readonly vapourFraction?: string;
    readonly solidFraction?: string;
  };
}

/** Runs a step that keeps `keeps` to a value of the other, to a boundary or to a fraction on one. */
export function keeping(step: Keeping, from: Stand, env: Env, keeps: 'T' | 'p'): Outcome {
  const { end } = step;
  const { m } = env;
  const { T, p } = from.state;
  const heat = keeps === 'p' ? 'enthalpy' : 'entropy';
  const leaves = step.vapour === 'leaves';
  const fraction = fractionOf(env, end);
  if (fraction || end.boundary !== undefined) {
    const kind = end.boundary ?? null;
    const wanted = fraction ? bears(fraction.of) : undefined;
    const here = boundaryMet(env, from, keeps, wanted ?? ((c) => c.kind === kind), kind);
    const met = pointOn(here, keeps, from.state[keeps]);
    // What is kept stays to the last digit.
    const point = keeps === 'p' ? { ...met, p } : { ...met, T };
    const share = fraction ? secondShare(fraction.of, fraction.value) : null;
    if (from.on === here.id && share !== null)
      return along(m, from, { curve: here, to: { ...point, T, p }, share, heat: null, leaves });
    if (from.on === here.id)
      return straight(m, from, { to: { T, p }, arrival: null, heat, leaves });
    return straight(m, from, {
      to: { T: point.T, p: point.p },
      arrival: { curve: here, point, share: share ?? 'as it comes' },
      heat,
      leaves,
    });
  }
  const to =
    keeps === 'p'
      ? { T: siOf(env, end.T!, 'temperature'), p }
      : { T, p: siOf(env, end.p!, 'pressure') };
  return straight(m, from, { to, arrival: null, heat, leaves });
}
