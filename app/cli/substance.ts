import { medium, type Medium } from '../../core/equilibrium/medium.ts';
import {
  answersTo,
  blendNamed,
  catalogue,
  findSubstances,
} from '../../core/substances/catalogue.ts';
import { en as words } from '../words/en.ts';
import { Refusal } from './refusal.ts';

/**
 * The substance that a word names by its id, name, formula, CAS number or ISO 817 number, loaded.
 *
 * A part of a name is never taken for the name, not even where one substance alone holds it: "CO" is
 * not CO2. Throws Refusal with the candidates, with all there is, or with why a blend has no place here.
 */
export async function substanceNamed(word: string | undefined): Promise<Medium> {
  const { terminal } = words;
  const all = catalogue.map(({ id }) => id);
  if (word === undefined) throw new Refusal(terminal.substanceMissing(all));
  const blend = blendNamed(word);
  if (blend) throw new Refusal(words.blend(word, blend));
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
