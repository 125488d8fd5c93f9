import type { Item, Sheet, Site, View } from '../../core/sheet/schema.ts';
import {
  pressureAs,
  readingFromSI,
  stepSI,
  type Reading,
  type UnitId,
} from '../../core/units/index.ts';

/** A sheet with one item replaced; the same sheet if nothing changed. */
export function withItem(sheet: Sheet, id: string, change: (item: Item) => Item): Sheet {
  const i = sheet.items.findIndex((item) => item.id === id);
  const item = sheet.items[i];
  if (!item) return sheet;
  const next = change(item);
  return next === item ? sheet : { ...sheet, items: sheet.items.with(i, next) };
}

/** A sheet with one view changed. */
export function withView(sheet: Sheet, id: string, change: (view: View) => View): Sheet {
  return { ...sheet, views: sheet.views.map((view) => (view.id === id ? change(view) : view)) };
}

/** A sheet with one site changed. */
export function withSite(sheet: Sheet, id: string, change: (site: Site) => Site): Sheet {
  return { ...sheet, sites: sheet.sites.map((site) => (site.id === id ? change(site) : site)) };
}

/** Decimals in `unit` that show steps no coarser than `step` (SI). */
export function decimalsFor(step: number, unit: UnitId): number {
  const inUnit = step / stepSI(unit);
  return Math.min(12, Math.max(-12, Math.ceil(-Math.log10(inUnit) - 1e-9)));
}

/** A temperature written to a step (K) in a unit. */
export const temperatureReading = (T: number, unit: UnitId, step: number): Reading =>
  readingFromSI('temperature', T, decimalsFor(step, unit), unit);

/** An absolute pressure (Pa) written to a step (Pa) as an instrument of the kind shows it. */
export const pressureReading = (
  p: number,
  unit: UnitId,
  kind: 'gauge' | 'absolute' | 'vacuum',
  local: number,
  step: number,
): Reading =>
  readingFromSI('pressure', pressureAs(kind, p, local), decimalsFor(step, unit), unit, kind);

/** A fresh id that no item, site, step or view of the sheet bears. */
export function freshId(sheet: Sheet, stem: string): string {
  const taken = new Set([...sheet.items, ...sheet.sites, ...sheet.views].map(({ id }) => id));
  for (let n = 1; ; n++) if (!taken.has(`${stem}-${n}`)) return `${stem}-${n}`;
}

/** The first number that no state's tag bears. */
export function freshTag(sheet: Sheet): string {
  const taken = new Set(sheet.items.map(({ tag }) => tag));
  for (let n = 1; ; n++) if (!taken.has(String(n))) return String(n);
}
