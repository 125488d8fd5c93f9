import type { Caution } from '../cautions/caution.ts';
import type { State } from '../equilibrium/state.ts';
import type { Boundary } from '../map/boundary.ts';
import type { Margin } from '../map/margins.ts';
import type { Region } from '../map/regions.ts';
import type { Encounter, NamedPhase } from '../process/encounter.ts';
import type { HeatAbsent } from '../process/outcome.ts';
import type { Leg, StateProblem, StepProblem } from '../process/problem.ts';

export type { StateProblem, StepProblem } from '../process/problem.ts';

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

/** A state of a path: its start, or the end of a step. */
export interface PathState extends StateResult {
  readonly path: string;
  /** Id of the step that ends here within its path; null at the start. */
  readonly step: string | null;
  readonly state: State;
  /** Id of the boundary it lies on. */
  readonly on: string | null;
  /** kg left per kg at the path's start; null where it is open. */
  readonly mass: number | null;
}

/** A step of a path; energies in J and masses in kg, per kg at the path's start. */
export interface StepResult {
  /** Also the id of the state at its end. */
  readonly id: string;
  /** Id of the step within its path. */
  readonly step: string;
  readonly kind: string;
  /** Its way on the map; each map holds the vertices. Empty where it stays in one place. */
  readonly legs: readonly Leg[];
  /** The phases gone through off the boundaries, in order. */
  readonly phases: readonly NamedPhase[];
  readonly encounters: readonly Encounter[];
  /** Heat taken in; null where `heatAbsent` says why. */
  readonly heat: number | null;
  readonly heatAbsent: HeatAbsent | null;
  /** Work done on the substance. */
  readonly work: number | null;
  /** What left as vapour; null where none may leave. */
  readonly lost: {
    readonly mass: number | null;
    /** Enthalpy it took along, and its heat of vaporisation. */
    readonly enthalpy: number | null;
    readonly latent: number | null;
  } | null;
  /** Mass left at the end. */
  readonly mass: number | null;
  /** Duration, and time since the path's start at its end, s; null where no time or rate tells it. */
  readonly time: number | null;
  readonly clock: number | null;
  /** Why it does not reach its end; the path stops there. */
  readonly problem: StepProblem | null;
}

/** A planned run evaluated. */
export interface PathResult {
  readonly id: string;
  readonly tag: string;
  readonly name: string | null;
  readonly substance: string;
  readonly site: string | null;
  /** Start and step ends as far as the path goes: A1, A2, … */
  readonly states: readonly PathState[];
  readonly steps: readonly StepResult[];
  /** The first problem, at a step or (null) at the start. */
  readonly problem: { readonly step: string | null; readonly problem: StepProblem } | null;
  /** Sums over all steps, null where one of them is not known. */
  readonly total: {
    readonly heat: number | null;
    readonly work: number | null;
    readonly time: number | null;
  };
}

/** A leg of a path as vertices on one map. */
export interface Track {
  readonly path: string;
  /** Id of the step's result. */
  readonly step: string;
  /** Id of the boundary it lies on; null where it is straight in T and p. */
  readonly along: string | null;
  /** True where its points are possible ends of the step and not states gone through: drawn dashed. */
  readonly locus: boolean;
  readonly points: readonly { readonly T: number; readonly p: number }[];
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
  readonly tracks: readonly Track[];
  /** Boundaries that nobody has published, which would bound the fields on the cold side. */
  readonly absent: readonly ('melting' | 'sublimation')[];
  /** Where the equations end, for what is drawn beyond. */
  readonly validity: { readonly T: readonly [number, number]; readonly pmax: number };
  /** Ids of states, of paths' too, that lie outside the frame. */
  readonly outside: readonly string[];
}

export interface Results {
  readonly sites: readonly SiteResult[];
  readonly states: readonly StateResult[];
  readonly paths: readonly PathResult[];
  readonly maps: readonly MapResult[];
  readonly cautions: readonly Caution[];
  /** Formulations used, by substance id, the fluid's first. */
  readonly formulations: Readonly<Record<string, readonly string[]>>;
  /** Boundaries that nobody has published, by substance id; none where all are. */
  readonly absent: Readonly<Record<string, readonly ('melting' | 'sublimation')[]>>;
}
