import { evaluate } from '../../core/sheet/evaluate.ts';
import type { Results } from '../../core/sheet/results.ts';
import type { Sheet } from '../../core/sheet/schema.ts';
import { loadSubstance } from '../../core/substances/catalogue.ts';
import type { Substance } from '../../core/substances/substance.ts';
import { frameOf } from '../figure/page.ts';
import { en } from '../words/en.ts';

const loaded = new Map<string, Substance>();

/** Results of a sheet, its substances loaded first and kept. Throws for a substance not known. */
export async function evaluateSheet(sheet: Sheet): Promise<Results> {
  for (const id of sheet.substances) {
    if (loaded.has(id)) continue;
    const substance = await loadSubstance(id);
    if (!substance) throw new RangeError(`no such substance: ${id}`);
    loaded.set(id, substance);
  }
  return evaluate(sheet, loaded, frameOf(sheet, en));
}
