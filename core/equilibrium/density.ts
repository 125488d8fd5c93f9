import { NotConverged } from '../errors.ts';
import { auxiliary } from '../models/auxiliary.ts';
import type { Medium } from './medium.ts';
import { criticalCap, saturationAt } from './saturation.ts';

/**
 * Density (kg/m³) of the fluid at T (K) and p (Pa) on the branch asked for: `liquid` is the branch
 * denser than the saturated liquid, `vapour` the one lighter than the saturated vapour; from the
 * critical temperature up there is one branch and both words mean it.
 *
 * Method: Newton inside a bracket that never holds the spurious roots between the branches. Below
 * the critical temperature the bracket ends at the saturated density (well away from it, 2 % beyond
 * the auxiliary equation's, still on the same branch).
 * Domain: T > 0, p > 0; a metastable state is found when the branch reaches that far, else
 * NotConverged.
 * Error: |p(T, ρ) − p| within 1e-12 p plus the rounding of the equation (about 1e-16 of ρRT).
 */
export function densityAt(
  m: Medium,
  T: number,
  p: number,
  branch: 'liquid' | 'vapour',
  start?: number,
): number {
  const { fluid, critical, substance } = m;
  const RT = fluid.R * T;
  let low = 0;
  let high = Infinity;
  // No liquid is so dense; beyond, some equations turn over.
  const densest = 1.8 * m.triple.rhoL;
  let rho = start !== undefined && !(start > densest) ? start : NaN;
  if (T < critical.T) {
    const near = T > 0.95 * critical.T;
    // So close below the critical temperature the loop of the isotherm is lost in rounding, and the
    // root for a pressure next to the critical one may lie on either side of the critical density.
    const slack = T > critical.T - criticalCap ? 0.1 : 1e-9;
    if (branch === 'liquid') {
      low = near
        ? saturationAt(m, T).rhoL
        : auxiliary(substance.saturation.liquidDensity, T) * 0.98;
      // At the very line rounding may ask for a hair less than the saturated density.
      low *= 1 - slack;
      if (!(rho > low)) rho = low * 1.03;
    } else {
      // Below the triple point the auxiliary equation is stretched past its range, and vapour is thin.
      const aside = T < m.triple.T && p <= m.triple.p ? 2 * (p / RT) : 0;
      high = near
        ? saturationAt(m, T).rhoV * (1 + slack)
        : Math.min(
            Math.max(auxiliary(substance.saturation.vapourDensity, T) * 1.1, aside),
            critical.rho,
          );
      if (!(rho > 0 && rho < high)) rho = Math.min(p / RT, 0.98 * high);
    }
  } else if (!(rho > 0)) {
    rho = Math.min(p / RT, critical.rho * 3);
    if (p > critical.p && rho > critical.rho) rho = critical.rho * 1.5;
  }
  let last = Infinity;
  let error = Infinity;
  for (let i = 0; i < 200; i++) {
    fluid.residual(T, rho);
    error = rho * RT * (1 + fluid.aRd) - p;
    const slope = RT * (1 + 2 * fluid.aRd + fluid.aRdd);
    if (error === 0) return rho;
    if (error < 0) low = Math.max(low, rho);
    else high = Math.min(high, rho);
    let next = rho - error / slope;
    const step = Math.abs(next - rho);
    const settled =
      step <= 1e-15 * rho || (step < 1e-9 * rho && (step >= last || !(next > low && next < high)));
    if (settled && slope > 0) return next > 0 ? next : rho;
    last = step;
    const most = 0.2 * rho;
    if (!(slope > 0) || !(next > low && next < high)) {
      next = high === Infinity ? rho * 1.2 : 0.5 * (low + high);
      if (next === low || next === high || next === rho) break;
      last = Infinity;
    } else if (next - rho > most) next = rho + most;
    else if (rho - next > 4 * most) next = rho - 4 * most;
    rho = next;
  }
  // Next to the critical point the slope drowns in rounding: a bracket closed on p is the answer.
  if (Math.abs(error) <= 1e-12 * p + 1e-14 * rho * RT) return rho;
  throw new NotConverged(`density of the ${branch}`, { T, p });
}
