import { parseReading, type DecimalMark, type ParseOptions } from '../../core/units/index.ts';
import { en as words } from '../words/en.ts';
import { Refusal, refusalOf } from './refusal.ts';
import { readTextFile } from './textFile.ts';

type Column = 'T' | 'p';

const quantityOf = { T: 'temperature', p: 'pressure' } as const;
const siOf = { T: 'K', p: 'Pa' } as const;

/** A point of a file as text, with how its numbers are to be read. */
export interface Row {
  /** Line of the file; the header stands on line 1. */
  readonly line: number;
  readonly cells: Readonly<Partial<Record<Column, string>>>;
}

export interface Points {
  readonly columns: ReadonlyMap<Column, ParseOptions>;
  readonly rows: readonly Row[];
}

/** A column's name and what its header says of the unit; null for a column of something else. */
function columnOf(header: string): { column: Column; unit: string } | null {
  const match = /^\s*(\S+?)\s*(?:\[(.*)\]|\((.*)\)|\/(.*))?\s*$/su.exec(header);
  if (!match) return null;
  const [, name = '', square, round, slash] = match;
  const unit = (square ?? round ?? slash ?? '').trim();
  if (name === 'T' || /^temperature$/i.test(name)) return { column: 'T', unit };
  if (name === 'p' || name === 'P' || /^pressure$/i.test(name)) return { column: 'p', unit };
  return null;
}

/** The separator that the header holds outside quotes; null where there is but one column. */
function separatorOf(header: string): ';' | '\t' | ',' | null {
  const bare = header.replace(/"[^"]*"/g, '').replace(/\[[^\]]*\]|\([^)]*\)/g, '');
  return ([';', '\t', ','] as const).find((mark) => bare.includes(mark)) ?? null;
}

/**
 * The decimal mark of a file's numbers. Beside a comma as separator it is the point. Otherwise commas
 * alone are decimal where another mark is the separator, or where a number shows it ("20,5").
 */
function decimalOf(separator: string | null, cells: readonly string[]): DecimalMark | undefined {
  if (separator === ',') return '.';
  const last = cells.map((cell) => /[.,](?=[^.,]*$)/.exec(cell)?.[0]);
  const comma = last.includes(',');
  if (!comma) return '.';
  if (last.includes('.')) return undefined;
  const plain = cells.some((cell) => /,(?!\d{3}(?!\d))/.test(cell));
  return separator !== null || plain ? ',' : undefined;
}

/**
 * The points of a text file: a header with the columns `T` and `p` in any order, units in brackets
 * (SI where none), one point a line. Other columns are passed over. Byte order mark, CRLF, quoted
 * cells, `;` or tab with decimal commas, and empty lines are taken.
 *
 * `wanted` says which columns: both, or one of them. Throws Refusal naming file and line.
 */
export async function readPoints(path: string, wanted: 'both' | 'one'): Promise<Points> {
  const { terminal } = words;
  const text = (await readTextFile(path)).replace(/^\uFEFF/, '').replace(/\r\n?/g, '\n');
  if (text.trim() === '') throw new Refusal(terminal.emptyFile(path));
  const { default: papa } = await import('papaparse');
  const separator = separatorOf(text.slice(0, text.indexOf('\n') + 1) || text);
  const { data, errors } = papa.parse<string[]>(text, { delimiter: separator ?? ';' });
  const lines: number[] = [];
  let line = 1;
  for (const cells of data) {
    lines.push(line);
    line += 1 + cells.reduce((breaks, cell) => breaks + (cell.split('\n').length - 1), 0);
  }
  const broken = errors.find(({ type }) => type === 'Quotes');
  if (broken) throw new Refusal(terminal.brokenQuotes(path, lines[broken.row ?? 0] ?? 1));

  const at = new Map<Column, number>();
  const units = new Map<Column, string>();
  for (const [i, header] of (data[0] ?? []).entries()) {
    const found = columnOf(header);
    if (!found) continue;
    if (at.has(found.column)) throw new Refusal(terminal.columnTwice(path, found.column));
    at.set(found.column, i);
    units.set(found.column, found.unit);
  }
  if (wanted === 'both') {
    const missing = (['T', 'p'] as const).filter((column) => !at.has(column));
    if (missing.length > 0) throw new Refusal(terminal.columnsMissing(path, missing));
  } else if (at.size !== 1) throw new Refusal(terminal.oneColumn(path, at.size));

  const rows: Row[] = [];
  for (const [i, cells] of data.entries()) {
    if (i === 0 || cells.every((cell) => cell.trim() === '')) continue;
    rows.push({
      line: lines[i]!,
      cells: Object.fromEntries([...at].map(([column, k]) => [column, cells[k] ?? ''])),
    });
  }
  if (rows.length === 0) throw new Refusal(terminal.noPoints(path));
  const decimal = decimalOf(
    separator,
    rows.flatMap(({ cells }) => Object.values(cells)),
  );

  const columns = new Map<Column, ParseOptions>();
  for (const [column, unit] of units) {
    const numbers = decimal === undefined ? {} : { decimal };
    if (unit === '') {
      columns.set(column, { ...numbers, defaultUnit: siOf[column] });
      continue;
    }
    try {
      const one = parseReading(`1 ${unit}`, quantityOf[column]);
      columns.set(column, {
        ...numbers,
        defaultUnit: one.unit,
        ...(one.kind === undefined ? {} : { defaultKind: one.kind }),
      });
    } catch (error) {
      throw await refusalOf(error, { place: terminal.place(path, 1) });
    }
  }
  return { columns, rows };
}
