/** SI units of the keys, for a header that can be read again. */
const units: Readonly<Record<string, string>> = {
  T: 'K',
  p: 'Pa',
  atmosphere: 'Pa',
  rho: 'kg/m3',
  h: 'J/kg',
  s: 'J/(kg K)',
  u: 'J/kg',
  cp: 'J/(kg K)',
  cv: 'J/(kg K)',
  w: 'm/s',
};

const quoted = (text: string): string =>
  /[",;\n]/.test(text) ? `"${text.replace(/"/g, '""')}"` : text;

/** Twelve digits: more than any equation deserves, and no rounding noise behind them. */
function written(value: unknown): string {
  if (typeof value === 'number') return String(Number(value.toPrecision(12)));
  return typeof value === 'string' ? quoted(value) : '';
}

/** Records as CSV in SI; `keys` are paths such as `liquid.rho`, null is an empty cell. */
export function csv(records: readonly object[], keys: readonly string[]): string {
  const header = keys.map((key) => {
    const unit = units[key.split('.').at(-1)!];
    return quoted(unit === undefined ? key : `${key} [${unit}]`);
  });
  const at = (record: object, key: string): unknown =>
    key
      .split('.')
      .reduce<unknown>(
        (part, name) =>
          typeof part === 'object' && part !== null
            ? (part as Readonly<Record<string, unknown>>)[name]
            : undefined,
        record,
      );
  const lines = records.map((record) => keys.map((key) => written(at(record, key))).join(','));
  return [header.join(','), ...lines, ''].join('\n');
}
