import { OutOfRange, Unknown } from '../../errors.ts';
import type { Medium } from '../medium.ts';
import { bracketedRoot } from '../root.ts';
import { meltingPointAtPressure, meltingPressureRange } from '../solidLines.ts';
import { overall, phaseProperties, type Part, type State } from '../state.ts';
import { coldest } from './isobar.ts';
import { triplePhases } from './rungs.ts';
import { stateFromTemperatureDensity } from './temperatureDensity.ts';

/** Shares of solid, liquid and vapour at the triple point that give a volume and an energy; null without the solid's equation. */
function tripleShares(m: Medium, rho: number, u: number): readonly number[] | null {
  const [a, b, c] = triplePhases(m).map((phase) => phaseProperties(m, phase));
  if (!a || !b || !c) return null;
  const [v1, v2, v3] = [1 / a.rho, 1 / b.rho, 1 / c.rho];
  // Shares of the second and third from the two balances beside Σ = 1.
  const det = (v2 - v1) * (c.u - a.u) - (v3 - v1) * (b.u - a.u);
  const [dv, du] = [1 / rho - v1, u - a.u];
  const second = (dv * (c.u - a.u) - (v3 - v1) * du) / det;
  const third = ((v2 - v1) * du - dv * (b.u - a.u)) / det;
  return [1 - second - third, second, third];
}

function tripleState(m: Medium, shares: readonly number[]): State {
  const parts = triplePhases(m).flatMap((phase, i): readonly Part[] =>
    shares[i]! > 0
      ? [{ ...phase, fraction: Math.min(1, shares[i]!), properties: phaseProperties(m, phase) }]
      : [],
  );
  return { T: m.triple.T, p: m.triple.p, parts, freedom: 0 };
}

/** Places in which the domain is looked at for states of a density, and the same should that miss a gap. */
const looks = [64, 2048] as const;

/** Temperatures (K) at which the highest density that is known turns: ends of lines, and where they reach the highest pressure. */
function corners(m: Medium): readonly number[] {
  const { pmax, Tmax } = m.substance.fluid.validity;
  return (
    [
      m.triple.T,
      ...m.substance.melting.flatMap((line) => {
        const [low, high] = meltingPressureRange(m, line);
        const top = pmax > low && pmax < high ? [meltingPointAtPressure(m, line, pmax).T] : [];
        return [line.range.Tmin, line.range.Tmax, ...top];
      }),
    ]
      // A hair away and a little further, where the lines' own slack at their ends is left behind.
      .flatMap((T) =>
        [-1e-5, -1e-6, -1e-7, -2e-9, 0, 2e-9, 1e-7, 1e-6, 1e-5].map((off) => T * (1 + off)),
      )
      .filter((T) => T > coldest(m) && T < Tmax)
  );
}

/**
 * The ranges of temperature (K) over which a state of this density is known, their ends by halving;
 * a solid may be known below and a fluid above a gap in which it is not told what stands.
 */
function knownRanges(
  m: Medium,
  rho: number,
  looks: number,
): readonly (readonly [number, number])[] {
  const known = (T: number): boolean => {
    try {
      stateFromTemperatureDensity(m, T, rho);
      return true;
    } catch (error) {
      if (error instanceof OutOfRange || error instanceof Unknown) return false;
      throw error;
    }
  };
  const ends = [coldest(m), m.substance.fluid.validity.Tmax] as const;
  const places = [
    ...corners(m),
    ...Array.from({ length: looks + 1 }, (_, i) => ends[0] + (i / looks) * (ends[1] - ends[0])),
  ]
    .sort((a, b) => a - b)
    .map((T) => ({ T, known: known(T) }));
  const edge = (good: number, bad: number): number => {
    let [inside, beyond] = [good, bad];
    while (Math.abs(inside - beyond) > 1e-12 * inside) {
      const middle = 0.5 * (inside + beyond);
      if (known(middle)) inside = middle;
      else beyond = middle;
    }
    return inside;
  };
  const ranges: (readonly [number, number])[] = [];
  let low: number | null = null;
  places.forEach((place, i) => {
    const [before, after] = [places[i - 1], places[i + 1]];
    if (!place.known) return;
    if (!before?.known) low = before ? edge(place.T, before.T) : place.T;
    if (!after?.known) ranges.push([low!, after ? edge(place.T, after.T) : place.T]);
  });
  return ranges;
}

function outside(m: Medium, rho: number): OutOfRange {
  const { validity } = m.substance.fluid;
  const rhos = [m.triple.rhoL, ...[...triplePhases(m)].map((phase) => phase.rho ?? 0)];
  return new OutOfRange(
    'density',
    rho,
    { min: 0, max: Math.max(...rhos) },
    validity.source,
    'kg/m³',
  );
}

/** The state between two temperatures at which the energy is below and above. */
function between(m: Medium, rho: number, u: number, low: number, high: number): State {
  const energy = (T: number): number => overall(stateFromTemperatureDensity(m, T, rho), 'u')!;
  const T = bracketedRoot(
    (t, out) => {
      const state = stateFromTemperatureDensity(m, t, rho);
      out.value = overall(state, 'u')! - u;
      const only = state.parts.length === 1 ? state.parts[0]!.properties : null;
      const step = 1e-6 * t;
      const other = t + step <= high ? t + step : Math.max(low, t - step);
      out.slope = only?.cv ?? (energy(other) - u - out.value) / (other - t);
    },
    low,
    high,
    { name: 'temperature of given density and energy', tolerance: 1e-15 },
  );
  return stateFromTemperatureDensity(m, T, rho);
}

/**
 * The state of given density (kg/m³) and specific internal energy u (J/kg), which fix all three
 * fractions on the three-phase line too.
 *
 * Method: at constant density the energy of the stable state rises with temperature through all phases,
 * by a step at the triple point, so one bracketed search in T finds it.
 * Domain: where T and density have a state; elsewhere throws OutOfRange.
 */
export function stateFromDensityEnergy(m: Medium, rho: number, u: number): State {
  if (!(rho > 0 && rho < Infinity)) throw outside(m, rho);
  const shares = tripleShares(m, rho, u);
  if (shares?.every((share) => share >= 0)) return tripleState(m, shares);
  try {
    return offTripleLine(m, rho, u, shares, looks[0]);
  } catch (error) {
    if (!(error instanceof Unknown)) throw error;
    return offTripleLine(m, rho, u, shares, looks[1]);
  }
}

function offTripleLine(
  m: Medium,
  rho: number,
  u: number,
  shares: readonly number[] | null,
  places: number,
): State {
  const energy = (T: number): number => overall(stateFromTemperatureDensity(m, T, rho), 'u')!;
  const { T } = m.triple;
  const [cold, warm] = [T * (1 - 2e-9), T * (1 + 2e-9)];
  let least = Infinity;
  let most = -Infinity;
  for (const range of knownRanges(m, rho, places)) {
    let [low, high] = range;
    if (low < cold && high > warm) {
      // Next to the step at the triple point the energy is smooth on either side.
      if (u >= energy(warm)) low = warm;
      else if (u <= energy(cold)) high = cold;
      // Rounding alone puts it off the three-phase line.
      else if (shares) return tripleState(m, shares);
    }
    const [atLow, atHigh] = [energy(low), energy(high)];
    const rounding = 1e-10 * m.fluid.R * m.critical.T;
    if (Math.abs(u - atLow) <= rounding) return stateFromTemperatureDensity(m, low, rho);
    if (Math.abs(u - atHigh) <= rounding) return stateFromTemperatureDensity(m, high, rho);
    if (u > atLow && u < atHigh) return between(m, rho, u, low, high);
    least = Math.min(least, atLow);
    most = Math.max(most, atHigh);
  }
  if (least === Infinity) throw outside(m, rho);
  const { source } = m.substance.fluid.validity;
  throw new OutOfRange('internal energy', u, { min: least, max: most }, source, 'J/kg');
}
