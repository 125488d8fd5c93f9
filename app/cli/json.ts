/** A record as JSON with a line a key, or records as an array with a line a record. */
export function json(value: object | readonly object[]): string {
  if (!Array.isArray(value)) return `${JSON.stringify(value, null, 2)}\n`;
  const lines = (value as readonly object[]).map((record) => JSON.stringify(record));
  return `[\n${lines.join(',\n')}\n]\n`;
}
