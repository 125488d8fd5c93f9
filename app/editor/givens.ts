import type { View } from '../../core/sheet/schema.ts';
import {
  absolutePressure,
  formatReading,
  parseReading,
  type Reading,
  type UnitId,
} from '../../core/units/index.ts';
import { pressureReading, temperatureReading } from '../store/edits.ts';
import type { Words } from '../words/en.ts';
import type { Slot } from '../words/sentence.ts';
import { tried } from './say.ts';

const quantities = {
  T: 'temperature',
  p: 'pressure',
  vapourFraction: 'fraction',
  solidFraction: 'fraction',
} as const;

type Given = { readonly [K in keyof typeof quantities]?: string | undefined };

/** What rows of the run table share: how readings are taken and shown, and the air at their site. */
export interface TablePlace {
  readonly view: View;
  readonly pressureKind: 'gauge' | 'absolute';
  /** Unit of pressures where none was given. */
  readonly usual: UnitId;
  /** Air pressure at the row's site, Pa. */
  readonly air: number;
}

/** The unit in which a row shows pressures: that of its own reading, else the usual one. */
export const pressureUnit = (p: string | undefined, { usual }: TablePlace): UnitId =>
  p === undefined ? usual : parseReading(p, 'pressure').unit;

/** The pairs that pin a state, as a choice beside its readings. */
export function pairSlot(given: Given, tag: string, words: Words): Slot {
  const pairs = ['T p', 'T vapourFraction', 'p vapourFraction'] as const;
  const keys = Object.keys(quantities).filter((key) => given[key as keyof Given] !== undefined);
  const now = keys.join(' ');
  return {
    field: 'pair',
    text: now,
    quiet: true,
    name: words.pairOf(tag),
    choices: [...new Set([...pairs, now])].map((value) => ({
      value,
      label: (words.pairs as Readonly<Record<string, string>>)[value] ?? value,
    })),
  };
}

/** An item without what pins its state. */
export const withoutGivens = <T extends object>(item: T): Omit<T, keyof Given> =>
  Object.fromEntries(Object.entries(item).filter(([key]) => !(key in quantities))) as Omit<
    T,
    keyof Given
  >;

/** A state given by another pair, at the place where it stands: readings of T (K) and p (Pa). */
export function regiven(
  pair: string,
  at: { readonly T: number; readonly p: number } | undefined,
  old: Given,
  place: TablePlace,
): Given {
  const { view, air, pressureKind } = place;
  const readings: Given = {
    T: old.T ?? temperatureReading(at?.T ?? 373.15, view.temperature.unit, 0.1).text,
    p:
      old.p ??
      pressureReading(
        at?.p ?? air,
        pressureUnit(old.p, place),
        pressureKind,
        air,
        (at?.p ?? air) / 1000,
      ).text,
    vapourFraction: old.vapourFraction ?? '0 %',
    solidFraction: old.solidFraction ?? '50 %',
  };
  return Object.fromEntries(pair.split(' ').map((key) => [key, readings[key as keyof Given]]));
}

/** The readings of a state or a start, each as a slot. */
export function givenSlots(given: Given, tag: string, words: Words): readonly Slot[] {
  return (Object.keys(quantities) as (keyof typeof quantities)[]).flatMap((field) => {
    const text = given[field];
    if (text === undefined) return [];
    return [
      {
        field,
        text: formatReading(parseReading(text, quantities[field]), words.decimal),
        name: words.stepField(field, tag),
        quantity: quantities[field],
      },
    ];
  });
}

/** A typed reading of a given, checked against absolute zero and the ends of a fraction. */
export function readGiven(
  field: string,
  text: string,
  old: Given,
  place: TablePlace,
  words: Words,
): { ok: Reading } | { trouble: string } {
  const quantity = quantities[field as keyof typeof quantities];
  const read = tried(words, () => {
    const reading = parseReading(text, quantity, {
      defaultUnit:
        field === 'T'
          ? place.view.temperature.unit
          : field === 'p'
            ? pressureUnit(old.p, place)
            : '%',
      ...(field === 'p' ? { defaultKind: place.pressureKind } : {}),
    });
    if (field === 'p') absolutePressure(reading, place.air);
    return reading;
  });
  if ('trouble' in read || quantity !== 'fraction') return read;
  const { value } = read.ok;
  return value >= 0 && value <= 1 ? read : { trouble: words.editor.fractionRange };
}
