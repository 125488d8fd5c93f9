import * as v from 'valibot';
import { startSchema } from '../process/path.ts';
import { stepSchema } from '../process/steps/index.ts';

/** Bounds on what a sheet may hold; far above any real one. */
export const limits = {
  items: 500,
  steps: 200,
  sites: 50,
  views: 20,
  text: 2000,
  name: 200,
} as const;

const id = v.pipe(v.string(), v.regex(/^[a-z0-9][a-z0-9-]{0,63}$/));
const name = v.pipe(v.string(), v.maxLength(limits.name));
/** A quantity as it was given, canonical: "2.5 bar(g)". */
const reading = v.pipe(v.string(), v.minLength(1), v.maxLength(64));
const millimetres = v.pipe(v.number(), v.finite());

export const siteSchema = v.strictObject({
  id,
  name,
  /** Either of the two; a barometer wins. Without both the standard atmosphere stands. */
  altitude: v.optional(reading),
  barometer: v.optional(reading),
  /** Limits of error of the local pressure. */
  barometerError: v.optional(reading),
  /** Gauge by class and ends of its scale, or by its limits of error. */
  gauge: v.optional(
    v.union([
      v.strictObject({
        class: v.picklist([0.1, 0.25, 0.6, 1, 1.6, 2.5, 4]),
        low: reading,
        high: reading,
      }),
      v.strictObject({ plusMinus: reading }),
    ]),
  ),
  probe: v.optional(reading),
});

const item = {
  id,
  /** Shown number or letter, apart from the permanent id. */
  tag: v.pipe(v.string(), v.minLength(1), v.maxLength(8)),
  name: v.optional(name),
  substance: v.optional(id),
  site: v.optional(id),
};

export const stateSchema = v.strictObject({
  ...item,
  kind: v.literal('state'),
  T: v.optional(reading),
  p: v.optional(reading),
  vapourFraction: v.optional(reading),
});

/** A planned run: its states are shown A1, A2, …; each step's id is permanent within the path. */
export const pathSchema = v.strictObject({
  ...item,
  kind: v.literal('path'),
  start: startSchema,
  steps: v.pipe(v.array(stepSchema), v.maxLength(limits.steps)),
});

export const itemSchema = v.variant('kind', [stateSchema, pathSchema]);

const range = v.nullable(v.strictTuple([reading, reading]));

export const viewSchema = v.strictObject({
  id,
  name: v.optional(name),
  substance: v.optional(id),
  page: v.strictObject({ width: reading, height: reading }),
  temperature: v.strictObject({
    unit: v.picklist(['°C', 'K', '°F']),
    scale: v.picklist(['linear', 'reciprocal']),
    /** null: as the run needs. */
    range,
  }),
  pressure: v.strictObject({
    unit: v.string(),
    kind: v.picklist(['absolute', 'gauge']),
    site: v.optional(id),
    scale: v.picklist(['linear', 'logarithmic']),
    range,
  }),
  second: v.nullable(
    v.strictObject({
      unit: v.string(),
      kind: v.picklist(['absolute', 'gauge']),
      site: v.optional(id),
    }),
  ),
  fields: v.picklist(['faint', 'full', 'none']),
  colours: v.picklist(['colour', 'grey', 'black']),
  hidden: v.array(v.pipe(v.string(), v.maxLength(80))),
  /** Where the user moved labels, in mm from where they would stand. */
  labelOffsets: v.record(
    v.pipe(v.string(), v.maxLength(80)),
    v.strictTuple([millimetres, millimetres]),
  ),
});

/** Sheet version 1: what the user says. Quantities are kept as given; nothing derived is stored. */
export const sheetSchema = v.strictObject({
  version: v.literal(1),
  /** Tool version and formulations that the sheet was last saved with. */
  made: v.strictObject({
    tool: name,
    formulations: v.record(id, name),
  }),
  title: name,
  /** What a pressure without a kind means on this sheet. */
  pressureKind: v.picklist(['gauge', 'absolute']),
  substances: v.pipe(v.array(id), v.minLength(1), v.maxLength(20)),
  sites: v.pipe(v.array(siteSchema), v.maxLength(limits.sites)),
  items: v.pipe(v.array(itemSchema), v.maxLength(limits.items)),
  views: v.pipe(v.array(viewSchema), v.minLength(1), v.maxLength(limits.views)),
  /** Big columns once, under their content hash. */
  data: v.record(v.pipe(v.string(), v.maxLength(80)), v.array(v.pipe(v.number(), v.finite()))),
});

type DeepReadonly<T> = T extends object ? { readonly [K in keyof T]: DeepReadonly<T[K]> } : T;

export type Sheet = DeepReadonly<v.InferOutput<typeof sheetSchema>>;
export type Site = DeepReadonly<v.InferOutput<typeof siteSchema>>;
export type StateItem = DeepReadonly<v.InferOutput<typeof stateSchema>>;
export type PathItem = DeepReadonly<v.InferOutput<typeof pathSchema>>;
export type Item = DeepReadonly<v.InferOutput<typeof itemSchema>>;
export type View = DeepReadonly<v.InferOutput<typeof viewSchema>>;
