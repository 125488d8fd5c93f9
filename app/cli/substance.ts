import { medium, type Medium } from '../../core/equilibrium/medium.ts';
import { catalogue, findSubstances, type CatalogueEntry } from '../../core/substances/catalogue.ts';
import { en as words } from '../words/en.ts';
import { Refusal } from './refusal.ts';

const subscripts = '₀₁₂₃₄₅₆₇₈₉';
const key = (text: string): string =>
  text
    .toLowerCase()
    .replace(/[₀-₉]/g, (d) => String(subscripts.indexOf(d)))
    .replace(/[\s_-]+/g, '');

const answersTo = (entry: CatalogueEntry, word: string): boolean =>
  [entry.id, ...entry.names, entry.formula, entry.cas, entry.refrigerant ?? entry.id].some(
    (name) => key(name) === key(word),
  );

/**
 * The substance that a word names by its id, name, formula, CAS number or ISO 817 number, loaded.
 *
 * A part of a name is never taken for the name, not even where one substance alone holds it: "CO" is
 * not CO2. Throws Refusal with the candidates, or with all there is.
 */
export async function substanceNamed(word: string | undefined): Promise<Medium> {
  const { terminal } = words;
  const all = catalogue.map(({ id }) => id);
  if (word === undefined) throw new Refusal(terminal.substanceMissing(all));
  const found = findSubstances(word);
  const [only] = found;
  if (only && found.length === 1 && answersTo(only, word)) return medium(await only.load());
  if (!only) throw new Refusal(terminal.unknownSubstance(word, all));
  throw new Refusal(
    terminal.whichSubstance(
      word,
      found.map(({ id, formula }) => `${id} (${formula})`),
    ),
  );
}
