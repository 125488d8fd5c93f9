import { readdirSync, readFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { evaluate, type FrameOf } from '../../../core/sheet/evaluate.ts';
import { readSheet } from '../../../core/sheet/read.ts';
import type { Results } from '../../../core/sheet/results.ts';
import type { Sheet } from '../../../core/sheet/schema.ts';
import { catalogue, loadSubstance } from '../../../core/substances/catalogue.ts';
import type { Substance } from '../../../core/substances/substance.ts';

const folder = join(dirname(fileURLToPath(import.meta.url)), '../../../public/demos');

/** The demo sheets as their files hold them, by name. */
export const demos: readonly (readonly [name: string, data: Record<string, unknown>])[] =
  readdirSync(folder)
    .filter((name) => name.endsWith('.json'))
    .sort()
    .map((name) => [
      name.replace('.json', ''),
      JSON.parse(readFileSync(join(folder, name), 'utf8')) as Record<string, unknown>,
    ]);

export const demo = (name: string): Record<string, unknown> =>
  structuredClone(demos.find(([known]) => known === name)![1]);

/** A sheet that must read. */
export function sheetOf(data: unknown): Sheet {
  const read = readSheet(data);
  if (!read.ok) throw new Error(JSON.stringify(read.issues));
  return read.sheet;
}

export const substances: ReadonlyMap<string, Substance> = new Map(
  await Promise.all(catalogue.map(async ({ id }) => [id, (await loadSubstance(id))!] as const)),
);

export const someFrame: FrameOf = () => ({ width: 150, height: 100 });

export const resultsOf = (data: unknown): Results => evaluate(sheetOf(data), substances, someFrame);

const main = {
  id: 'main',
  page: { width: '190 mm', height: '130 mm' },
  temperature: { unit: '°C', scale: 'linear', range: ['-20 °C', '200 °C'] },
  pressure: { unit: 'kPa', kind: 'absolute', scale: 'linear', range: ['0 kPa(a)', '900 kPa(a)'] },
  second: null,
  fields: 'faint',
  colours: 'colour',
  hidden: [],
  labelOffsets: {},
};

/** A sheet of water with given sites and states; ids and tags are filled in. */
export const waterSheet = (
  items: readonly Record<string, unknown>[],
  sites: readonly Record<string, unknown>[] = [],
  change: Record<string, unknown> = {},
): Record<string, unknown> => ({
  version: 1,
  made: { tool: '0.1.0', formulations: {} },
  title: 'trial',
  pressureKind: 'gauge',
  substances: ['water'],
  sites: sites.map((site, i) => ({ id: `site-${i + 1}`, name: `Site ${i + 1}`, ...site })),
  items: items.map((item, i) => ({ id: `s${i + 1}`, tag: `${i + 1}`, kind: 'state', ...item })),
  views: [structuredClone(main)],
  data: {},
  ...change,
});

/** Where in a value a number is NaN or not finite. */
export function notNumbers(value: unknown, place = ''): readonly string[] {
  if (typeof value === 'number') return Number.isFinite(value) ? [] : [`${place} = ${value}`];
  if (Array.isArray(value)) return value.flatMap((x, i) => notNumbers(x, `${place}[${i}]`));
  if (typeof value === 'object' && value !== null)
    return Object.entries(value).flatMap(([key, x]) => notNumbers(x, `${place}.${key}`));
  return [];
}

export function deepFreeze<T>(value: T): T {
  if (typeof value === 'object' && value !== null && !Object.isFrozen(value)) {
    Object.freeze(value);
    Object.values(value).forEach(deepFreeze);
  }
  return value;
}
