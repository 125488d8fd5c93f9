import type { Results } from '../../core/sheet/results.ts';
import type { Sheet, View } from '../../core/sheet/schema.ts';
import { standardPressure, type UnitId } from '../../core/units/index.ts';

/** Air pressure (Pa) at a site of the sheet, by default the first; the standard one without sites. */
export function airAt(
  sheet: Sheet,
  results: Pick<Results, 'sites'> | null | undefined,
  siteId?: string | null,
): number {
  const wanted = siteId ?? sheet.sites[0]?.id;
  return results?.sites.find(({ id }) => id === wanted)?.local ?? standardPressure;
}

/** The unit in which pressures of the sheet's own kind are read on a view. */
export const usualUnit = (sheet: Sheet, view: View): UnitId =>
  (sheet.pressureKind === view.pressure.kind
    ? view.pressure.unit
    : (view.second?.unit ?? view.pressure.unit)) as UnitId;
