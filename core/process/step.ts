import * as v from 'valibot';
import type { Medium } from '../equilibrium/medium.ts';
import { OutOfRange } from '../errors.ts';
import {
  boundaryCurves,
  type BoundaryCurve,
  type BoundaryKind,
  type BoundaryPoint,
} from '../map/boundary.ts';
import { absolutePressure, parseReading, type Quantity } from '../units/index.ts';
import type { Outcome } from './outcome.ts';
import { StepFailure } from './problem.ts';
import { curveOf, type Stand } from './stand.ts';

/** What turns a path's readings into SI: its substance, its site's air and what a bare pressure means. */
export interface Env {
  readonly m: Medium;
  /** Local atmosphere, Pa. */
  readonly local: number;
  readonly pressureKind: 'gauge' | 'absolute';
}

/** A reading in SI; pressures absolute. Throws ReadingError. */
export function siOf(env: Env, text: string, quantity: Quantity): number {
  if (quantity !== 'pressure') return parseReading(text, quantity).value;
  return absolutePressure(
    parseReading(text, 'pressure', { defaultKind: env.pressureKind }),
    env.local,
  );
}

const reading = v.pipe(v.string(), v.minLength(1), v.maxLength(64));

/** Every way to say where a step ends; each step kind takes some of them. */
export const endFields = {
  T: v.optional(reading),
  p: v.optional(reading),
  /** The first line of the kind that is met. */
  boundary: v.optional(v.picklist(['saturation', 'melting', 'sublimation'])),
  /** Where vapour leaves: the share of the mass at the step's start that has turned to vapour. */
  vapourFraction: v.optional(reading),
  solidFraction: v.optional(reading),
  /** Heat taken in along the line, per kg at the path's start. */
  heat: v.optional(reading),
  /** Isentropic efficiency of the machine that gets there. */
  efficiency: v.optional(reading),
};

/** Fields that every step has. */
export const stepFields = {
  /** Permanent; "start" is kept for the path's own start. */
  id: v.pipe(v.string(), v.regex(/^[a-z0-9][a-z0-9-]{0,63}$/), v.notValue('start')),
  time: v.optional(reading),
  /** Of temperature or of pressure; gives the time. */
  rate: v.optional(reading),
};

/** Whether steam stays with the rest or is let off; it stays where nothing is said. */
export const vapourField = { vapour: v.optional(v.picklist(['stays', 'leaves'])) };

export type EndKey = keyof typeof endFields;

/** The quantity of an end that is a reading. */
export const quantityOfEnd: Readonly<Record<Exclude<EndKey, 'boundary'>, Quantity>> = {
  T: 'temperature',
  p: 'pressure',
  vapourFraction: 'fraction',
  solidFraction: 'fraction',
  heat: 'specificEnergy',
  efficiency: 'fraction',
};

/** A step's end in SI, as dragging gives it; what it does not name is not said any more. */
export interface DraggedEnd {
  readonly T?: number;
  readonly p?: number;
  readonly boundary?: SnapKind;
  readonly vapourFraction?: number;
  readonly solidFraction?: number;
  readonly heat?: number;
  readonly efficiency?: number;
}

export type SnapKind = Exclude<BoundaryKind, 'critical'>;

/** Where a hand puts a step's end; `snap` where it took hold of a boundary. */
export interface DragTarget {
  readonly T: number;
  readonly p: number;
  readonly snap?: SnapKind | null;
}

/** One kind of step; adding one is a file and a line in the list. */
export interface StepKind<S> {
  readonly kind: string;
  /** Combinations of ends, each enough by itself. */
  readonly ends: readonly (readonly EndKey[])[];
  readonly rates: readonly ('temperatureRate' | 'pressureRate')[];
  /** Throws StepFailure, ReadingError and the typed errors of core where the end cannot be reached. */
  run(step: S, from: Stand, env: Env): Outcome;
  /** What dragging the step's end to a place means, as far as the step allows; null where it cannot be dragged. */
  drag(step: S, from: Stand, to: DragTarget, env: Env): DraggedEnd | null;
}

/** The boundary of a kind that a run meets first where it keeps its pressure or its temperature. */
export function boundaryMet(
  env: Env,
  from: Stand,
  keeps: 'T' | 'p',
  wanted: (curve: BoundaryCurve) => boolean,
  kind: BoundaryKind | null,
): BoundaryCurve {
  const value = from.state[keeps];
  const other = keeps === 'T' ? 'p' : 'T';
  const far = (curve: BoundaryCurve): number =>
    curve.id === from.on
      ? 0
      : Math.abs(Math.log(pointOn(curve, keeps, value)[other] / from.state[other]));
  const met = covering(env, keeps, value, wanted)
    .map((curve) => ({ curve, far: far(curve) }))
    .sort((a, b) => a.far - b.far)[0];
  if (!met) throw new StepFailure({ code: 'noBoundary', boundary: kind, keeps, value });
  return met.curve;
}

const covering = (
  { m }: Env,
  by: 'T' | 'p',
  value: number,
  wanted: (curve: BoundaryCurve) => boolean,
): readonly BoundaryCurve[] =>
  boundaryCurves(m).filter((c) => wanted(c) && value >= c[by][0] && value <= c[by][1]);

/** The boundary that a temperature or pressure and a fraction mean: melting, boiling, then sublimation. */
export function boundaryMetAt(
  env: Env,
  by: 'T' | 'p',
  value: number,
  wanted: (curve: BoundaryCurve) => boolean,
): BoundaryCurve {
  const order = ['melting', 'saturation', 'sublimation'];
  const met = [...covering(env, by, value, wanted)].sort(
    (a, b) => order.indexOf(a.kind) - order.indexOf(b.kind),
  )[0];
  if (!met) throw new StepFailure({ code: 'noBoundary', boundary: null, keeps: by, value });
  return met;
}

/** The point of a boundary at a temperature or pressure; throws OutOfRange past its ends. */
export function pointOn(curve: BoundaryCurve, by: 'T' | 'p', value: number): BoundaryPoint {
  const [min, max] = curve[by];
  if (!(value >= min && value <= max))
    throw new OutOfRange(by, value, { min, max }, curve.source, by === 'T' ? 'K' : 'Pa');
  return by === 'T' ? curve.atTemperature(value) : curve.atPressure(value);
}

/** Whether a boundary has the phase of a fraction on one side. */
export const bears =
  (fraction: 'vapour' | 'solid') =>
  ({ kind }: BoundaryCurve): boolean =>
    kind !== (fraction === 'vapour' ? 'melting' : 'saturation');

/** The share of a boundary's second side that a fraction means. */
export const secondShare = (fraction: 'vapour' | 'solid', value: number): number =>
  fraction === 'vapour' ? value : 1 - value;

/** The fraction that an end asks for, with its value 0 to 1; null where it asks for none. */
export function fractionOf(
  env: Env,
  end: { readonly vapourFraction?: string; readonly solidFraction?: string },
): { readonly of: 'vapour' | 'solid'; readonly value: number } | null {
  if (end.vapourFraction !== undefined)
    return { of: 'vapour', value: siOf(env, end.vapourFraction, 'fraction') };
  if (end.solidFraction !== undefined)
    return { of: 'solid', value: siOf(env, end.solidFraction, 'fraction') };
  return null;
}

/** The boundary that a stand lies on; throws StepFailure where it lies on none. */
export function boundaryUnder({ m }: Env, { on, state: { T, p } }: Stand): BoundaryCurve {
  if (on === null) throw new StepFailure({ code: 'notOnBoundary', T, p });
  return curveOf(m, on);
}

/** The share that an end's fraction or heat asks for on a boundary; throws StepFailure where a phase is not there. */
export function shareAsked(
  env: Env,
  curve: BoundaryCurve,
  end: {
    readonly vapourFraction?: string;
    readonly solidFraction?: string;
    readonly heat?: string;
  },
  { T, p }: { readonly T: number; readonly p: number },
): { readonly share: number | null; readonly heat: number | null } {
  const fraction = fractionOf(env, end);
  if (fraction && !bears(fraction.of)(curve))
    throw new StepFailure({ code: 'noSuchPhase', fraction: fraction.of, T, p });
  return {
    share: fraction && secondShare(fraction.of, fraction.value),
    heat: end.heat === undefined ? null : siOf(env, end.heat, 'specificEnergy'),
  };
}
