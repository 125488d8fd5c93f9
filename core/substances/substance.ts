/**
 * The one layout that every substance file fills: SI, kelvin, per kilogram. Where a source prints
 * molar numbers, the file carries them divided by the molar mass and says so in `printed`.
 */
export interface Substance {
  /** Catalogue id, equal to the file's name. */
  readonly id: string;
  readonly name: string;
  readonly otherNames: readonly string[];
  readonly formula: string;
  readonly cas: string;
  /** Designation by ISO 817, where one exists. */
  readonly refrigerant: string | null;
  readonly molarMass: { readonly value: number; readonly source: string };
  /** Critical point as published, and where the fluid equation itself has it (the dome closes there). */
  readonly critical: {
    readonly T: number;
    readonly p: number;
    readonly rho: number;
    readonly source: string;
    readonly equation: { readonly T: number; readonly p: number; readonly rho: number };
  };
  readonly triplePoints: readonly [VapourTriplePoint, ...TriplePoint[]];
  readonly normalPoint: {
    readonly kind: 'boiling' | 'sublimation';
    readonly T: number;
    readonly source: string;
  };
  readonly fluid: FluidEquation;
  readonly solids: readonly SolidEquation[];
  readonly melting: readonly MeltingLine[];
  readonly sublimation: readonly SublimationLine[];
  /** Boundaries that no source covers, each with its reason. */
  readonly absent: readonly {
    readonly boundary: 'melting' | 'sublimation';
    readonly reason: AbsenceReason;
  }[];
  /** Published equations of the saturation line: first guesses and checks, never results. */
  readonly saturation: {
    readonly pressure: AuxiliaryEquation;
    readonly liquidDensity: AuxiliaryEquation;
    readonly vapourDensity: AuxiliaryEquation;
    /** Enthalpy and entropy on the line, where they are published apart from the fluid equation. */
    readonly caloric?: SaturationCaloricEquation;
    /** The saturation line of the formulation that plant calculations use, where there is one. */
    readonly industrial?: IndustrialSaturationEquation;
  };
  readonly uncertainty: readonly Uncertainty[];
  readonly hazards: readonly Hazard[];
  /** State at which enthalpy and entropy are zero, a code that app/words spells out. */
  readonly referenceState: ReferenceState;
}

/** Why a boundary is absent, a code that app/words spells out. */
export type AbsenceReason = 'not published';

/** What a substance does to people and plant, a code that app/words spells out. */
export type Hazard =
  | 'scald'
  | 'pressure'
  | 'asphyxiation'
  | 'displaces air'
  | 'cold burn'
  | 'cryogenic'
  | 'dry ice blocks lines'
  | 'toxic'
  | 'flammable'
  | 'mildly flammable'
  | 'toxic in fire'
  | 'oxidiser';

export type ReferenceState =
  | 'liquid at the triple point'
  | 'liquid at the triple point: h = s = 0'
  | 'ideal gas at 298.15 K and 101.325 kPa'
  | 'ideal gas at 298.15 K and 101.325 kPa: 8670 J/mol, 191.5 J/(mol K)'
  | 'ideal gas at 298.15 K and 101.325 kPa: 8680 J/mol, 205.043 J/(mol K)'
  | 'liquid at 273.15 K: 200 kJ/kg, 1 kJ/(kg K)'
  | 'liquid at the normal boiling point'
  | 'as published';

export interface TriplePoint {
  readonly id: string;
  readonly phases: readonly [string, string, string];
  readonly T: number;
  readonly p: number;
  readonly source: string;
}
export type VapourTriplePoint = TriplePoint & {
  readonly phases: readonly [string, 'liquid', 'vapour'];
};

export interface Uncertainty {
  readonly quantity: string;
  readonly figure: string;
  readonly source: string;
  readonly provenance: 'published' | 'recalled';
}

export interface Range {
  readonly Tmin: number;
  readonly Tmax: number;
}

/** αR is the sum of these over δ = ρ/ρ*, τ = T* / T. */
export type ResidualTerm =
  | { readonly kind: 'power'; readonly n: number; readonly d: number; readonly t: number }
  | {
      readonly kind: 'exponential';
      readonly n: number;
      readonly d: number;
      readonly t: number;
      readonly c: number;
    }
  | {
      readonly kind: 'gaussian';
      readonly n: number;
      readonly d: number;
      readonly t: number;
      readonly eta: number;
      readonly epsilon: number;
      readonly beta: number;
      readonly gamma: number;
    }
  | {
      readonly kind: 'associating';
      readonly n: number;
      readonly d: number;
      readonly t: number;
      readonly eta: number;
      readonly epsilon: number;
      readonly beta: number;
      readonly gamma: number;
      readonly b: number;
    }
  | {
      readonly kind: 'nonanalytic';
      readonly n: number;
      readonly a: number;
      readonly b: number;
      readonly beta: number;
      readonly A: number;
      readonly B: number;
      readonly C: number;
      readonly D: number;
    };

export interface FluidEquation {
  /** Short name for captions, "IAPWS R6-95(2018)". */
  readonly formulation: string;
  readonly source: string;
  readonly R: number;
  readonly reducing: { readonly T: number; readonly rho: number };
  /** What the paper prints where this file had to convert to mass. */
  readonly printed?: string;
  readonly ideal: {
    readonly a1: number;
    readonly a2: number;
    readonly logTau: number;
    readonly powers?: readonly { readonly n: number; readonly t: number }[];
    /** n ln(1 − exp(−θτ)) */
    readonly planckEinstein: readonly { readonly n: number; readonly theta: number }[];
    /** n ln(1 + g exp(−θτ)) */
    readonly electronic?: readonly {
      readonly n: number;
      readonly g: number;
      readonly theta: number;
    }[];
    /** IAPWS G9-12: an addition for water vapour below T. */
    readonly lowTemperature?: { readonly E: number; readonly T: number; readonly source: string };
  };
  readonly residual: readonly ResidualTerm[];
  readonly validity: {
    /** Vapour and liquid above the triple point. */
    readonly Tmin: number;
    readonly Tmax: number;
    readonly pmax: number;
    /** Lowest temperature of the vapour on the sublimation line. */
    readonly vapourTmin: number;
    readonly source: string;
  };
}

export interface IceIhEquation {
  readonly kind: 'iceIh';
  readonly solid: string;
  readonly formulation: string;
  readonly source: string;
  readonly Tt: number;
  readonly pt: number;
  readonly p0: number;
  readonly g0: readonly [number, number, number, number, number];
  readonly s0: number;
  readonly t1: Complex;
  readonly r1: Complex;
  readonly t2: Complex;
  readonly r2: readonly [Complex, Complex, Complex];
  readonly validity: SolidValidity;
}
export interface DryIceEquation {
  readonly kind: 'dryIce';
  readonly solid: string;
  readonly formulation: string;
  readonly source: string;
  /** Molar as published: J/(mol K). */
  readonly R: number;
  readonly T0: number;
  readonly p0: number;
  readonly n: number;
  readonly molarMass: number;
  readonly g: readonly number[];
  readonly gAlpha: readonly number[];
  readonly gKappa: readonly number[];
  /** g0 and g1 as published, where `g` is anchored to another reference state; for checks alone. */
  readonly publishedReference: readonly [number, number];
  readonly validity: SolidValidity;
}
export type SolidEquation = IceIhEquation | DryIceEquation;

export interface Complex {
  readonly re: number;
  readonly im: number;
}
export interface SolidValidity extends Range {
  readonly pmax: number;
  readonly source: string;
}

/** Melting pressure over temperature, θ = T/T*. */
export type MeltingEquation = {
  /** Short, for captions. */
  readonly source: string;
  /** The source in full, where it is not the fluid equation's or the short one says it all. */
  readonly citation?: string;
  readonly range: Range;
  readonly reducing: { readonly T: number; readonly p: number };
} & (
  | {
      /** p/p* = 1 + Σ aᵢ (1 − θ^bᵢ) */
      readonly kind: 'powers';
      readonly a: readonly number[];
      readonly b: readonly number[];
    }
  | {
      /** ln(p/p*) = Σ aᵢ (1 − θ^bᵢ) */
      readonly kind: 'logarithm of powers';
      readonly a: readonly number[];
      readonly b: readonly number[];
    }
  | {
      /** p/p* = 1 + Σ aᵢ (θ − 1)^i, i from 1 */
      readonly kind: 'polynomial';
      readonly a: readonly number[];
    }
  | {
      /** p = p* + scale Σ aᵢ (θ^bᵢ − 1) */
      readonly kind: 'scaled powers';
      readonly scale: number;
      readonly a: readonly number[];
      readonly b: readonly number[];
    }
);

/** Sublimation pressure over temperature, θ = T/T*. */
export type SublimationEquation = {
  /** Short, for captions. */
  readonly source: string;
  /** The source in full, where it is not the fluid equation's or the short one says it all. */
  readonly citation?: string;
  readonly range: Range;
  readonly reducing: { readonly T: number; readonly p: number };
} & (
  | {
      /** ln(p/p*) = θ⁻¹ Σ aᵢ θ^bᵢ */
      readonly kind: 'powers';
      readonly a: readonly number[];
      readonly b: readonly number[];
    }
  | {
      /** ln(p/p*) = θ⁻¹ Σ aᵢ (1 − θ)^bᵢ */
      readonly kind: 'reduced';
      readonly a: readonly number[];
      readonly b: readonly number[];
    }
  | {
      /** ln(p/p*) = Σ aᵢ / Tⁱ, i from 0; `factor` closes the triple point. */
      readonly kind: 'inverse powers';
      readonly a: readonly number[];
      readonly factor: number;
    }
  | {
      /** ln(p/p*) = (L/R)(1/T* − 1/T), L the heat of sublimation in J/kg */
      readonly kind: 'Clausius–Clapeyron';
      readonly L: number;
      readonly R: number;
    }
);

/** How a line is obtained; `equilibrium` solves equal Gibbs energies and uses `equation` as a start. */
export type Route = 'equilibrium' | 'correlation' | 'estimate';

export interface MeltingLine {
  readonly id: string;
  /** The solid that melts; null where only its melting curve is published. */
  readonly solid: string | null;
  /** What the line itself is called, "ice III". */
  readonly form: string;
  readonly route: Route;
  readonly equation: MeltingEquation;
  /** The line is used over this part of its equation. */
  readonly range: Range;
}
export interface SublimationLine {
  readonly id: string;
  readonly solid: string | null;
  readonly form: string;
  readonly route: Route;
  readonly equation: SublimationEquation;
  readonly range: Range;
}

/** A published auxiliary equation in x = 1 − T/T*. */
export interface AuxiliaryEquation {
  /**
   * sum: y/y* = 1 + Σ aᵢ x^tᵢ; plain sum: y/y* = Σ aᵢ x^tᵢ; exponential: ln(y/y*) = Σ aᵢ x^tᵢ;
   * exponential over temperature: ln(y/y*) = (1 / (1 − x)) Σ aᵢ x^tᵢ
   */
  readonly kind: 'sum' | 'plain sum' | 'exponential' | 'exponential over temperature';
  readonly reducing: { readonly T: number; readonly y: number };
  readonly a: readonly number[];
  readonly t: readonly number[];
  readonly range: Range;
  readonly source: string;
}

/**
 * With θ = T/T*: α/α0 = dα + d1 θ^−19 + d2 θ + d3 θ^4.5 + d4 θ^5 + d5 θ^54.5 and
 * φ T* / α0 = dφ + (19/20) d1 θ^−20 + d2 ln θ + (9/7) d3 θ^3.5 + (5/4) d4 θ^4 + (109/107) d5 θ^53.5.
 */
export interface SaturationCaloricEquation {
  readonly T: number;
  readonly alpha0: number;
  readonly dAlpha: number;
  readonly dPhi: number;
  readonly d: readonly [number, number, number, number, number];
  readonly range: Range;
  readonly source: string;
}

/**
 * With y = (p / 1 MPa)^¼ and v = T + n9 / (T − n10):
 * y²v² + n1 y²v + n2 y² + n3 yv² + n4 yv + n5 y + n6 v² + n7 v + n8 = 0.
 */
export interface IndustrialSaturationEquation {
  readonly n: readonly [
    number,
    number,
    number,
    number,
    number,
    number,
    number,
    number,
    number,
    number,
  ];
  readonly range: Range & { readonly pmin: number; readonly pmax: number };
  readonly source: string;
}

/** What a check's value is worth: where its digits come from. */
export type CheckProvenance =
  'published, one text' | 'published, two texts' | 'recalled' | 'computed' | 'computed elsewhere';

/** A state at which a source tabulates values; SI. */
export interface CheckState {
  readonly T?: number;
  readonly p?: number;
  readonly rho?: number;
  /** Id of the published equation that is meant, where that is not told by the kind. */
  readonly correlation?: string;
}

/** Values that a source prints, to be computed again; `value` is SI, `printed` keeps the digits. */
export interface Checks {
  readonly groups: readonly {
    /** How the values are computed, a key of `evaluations`. */
    readonly kind: string;
    readonly source: string;
    readonly provenance: string;
    readonly states: readonly {
      readonly at: CheckState;
      readonly values: {
        readonly [property: string]:
          | { readonly value: number; readonly printed: string; readonly toleranceAbs: number }
          | undefined;
      };
    }[];
  }[];
}
