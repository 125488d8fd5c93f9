import type { Medium } from '../../core/equilibrium/medium.ts';
import { boundaryCurves } from '../../core/map/boundary.ts';
import {
  formatNumber,
  fromSI,
  gaugePressure,
  parseReading,
  type ParseOptions,
  type Reading,
} from '../../core/units/index.ts';
import { en as words } from '../words/en.ts';
import {
  boundaryKinds,
  boundaryRecord,
  type AskedKind,
  type BoundaryRecord,
} from './boundaryRecord.ts';
import { cautionLines } from './cautionLines.ts';
import { csv } from './csv.ts';
import { localOf, pressureGiven, pressureNotes, type GivenPressure, type Local } from './given.ts';
import { json } from './json.ts';
import { readOptions } from './options.ts';
import { readPoints } from './points.ts';
import { Refusal, refusalOf, type Context } from './refusal.ts';
import { substanceNamed } from './substance.ts';
import { cell, pressureUnit, shownProperties, table, type TableRow } from './table.ts';
import type { Answer } from './terminal.ts';

interface Asked {
  readonly record: BoundaryRecord;
  readonly reading: Reading;
  readonly pressure: GivenPressure | null;
}

/** Sides of each kind of line, the denser first. */
const sidesOf = {
  saturation: ['liquid', 'vapour'],
  melting: ['solid', 'liquid'],
  sublimation: ['solid', 'vapour'],
} as const satisfies Record<AskedKind, readonly (keyof BoundaryRecord)[]>;

async function ask(
  m: Medium,
  kind: AskedKind,
  given: 'T' | 'p',
  text: string,
  local: Local,
  place: string,
  options: ParseOptions = {},
): Promise<Asked> {
  let units: Context['units'];
  try {
    const pressure = given === 'p' ? pressureGiven(text, local, options) : null;
    const reading = pressure?.reading ?? parseReading(text, 'temperature', options);
    units = given === 'p' ? { p: reading.unit } : { T: reading.unit };
    const found = boundaryRecord(m, kind, pressure ? { p: pressure.p } : { T: reading.value });
    if (!found)
      throw new Refusal(
        words.terminal.noLine(
          words.substance(m.substance.id),
          kind,
          m.substance.absent.find(({ boundary }) => boundary === kind)?.reason ?? null,
        ),
      );
    const record = pressure?.relative ? { ...found, atmosphere: local.p } : found;
    return { record, reading, pressure };
  } catch (error) {
    throw await refusalOf(error, { place, medium: m, ...(units ? { units } : {}) });
  }
}

function placeRows(
  { record, reading, pressure }: Asked,
  local: Local,
  columns: number,
): readonly TableRow[] {
  const { symbols } = words.terminal;
  // Both sides share T and p: they stand once, in the first column.
  const row = (label: string, value: string | null, unit: string): TableRow => ({
    label,
    cells: [value, ...Array<string>(columns - 1).fill('')],
    unit,
  });
  const T = pressure ? '°C' : reading.unit;
  const rows = [
    row(symbols.T, formatNumber(fromSI(record.T, T), pressure ? 2 : reading.decimals), T),
  ];
  if (T !== 'K') rows.push(row('', formatNumber(record.T, 2), 'K'));
  const p = pressure ? reading.unit : pressureUnit(record.p);
  rows.push(row(symbols.p, cell(record.p, p, { significant: 5 }), `${p}(a)`));
  if (local.given || record.atmosphere !== undefined) {
    const power = Math.floor(Math.log10(fromSI(record.p, p)));
    const gauge = fromSI(gaugePressure(record.p, local.p), p);
    rows.push(row('', formatNumber(gauge, Math.max(0, 3 - power)), `${p}(g)`));
    rows.push(
      row(symbols.atmosphere, cell(local.p, 'kPa', { significant: local.given ? 4 : 6 }), 'kPa(a)'),
    );
  }
  return rows;
}

function text(
  m: Medium,
  kind: AskedKind,
  asked: Asked,
  local: Local,
  notes: readonly string[],
): string {
  const { terminal } = words;
  const { record } = asked;
  const names = sidesOf[kind];
  const sides = names.map((name) => record[name]!);
  const wanted = shownProperties.filter(([name]) => ['rho', 'h', 's', 'cp', 'w'].includes(name));
  const rows = [
    ...placeRows(asked, local, sides.length),
    ...wanted.map(([name, unit, digits]): TableRow => ({
      label: terminal.symbols[name],
      cells: sides.map((side) =>
        cell(
          (side as unknown as Readonly<Record<string, number | null | undefined>>)[name] ?? null,
          unit,
          digits,
        ),
      ),
      unit,
    })),
  ];
  const heads = names.map((name) => (name === 'solid' ? (record.solid!.name ?? name) : name));
  const forms = new Set(
    boundaryCurves(m)
      .filter((curve) => curve.kind === kind)
      .map(({ form }) => form),
  );
  const name = words.boundary(m.substance.id, kind, record.solid?.name ?? null, {
    kind: forms.size === 1,
    line: false,
  });
  const also = (record.also ?? []).map((other) => {
    const at = pressureUnit(other.p);
    return terminal.alsoMelts(
      other.solid!.name!,
      `${cell(other.p, at, { significant: 4 }) ?? ''} ${at}(a)`,
    );
  });
  return [
    terminal.boundaryTitle(words.substance(m.substance.id), name),
    ...table(rows, heads),
    ...(rows.some(({ cells }) => cells.includes(null)) ? [terminal.notDefined] : []),
    ...also,
    ...notes,
    terminal.basis(words.basis[record.basis], record.source),
    terminal.referenceState[m.substance.referenceState],
    ...cautionLines(m, { T: record.T, p: record.p, solid: kind !== 'saturation' }, local.p),
    '',
  ].join('\n');
}

/** `boundary <substance> <kind> (--T … | --p … | --from file) [--altitude | --barometer] [--json]` */
export async function boundaryCommand(args: readonly string[]): Promise<Answer> {
  const { terminal } = words;
  const { positionals, values, flags } = readOptions(
    args,
    { values: ['T', 'p', 'from', 'altitude', 'barometer'], flags: ['json'] },
    2,
  );
  const m = await substanceNamed(positionals[0]);
  const kind = boundaryKinds.find((known) => known === positionals[1]);
  if (!kind) throw new Refusal(terminal.unknownKind(positionals[1], boundaryKinds));
  const local = await localOf(values);
  const given = (['T', 'p', 'from'] as const).filter((name) => values.has(name));
  const [one] = given;
  if (one === undefined || given.length > 1) throw new Refusal(terminal.boundaryNeeds);
  if (one === 'from') return fromFile(m, kind, values.get('from')!, local, flags.has('json'));

  const asked = await ask(m, kind, one, values.get(one)!, local, `--${one}`);
  const notes = pressureNotes(asked.pressure ? [asked.pressure] : [], local);
  return flags.has('json')
    ? { out: json(asked.record), notes }
    : { out: text(m, kind, asked, local, notes), notes: [] };
}

async function fromFile(
  m: Medium,
  kind: AskedKind,
  path: string,
  local: Local,
  asJson: boolean,
): Promise<Answer> {
  const { columns, rows } = await readPoints(path, 'one');
  const [[given, options]] = [...columns] as [['T' | 'p', ParseOptions]];
  const asked: Asked[] = [];
  for (const { line, cells } of rows)
    asked.push(
      await ask(
        m,
        kind,
        given,
        cells[given] ?? '',
        local,
        words.terminal.place(path, line),
        options,
      ),
    );
  const records = asked.map(({ record }) => record);
  const notes = pressureNotes(
    asked.flatMap(({ pressure }) => pressure ?? []),
    local,
  );
  if (asJson) return { out: json(records), notes };
  const more = records.filter(({ also }) => also).length;
  const keys = [
    'T',
    'p',
    ...sidesOf[kind].flatMap((side) =>
      (side === 'solid' ? ['name', 'rho', 'h', 's', 'cp'] : ['rho', 'h', 's', 'cp', 'w']).map(
        (key) => `${side}.${key}`,
      ),
    ),
    'basis',
    'source',
    ...(records.some(({ atmosphere }) => atmosphere !== undefined) ? ['atmosphere'] : []),
  ];
  return {
    out: csv(records, keys),
    notes: [...notes, ...(more > 0 ? [words.terminal.alsoInJson(more)] : [])],
  };
}
