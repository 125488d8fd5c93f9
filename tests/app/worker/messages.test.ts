import { describe, expect, it } from 'vitest';
import { readSheet } from '../../../core/sheet/read.ts';
import type { Results } from '../../../core/sheet/results.ts';
import type { Sheet } from '../../../core/sheet/schema.ts';
import { shared } from '../../../app/shared.ts';
import { evaluateSheet } from '../../../app/worker/evaluateSheet.ts';
import { changesBetween, withChanges } from '../../../app/worker/messages.ts';
import { heavySheet } from '../../benchmarks/heavySheet.ts';

const heavy = (): Sheet => {
  const read = readSheet(heavySheet());
  if (!read.ok) throw new Error(JSON.stringify(read.issues));
  return read.sheet;
};

/** The sheet with one state moved, all other objects the same. */
const moved = (sheet: Sheet, id: string, T: string): Sheet => ({
  ...sheet,
  items: sheet.items.map((item) => (item.id === id ? { ...item, T } : item)),
});

/** The sheet with the end of one step moved. */
const bent = (sheet: Sheet, id: string, step: string, T: string): Sheet => ({
  ...sheet,
  items: sheet.items.map((item) =>
    item.id === id && item.kind === 'path'
      ? {
          ...item,
          steps: item.steps.map((s) => (s.id === step ? ({ ...s, end: { T } } as typeof s) : s)),
        }
      : item,
  ),
});

describe('what the worker sends', () => {
  it('builds the same results on the page, step by step', async () => {
    let sheet: Sheet | null = null;
    let inWorker: Results | null = null;
    let onPage: Results | null = null;
    const first = heavy();
    const { items } = first;
    const edits = [
      first,
      moved(first, 'state-3', '71.5 °C'),
      bent(first, 'path-0', 's0', '64 °C'),
      bent(first, 'path-2', 's8', '120 °C'),
      { ...first, items: items.slice(3) },
      { ...first, items: [...items.slice(10), ...items.slice(0, 10)] },
      { ...first, sites: [{ ...first.sites[0]!, altitude: '1900 m' }] },
    ];
    for (const edit of edits) {
      sheet = shared(sheet, structuredClone(edit));
      const results: Results = shared(inWorker, await evaluateSheet(sheet));
      const changes = structuredClone(changesBetween(inWorker, results));
      inWorker = results;
      onPage = withChanges(onPage, changes);
      expect(onPage).toEqual(results);
      // What evaluation kept from an edit before is what it makes of the sheet by itself.
      expect(onPage).toEqual(await evaluateSheet(structuredClone(edit)));
    }
  });

  it('sends of a moved state little else, and the page keeps the rest as it was', async () => {
    const sheet = heavy();
    const last = await evaluateSheet(sheet);
    const next = shared(last, await evaluateSheet(moved(sheet, 'state-3', '71.5 °C')));
    const changes = changesBetween(last, next);
    expect(changes.lists.states!.changed.map(({ id }) => id)).toEqual(['state-3']);
    expect(changes.lists.paths!.changed).toEqual([]);
    expect(JSON.stringify(changes).length).toBeLessThan(0.02 * JSON.stringify(next).length);
    const page = withChanges(last, structuredClone(changes));
    expect(page.paths).toBe(last.paths);
    expect(page.maps[0]!.boundaries).toBe(last.maps[0]!.boundaries);
    expect(page.states.filter((s, i) => s !== last.states[i]).map(({ id }) => id)).toEqual([
      'state-3',
    ]);
  });
});
