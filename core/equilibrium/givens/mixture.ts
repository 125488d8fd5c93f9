import { Unknown } from '../../errors.ts';
import type { Medium } from '../medium.ts';
import type { PhaseState } from '../phase.ts';
import { phaseProperties, type Part, type State } from '../state.ts';
import { sideProperties, type Plateau } from './rungs.ts';

/** One phase alone as a state. */
export function pure(m: Medium, at: PhaseState): State {
  const { T, p } = at;
  return {
    T,
    p,
    parts: [{ ...at, fraction: 1, properties: phaseProperties(m, at) }],
    freedom: 0,
  };
}

/** A property that mixes by mass. */
export type Mixing = 'h' | 's' | 'v' | 'u';

/** The values of a property on a plateau's sides. Throws Unknown where a side has no equation. */
export function sideValues(m: Medium, plateau: Plateau, of: Mixing): readonly number[] {
  const sides = sideProperties(m, plateau);
  if (!sides) throw new Unknown('phase', 'no equation for the solid');
  return sides.map((side) => (of === 'v' ? 1 / side.rho : side[of]));
}

const held = (x: number): number => Math.min(1, Math.max(0, x));

/**
 * The phases of a plateau mixed to the value of a property: two shares, or three ranges with one
 * freedom where three phases stand together. A value at the very edge is one phase.
 */
export function mixture(m: Medium, plateau: Plateau, of: Mixing, value: number): State {
  const values = sideValues(m, plateau, of);
  const { T, p, sides } = plateau;
  const parts = sides.map((side) => ({ ...side, properties: phaseProperties(m, side) }));
  if (parts.length === 2) {
    // Each by itself, since a small share must keep its digits.
    const span = values[1]! - values[0]!;
    const second = held((value - values[0]!) / span);
    const first = held((values[1]! - value) / span);
    const shared: Part[] = [];
    if (first > 0) shared.push({ ...parts[0]!, fraction: first });
    if (second > 0) shared.push({ ...parts[1]!, fraction: second });
    return { T, p, parts: shared, freedom: 0 };
  }
  // Each pair that reaches the value without the third phase is an end of what is possible.
  const ends: number[][] = [];
  for (const [i, j] of [
    [0, 1],
    [0, 2],
    [1, 2],
  ] as const) {
    const share = (value - values[i]!) / (values[j]! - values[i]!);
    if (!(share >= -1e-12 && share <= 1 + 1e-12)) continue;
    const end = [0, 0, 0];
    end[i] = 1 - held(share);
    end[j] = held(share);
    ends.push(end);
  }
  const ranged = parts.map((part, i): Part => {
    const shares = ends.map((end) => end[i]!);
    const [low, high] = [Math.min(...shares), Math.max(...shares)];
    return { ...part, fraction: high - low < 1e-14 ? low : [low, high] };
  });
  const present = ranged.filter(({ fraction }) => fraction !== 0);
  const open = present.some(({ fraction }) => typeof fraction !== 'number');
  return {
    T,
    p,
    parts: present,
    freedom: open ? 1 : 0,
    ...(open && of !== 'u' && { known: { [of]: value } }),
  };
}
