import type { Hazard } from '../substances/substance.ts';
import type { Caution, CautionCode, Judged } from './caution.ts';

type Rule = readonly [
  code: CautionCode,
  applies: (j: Judged) => boolean,
  number: (j: Judged) => readonly [name: string, value: number],
  worst: 'high' | 'low',
];

/** A hazard that needs no threshold: it stands wherever the substance does. */
const always = (code: CautionCode & Hazard): Rule => [
  code,
  (j) => j.hazards.includes(code),
  (j) => ['T', j.T],
  'low',
];

/**
 * One rule a line: when a state calls for a caution and the number to show. Thresholds are common
 * practice, no source, and set low on purpose; a caution defers to codes, ratings and people.
 */
const rules: readonly Rule[] = [
  // Many codes take vessels above about half a bar of gauge pressure in.
  [
    'pressure vessel',
    (j) => j.p > j.local + 50e3 && j.p < 100e6,
    (j) => ['gauge', j.p - j.local],
    'high',
  ],
  ['high pressure', (j) => j.p >= 100e6, (j) => ['p', j.p], 'high'],
  ['scald', (j) => j.hazards.includes('scald') && j.T > 323.15, (j) => ['T', j.T], 'high'],
  ['vacuum', (j) => j.p < j.local - 10e3, (j) => ['p', j.p], 'low'],
  always('asphyxiation'),
  always('displaces air'),
  always('toxic'),
  always('flammable'),
  always('mildly flammable'),
  always('toxic in fire'),
  always('oxidiser'),
  // What is named cryogenic is colder than −90 °C where it is liquid under the pressures of a plant.
  ['cryogenic', (j) => j.hazards.includes('cryogenic') && j.T < 183.15, (j) => ['T', j.T], 'low'],
  ['cold burn', (j) => j.hazards.includes('cold burn') && j.T < 273.15, (j) => ['T', j.T], 'low'],
  [
    'dry ice blocks lines',
    (j) =>
      j.hazards.includes('dry ice blocks lines') &&
      (j.solid || j.p <= j.triplePressure * 1.2) &&
      j.T < 263.15,
    (j) => ['triplePressure', j.triplePressure],
    'low',
  ],
];

/** The cautions that a set of states calls for, each once, with where it stands and its worst number. */
export function cautions(states: readonly Judged[]): readonly Caution[] {
  const found: Caution[] = [{ code: 'equilibrium lines', at: [], numbers: {} }];
  for (const [code, applies, number, worst] of rules) {
    const met = states.filter(applies);
    if (met.length === 0) continue;
    const values = met.map((j) => number(j)[1]);
    const [name] = number(met[0]!);
    found.push({
      code,
      at: [...new Set(met.map((j) => j.id))],
      numbers: { [name]: worst === 'high' ? Math.max(...values) : Math.min(...values) },
    });
  }
  return found;
}
