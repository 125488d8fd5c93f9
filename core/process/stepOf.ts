import type * as v from 'valibot';

type DeepReadonly<T> = T extends object ? { readonly [K in keyof T]: DeepReadonly<T[K]> } : T;

/** The step that a schema reads. */
export type StepOf<Schema extends v.GenericSchema> = DeepReadonly<v.InferOutput<Schema>>;
