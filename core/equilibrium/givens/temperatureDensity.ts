import { OutOfRange, Unknown } from '../../errors.ts';
import { pressure } from '../../models/fluidProperties.ts';
import { densityAt } from '../density.ts';
import type { Medium } from '../medium.ts';
import { fluidName } from '../phase.ts';
import { bracketedRoot } from '../root.ts';
import type { State } from '../state.ts';
import { isotherm } from './isotherm.ts';
import { mixture, pure } from './mixture.ts';
import type { Piece } from './rungs.ts';

/** Density (kg/m³) at an end of a piece of an isotherm; 0 where pressure goes to nothing. */
export function endDensity(m: Medium, piece: Piece, T: number, end: 0 | 1): number {
  const p = end === 0 ? piece.low : piece.high;
  if (piece.phase === 'solid') return 1 / m.solids.get(piece.solid!)!.model(T, p).gp;
  return piece.rho[end] ?? (p === 0 ? 0 : densityAt(m, T, p, 'liquid'));
}

/** Pressure (Pa) of a solid at T and density, between those of the piece's ends. */
function solidPressure(m: Medium, piece: Piece, T: number, rho: number): number {
  const { model } = m.solids.get(piece.solid!)!;
  return bracketedRoot(
    (p, out) => {
      const g = model(T, p);
      out.value = g.gp * rho - 1;
      out.slope = g.gpp * rho;
    },
    piece.low,
    piece.high,
    { name: 'pressure of a solid of given density' },
  );
}

/**
 * The state at temperature T (K) and density (kg/m³), one phase or two; at the triple temperature
 * three phases, whose fractions are ranges with one freedom.
 *
 * Method: density rises with pressure through all phases, so the boundaries met at T tell the phase;
 * the fluid's pressure is then the equation's own.
 * Domain: the temperatures of the equations, densities up to their highest pressure; elsewhere throws
 * OutOfRange, or Unknown where no published equation tells the phase or the solid's density.
 */
export function stateFromTemperatureDensity(m: Medium, T: number, rho: number): State {
  const rungs = isotherm(m, T);
  const { source } = m.substance.fluid.validity;
  const pieces = rungs.filter((rung) => rung.kind === 'piece');
  const top = pieces.at(-1);
  const outside = (): OutOfRange => {
    const max = top ? endDensity(m, top, T, 1) : 0;
    return new OutOfRange('density', rho, { min: 0, max }, source, 'kg/m³');
  };
  if (!(rho > 0 && rho < Infinity)) throw outside();
  for (const [i, rung] of rungs.entries()) {
    if (rung.kind === 'blank') throw new Unknown('phase', rung.reason);
    if (rung.kind === 'plateau') {
      const first = rung.sides[0]!.rho!;
      if (rho <= first) return pure(m, rung.sides[0]!);
      const last = rung.sides.at(-1)!.rho;
      if (last === null) throw new Unknown('phase', 'no equation for the solid');
      if (rho < last) return mixture(m, rung, 'v', 1 / rho);
      if (rho === last) return pure(m, rung.sides.at(-1)!);
      continue;
    }
    const low = endDensity(m, rung, T, 0);
    // A hair between a boundary and the piece above it is rounding.
    if (rho < low) {
      const below = rungs[i - 1];
      if (below?.kind === 'plateau') return pure(m, below.sides.at(-1)!);
      throw outside();
    }
    const slack = rung === top ? 1e-12 : 0;
    if (rho > endDensity(m, rung, T, 1) * (1 + slack)) continue;
    if (rung.phase === 'solid') {
      const high = endDensity(m, rung, T, 1);
      const p = rho >= high ? rung.high : solidPressure(m, rung, T, rho);
      return pure(m, { phase: 'solid', solid: rung.solid, T, p, rho });
    }
    const p = Math.max(pressure(m.fluid.evaluate(T, rho)), rung.low);
    return pure(m, { phase: fluidName(m, T, p), solid: null, T, p, rho });
  }
  throw outside();
}
