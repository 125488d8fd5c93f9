import { describe, expect, it } from 'vitest';
import { densityAt } from '../../core/equilibrium/density.ts';
import { medium, type Medium } from '../../core/equilibrium/medium.ts';
import { fluidName } from '../../core/equilibrium/phase.ts';
import { saturationAt } from '../../core/equilibrium/saturation.ts';
import {
  meltingPoint,
  meltingPointAtPressure,
  sublimationPoint,
} from '../../core/equilibrium/solidLines.ts';
import { phaseProperties, saturatedPhases } from '../../core/equilibrium/state.ts';
import { auxiliary } from '../../core/models/auxiliary.ts';
import { dryIce } from '../../core/models/dryIce.ts';
import { enthalpy, fluidProperties, pressure } from '../../core/models/fluidProperties.ts';
import { Helmholtz } from '../../core/models/helmholtz.ts';
import {
  industrialSaturationPressure,
  industrialSaturationTemperature,
} from '../../core/models/industrialSaturation.ts';
import { meltingPressure } from '../../core/models/meltingPressure.ts';
import { saturationCaloric } from '../../core/models/saturationCaloric.ts';
import { solidProperties } from '../../core/models/solid.ts';
import type { SolidGibbs } from '../../core/models/solidGibbs.ts';
import { sublimationPressure } from '../../core/models/sublimationPressure.ts';
import { carbonDioxide } from '../../core/substances/carbon-dioxide.ts';
import type { DryIceEquation, Substance } from '../../core/substances/substance.ts';
import { water } from '../../core/substances/water.ts';
import carbonDioxideChecks from './carbon-dioxide.json' with { type: 'json' };
import waterChecks from './water.json' with { type: 'json' };

interface Check {
  readonly value: number;
  readonly printed: string;
  readonly toleranceAbs: number;
}
interface At {
  readonly T?: number;
  readonly p?: number;
  readonly rho?: number;
  readonly correlation?: string;
}
interface Checks {
  readonly groups: readonly {
    readonly kind: string;
    readonly source: string;
    readonly provenance: string;
    readonly states: readonly {
      readonly at: At;
      readonly values: { readonly [property: string]: Check | undefined };
    }[];
  }[];
}

type Values = Readonly<Record<string, number | null | undefined>>;

/** The solid as tabulated: `molar` gives values per mole, as the dry-ice paper prints them. */
function solidValues(g: Readonly<SolidGibbs>, T: number, p: number, molar = 1): Values {
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

const withPublishedReference = (): DryIceEquation => {
  const solid = carbonDioxide.solids[0]!;
  if (solid.kind !== 'dryIce') throw new Error('carbon dioxide has lost its solid');
  // A. Jäger, R. Span, J. Chem. Eng. Data 57, 590 (2012), table 2: belongs to a fluid with
  // h = 200 kJ/kg and s = 1 kJ/(kg K) for the saturated liquid at 273.15 K.
  return { ...solid, g: [-2.6385478, 4.5088732, ...solid.g.slice(2)] };
};

function correlation(substance: Substance, id: string, T: number): number {
  const melting = substance.melting.find((line) => line.id === id);
  if (melting) return meltingPressure(melting.equation, T);
  const sublimation = substance.sublimation.find((line) => line.id === id);
  if (sublimation) return sublimationPressure(sublimation.equation, T);
  if (id === 'saturation-pressure') return auxiliary(substance.saturation.pressure, T);
  throw new Error(`no equation "${id}"`);
}

const solidEnthalpy = (m: Medium, T: number, p: number): number => {
  const solid = [...m.solids.values()][0]!;
  return solidProperties(T, p, solid.model(T, p)).h;
};

/** Every property that rows of a kind may ask for, at one state. */
const evaluations: Readonly<Record<string, (m: Medium, at: At) => Values>> = {
  fluidReduced: ({ substance }, { T, rho }) => {
    const f = new Helmholtz(substance.fluid).evaluate(T!, rho!);
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
  // The fluid's own branch: one row stands on the published melting curve, where the solved line
  // already has the solid.
  fluidStateTp: (m, { T, p }) => {
    const branch = fluidName(m, T!, p!) === 'vapour' ? 'vapour' : 'liquid';
    return { ...fluidProperties(m.fluid.evaluate(T!, densityAt(m, T!, p!, branch))) };
  },
  saturation: (m, { T }) => {
    const s = saturationAt(m, T!);
    const [l, v] = saturatedPhases(s).map((side) => phaseProperties(m, side)!);
    const sided = (side: string, properties: object): Values =>
      Object.fromEntries(Object.entries(properties).map(([k, x]) => [k + side, x as number]));
    return { p: s.p, ...sided('L', l!), ...sided('V', v!) };
  },
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
  dryIcePublishedReference: (_, { T, p }) => {
    const e = withPublishedReference();
    return solidValues(dryIce(e)(T!, p!), T!, p!, e.molarMass);
  },
  dryIceOther: (m, { T, p }) => {
    const { model, equation } = m.solids.get('dry ice')!;
    const molar = equation.kind === 'dryIce' ? equation.molarMass : NaN;
    return solidValues(model(T!, p!), T!, p!, molar);
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

const called = (at: At): string =>
  Object.entries(at)
    .map(([k, x]) => `${k} ${x}`)
    .join(', ');

function flatten({ groups }: Checks) {
  return groups.flatMap(({ kind, source, provenance, states }) =>
    states.flatMap(({ at, values }) =>
      Object.entries(values).flatMap(([property, check]) =>
        check
          ? [
              {
                kind,
                at,
                property,
                ...check,
                name: `${kind}(${called(at)}).${property} is ${check.printed}: ${source} [${provenance}]`,
              },
            ]
          : [],
      ),
    ),
  );
}

describe.each([
  { substance: water, checks: waterChecks, rows: 354 },
  { substance: carbonDioxide, checks: carbonDioxideChecks, rows: 195 },
])('$substance.id', ({ substance, checks, rows }) => {
  const m = medium(substance);
  const all = flatten(checks);

  it(`has ${rows} published values, each marked with where it comes from`, () => {
    expect(all).toHaveLength(rows);
    for (const { provenance } of checks.groups)
      expect(provenance).toMatch(/^(published, (one|two) texts?|recalled|computed)$/);
  });

  for (const { name, kind, at, property, value, toleranceAbs } of all)
    it(name, () => {
      const found = evaluations[kind]!(m, at)[property];
      expect(found).toBeTypeOf('number');
      expect(Math.abs(found! - value)).toBeLessThanOrEqual(toleranceAbs);
    });
});
