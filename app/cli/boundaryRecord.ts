import type { Medium } from '../../core/equilibrium/medium.ts';
import type { PhaseState } from '../../core/equilibrium/phase.ts';
import { seam } from '../../core/equilibrium/solidLines.ts';
import { phaseProperties } from '../../core/equilibrium/state.ts';
import { OutOfRange } from '../../core/errors.ts';
import { boundaryCurves, type Basis, type BoundaryCurve } from '../../core/map/boundary.ts';

export const boundaryKinds = ['saturation', 'melting', 'sublimation'] as const;
export type AskedKind = (typeof boundaryKinds)[number];

export interface FluidSide {
  readonly rho: number | null;
  readonly h: number | null;
  readonly s: number | null;
  readonly cp: number | null;
  readonly w: number | null;
}
export interface SolidSide {
  /** The line's form, "ice III". */
  readonly name: string | null;
  readonly rho: number | null;
  readonly h: number | null;
  readonly s: number | null;
  readonly cp: number | null;
}

/** A point of a boundary with its two sides as JSON writes it, SI. */
export interface BoundaryRecord {
  readonly T: number;
  readonly p: number;
  readonly solid?: SolidSide;
  readonly liquid?: FluidSide;
  readonly vapour?: FluidSide;
  readonly basis: Basis;
  readonly source: string;
  /** Local atmosphere, where a gauge or vacuum reading was given. */
  readonly atmosphere?: number;
  /** Other melting lines met at the same temperature, at higher pressures. */
  readonly also?: readonly BoundaryRecord[];
}

/** Rounding of a unit's conversion may carry a line's very end out of its range. */
const rounding = 1e-12;

function fluidSide(m: Medium, side: PhaseState): FluidSide {
  const properties = phaseProperties(m, side);
  return {
    rho: side.rho,
    h: properties?.h ?? null,
    s: properties?.s ?? null,
    cp: properties?.cp ?? null,
    w: properties?.w ?? null,
  };
}

function solidSide(m: Medium, form: string | null, side: PhaseState): SolidSide {
  const { rho, h, s, cp } = fluidSide(m, side);
  return { name: form, rho, h, s, cp };
}

function record(
  m: Medium,
  curve: BoundaryCurve,
  at: { T: number } | { p: number },
): BoundaryRecord {
  const point = 'T' in at ? curve.atTemperature(at.T) : curve.atPressure(at.p);
  const [dense, thin] = point.sides as readonly [PhaseState, PhaseState];
  const sides = {
    saturation: () => ({ liquid: fluidSide(m, dense), vapour: fluidSide(m, thin) }),
    melting: () => ({ solid: solidSide(m, curve.form, dense), liquid: fluidSide(m, thin) }),
    sublimation: () => ({ solid: solidSide(m, curve.form, dense), vapour: fluidSide(m, thin) }),
  }[curve.kind as AskedKind]();
  return { T: point.T, p: point.p, ...sides, basis: curve.basis, source: curve.source };
}

/**
 * The boundary of a kind at a temperature (K) or a pressure (Pa).
 *
 * Where one temperature meets several melting lines, the one at the lowest pressure stands first and
 * carries the others. Outside the lines' ranges, between the lowest and the highest of their ends,
 * throws OutOfRange; where the substance has no such line returns null.
 */
export function boundaryRecord(
  m: Medium,
  kind: AskedKind,
  at: { readonly T: number } | { readonly p: number },
): BoundaryRecord | null {
  const curves = boundaryCurves(m).filter((curve) => curve.kind === kind);
  if (curves.length === 0) return null;
  const quantity = 'T' in at ? 'T' : 'p';
  const value = 'T' in at ? at.T : at.p;
  const slack = quantity === 'p' && kind === 'melting' ? seam : rounding;
  const met = curves.filter((curve) => {
    const [low, high] = curve[quantity];
    return value >= low * (1 - slack) && value <= high * (1 + slack);
  });
  if (met.length === 0)
    throw new OutOfRange(
      quantity,
      value,
      {
        min: Math.min(...curves.map((curve) => curve[quantity][0])),
        max: Math.max(...curves.map((curve) => curve[quantity][1])),
      },
      [...new Set(curves.map(({ source }) => source.replace(/, eqs?\. [\d.]+/, '')))].join('; '),
      quantity === 'T' ? 'K' : 'Pa',
    );
  const records = met.map((curve) => {
    const [low, high] = curve[quantity];
    const inside = Math.min(high, Math.max(low, value));
    return record(m, curve, quantity === 'T' ? { T: inside } : { p: inside });
  });
  if (quantity === 'p') return records[0]!;
  // Lines that join at this temperature give the point of their junction once.
  const [lowest, ...others] = records
    .sort((a, b) => a.p - b.p)
    .filter((r, i, all) => i === 0 || Math.abs(r.p / all[i - 1]!.p - 1) > seam);
  return others.length > 0 ? { ...lowest!, also: others } : lowest!;
}
