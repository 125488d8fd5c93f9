import { evaluate } from '../../core/sheet/evaluate.ts';
import type { Results } from '../../core/sheet/results.ts';
import type { Sheet } from '../../core/sheet/schema.ts';
import { loadSubstance } from '../../core/substances/catalogue.ts';
import type { Substance } from '../../core/substances/substance.ts';
import { frameOf } from '../figure/page.ts';
import { en } from '../words/en.ts';

const loaded = new Map<string, Substance>();

/** A substance that has been loaded on this thread already, else undefined. */
export const loadedSubstance = (id: string): Substance | undefined => loaded.get(id);

/** Loads a substance once; null where the catalogue has none. */
export async function substanceOf(id: string): Promise<Substance | null> {
  const ready = loaded.get(id);
  if (ready) return ready;
  const substance = await loadSubstance(id);
  if (substance) loaded.set(id, substance);
  return substance;
}

/** Results of a sheet, its substances loaded first and kept. Throws for a substance not known. */
export async function evaluateSheet(sheet: Sheet): Promise<Results> {
  for (const id of sheet.substances) {
    if (!(await substanceOf(id))) throw new RangeError(`no such substance: ${id}`);
  }
  return evaluate(sheet, loaded, frameOf(sheet, en));
}
