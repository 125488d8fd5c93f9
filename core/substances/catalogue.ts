import type { Checks, Substance } from './substance.ts';

/** What is known of a substance before its equations are loaded. */
export interface CatalogueEntry {
  readonly id: string;
  readonly names: readonly string[];
  readonly formula: string;
  readonly cas: string;
  readonly refrigerant: string | null;
  /** Another formulation of the entry with this id, which answers in its stead to all but its own id. */
  readonly insteadOf?: string;
  readonly load: () => Promise<Substance>;
  /** Values that its sources print, to be computed again. */
  readonly checks: () => Promise<Checks>;
}

/** Every substance, one entry each; equations and checks are loaded when they are asked for. */
export const catalogue: readonly CatalogueEntry[] = [
  {
    id: 'water',
    names: ['water', 'steam', 'ice'],
    formula: 'H2O',
    cas: '7732-18-5',
    refrigerant: 'R-718',
    load: async () => (await import('./water.ts')).water,
    checks: async () => (await import('./checks/water.json', { with: { type: 'json' } })).default,
  },
  {
    id: 'carbon-dioxide',
    names: ['carbon dioxide', 'dry ice', 'carbonic acid gas'],
    formula: 'CO2',
    cas: '124-38-9',
    refrigerant: 'R-744',
    load: async () => (await import('./carbon-dioxide.ts')).carbonDioxide,
    checks: async () =>
      (await import('./checks/carbon-dioxide.json', { with: { type: 'json' } })).default,
  },
  {
    id: 'ammonia',
    names: ['ammonia', 'anhydrous ammonia'],
    formula: 'NH3',
    cas: '7664-41-7',
    refrigerant: 'R-717',
    load: async () => (await import('./ammonia.ts')).ammonia,
    checks: async () => (await import('./checks/ammonia.json', { with: { type: 'json' } })).default,
  },
  {
    id: 'ammonia-1993',
    names: ['ammonia, 1993 formulation'],
    formula: 'NH3',
    cas: '7664-41-7',
    refrigerant: 'R-717',
    insteadOf: 'ammonia',
    load: async () => (await import('./ammonia-1993.ts')).ammonia1993,
    checks: async () =>
      (await import('./checks/ammonia-1993.json', { with: { type: 'json' } })).default,
  },
  {
    id: 'propane',
    names: ['propane'],
    formula: 'C3H8',
    cas: '74-98-6',
    refrigerant: 'R-290',
    load: async () => (await import('./propane.ts')).propane,
    checks: async () => (await import('./checks/propane.json', { with: { type: 'json' } })).default,
  },
  {
    id: 'isobutane',
    names: ['isobutane', '2-methylpropane'],
    formula: 'C4H10',
    cas: '75-28-5',
    refrigerant: 'R-600a',
    load: async () => (await import('./isobutane.ts')).isobutane,
    checks: async () =>
      (await import('./checks/isobutane.json', { with: { type: 'json' } })).default,
  },
  {
    id: 'n-butane',
    names: ['n-butane'],
    formula: 'C4H10',
    cas: '106-97-8',
    refrigerant: 'R-600',
    load: async () => (await import('./n-butane.ts')).nButane,
    checks: async () =>
      (await import('./checks/n-butane.json', { with: { type: 'json' } })).default,
  },
  {
    id: 'r134a',
    names: ['R-134a', '1,1,1,2-tetrafluoroethane', 'HFC-134a'],
    formula: 'C2H2F4',
    cas: '811-97-2',
    refrigerant: 'R-134a',
    load: async () => (await import('./r134a.ts')).r134a,
    checks: async () => (await import('./checks/r134a.json', { with: { type: 'json' } })).default,
  },
  {
    id: 'r1234yf',
    names: ['R-1234yf', '2,3,3,3-tetrafluoropropene', 'HFO-1234yf'],
    formula: 'C3H2F4',
    cas: '754-12-1',
    refrigerant: 'R-1234yf',
    load: async () => (await import('./r1234yf.ts')).r1234yf,
    checks: async () => (await import('./checks/r1234yf.json', { with: { type: 'json' } })).default,
  },
  {
    id: 'r1234ze-e',
    names: ['R-1234ze(E)', 'trans-1,3,3,3-tetrafluoropropene', 'HFO-1234ze(E)'],
    formula: 'C3H2F4',
    cas: '29118-24-9',
    refrigerant: 'R-1234ze(E)',
    load: async () => (await import('./r1234ze-e.ts')).r1234zeE,
    checks: async () =>
      (await import('./checks/r1234ze-e.json', { with: { type: 'json' } })).default,
  },
  {
    id: 'ethanol',
    names: ['ethanol', 'ethyl alcohol'],
    formula: 'C2H6O',
    cas: '64-17-5',
    refrigerant: null,
    load: async () => (await import('./ethanol.ts')).ethanol,
    checks: async () => (await import('./checks/ethanol.json', { with: { type: 'json' } })).default,
  },
  {
    id: 'nitrogen',
    names: ['nitrogen', 'liquid nitrogen'],
    formula: 'N2',
    cas: '7727-37-9',
    refrigerant: 'R-728',
    load: async () => (await import('./nitrogen.ts')).nitrogen,
    checks: async () =>
      (await import('./checks/nitrogen.json', { with: { type: 'json' } })).default,
  },
  {
    id: 'oxygen',
    names: ['oxygen', 'liquid oxygen'],
    formula: 'O2',
    cas: '7782-44-7',
    refrigerant: 'R-732',
    load: async () => (await import('./oxygen.ts')).oxygen,
    checks: async () => (await import('./checks/oxygen.json', { with: { type: 'json' } })).default,
  },
  {
    id: 'argon',
    names: ['argon', 'liquid argon'],
    formula: 'Ar',
    cas: '7440-37-1',
    refrigerant: 'R-740',
    load: async () => (await import('./argon.ts')).argon,
    checks: async () => (await import('./checks/argon.json', { with: { type: 'json' } })).default,
  },
  {
    id: 'methane',
    names: ['methane', 'liquid methane'],
    formula: 'CH4',
    cas: '74-82-8',
    refrigerant: 'R-50',
    load: async () => (await import('./methane.ts')).methane,
    checks: async () => (await import('./checks/methane.json', { with: { type: 'json' } })).default,
  },
];

const subscripts = '₀₁₂₃₄₅₆₇₈₉';
const plain = (text: string): string =>
  text
    .toLowerCase()
    .replace(/[₀-₉]/g, (d) => String(subscripts.indexOf(d)))
    // Dashes of every length, as word processors make them of a hyphen.
    .replace(/[\s_\-\u2010-\u2015\u2212]+/g, ' ')
    .trim();
const squeezed = (text: string): string => plain(text).replace(/ /g, '');

const keys = (e: CatalogueEntry): readonly string[] => [
  e.id,
  ...e.names,
  e.formula,
  e.cas,
  ...(e.refrigerant ? [e.refrigerant] : []),
];

/** Whether a word is the entry's id, name, formula, CAS number or ISO 817 designation, whole. */
export const answersTo = (e: CatalogueEntry, word: string): boolean =>
  (e.insteadOf ? [e.id, ...e.names] : keys(e)).some((key) => squeezed(key) === squeezed(word));

/**
 * Entries that answer to a word: catalogue id, name, formula, CAS number or ISO 817 designation.
 * Whole answers stand alone; else every entry that holds the word.
 */
export function findSubstances(word: string): readonly CatalogueEntry[] {
  const wanted = plain(word);
  if (wanted === '') return [];
  const whole = catalogue.filter((e) => answersTo(e, word));
  return whole.length > 0
    ? whole
    : catalogue.filter((e) => keys(e).some((key) => plain(key).includes(wanted)));
}

/** Why a blend is no substance of this catalogue, a code that app/words spells out. */
export type BlendReason = 'boils over a range' | 'azeotrope';

/** Mixtures that people ask for by name; refrigerant blends are known by their numbers. */
const mixtures: readonly string[] = [
  'air',
  'liquid air',
  'LPG',
  'liquefied petroleum gas',
  'natural gas',
  'LNG',
  'liquefied natural gas',
  'biogas',
];

/**
 * Whether a word names a blend, and of which kind; null for anything else.
 *
 * Source: ISO 817 numbers zeotropic blends and azeotropic ones.
 */
export function blendNamed(word: string): BlendReason | null {
  const asked = squeezed(word);
  if (mixtures.some((name) => squeezed(name) === asked)) return 'boils over a range';
  const [, series] = /^(?:r(?=[45]\d\d)|(?=\d{3}[a-z]))([45])\d\d[a-z]?$/.exec(asked) ?? [];
  return series === '4' ? 'boils over a range' : series === '5' ? 'azeotrope' : null;
}

/** The substance with a catalogue id, loaded; null where the catalogue has none. */
export async function loadSubstance(id: string): Promise<Substance | null> {
  return (await catalogue.find((e) => e.id === id)?.load()) ?? null;
}
