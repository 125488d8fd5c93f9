import { formatNumber, fromSI, type UnitId } from '../../core/units/index.ts';

/** A row of a table: its label and, for each column, a number as text, a word, or nothing. */
export interface TableRow {
  readonly label: string;
  readonly cells: readonly (string | null)[];
  readonly unit: string;
}

const width = (text: string): number => [...text].length;
const isNumber = (text: string): boolean => /^[−\d]/.test(text);
const split = (text: string): readonly [string, string] => {
  const at = text.indexOf('.');
  return at < 0 || !isNumber(text) ? [text, ''] : [text.slice(0, at), text.slice(at)];
};

/** Lines of a table: labels left, numbers on their decimal point, units after; a dash for null. */
export function table(rows: readonly TableRow[], heads?: readonly string[]): readonly string[] {
  const columns = Math.max(...rows.map(({ cells }) => cells.length));
  const label = Math.max(...rows.map((row) => width(row.label)));
  const aligned: string[][] = rows.map(() => []);
  for (let k = 0; k < columns; k++) {
    const cells = rows.map((row) => row.cells[k] ?? '—');
    const numbers = cells.filter(isNumber).map(split);
    const whole = Math.max(1, ...numbers.map(([a]) => width(a)));
    const rest = Math.max(0, ...numbers.map(([, b]) => width(b)));
    const wide = Math.max(whole + rest, width(heads?.[k] ?? ''), ...cells.map(width));
    cells.forEach((cell, i) => {
      const [a, b] = split(cell);
      const text = isNumber(cell)
        ? ' '.repeat(whole - width(a)) + a + b + ' '.repeat(rest - width(b))
        : cell;
      aligned[i]!.push(text + ' '.repeat(wide - width(text)));
    });
    if (heads) heads = heads.map((head, i) => (i === k ? head.padEnd(wide) : head));
  }
  const lines = rows.map((row, i) =>
    [row.label.padEnd(label), ...aligned[i]!, row.unit].join('  ').trimEnd(),
  );
  return heads ? [[' '.repeat(label), ...heads].join('  ').trimEnd(), ...lines] : lines;
}

/** Digits of a property as its equations deserve: significant ones, or a place for what has no zero. */
export type Digits = { readonly significant: number } | { readonly decimals: number };

/** An SI value in `unit` as text, null for null. */
export function cell(value: number | null, unit: UnitId, digits: Digits): string | null {
  if (value === null) return null;
  const shown = fromSI(value, unit);
  if ('decimals' in digits) return formatNumber(shown, digits.decimals);
  if (shown !== 0 && (Math.abs(shown) < 1e-4 || Math.abs(shown) >= 1e9))
    return shown.toExponential(digits.significant - 1).replace('-', '−');
  const power = shown === 0 ? 0 : Math.floor(Math.log10(Math.abs(shown)));
  return formatNumber(shown, digits.significant - 1 - power);
}

/** Properties in the order of the tables, with unit and digits. Common practice, no source. */
export const shownProperties = [
  ['rho', 'kg/m³', { significant: 5 }],
  ['h', 'kJ/kg', { decimals: 1 }],
  ['s', 'kJ/(kg·K)', { decimals: 4 }],
  ['u', 'kJ/kg', { decimals: 1 }],
  ['cp', 'kJ/(kg·K)', { significant: 4 }],
  ['cv', 'kJ/(kg·K)', { significant: 4 }],
  ['w', 'm/s', { significant: 4 }],
] as const satisfies readonly (readonly [string, UnitId, Digits])[];

/** A pressure unit in which a pressure (Pa) reads well. */
export const pressureUnit = (p: number): UnitId => (p < 1e3 ? 'Pa' : p < 1e6 ? 'kPa' : 'MPa');
