import { OutOfRange } from '../../errors.ts';
import { entropy, pressure, pressureOverTemperature } from '../../models/fluidProperties.ts';
import type { Medium } from '../medium.ts';
import { fluidName } from '../phase.ts';
import type { State } from '../state.ts';
import { isotherm } from './isotherm.ts';
import { mixture, pure } from './mixture.ts';
import { addState, between, everyRoot, monotoneParts } from './monotone.ts';
import { sideProperties, type Piece } from './rungs.ts';
import { endDensity } from './temperatureDensity.ts';

/** Least pressure (Pa) at which a vapour is looked for. */
const thinnest = 1e-40;

interface Stretch {
  /** Entropy over ln ρ of a fluid, over p of a solid. */
  readonly value: (x: number) => number;
  readonly slope: (x: number) => number;
  readonly low: number;
  readonly high: number;
  readonly state: (x: number) => State;
}

function stretchOf(m: Medium, piece: Piece, T: number): Stretch {
  if (piece.phase === 'solid') {
    const { model } = m.solids.get(piece.solid!)!;
    return {
      value: (p) => -model(T, p).gT,
      slope: (p) => -model(T, p).gTp,
      low: piece.low,
      high: piece.high,
      state: (p) => pure(m, { phase: 'solid', solid: piece.solid, T, p, rho: 1 / model(T, p).gp }),
    };
  }
  const low = Math.max(endDensity(m, piece, T, 0), thinnest / (m.fluid.R * T));
  return {
    value: (x) => entropy(m.fluid.evaluate(T, Math.exp(x))),
    slope: (x) => {
      const rho = Math.exp(x);
      return -pressureOverTemperature(m.fluid.evaluate(T, rho)) / rho;
    },
    low: Math.log(low),
    high: Math.log(endDensity(m, piece, T, 1)),
    state: (x) => {
      const rho = Math.exp(x);
      const p = pressure(m.fluid.evaluate(T, rho));
      return pure(m, { phase: fluidName(m, T, p), solid: null, T, p, rho });
    },
  };
}

/**
 * Every stable state at temperature T (K) and specific entropy s (J/(kg K)), from low to high
 * pressure: cold water, whose entropy first rises and then falls with pressure, has two.
 *
 * Method: between the boundaries met at T entropy over density is parted where it turns, and each part
 * searched in a bracket.
 * Domain: the temperatures of the equations; elsewhere, and where nothing known has the entropy, throws
 * OutOfRange. States of a solid without an equation are not among the answers.
 */
export function statesFromTemperatureEntropy(m: Medium, T: number, s: number): readonly State[] {
  const found: State[] = [];
  const slack = 1e-12 * m.fluid.R;
  let least = Infinity;
  let most = -Infinity;
  for (const rung of isotherm(m, T)) {
    if (rung.kind === 'blank') continue;
    if (rung.kind === 'plateau') {
      const sides = sideProperties(m, rung);
      if (!sides) continue;
      const all = sides.map((side) => side.s);
      if (between(s, all, () => slack)) addState(found, mixture(m, rung, 's', s));
      continue;
    }
    const { value, slope, low, high, state } = stretchOf(m, rung, T);
    const cuts = monotoneParts(slope, low, high);
    for (const x of cuts) {
      least = Math.min(least, value(x));
      most = Math.max(most, value(x));
    }
    for (const x of everyRoot(value, slope, cuts, s, slack)) addState(found, state(x));
  }
  if (found.length > 0) return found;
  const { source } = m.substance.fluid.validity;
  throw new OutOfRange('entropy', s, { min: least, max: most }, source, 'J/(kg K)');
}
