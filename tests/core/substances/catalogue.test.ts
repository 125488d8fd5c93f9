import { readdirSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { describe, expect, it } from 'vitest';
import {
  blendNamed,
  catalogue,
  findSubstances,
  loadSubstance,
} from '../../../core/substances/catalogue.ts';

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
      .filter((name) => !['catalogue.ts', 'substance.ts', 'checks'].includes(name))
      .map((name) => name.replace(/\.ts$/, ''));
    expect(catalogue.map(({ id }) => id).toSorted()).toEqual(files.toSorted());
  });

  it('has a file of published values for each substance, and no other', () => {
    const files = readdirSync(join(folder, 'checks')).map((name) => name.replace(/\.json$/, ''));
    expect(files.toSorted()).toEqual(catalogue.map(({ id }) => id).toSorted());
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

  it('has ids and names once, CAS numbers too but for another formulation', () => {
    const own = catalogue.filter(({ insteadOf }) => insteadOf === undefined);
    for (const all of [
      catalogue.map(({ id }) => id),
      own.map(({ cas }) => cas),
      own.flatMap(({ refrigerant }) => refrigerant ?? []),
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
    // ISO 817 designations and CAS numbers of the common refrigerants: recalled.
    ['R-717', 'ammonia'],
    ['r717', 'ammonia'],
    ['7664-41-7', 'ammonia'],
    ['NH3', 'ammonia'],
    ['NH₃', 'ammonia'],
    ['Ammonia', 'ammonia'],
    ['ammonia-1993', 'ammonia-1993'],
    ['R290', 'propane'],
    ['R-600a', 'isobutane'],
    ['R-600', 'n-butane'],
    ['R134a', 'r134a'],
    ['r-1234yf', 'r1234yf'],
    ['R-1234ze(E)', 'r1234ze-e'],
    ['R1234ze', 'r1234ze-e'],
    ['ethyl alcohol', 'ethanol'],
    ['R-728', 'nitrogen'],
    ['R-740', 'argon'],
    ['O2', 'oxygen'],
    ['R-50', 'methane'],
  ])('findSubstances(%j) is %s alone', (word, id) => {
    expect(ids(word)).toEqual([id]);
  });

  it('an exact answer stands alone although other names hold the word', () => {
    expect(ids('ice')).toEqual(['water']);
  });

  it('a word that several hold gives them all', () => {
    const seven = ['water', 'carbon-dioxide', 'ammonia', 'ammonia-1993'];
    expect(ids('r-7')).toEqual([...seven, 'nitrogen', 'oxygen', 'argon']);
    expect(ids('butane')).toEqual(['isobutane', 'n-butane']);
    expect(ids('C4H10')).toEqual(['isobutane', 'n-butane']);
    expect(ids('C3H2F4')).toEqual(['r1234yf', 'r1234ze-e']);
    expect(ids('ammon')).toEqual(['ammonia', 'ammonia-1993']);
  });

  it.each(['', '   ', 'unobtainium', 'H2SO4', 'R-22', '-', '999-99-9', '*', '.*'])(
    'findSubstances(%j) is empty',
    (word) => {
      expect(ids(word)).toEqual([]);
    },
  );
});

describe('blendNamed', () => {
  // Series of ISO 817: 400 zeotropic, 500 azeotropic (recalled).
  it.each(['R-404A', 'r407c', 'R 410A', 'R-449A', 'R-448A', '404A', 'air', 'LPG', 'Natural gas'])(
    'blendNamed(%j) boils over a range',
    (word) => {
      expect(blendNamed(word)).toBe('boils over a range');
    },
  );
  it.each(['R-507A', 'R-502', 'R513A'])('blendNamed(%j) is an azeotrope', (word) => {
    expect(blendNamed(word)).toBe('azeotrope');
  });
  it('is null for every name, number and formula of the catalogue', () => {
    for (const { id, names, formula, cas, refrigerant } of catalogue)
      for (const word of [id, ...names, formula, cas, refrigerant ?? id])
        expect(blendNamed(word)).toBeNull();
    for (const word of ['', 'R-22', 'R-4', 'hair', '450']) expect(blendNamed(word)).toBeNull();
  });
});

describe('loadSubstance', () => {
  it.each(['', 'Water', 'steam', '__proto__', 'toString'])(
    'loadSubstance(%j) is null: only a catalogue id loads',
    async (id) => {
      expect(await loadSubstance(id)).toBeNull();
    },
  );
});
