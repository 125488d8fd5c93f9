import { readdirSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import { catalogue, findSubstances, loadSubstance } from '../../../core/substances/catalogue.ts';

const folder = join(dirname(fileURLToPath(import.meta.url)), '../../../core/substances');

/** The last figure of a CAS number: the others from the right times 1, 2, 3 …, modulo 10 (CAS rule). */
function checkDigit(cas: string): number {
  const figures = cas.replace(/-/g, '').slice(0, -1).split('').reverse();
  return figures.reduce((sum, figure, i) => sum + Number(figure) * (i + 1), 0) % 10;
}

const ids = (word: string): readonly string[] => findSubstances(word).map(({ id }) => id);

describe('catalogue', () => {
  it('has an entry for each substance file, and no other', () => {
    const files = readdirSync(folder)
      .filter((name) => !['catalogue.ts', 'substance.ts'].includes(name))
      .map((name) => name.replace(/\.ts$/, ''));
    expect(catalogue.map(({ id }) => id).toSorted()).toEqual(files.toSorted());
  });

  it.each(catalogue.map((entry) => [entry.id, entry] as const))(
    'says of %s what its file says',
    async (id, entry) => {
      const substance = await entry.load();
      expect(substance.id).toBe(id);
      expect(entry.names).toEqual([substance.name, ...substance.otherNames]);
      expect(entry.formula).toBe(substance.formula);
      expect(entry.cas).toBe(substance.cas);
      expect(entry.refrigerant).toBe(substance.refrigerant);
      expect(await loadSubstance(id)).toBe(substance);
    },
  );

  it.each(catalogue.map(({ id, cas }) => [id, cas] as const))(
    'has for %s a CAS number with a right last figure: %s',
    (_, cas) => {
      expect(cas).toMatch(/^[1-9]\d{1,6}-\d\d-\d$/);
      expect(Number(cas.at(-1))).toBe(checkDigit(cas));
    },
  );

  it('has ids, CAS numbers and names once', () => {
    for (const all of [
      catalogue.map(({ id }) => id),
      catalogue.map(({ cas }) => cas),
      catalogue.flatMap(({ names }) => names),
    ])
      expect(new Set(all).size).toBe(all.length);
  });
});

describe('findSubstances', () => {
  // Designations: ISO 817:2014, R-718 and R-744; CAS 7732-18-5 and 124-38-9 (recalled).
  it.each([
    ['water', 'water'],
    ['  Steam ', 'water'],
    ['ICE', 'water'],
    ['H2O', 'water'],
    ['h₂o', 'water'],
    ['7732-18-5', 'water'],
    ['R-718', 'water'],
    ['R718', 'water'],
    ['r 718', 'water'],
    ['carbon dioxide', 'carbon-dioxide'],
    ['carbon-dioxide', 'carbon-dioxide'],
    ['Carbon_Dioxide', 'carbon-dioxide'],
    ['carbondioxide', 'carbon-dioxide'],
    ['dry ice', 'carbon-dioxide'],
    ['CO2', 'carbon-dioxide'],
    ['CO₂', 'carbon-dioxide'],
    ['124-38-9', 'carbon-dioxide'],
    ['124–38–9', 'carbon-dioxide'],
    ['R744', 'carbon-dioxide'],
    ['diox', 'carbon-dioxide'],
  ])('findSubstances(%j) is %s alone', (word, id) => {
    expect(ids(word)).toEqual([id]);
  });

  it('an exact answer stands alone although other names hold the word', () => {
    expect(ids('ice')).toEqual(['water']);
  });

  it('a word that several hold gives them all', () => {
    expect(ids('r-7')).toEqual(['water', 'carbon-dioxide']);
    expect(ids('i')).toEqual(['water', 'carbon-dioxide']);
  });

  it.each(['', '   ', 'unobtainium', 'H2SO4', 'R-12', '-', '999-99-9', '*', '.*'])(
    'findSubstances(%j) is empty',
    (word) => {
      expect(ids(word)).toEqual([]);
    },
  );
});

describe('loadSubstance', () => {
  it.each(['', 'Water', 'steam', '__proto__', 'toString'])(
    'loadSubstance(%j) is null: only a catalogue id loads',
    async (id) => {
      expect(await loadSubstance(id)).toBeNull();
    },
  );
});
