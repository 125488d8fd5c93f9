import { densityAt } from '../equilibrium/density.ts';
import type { Medium } from '../equilibrium/medium.ts';
import { fluidName } from '../equilibrium/phase.ts';
import { saturationAt, saturationAtPressure } from '../equilibrium/saturation.ts';
import {
  meltingPoint,
  meltingPointAtPressure,
  sublimationPoint,
} from '../equilibrium/solidLines.ts';
import { phaseProperties, saturatedPhases } from '../equilibrium/state.ts';
import { auxiliary } from '../models/auxiliary.ts';
import { dryIce } from '../models/dryIce.ts';
import { enthalpy, fluidProperties, pressure } from '../models/fluidProperties.ts';
import {
  industrialSaturationPressure,
  industrialSaturationTemperature,
} from '../models/industrialSaturation.ts';
import { meltingPressure } from '../models/meltingPressure.ts';
import { saturationCaloric } from '../models/saturationCaloric.ts';
import { solidProperties } from '../models/solid.ts';
import type { SolidGibbs } from '../models/solidGibbs.ts';
import { sublimationPressure } from '../models/sublimationPressure.ts';
import type { CheckState, DryIceEquation, Substance } from '../substances/substance.ts';

/** Every property that a table row may ask for at one state, by its name. */
export type CheckValues = Readonly<Record<string, number | null | undefined>>;

/** The solid as tabulated: `molar` gives values per mole, as the dry-ice paper prints them. */
function solidValues(g: Readonly<SolidGibbs>, T: number, p: number, molar = 1): CheckValues {
  const { rho, h, s, u, cp } = solidProperties(T, p, g);
  return {
    g: g.g * molar,
    dgdp: g.gp,
    dgdT: g.gT,
    d2gdp2: g.gpp,
    d2gdTdp: g.gTp,
    d2gdT2: g.gTT,
    h: h * molar,
    f: g.g - p * g.gp,
    u: u * molar,
    s: s * molar,
    cp: cp === null ? null : cp * molar,
    rho,
    v: g.gp * molar,
    alpha: g.gTp / g.gp,
    beta: -g.gTp / g.gpp,
    kappaT: -g.gpp / g.gp,
    kappaS: (g.gTp * g.gTp - g.gTT * g.gpp) / (g.gp * g.gTT),
  };
}

const dryIceOf = ({ substance }: Medium): DryIceEquation =>
  substance.solids.find((solid) => solid.kind === 'dryIce')!;

function correlation(substance: Substance, id: string, T: number): number | null {
  const melting = substance.melting.find((line) => line.id === id);
  if (melting) return meltingPressure(melting.equation, T);
  const sublimation = substance.sublimation.find((line) => line.id === id);
  if (sublimation) return sublimationPressure(sublimation.equation, T);
  return id === 'saturation-pressure' ? auxiliary(substance.saturation.pressure, T) : null;
}

const solidEnthalpy = (m: Medium, T: number, p: number): number => {
  const solid = [...m.solids.values()][0]!;
  return solidProperties(T, p, solid.model(T, p)).h;
};

/**
 * How each kind of table row is computed: every property at its state, in SI. The states carry what
 * the kind needs; ranges are those of the functions called, whose errors pass through.
 */
export const evaluations: Readonly<Record<string, (m: Medium, at: CheckState) => CheckValues>> = {
  fluidReduced: (m, { T, rho }) => {
    const f = m.fluid.evaluate(T!, rho!);
    const { delta: d, tau: t } = f;
    return {
      alpha0: f.a0,
      alpha0_d: 1 / d,
      alpha0_dd: -1 / (d * d),
      alpha0_t: f.a0t / t,
      alpha0_tt: f.a0tt / (t * t),
      alphaR: f.aR,
      alphaR_d: f.aRd / d,
      alphaR_dd: f.aRdd / (d * d),
      alphaR_t: f.aRt / t,
      alphaR_tt: f.aRtt / (t * t),
      alphaR_dt: f.aRdt / (d * t),
    };
  },
  fluidState: (m, { T, rho }) => {
    const f = m.fluid.evaluate(T!, rho!);
    return { ...fluidProperties(f), p: pressure(f) };
  },
  // The fluid's own branch: a row may stand on a published melting curve, where the solved line
  // already has the solid.
  fluidStateTp: (m, { T, p }) => {
    const branch = fluidName(m, T!, p!) === 'vapour' ? 'vapour' : 'liquid';
    return { ...fluidProperties(m.fluid.evaluate(T!, densityAt(m, T!, p!, branch))) };
  },
  saturation: (m, { T, p }) => {
    const s = T === undefined ? saturationAtPressure(m, p!) : saturationAt(m, T);
    const [l, v] = saturatedPhases(s).map((side) => phaseProperties(m, side)!);
    const sided = (side: string, properties: object): CheckValues =>
      Object.fromEntries(Object.entries(properties).map(([k, x]) => [k + side, x as number]));
    return {
      T: s.T,
      p: s.p,
      ...sided('L', l!),
      ...sided('V', v!),
      dh: v!.h - l!.h,
      ds: v!.s - l!.s,
    };
  },
  melting: (m, { p }) => ({ T: meltingPointAtPressure(m, m.substance.melting[0]!, p!).T }),
  iceIh: (m, { T, p }) => solidValues(m.solids.get('ice Ih')!.model(T!, p!), T!, p!),
  correlation: ({ substance }, { T, correlation: id }) => ({ p: correlation(substance, id!, T!) }),
  meltingEqualGibbs: (m, { T, p }) => {
    const line = m.substance.melting[0]!;
    return T === undefined
      ? { T: meltingPointAtPressure(m, line, p!).T }
      : { p: meltingPoint(m, line, T).p };
  },
  sublimationEqualGibbs: (m, { T }) => ({
    p: sublimationPoint(m, m.substance.sublimation[0]!, T!).p,
  }),
  industrialSaturation: ({ substance }, { T, p }) => {
    const e = substance.saturation.industrial!;
    return T === undefined
      ? { T: industrialSaturationTemperature(e, p!) }
      : { p: industrialSaturationPressure(e, T) };
  },
  saturationAuxiliary: ({ substance }, { T }) => ({
    ...saturationCaloric(substance.saturation, T!),
    p: auxiliary(substance.saturation.pressure, T!),
    rhoL: auxiliary(substance.saturation.liquidDensity, T!),
    rhoV: auxiliary(substance.saturation.vapourDensity, T!),
  }),
  dryIcePublishedReference: (m, { T, p }) => {
    const solid = dryIceOf(m);
    const e = { ...solid, g: [...solid.publishedReference, ...solid.g.slice(2)] };
    return solidValues(dryIce(e)(T!, p!), T!, p!, e.molarMass);
  },
  dryIceOther: (m, { T, p }) => {
    const solid = dryIceOf(m);
    return solidValues(m.solids.get(solid.solid)!.model(T!, p!), T!, p!, solid.molarMass);
  },
  fusionEnthalpy: (m, { T, p }) => {
    const rho = p === undefined ? m.triple.rhoL : densityAt(m, T!, p, 'liquid');
    const liquid = enthalpy(m.fluid.evaluate(T!, rho));
    const dh = liquid - solidEnthalpy(m, T!, p ?? m.triple.p);
    return { dh: p === undefined ? dh * m.substance.molarMass.value : dh };
  },
  sublimationEnthalpy: (m, { T }) => {
    const { p, rho } = sublimationPoint(m, m.substance.sublimation[0]!, T!);
    const vapour = enthalpy(m.fluid.evaluate(T!, rho!));
    return { dh: (vapour - solidEnthalpy(m, T!, p)) * m.substance.molarMass.value };
  },
  triplePointFromEquations: (m) => ({ p: m.triple.p }),
};
