import type { Substance } from './substance.ts';

/** What is known of a substance before its equations are loaded. */
export interface CatalogueEntry {
  readonly id: string;
  readonly names: readonly string[];
  readonly formula: string;
  readonly cas: string;
  readonly refrigerant: string | null;
  readonly load: () => Promise<Substance>;
}

/** Every substance, one line each. */
export const catalogue: readonly CatalogueEntry[] = [
  {
    id: 'water',
    names: ['water', 'steam', 'ice'],
    formula: 'H2O',
    cas: '7732-18-5',
    refrigerant: 'R-718',
    load: async () => (await import('./water.ts')).water,
  },
  {
    id: 'carbon-dioxide',
    names: ['carbon dioxide', 'dry ice', 'carbonic acid gas'],
    formula: 'CO2',
    cas: '124-38-9',
    refrigerant: 'R-744',
    load: async () => (await import('./carbon-dioxide.ts')).carbonDioxide,
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

/**
 * Entries that answer to a word: catalogue id, name, formula, CAS number or ISO 817 designation.
 * An exact answer stands alone; else every entry that holds the word.
 */
export function findSubstances(word: string): readonly CatalogueEntry[] {
  const wanted = plain(word);
  if (wanted === '') return [];
  const keys = (e: CatalogueEntry): string[] =>
    [e.id, ...e.names, e.formula, e.cas, ...(e.refrigerant ? [e.refrigerant] : [])].map(plain);
  const squeezed = wanted.replace(/ /g, '');
  const exact = catalogue.filter((e) => keys(e).some((k) => k.replace(/ /g, '') === squeezed));
  return exact.length > 0
    ? exact
    : catalogue.filter((e) => keys(e).some((k) => k.includes(wanted)));
}

/** The substance with a catalogue id, loaded; null where the catalogue has none. */
export async function loadSubstance(id: string): Promise<Substance | null> {
  return (await catalogue.find((e) => e.id === id)?.load()) ?? null;
}
