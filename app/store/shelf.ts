import { createStore, del, get, keys, update, type UseStore } from 'idb-keyval';
import { readSheet } from '../../core/sheet/read.ts';
import type { Sheet } from '../../core/sheet/schema.ts';

/** A sheet as this device keeps it. */
export interface Kept {
  readonly key: string;
  readonly sheet: Sheet;
  /** Milliseconds since 1970. */
  readonly saved: number;
  /** The page that saved it, to tell one's own changes from another tab's. */
  readonly by: string;
}

/** Tells one keeping of a sheet from every other. */
export const stampOf = ({ saved, by }: Kept): string => `${saved} ${by}`;

/** Where sheets are kept; a test passes its own. */
export interface Shelf {
  /**
   * Keeps a sheet under its key. With the stamp of what was last known to lie there, only if that
   * still lies there; false if another page was first.
   */
  put: (kept: Kept, known?: string | null) => Promise<boolean>;
  take: (key: string) => Promise<Kept | undefined>;
  remove: (key: string) => Promise<void>;
  list: () => Promise<readonly Kept[]>;
}

/** Whether what lies there is a sheet that this version reads. */
const isReadable = (kept: Kept | undefined): kept is Kept =>
  kept !== undefined && readSheet(kept.sheet).ok;

/**
 * Sheets on this device, in the browser's own database; nothing leaves it. What another version left
 * there and this one cannot read stays there and is not shown.
 */
export function deviceShelf(): Shelf {
  let store: UseStore | null = null;
  const db = (): UseStore => (store ??= createStore('simmerline', 'sheets'));
  return {
    put: async (kept, known = null) => {
      let isFirst = true;
      // Looking and keeping are one transaction, so that no other page comes in between.
      await update<Kept>(
        kept.key,
        (old) => {
          isFirst = known === null || old === undefined || stampOf(old) === known;
          return isFirst || old === undefined ? kept : old;
        },
        db(),
      );
      return isFirst;
    },
    take: async (key) => {
      const kept = await get<Kept>(key, db());
      return isReadable(kept) ? kept : undefined;
    },
    remove: (key) => del(key, db()),
    list: async () => {
      const all = await keys<string>(db());
      const kept = await Promise.all(all.map((key) => get<Kept>(key, db())));
      return kept.filter(isReadable).sort((a, b) => b.saved - a.saved);
    },
  };
}
