type Plain = Readonly<Record<string, unknown>>;

const isObject = (x: unknown): x is object => typeof x === 'object' && x !== null;
const idOf = (x: unknown): string | undefined => {
  const id = isObject(x) ? (x as Plain).id : undefined;
  return typeof id === 'string' ? id : undefined;
};

// Lists and objects are copied from the first difference on only: most have none.

function sharedList(last: readonly unknown[], next: readonly unknown[]): readonly unknown[] {
  let byId: Map<unknown, unknown> | null = null;
  let made: unknown[] | null = null;
  for (let i = 0; i < next.length; i++) {
    const id = idOf(next[i]);
    let old = last[i];
    // Entries with an id are matched by it, so that one more or less does not shift the rest.
    if (id !== undefined && id !== idOf(old)) {
      byId ??= new Map(last.map((entry) => [idOf(entry), entry]));
      old = byId.get(id);
    }
    const entry = shared(old, next[i]);
    if (!made && (i >= last.length || !Object.is(entry, last[i]))) made = last.slice(0, i);
    made?.push(entry);
  }
  return made ?? (next.length === last.length ? last : last.slice(0, next.length));
}

function sharedObject(last: Plain, next: Plain): Plain {
  const keys = Object.keys(next);
  let made: Record<string, unknown> | null = null;
  for (let i = 0; i < keys.length; i++) {
    const key = keys[i]!;
    const value = shared(last[key], next[key]);
    if (!made && !(Object.is(value, last[key]) && key in last)) {
      made = {};
      for (const before of keys.slice(0, i)) made[before] = last[before];
    }
    if (made) made[key] = value;
  }
  if (made || Object.keys(last).length === keys.length) return made ?? last;
  return Object.fromEntries(keys.map((key) => [key, last[key]]));
}

/**
 * `next` with every part that equals its counterpart in `last` replaced by that very object, so that
 * identity alone tells what changed. Both are plain data.
 */
export function shared<T>(last: unknown, next: T): T {
  if (last === next || !isObject(last) || !isObject(next)) return next;
  if (Array.isArray(last) !== Array.isArray(next)) return next;
  return (
    Array.isArray(next)
      ? sharedList(last as readonly unknown[], next)
      : sharedObject(last as Plain, next as Plain)
  ) as T;
}
