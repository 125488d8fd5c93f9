import { OutOfRange } from '../errors.ts';
import { fluidProperties, type Properties } from '../models/fluidProperties.ts';
import { solidProperties } from '../models/solid.ts';
import type { Medium } from './medium.ts';
import { stablePhase, type PhaseState } from './phase.ts';
import { saturationAt, saturationAtPressure } from './saturation.ts';

export interface Part extends PhaseState {
  /** Share of the mass, or its range where the givens leave it open. */
  readonly fraction: number | readonly [number, number];
  /** Null where no published equation gives them. */
  readonly properties: Properties | null;
}

/** A state of the substance; it can say what is undetermined. */
export interface State {
  readonly T: number;
  readonly p: number;
  readonly parts: readonly Part[];
  /** Number of fractions that the givens leave open. */
  readonly freedom: 0 | 1 | 2;
  /** Properties of the whole that were given and stand although fractions are open. */
  readonly known?: { readonly h?: number; readonly s?: number; readonly v?: number };
}

/** Properties of one phase, null where no published equation gives them. */
export function phaseProperties(m: Medium, at: PhaseState): Properties | null {
  if (at.rho === null) return null;
  if (at.phase !== 'solid') return fluidProperties(m.fluid.evaluate(at.T, at.rho));
  const solid = at.solid === null ? undefined : m.solids.get(at.solid);
  return solid ? solidProperties(at.T, at.p, solid.model(at.T, at.p)) : null;
}

const part = (m: Medium, at: PhaseState, fraction: Part['fraction']): Part => ({
  ...at,
  fraction,
  properties: phaseProperties(m, at),
});

/**
 * The state at T (K) and p (Pa).
 *
 * Throws OutOfRange, Unknown or Undetermined as `stablePhase` does.
 */
export function stateAt(m: Medium, T: number, p: number): State {
  return { T, p, parts: [part(m, stablePhase(m, T, p), 1)], freedom: 0 };
}

/**
 * The state on the saturation line at a temperature (K) or a pressure (Pa) with a vapour fraction by
 * mass, ends included.
 *
 * Domain: triple to critical point, fraction 0 to 1; elsewhere throws OutOfRange.
 */
export function saturatedState(
  m: Medium,
  at: { readonly T: number } | { readonly p: number },
  vapourFraction: number,
): State {
  if (!(vapourFraction >= 0 && vapourFraction <= 1))
    throw new OutOfRange('vapour fraction', vapourFraction, { min: 0, max: 1 }, 'definition', '1');
  if ('T' in at && at.T < m.triple.T)
    throw new OutOfRange(
      'T',
      at.T,
      { min: m.triple.T, max: m.critical.T },
      m.substance.triplePoints[0].source,
      'K',
    );
  const s = 'T' in at ? saturationAt(m, at.T) : saturationAtPressure(m, at.p);
  const [liquid, vapour] = saturatedPhases(s);
  const parts: Part[] = [];
  if (vapourFraction < 1) parts.push(part(m, liquid, 1 - vapourFraction));
  if (vapourFraction > 0) parts.push(part(m, vapour, vapourFraction));
  return { T: s.T, p: s.p, parts, freedom: 0 };
}

/**
 * The state of two phases in equilibrium with a share by mass of the second, 0 to 1, ends included,
 * or the range in which it lies. Elsewhere throws OutOfRange.
 */
export function mixedState(
  m: Medium,
  [first, second]: readonly [PhaseState, PhaseState],
  share: number | readonly [number, number],
): State {
  const { T, p } = first;
  if (typeof share !== 'number') {
    const [low, high] = share;
    return {
      T,
      p,
      parts: [part(m, first, [1 - high, 1 - low]), part(m, second, [low, high])],
      freedom: 1,
    };
  }
  if (!(share >= 0 && share <= 1))
    throw new OutOfRange('fraction', share, { min: 0, max: 1 }, 'definition', '1');
  const parts: Part[] = [];
  if (share < 1) parts.push(part(m, first, 1 - share));
  if (share > 0) parts.push(part(m, second, share));
  return { T, p, parts, freedom: 0 };
}

/** Both sides of the saturation line as phases. */
export function saturatedPhases(s: {
  readonly T: number;
  readonly p: number;
  readonly rhoL: number;
  readonly rhoV: number;
}): readonly [liquid: PhaseState, vapour: PhaseState] {
  const { T, p } = s;
  return [
    { phase: 'liquid', solid: null, T, p, rho: s.rhoL },
    { phase: 'vapour', solid: null, T, p, rho: s.rhoV },
  ];
}

/** A specific property of the whole state (per kg), null where a part lacks it or a share is open. */
export function overall(state: State, property: 'h' | 's' | 'u' | 'v'): number | null {
  const given = property === 'u' ? undefined : state.known?.[property];
  if (given !== undefined) return given;
  let sum = 0;
  for (const { fraction, properties } of state.parts) {
    if (typeof fraction !== 'number' || properties === null) return null;
    sum += fraction * (property === 'v' ? 1 / properties.rho : properties[property]);
  }
  return sum;
}
