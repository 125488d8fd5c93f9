import { OutOfRange, Unknown } from '../../errors.ts';
import { auxiliary } from '../../models/auxiliary.ts';
import { densityAt } from '../density.ts';
import type { Medium } from '../medium.ts';
import { fluidName, type PhaseState } from '../phase.ts';
import { bracketedRoot } from '../root.ts';
import { criticalCap, saturationAt } from '../saturation.ts';
import { phaseProperties, type State } from '../state.ts';
import { caloric, caloricScale, fluidNewton, type Caloric } from './fluidAt.ts';
import { capPressure, isobar } from './isobar.ts';
import { mixture, pure } from './mixture.ts';
import { quickState } from './quick.ts';
import type { Piece, Plateau, Rung } from './rungs.ts';

/** A phase alone at T (K) and p (Pa); a fluid takes the density given, or the one of its branch. */
function phaseIn(m: Medium, piece: Piece, T: number, p: number, rho?: number): PhaseState {
  if (piece.phase === 'solid')
    return {
      phase: 'solid',
      solid: piece.solid,
      T,
      p,
      rho: 1 / m.solids.get(piece.solid!)!.model(T, p).gp,
    };
  const phase = fluidName(m, T, p);
  return { phase, solid: null, T, p, rho: rho ?? densityAt(m, T, p, branchOf(m, piece, p)) };
}

/** The fluid's branch on a piece of an isobar: vapour where the piece begins at a vapour. */
export function branchOf(m: Medium, piece: Piece, p: number): 'liquid' | 'vapour' {
  if (p < m.triple.p * (1 + 1e-9)) return 'vapour';
  if (p >= m.critical.p) return 'liquid';
  const [low] = piece.rho;
  return low !== null && low < m.critical.rho ? 'vapour' : 'liquid';
}

/** Value of a property at an end of a piece. */
function atEnd(m: Medium, of: Caloric, piece: Piece, p: number, end: 0 | 1): number {
  const T = end === 0 ? piece.low : piece.high;
  if (piece.phase === 'solid') return solidCaloric(m, of, piece.solid!, T, p).value;
  const rho = piece.rho[end] ?? densityAt(m, T, p, branchOf(m, piece, p));
  return caloric(m.fluid.evaluate(T, rho), of);
}

function solidCaloric(
  m: Medium,
  of: Caloric,
  solid: string,
  T: number,
  p: number,
): { value: number; slope: number } {
  const g = m.solids.get(solid)!.model(T, p);
  return of === 'h'
    ? { value: g.g - T * g.gT, slope: -T * g.gTT }
    : { value: -g.gT, slope: -g.gTT };
}

/** A start for Newton between the ends of a piece. */
function startIn(
  m: Medium,
  of: Caloric,
  piece: Piece,
  p: number,
  value: number,
  [atLow, atHigh]: readonly [number, number],
): { T: number; rho: number } {
  const { low, high } = piece;
  const { R } = m.fluid;
  const [rhoLow, rhoHigh] = piece.rho;
  if (rhoLow !== null && rhoHigh !== null) {
    const share = (value - atLow) / (atHigh - atLow);
    return { T: low + share * (high - low), rho: rhoLow + share * (rhoHigh - rhoLow) };
  }
  if (rhoHigh !== null) return { T: 0.5 * (low + high), rho: rhoHigh * 1.05 };
  const cp = 4.5 * R;
  const from = rhoLow ?? Math.min(p / (R * low), 3 * m.critical.rho);
  const grown = of === 'h' ? low + (value - atLow) / cp : low * Math.exp((value - atLow) / cp);
  const T = Math.min(high, Math.max(low, grown));
  return { T, rho: from * (low / T) };
}

/** Whether a liquid or a fluid above the dome is no root of the equation inside the dome. */
function beyondDome(m: Medium, T: number, rho: number): boolean {
  if (T > m.critical.T - criticalCap) return rho > 0;
  if (T > 0.95 * m.critical.T) return rho >= saturationAt(m, T).rhoL * (1 - 1e-7);
  return rho >= 0.98 * auxiliary(m.substance.saturation.liquidDensity, T);
}

/** The fluid on a piece of an isobar with the value of a property. */
function fluidOn(
  m: Medium,
  of: Caloric,
  piece: Piece,
  p: number,
  value: number,
  ends: readonly [number, number],
): { readonly T: number; readonly rho: number } {
  const { low, high, rho } = piece;
  const branch = branchOf(m, piece, p);
  const belongs = (found: { readonly T: number; readonly rho: number } | null): boolean => {
    if (!found) return false;
    if (!(found.T >= low * (1 - 1e-9) && found.T <= high * (1 + 1e-9))) return false;
    return branch === 'vapour' && p < capPressure(m)
      ? found.rho > 0 && found.rho <= (rho[0] ?? m.critical.rho) * (1 + 1e-6)
      : beyondDome(m, found.T, found.rho);
  };
  const scale = caloricScale(m, of);
  for (const end of [0, 1] as const) {
    const known = rho[end];
    if (known !== null && Math.abs(value - ends[end]) <= onEdge * scale)
      return { T: end === 0 ? low : high, rho: known };
  }
  const quick = fluidNewton(m, of, p, value, startIn(m, of, piece, p, value, ends));
  if (belongs(quick)) return quick!;
  let near = rho[0] ?? rho[1] ?? undefined;
  const T = bracketedRoot(
    (t, out) => {
      near = densityAt(m, t, p, branch, near);
      const f = m.fluid.evaluate(t, near);
      out.value = caloric(f, of) - value;
      const cp = phaseProperties(m, { phase: 'liquid', solid: null, T: t, p, rho: near })!.cp;
      out.slope = cp === null ? 0 : of === 'h' ? cp : cp / t;
    },
    low,
    high,
    { name: `temperature of given ${of}`, tolerance: 2e-15 },
  );
  const rough = { T, rho: densityAt(m, T, p, branch, near) };
  // Next to the critical point a step in the last digit of T is a long one in h.
  const polished = fluidNewton(m, of, p, value, rough);
  return belongs(polished) ? polished! : rough;
}

const quantity = { h: 'enthalpy', s: 'entropy' } as const;
const unit = { h: 'J/kg', s: 'J/(kg K)' } as const;

/** A value this near a boundary's own, on the property's scale, is the boundary's. */
const onEdge = 1e-12;

/** The range of a property that is known on an isobar, for an error to tell. */
function rangeOf(m: Medium, of: Caloric, p: number, rungs: readonly Rung[]): [number, number] {
  const known = rungs
    .filter((rung) => rung.kind === 'piece')
    .flatMap((rung) => [atEnd(m, of, rung, p, 0), atEnd(m, of, rung, p, 1)]);
  return [Math.min(...known), Math.max(...known)];
}

function stateFrom(m: Medium, of: Caloric, p: number, value: number): State {
  const quick = quickState(m, of, p, value);
  if (quick) return quick;
  const rungs = isobar(m, p);
  const scale = caloricScale(m, of);
  const outside = (): OutOfRange => {
    const [min, max] = rangeOf(m, of, p, rungs);
    return new OutOfRange(
      quantity[of],
      value,
      { min, max },
      m.substance.fluid.validity.source,
      unit[of],
    );
  };
  if (!Number.isFinite(value)) throw outside();
  // From the warm end: the fluid is known where the solid may not be. What is above is passed.
  for (let i = rungs.length - 1; i >= 0; i--) {
    const rung = rungs[i]!;
    if (rung.kind === 'blank') throw new Unknown('phase', rung.reason);
    if (rung.kind === 'plateau') {
      const known = rung.sides.map((side) => phaseProperties(m, side)?.[of]);
      const warm = known.at(-1)!;
      if (value > warm - onEdge * scale) return edge(m, rung, rung.sides.length - 1);
      const cold = known[0];
      // Of three phases without the solid's equation nothing can be told between the other two.
      if (cold === undefined) throw new Unknown('phase', 'no equation for the solid');
      if (value >= cold + onEdge * scale) return mixture(m, rung, of, value);
      if (value >= cold) return edge(m, rung, 0);
      continue;
    }
    const low = atEnd(m, of, rung, p, 0);
    if (value < low) continue;
    const high = atEnd(m, of, rung, p, 1);
    if (value > high) {
      // A hair between a piece's end and the boundary above is rounding.
      const above = rungs[i + 1];
      if (above?.kind === 'plateau') return edge(m, above, 0);
      throw outside();
    }
    if (rung.phase === 'fluid') {
      const { T, rho } = fluidOn(m, of, rung, p, value, [low, high]);
      return pure(m, phaseIn(m, rung, T, p, rho));
    }
    const T = bracketedRoot(
      (t, out) => {
        const at = solidCaloric(m, of, rung.solid!, t, p);
        out.value = at.value - value;
        out.slope = at.slope;
      },
      rung.low,
      rung.high,
      { name: `temperature of a solid of given ${of}` },
    );
    return pure(m, phaseIn(m, rung, T, p));
  }
  throw outside();
}

const edge = (m: Medium, plateau: Plateau, side: number): State => pure(m, plateau.sides[side]!);

/**
 * The state at pressure p (Pa) and specific enthalpy h (J/kg), one phase or two; at the triple pressure
 * three phases, whose fractions are ranges with one freedom.
 *
 * Method: the boundaries met at p with both sides' enthalpies tell the phase; in one phase Newton in T
 * and ρ, its result checked to lie on the piece, else a bracketed search in T.
 * Domain: 0 < p to the equation's limit, h up to its highest temperature; elsewhere throws OutOfRange,
 * or Unknown where no published equation tells the phase or the solid's enthalpy.
 * Error: p as given, |Δh| ≤ 1e-9 R·Tc.
 */
export const stateFromPressureEnthalpy = (m: Medium, p: number, h: number): State =>
  stateFrom(m, 'h', p, h);

/**
 * The state at pressure p (Pa) and specific entropy s (J/(kg K)); otherwise as
 * `stateFromPressureEnthalpy`, |Δs| ≤ 1e-9 R.
 */
export const stateFromPressureEntropy = (m: Medium, p: number, s: number): State =>
  stateFrom(m, 's', p, s);
