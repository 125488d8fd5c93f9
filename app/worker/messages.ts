import type { Results } from '../../core/sheet/results.ts';
import type { Sheet } from '../../core/sheet/schema.ts';

/** What the page asks of the worker; a newer request makes older ones void. */
export interface Request {
  readonly id: number;
  readonly sheet: Sheet;
}

/** Keyed parts of results; unchanged ones are not sent again. */
export interface Changes {
  /** For each list, ids in order and the entries that changed since the last answer. */
  readonly lists: Readonly<
    Record<string, { readonly order: readonly string[]; readonly changed: readonly unknown[] }>
  >;
  readonly rest: Readonly<Record<string, unknown>>;
}

export type Answer =
  | { readonly id: number; readonly ok: true; readonly changes: Changes; readonly ms: number }
  | { readonly id: number; readonly ok: false; readonly message: string };

type Entry = Readonly<Record<string, unknown>>;
const keyOf = (entry: Entry): string => String(entry.id ?? entry.view ?? entry.code);

const listOf = (results: Results | null, name: string): readonly Entry[] =>
  ((results as unknown as Record<string, unknown> | null)?.[name] ?? []) as readonly Entry[];

/** What `next` has that `last` has not. Parts are compared by identity first, by content then. */
export function changesBetween(last: Results | null, next: Results): Changes {
  const lists: Record<string, { order: string[]; changed: unknown[] }> = {};
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
      changed: entries.filter((entry) => {
        const old = before.get(keyOf(entry));
        return old !== entry && JSON.stringify(old) !== JSON.stringify(entry);
      }),
    };
  }
  return { lists, rest };
}

/** `last` with the changes made; entries that did not change stay the same objects. */
export function withChanges(last: Results | null, { lists, rest }: Changes): Results {
  const out: Record<string, unknown> = { ...rest };
  for (const [name, { order, changed }] of Object.entries(lists)) {
    const known = new Map(
      [...listOf(last, name), ...(changed as Entry[])].map((entry) => [keyOf(entry), entry]),
    );
    out[name] = order.map((key) => known.get(key)!);
  }
  return out as unknown as Results;
}
