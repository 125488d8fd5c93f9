import * as v from 'valibot';
import { absolutePressure, parseReading, ReadingError, type ReadingIssue } from '../units/index.ts';
import type { Quantity, Reading } from '../units/index.ts';
import { unitTable } from '../units/index.ts';
import { rateOf, startGivens } from '../process/path.ts';
import { quantityOfEnd } from '../process/step.ts';
import { kindOf, type Step } from '../process/steps/index.ts';
import {
  sheetSchema,
  type PathItem,
  type Sheet,
  type Site,
  type StateItem,
  type View,
} from './schema.ts';
import { barometerRange, localPressure, siteErrors } from './site.ts';

/** What is wrong at one place of a sheet; the place reads like `items[3].p`. */
export type SheetIssue = { readonly place: string } & (
  | { readonly code: 'notASheet' }
  | { readonly code: 'newerVersion'; readonly version: number }
  | { readonly code: 'shape'; readonly expected: string; readonly received: string }
  | { readonly code: 'reading'; readonly given: string; readonly issue: ReadingIssue }
  | {
      readonly code: 'unknownId';
      readonly given: string;
      readonly of: 'site' | 'substance' | 'view';
    }
  | { readonly code: 'twice'; readonly given: string }
  | { readonly code: 'givens'; readonly given: readonly string[] }
  | { readonly code: 'unit'; readonly given: string }
  | { readonly code: 'emptyRange' }
  | { readonly code: 'tooLarge' }
);

export type ReadSheet =
  | { readonly ok: true; readonly sheet: Sheet }
  | { readonly ok: false; readonly issues: readonly SheetIssue[] };

const placeOf = (path: readonly { key?: unknown }[] | undefined): string =>
  (path ?? [])
    .map(({ key }) => (typeof key === 'number' ? `[${key}]` : `.${String(key)}`))
    .join('')
    .replace(/^\./, '');

const isObject = (x: unknown): x is Record<string, unknown> =>
  typeof x === 'object' && x !== null && !Array.isArray(x);

/**
 * A sheet from untrusted data, checked whole: shape, ids, every reading, every site's pressure.
 *
 * Gives the sheet or the list of what is wrong and where; nothing is repaired in silence. A newer
 * version is refused by its number alone.
 */
export function readSheet(data: unknown): ReadSheet {
  if (!isObject(data) || !('version' in data))
    return { ok: false, issues: [{ place: '', code: 'notASheet' }] };
  if (typeof data.version === 'number' && data.version > 1)
    return {
      ok: false,
      issues: [{ place: 'version', code: 'newerVersion', version: data.version }],
    };
  const parsed = v.safeParse(sheetSchema, data);
  if (!parsed.success)
    return {
      ok: false,
      issues: parsed.issues.slice(0, 20).map((issue) => ({
        place: placeOf(issue.path),
        code: 'shape',
        expected: issue.expected ?? issue.type,
        received: issue.received.slice(0, 80),
      })),
    };
  const sheet: Sheet = parsed.output;
  const issues = check(sheet);
  return issues.length > 0 ? { ok: false, issues } : { ok: true, sheet };
}

function check(sheet: Sheet): readonly SheetIssue[] {
  const issues: SheetIssue[] = [];
  const read = (
    place: string,
    given: string | undefined,
    quantity: Quantity,
    defaultKind: 'gauge' | 'absolute' = sheet.pressureKind,
  ): Reading | null => {
    if (given === undefined) return null;
    try {
      return parseReading(given, quantity, quantity === 'pressure' ? { defaultKind } : {});
    } catch (error) {
      if (!(error instanceof ReadingError)) throw error;
      issues.push({ place, code: 'reading', given, issue: error.issue });
      return null;
    }
  };
  const absolute = (
    place: string,
    given: string | undefined,
    site: Site | undefined,
  ): number | null => {
    const reading = read(place, given, 'pressure');
    if (!reading) return null;
    try {
      return absolutePressure(reading, localPressure(site));
    } catch (error) {
      if (!(error instanceof ReadingError)) throw error;
      issues.push({ place, code: 'reading', given: given!, issue: error.issue });
      return null;
    }
  };
  /** A barometer reads the air itself: an absolute pressure that air can have. */
  const readBarometer = (place: string, given: string | undefined): void => {
    const reading = read(`${place}.barometer`, given, 'pressure', 'absolute');
    if (!reading) return;
    const { min, max } = barometerRange;
    if (reading.kind !== 'absolute' || !(reading.value >= min && reading.value <= max))
      issues.push({
        place: `${place}.barometer`,
        code: 'shape',
        expected: `${min / 1000} kPa(a) to ${max / 1000} kPa(a)`,
        received: given!,
      });
  };
  const siteOf = (place: string, given: string | undefined): Site | undefined => {
    if (given === undefined) return sheet.sites[0];
    const site = sheet.sites.find((s) => s.id === given);
    if (!site) issues.push({ place, code: 'unknownId', given, of: 'site' });
    return site;
  };
  const substanceOf = (place: string, given: string | undefined): void => {
    if (given !== undefined && !sheet.substances.includes(given))
      issues.push({ place, code: 'unknownId', given, of: 'substance' });
  };
  const unique = (list: readonly { readonly id: string }[], place: string): void => {
    const seen = new Set<string>();
    list.forEach(({ id }, i) => {
      if (seen.has(id)) issues.push({ place: `${place}[${i}].id`, code: 'twice', given: id });
      seen.add(id);
    });
  };
  unique(sheet.sites, 'sites');
  unique(sheet.items, 'items');
  unique(sheet.views, 'views');

  sheet.sites.forEach((site, i) => {
    const place = `sites[${i}]`;
    read(`${place}.altitude`, site.altitude, 'altitude');
    readBarometer(place, site.barometer);
    read(`${place}.barometerError`, site.barometerError, 'pressureDifference');
    read(`${place}.probe`, site.probe, 'temperatureDifference');
    if (site.gauge && 'plusMinus' in site.gauge)
      read(`${place}.gauge.plusMinus`, site.gauge.plusMinus, 'pressureDifference');
    else if (site.gauge) {
      read(`${place}.gauge.low`, site.gauge.low, 'pressure');
      read(`${place}.gauge.high`, site.gauge.high, 'pressure');
    }
    if (issues.length > 0) return;
    try {
      localPressure(site);
      siteErrors(site, 'gauge');
    } catch (error) {
      if (error instanceof ReadingError)
        issues.push({
          place: `${place}.gauge`,
          code: 'reading',
          given: site.gauge && 'high' in site.gauge ? site.gauge.high : '',
          issue: error.issue,
        });
      else
        issues.push({
          place: `${place}.altitude`,
          code: 'shape',
          expected: '−2000 m to 11000 m',
          received: site.altitude ?? '',
        });
    }
  });
  if (issues.length > 0) return issues;

  const checkState = (item: StateItem, place: string): void => {
    const site = siteOf(`${place}.site`, item.site);
    substanceOf(`${place}.substance`, item.substance);
    const given = (['T', 'p', 'vapourFraction'] as const).filter((key) => item[key] !== undefined);
    if (given.length !== 2) issues.push({ place, code: 'givens', given });
    read(`${place}.T`, item.T, 'temperature');
    absolute(`${place}.p`, item.p, site);
    const fraction = read(`${place}.vapourFraction`, item.vapourFraction, 'fraction');
    if (fraction && !(fraction.value >= 0 && fraction.value <= 1))
      issues.push({
        place: `${place}.vapourFraction`,
        code: 'shape',
        expected: '0 to 1',
        received: item.vapourFraction!,
      });
  };
  const pathPlaces = (
    place: string,
    given: Readonly<Record<string, string | undefined>>,
    site: Site | undefined,
  ): void => {
    for (const [key, quantity] of Object.entries(quantityOfEnd)) {
      if (quantity === 'pressure') absolute(`${place}.${key}`, given[key], site);
      else {
        const reading = read(`${place}.${key}`, given[key], quantity);
        if (quantity === 'fraction' && reading && !(reading.value >= 0 && reading.value <= 1))
          issues.push({
            place: `${place}.${key}`,
            code: 'shape',
            expected: '0 to 1',
            received: given[key]!,
          });
      }
    }
  };
  const oneOf = (
    place: string,
    given: Readonly<Record<string, string | undefined>>,
    allowed: readonly (readonly string[])[],
  ): void => {
    const keys = Object.keys(given).filter((key) => given[key] !== undefined);
    if (!allowed.some((a) => a.length === keys.length && a.every((key) => keys.includes(key))))
      issues.push({ place, code: 'givens', given: keys });
  };
  const checkStep = (step: Step, place: string, site: Site | undefined): void => {
    const { ends, rates } = kindOf(step);
    oneOf(`${place}.end`, step.end, ends);
    pathPlaces(`${place}.end`, step.end, site);
    const time = read(`${place}.time`, step.time, 'time');
    if (time && !(time.value >= 0))
      issues.push({
        place: `${place}.time`,
        code: 'shape',
        expected: '0 s or more',
        received: step.time!,
      });
    if (step.rate === undefined) return;
    if (step.time !== undefined) issues.push({ place, code: 'givens', given: ['time', 'rate'] });
    // Read as the first quantity that the kind takes, so that an issue is told in its terms.
    let of: Quantity = rates[0] ?? 'temperatureRate';
    try {
      of = rateOf(step.rate).of;
    } catch (error) {
      if (!(error instanceof ReadingError)) throw error;
    }
    read(`${place}.rate`, step.rate, of);
    if (!rates.some((rate) => rate === of))
      issues.push({ place: `${place}.rate`, code: 'givens', given: [of] });
  };
  const checkPath = (item: PathItem, place: string): void => {
    const site = siteOf(`${place}.site`, item.site);
    substanceOf(`${place}.substance`, item.substance);
    oneOf(`${place}.start`, item.start, startGivens);
    pathPlaces(`${place}.start`, item.start, site);
    unique(item.steps, `${place}.steps`);
    item.steps.forEach((step, i) => checkStep(step, `${place}.steps[${i}]`, site));
  };
  const checkView = (view: View, place: string): void => {
    substanceOf(`${place}.substance`, view.substance);
    const site = siteOf(`${place}.pressure.site`, view.pressure.site);
    if (view.second) siteOf(`${place}.second.site`, view.second.site);
    for (const key of ['width', 'height'] as const) {
      const size = read(`${place}.page.${key}`, view.page[key], 'length');
      if (size && !(size.value >= 0.04 && size.value <= 2))
        issues.push({
          place: `${place}.page.${key}`,
          code: 'shape',
          expected: '40 mm to 2 m',
          received: view.page[key],
        });
    }
    for (const [key, unit] of [
      ['pressure', view.pressure.unit],
      ['second', view.second?.unit],
    ] as const)
      if (unit !== undefined && !isPressureUnit(unit))
        issues.push({ place: `${place}.${key}.unit`, code: 'unit', given: unit });
    const ordered = (
      at: string,
      low: number | null | undefined,
      high: number | null | undefined,
    ) => {
      if (typeof low === 'number' && typeof high === 'number' && !(high > low))
        issues.push({ place: at, code: 'emptyRange' });
    };
    const T = view.temperature.range?.map((given, k) =>
      read(`${place}.temperature.range[${k}]`, given, 'temperature'),
    );
    ordered(`${place}.temperature.range`, T?.[0]?.value, T?.[1]?.value);
    if (view.temperature.scale === 'reciprocal' && T?.[0]?.value === 0)
      issues.push({ place: `${place}.temperature.range[0]`, code: 'emptyRange' });
    const p = view.pressure.range?.map((given, k) => {
      const at = `${place}.pressure.range[${k}]`;
      // An axis may start at zero, where no state can be.
      const reading = read(at, given, 'pressure');
      return reading?.value === 0 && reading.kind === 'absolute' ? 0 : absolute(at, given, site);
    });
    ordered(`${place}.pressure.range`, p?.[0], p?.[1]);
    if (view.pressure.scale === 'logarithmic' && p?.[0] === 0)
      issues.push({ place: `${place}.pressure.range[0]`, code: 'emptyRange' });
  };
  sheet.items.forEach((item, i) =>
    item.kind === 'path' ? checkPath(item, `items[${i}]`) : checkState(item, `items[${i}]`),
  );
  sheet.views.forEach((view, i) => checkView(view, `views[${i}]`));
  return issues;
}

/** Whether a word is the id of a pressure unit. */
export function isPressureUnit(unit: string): boolean {
  if (!Object.hasOwn(unitTable, unit)) return false;
  try {
    parseReading(`1 ${unit}`, 'pressure');
    return true;
  } catch {
    return false;
  }
}
