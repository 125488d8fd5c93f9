import type { Results } from '../../core/sheet/results.ts';
import type { Sheet } from '../../core/sheet/schema.ts';
import { shared } from '../shared.ts';

/** What the page asks of the worker; a newer request makes older ones void. */
export interface Request {
  readonly id: number;
  readonly sheet: Sheet;
}

type Entry = Readonly<Record<string, unknown>>;

/** Keyed parts of results; what did not change is not sent again. */
export interface Changes {
  /** For each list, ids in order and, of the entries that changed since the last answer, the changed fields. */
  readonly lists: Readonly<
    Record<string, { readonly order: readonly string[]; readonly changed: readonly Entry[] }>
  >;
  readonly rest: Readonly<Record<string, unknown>>;
}

export type Answer =
  | { readonly id: number; readonly ok: true; readonly changes: Changes; readonly ms: number }
  | { readonly id: number; readonly ok: false; readonly message: string };

const keyOf = (entry: Entry): string => String(entry.id ?? entry.view ?? entry.code);

const listOf = (results: Results | null, name: string): readonly Entry[] =>
  ((results as unknown as Record<string, unknown> | null)?.[name] ?? []) as readonly Entry[];

const keys = ['id', 'view', 'code'];

/** The fields of an entry that are other objects or values than before, with what names the entry. */
function changedFields(old: Entry | undefined, entry: Entry): Entry | null {
  if (!old) return entry;
  const fields = Object.entries(entry).filter(([name, value]) => !Object.is(value, old[name]));
  if (fields.length === 0) return null;
  return Object.fromEntries([
    ...Object.entries(entry).filter(([name]) => keys.includes(name)),
    ...fields,
  ]);
}

/** What `next` has that `last` has not, told by identity: `next` shares what did not change. */
export function changesBetween(last: Results | null, next: Results): Changes {
  const lists: Record<string, { order: string[]; changed: Entry[] }> = {};
  const rest: Record<string, unknown> = {};
  for (const [name, value] of Object.entries(next)) {
    if (!Array.isArray(value)) {
      rest[name] = value;
      continue;
    }
    const before = new Map(listOf(last, name).map((entry) => [keyOf(entry), entry]));
    const entries = value as Entry[];
    lists[name] = {
      order: entries.map(keyOf),
      changed: entries
        .map((entry) => changedFields(before.get(keyOf(entry)), entry))
        .filter((entry) => entry !== null),
    };
  }
  return { lists, rest };
}

/** `last` with the changes made; everything that did not change stays the same object. */
export function withChanges(last: Results | null, { lists, rest }: Changes): Results {
  const out: Record<string, unknown> = { ...rest };
  for (const [name, { order, changed }] of Object.entries(lists)) {
    const known = new Map(listOf(last, name).map((entry) => [keyOf(entry), entry]));
    for (const entry of changed) known.set(keyOf(entry), { ...known.get(keyOf(entry)), ...entry });
    out[name] = order.map((key) => known.get(key)!);
  }
  return shared(last, out) as unknown as Results;
}
