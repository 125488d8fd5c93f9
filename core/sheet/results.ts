import type { Caution } from '../cautions/caution.ts';
import type { State } from '../equilibrium/state.ts';
import type { Boundary } from '../map/boundary.ts';
import type { Margin } from '../map/margins.ts';
import type { Region } from '../map/regions.ts';

/** Why a state has no result; carries what the sentence needs. */
export type StateProblem =
  | {
      readonly code: 'outOfRange';
      readonly quantity: string;
      readonly value: number;
      readonly min: number;
      readonly max: number;
      readonly source: string;
      readonly unit: string;
    }
  | {
      readonly code: 'onBoundary';
      readonly boundary: string;
      readonly needs: 'vapour fraction' | 'solid fraction';
    }
  | { readonly code: 'unknown'; readonly reason: string };

export interface SiteResult {
  readonly id: string;
  readonly name: string;
  /** Local atmosphere, Pa absolute. */
  readonly local: number;
  readonly from: 'barometer' | 'altitude' | 'standard';
}

/** A state item evaluated; T and p are known even where the phase is not. */
export interface StateResult {
  readonly id: string;
  readonly tag: string;
  readonly name: string | null;
  readonly substance: string;
  readonly site: string | null;
  readonly T: number;
  readonly p: number;
  /** Kind in which the pressure was given, for showing it again. */
  readonly kind: 'gauge' | 'absolute' | 'vacuum';
  readonly state: State | null;
  readonly problem: StateProblem | null;
  readonly margins: readonly Margin[];
  /** Limits of error in K and Pa; 0 where no instrument was named. */
  readonly error: { readonly T: number; readonly p: number };
  /** The boundary that the error box touches: "cannot be told from these instruments". */
  readonly touches: string | null;
}

export interface MapPoint {
  readonly id: string;
  readonly kind: 'triple' | 'critical';
  readonly phases: readonly string[];
  readonly T: number;
  readonly p: number;
  readonly source: string;
}

/** A map ready to be drawn; everything in it is plain data. */
export interface MapResult {
  readonly view: string;
  readonly substance: string;
  readonly T: { readonly kind: 'linear' | 'reciprocal'; readonly range: readonly [number, number] };
  readonly p: {
    readonly kind: 'linear' | 'logarithmic';
    readonly range: readonly [number, number];
  };
  /** The frame in mm. */
  readonly width: number;
  readonly height: number;
  readonly boundaries: readonly Boundary[];
  readonly regions: readonly Region[];
  readonly points: readonly MapPoint[];
  /** Where the equations end, for what is drawn beyond. */
  readonly validity: { readonly T: readonly [number, number]; readonly pmax: number };
  /** Ids of states that lie outside the frame. */
  readonly outside: readonly string[];
}

export interface Results {
  readonly sites: readonly SiteResult[];
  readonly states: readonly StateResult[];
  readonly maps: readonly MapResult[];
  readonly cautions: readonly Caution[];
  /** Formulations used, by substance id, the fluid's first. */
  readonly formulations: Readonly<Record<string, readonly string[]>>;
}
