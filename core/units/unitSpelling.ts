import { kindWords, type PressureKind } from './pressureKind.ts';
import { quantities, type Quantity } from './quantity.ts';
import { unitTable, type UnitId } from './unitTable.ts';

interface Spellings {
  readonly exact: ReadonlyMap<string, UnitId>;
  readonly folded: ReadonlyMap<string, UnitId>;
}

export interface SpelledUnit {
  /** Absent where only a kind was written: "2.5 (g)". */
  readonly unit?: UnitId;
  readonly kind: PressureKind;
}

/** One key for all ways to set the same unit: signs, spaces, dots and raised digits drop out. */
function keyOf(text: string): string {
  return text
    .replace(/[º˚]/g, '°')
    .replace(/[″“”]|''|′′/g, '"')
    .replace(/[′’]/g, "'")
    .normalize('NFKC')
    .replace(/\bdeg(?:ree)?s?(?=\b|[CFK])/gi, '°')
    .replace(/[\s.·⋅∙*^_]/g, '')
    .replace(/−/g, '-');
}

function spellingsOf(quantity: Quantity): Spellings {
  const exact = new Map<string, UnitId>();
  const folded = new Map<string, UnitId>();
  const row = quantities[quantity];
  for (const id of row.units) {
    if (id === row.bare) continue;
    const { spellings, caseMatters } = unitTable[id];
    for (const spelling of [id, ...spellings, ...(row.spellings?.[id] ?? [])]) {
      const key = keyOf(spelling);
      exact.set(key, id);
      if (!caseMatters) folded.set(key.toLowerCase(), id);
    }
  }
  return { exact, folded };
}

const names = Object.keys(quantities) as Quantity[];
const spellings = Object.fromEntries(names.map((q) => [q, spellingsOf(q)])) as Readonly<
  Record<Quantity, Spellings>
>;

function lookUp(key: string, { exact, folded }: Spellings): UnitId | undefined {
  return exact.get(key) ?? folded.get(key.toLowerCase());
}

const kindEndings: readonly (readonly [ending: string, kind: PressureKind])[] = Object.entries(
  kindWords,
).flatMap(([word, kind]) =>
  [word, `(${word})`, `[${word}]`].map((ending) => [ending, kind] as const),
);

/** Every ending is tried: "inHga" is inHg absolute, not inH with "ga". */
function spelledWithKind(key: string, table: Spellings): SpelledUnit | undefined {
  for (const [ending, kind] of kindEndings) {
    const rest = key.slice(0, -ending.length);
    if (key.slice(rest.length).toLowerCase() !== ending) continue;
    // A lone letter without brackets is no kind: "35 g" may be grams.
    if (rest === '' && ending.length > 1) return { kind };
    const unit = lookUp(rest, table);
    if (unit) return { unit, kind };
  }
  return undefined;
}

/** The unit, and for pressures the kind, that `text` spells; undefined if it spells none. */
export function spelledUnit(text: string, quantity: Quantity): SpelledUnit | undefined {
  const key = keyOf(text);
  const table = spellings[quantity];
  const whole = lookUp(key, table);
  if (whole) return { unit: whole, kind: 'unstated' };
  return quantity === 'pressure' ? spelledWithKind(key, table) : undefined;
}

/** Quantities for which `text` spells a unit. */
export function quantitiesOf(text: string): readonly Quantity[] {
  return names.filter((quantity) => spelledUnit(text, quantity)?.unit !== undefined);
}
