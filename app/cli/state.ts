import type { Medium } from '../../core/equilibrium/medium.ts';
import type { PhaseName } from '../../core/equilibrium/phase.ts';
import { stateAt } from '../../core/equilibrium/state.ts';
import { formatNumber, fromSI, parseReading, type Reading } from '../../core/units/index.ts';
import { en as words } from '../words/en.ts';
import { cautionLines } from './cautionLines.ts';
import { csv } from './csv.ts';
import { localOf, pressureGiven, pressureNotes, type GivenPressure, type Local } from './given.ts';
import { json } from './json.ts';
import { readOptions } from './options.ts';
import { readPoints } from './points.ts';
import { Refusal, refusalOf } from './refusal.ts';
import { substanceNamed } from './substance.ts';
import { cell, shownProperties, table, type TableRow } from './table.ts';
import type { Answer } from './terminal.ts';

/** A state as JSON writes it: SI, absolute pressure, null where the sources define nothing. */
export interface StateRecord {
  readonly T: number;
  readonly p: number;
  readonly phase: PhaseName;
  readonly rho: number | null;
  readonly h: number | null;
  readonly s: number | null;
  readonly u: number | null;
  readonly cp: number | null;
  readonly cv: number | null;
  readonly w: number | null;
  /** Of a solid only: its form, null where it is not resolved. */
  readonly solid?: string | null;
  /** Local atmosphere, where a gauge or vacuum reading was given. */
  readonly atmosphere?: number;
}

const keys = ['T', 'p', 'phase', 'rho', 'h', 's', 'u', 'cp', 'cv', 'w'] as const;

/** Throws OutOfRange, Unknown or Undetermined as `stateAt` does. */
export function stateRecord(m: Medium, T: number, p: number, atmosphere?: number): StateRecord {
  const [part] = stateAt(m, T, p).parts;
  const { phase, solid, rho, properties } = part!;
  return {
    T,
    p,
    phase,
    rho,
    h: properties?.h ?? null,
    s: properties?.s ?? null,
    u: properties?.u ?? null,
    cp: properties?.cp ?? null,
    cv: properties?.cv ?? null,
    w: properties?.w ?? null,
    ...(phase === 'solid' ? { solid } : {}),
    ...(atmosphere === undefined ? {} : { atmosphere }),
  };
}

function temperatureRows(reading: Reading): readonly TableRow[] {
  const { T } = words.terminal.symbols;
  const given: TableRow = {
    label: T,
    cells: [formatNumber(reading.number, reading.decimals)],
    unit: reading.unit,
  };
  if (reading.unit === 'K') return [given];
  const kelvin = formatNumber(reading.value, Math.max(2, reading.decimals));
  return [given, { label: '', cells: [kelvin], unit: 'K' }];
}

function pressureRows({ reading, p, relative }: GivenPressure, local: Local): readonly TableRow[] {
  const { symbols } = words.terminal;
  const { unit } = reading;
  const kind = { gauge: '(g)', vacuum: ' vacuum', absolute: '(a)', unstated: '' }[reading.kind!];
  const given: TableRow = {
    label: symbols.p,
    cells: [formatNumber(reading.number, reading.decimals)],
    unit: `${unit}${kind}`,
  };
  if (!relative) return [given];
  const power = Math.floor(Math.log10(Math.abs(fromSI(p, unit))));
  const decimals = Math.max(reading.decimals, 3 - power);
  const absolute = formatNumber(fromSI(p, unit), decimals);
  const atmosphere = cell(local.p, 'kPa', { significant: local.given ? 4 : 6 });
  return [
    given,
    { label: '', cells: [absolute], unit: `${unit}(a)` },
    { label: symbols.atmosphere, cells: [atmosphere], unit: 'kPa(a)' },
  ];
}

function text(
  m: Medium,
  record: StateRecord,
  given: { readonly T: Reading; readonly p: GivenPressure },
  local: Local,
  notes: readonly string[],
): string {
  const { terminal } = words;
  const solid = record.solid ?? null;
  const rows = [
    ...temperatureRows(given.T),
    ...pressureRows(given.p, local),
    ...shownProperties.map(([name, unit, digits]): TableRow => ({
      label: terminal.symbols[name],
      cells: [cell(record[name], unit, digits)],
      unit: record[name] === null ? '' : unit,
    })),
  ];
  const of =
    record.phase === 'solid'
      ? solid === null
        ? null
        : m.solids.get(solid)?.equation
      : m.substance.fluid;
  return [
    `${words.substance(m.substance.id)}: ${words.phase(record.phase, solid)}`,
    ...table(rows),
    ...(rows.some(({ cells }) => cells.includes(null)) ? [terminal.notDefined] : []),
    ...notes,
    ...(of
      ? [terminal.equations([of.formulation]), terminal.referenceState[m.substance.referenceState]]
      : []),
    ...cautionLines(m, { ...record, solid: record.phase === 'solid' }, local.p),
    '',
  ].join('\n');
}

async function reading<R>(place: string, read: () => R): Promise<R> {
  try {
    return read();
  } catch (error) {
    throw await refusalOf(error, { place });
  }
}

/** `state <substance> (--T … --p … | --from file) [--altitude | --barometer] [--json]` */
export async function stateCommand(args: readonly string[]): Promise<Answer> {
  const { terminal } = words;
  const { positionals, values, flags } = readOptions(
    args,
    { values: ['T', 'p', 'from', 'altitude', 'barometer'], flags: ['json'] },
    1,
  );
  const m = await substanceNamed(positionals[0]);
  const local = await localOf(values);
  const from = values.get('from');
  const [T, p] = [values.get('T'), values.get('p')];
  if (from !== undefined) {
    if (T !== undefined || p !== undefined)
      throw new Refusal(terminal.eitherOf(['--T, --p', '--from']));
    return fromFile(m, from, local, flags.has('json'));
  }
  if (T === undefined || p === undefined) throw new Refusal(terminal.stateNeeds);

  const warmth = await reading('--T', () => parseReading(T, 'temperature'));
  const pressure = await reading('--p', () => pressureGiven(p, local));
  let record: StateRecord;
  try {
    const atmosphere = pressure.relative ? local.p : undefined;
    record = stateRecord(m, warmth.value, pressure.p, atmosphere);
  } catch (error) {
    const units = { T: warmth.unit, p: pressure.reading.unit };
    throw await refusalOf(error, { units, medium: m });
  }
  const notes = pressureNotes([pressure], local);
  return flags.has('json')
    ? { out: json(record), notes }
    : { out: text(m, record, { T: warmth, p: pressure }, local, notes), notes: [] };
}

async function fromFile(m: Medium, path: string, local: Local, asJson: boolean): Promise<Answer> {
  const { columns, rows } = await readPoints(path, 'both');
  const records: StateRecord[] = [];
  const seen = { kindWritten: true, relative: false };
  for (const { line, cells } of rows) {
    try {
      const T = parseReading(cells.T ?? '', 'temperature', columns.get('T'));
      const pressure = pressureGiven(cells.p ?? '', local, columns.get('p'));
      seen.kindWritten &&= pressure.kindWritten;
      seen.relative ||= pressure.relative;
      records.push(stateRecord(m, T.value, pressure.p, pressure.relative ? local.p : undefined));
    } catch (error) {
      throw await refusalOf(error, {
        place: words.terminal.place(path, line),
        units: { T: columns.get('T')!.defaultUnit!, p: columns.get('p')!.defaultUnit! },
        medium: m,
      });
    }
  }
  const notes = pressureNotes([seen], local);
  if (asJson) return { out: json(records), notes };
  const [T, p, phase, ...rest] = keys;
  const columnsOut = [T, p, phase, 'solid', ...rest, ...(seen.relative ? ['atmosphere'] : [])];
  return { out: csv(records, columnsOut), notes };
}
