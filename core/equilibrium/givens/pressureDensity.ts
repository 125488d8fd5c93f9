import { OutOfRange } from '../../errors.ts';
import { pressureOverTemperature, pressureSlope } from '../../models/fluidProperties.ts';
import { densityAt } from '../density.ts';
import type { Medium } from '../medium.ts';
import { fluidName } from '../phase.ts';
import type { State } from '../state.ts';
import { isobar } from './isobar.ts';
import { mixture, pure } from './mixture.ts';
import { addState, between, everyRoot, monotoneParts } from './monotone.ts';
import { branchOf } from './pressureCaloric.ts';
import { sideProperties, type Piece } from './rungs.ts';

/** Density over temperature on a piece of an isobar, and its slope. */
function densityOn(
  m: Medium,
  piece: Piece,
  p: number,
): { value: (T: number) => number; slope: (T: number) => number } {
  if (piece.phase === 'solid') {
    const { model } = m.solids.get(piece.solid!)!;
    return {
      value: (T) => 1 / model(T, p).gp,
      slope: (T) => {
        const g = model(T, p);
        return -g.gTp / (g.gp * g.gp);
      },
    };
  }
  const branch = branchOf(m, piece, p);
  let near: number | undefined;
  const value = (T: number): number => {
    const known =
      T === piece.low && piece.rho[0] !== null
        ? piece.rho[0]
        : T === piece.high && piece.rho[1] !== null
          ? piece.rho[1]
          : null;
    near = known ?? densityAt(m, T, p, branch, near);
    return near;
  };
  return {
    value,
    slope: (T) => {
      const f = m.fluid.evaluate(T, value(T));
      return -pressureOverTemperature(f) / Math.max(pressureSlope(f), 1e-300);
    },
  };
}

/**
 * Every stable state at pressure p (Pa) and density (kg/m³), from cold to warm: liquid water has two
 * about its densest point, and a mixture of ice and water may be a third.
 *
 * Method: between the boundaries met at p density over temperature is parted where it turns, and each
 * part searched in a bracket.
 * Domain: 0 < p to the equation's limit; elsewhere, and where nothing known has the density, throws
 * OutOfRange. States of a solid without an equation are not among the answers.
 */
export function statesFromPressureDensity(m: Medium, p: number, rho: number): readonly State[] {
  const found: State[] = [];
  let least = Infinity;
  let most = 0;
  for (const rung of isobar(m, p)) {
    if (rung.kind === 'blank') continue;
    if (rung.kind === 'plateau') {
      const sides = sideProperties(m, rung);
      if (!sides) continue;
      const all = sides.map((side) => side.rho);
      if (between(rho, all, (x) => 1e-11 * x)) addState(found, mixture(m, rung, 'v', 1 / rho));
      continue;
    }
    const { value, slope } = densityOn(m, rung, p);
    const cuts = monotoneParts(slope, rung.low, rung.high);
    for (const T of cuts) {
      least = Math.min(least, value(T));
      most = Math.max(most, value(T));
    }
    for (const T of everyRoot(value, slope, cuts, rho, 1e-12 * rho))
      addState(
        found,
        rung.phase === 'solid'
          ? pure(m, { phase: 'solid', solid: rung.solid, T, p, rho: value(T) })
          : pure(m, { phase: fluidName(m, T, p), solid: null, T, p, rho }),
      );
  }
  if (found.length > 0) return found;
  const { source } = m.substance.fluid.validity;
  throw new OutOfRange('density', rho, { min: least, max: most }, source, 'kg/m³');
}
