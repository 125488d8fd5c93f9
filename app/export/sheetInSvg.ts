/** Why no sheet came out of a file. */
export type SheetInSvgCode = 'noSheet' | 'tooLarge' | 'malformed';

export class SheetInSvgError extends Error {
  override readonly name = 'SheetInSvgError';
  readonly code: SheetInSvgCode;
  constructor(code: SheetInSvgCode, detail: string) {
    super(`${code}: ${detail}`);
    this.code = code;
  }
}

/** Element inside `<metadata>` whose text is the sheet. */
export const sheetElement = 'simmerline-sheet';

/** Largest file that is read, in UTF-16 units. */
export const sheetLimit = 20 * 1024 * 1024;

const deepest = 100;

/**
 * A sheet as text for an XML element: JSON in ASCII without white space or markup.
 *
 * Whatever another program does to the text (indents it, wraps it, quotes it anew, turns it into
 * CDATA) can be undone by dropping white space, for there is none in what was written.
 */
export function sheetAsText(sheet: unknown): string {
  const json = JSON.stringify(sheet) as string | undefined;
  if (json === undefined) throw new TypeError('a sheet must be a JSON value');
  return json.replace(
    /[^!-~]|[<>&]/g,
    (sign) => `\\u${sign.charCodeAt(0).toString(16).padStart(4, '0')}`,
  );
}

const named: Readonly<Record<string, string>> = {
  amp: '&',
  lt: '<',
  gt: '>',
  quot: '"',
  apos: "'",
};

function decoded(text: string): string {
  return text.replace(
    /&(?:#x([0-9a-f]{1,6})|#(\d{1,7})|(\w{1,8}));|&/gi,
    (whole, hex, decimal, name) => {
      const code = hex ? parseInt(hex as string, 16) : decimal ? Number(decimal) : null;
      const sign =
        code === null
          ? named[name as string]
          : code <= 0x10ffff
            ? String.fromCodePoint(code)
            : undefined;
      if (sign === undefined) throw new SheetInSvgError('malformed', `unknown reference ${whole}`);
      return sign;
    },
  );
}

/** Index after `mark`, from `from` on. */
function past(text: string, mark: string, from: number): number {
  const at = text.indexOf(mark, from);
  if (at < 0) throw new SheetInSvgError('malformed', `no ${mark} after ${from}`);
  return at + mark.length;
}

const quoteOrEnd = /["'>]/g;

/** Index after the `>` of a tag that opens at `from`, quoted values passed over. */
function pastTag(text: string, from: number): number {
  let at = from + 1;
  for (;;) {
    quoteOrEnd.lastIndex = at;
    const found = quoteOrEnd.exec(text);
    if (!found) throw new SheetInSvgError('malformed', `a tag at ${from} has no end`);
    if (found[0] === '>') return found.index + 1;
    at = past(text, found[0], found.index + 1);
  }
}

/** Index after a document type declaration, its internal subset passed over unread. */
function pastDoctype(text: string, from: number): number {
  const end = pastTag(text, from);
  const subset = text.indexOf('[', from);
  return subset < 0 || subset >= end ? end : past(text, '>', past(text, ']', subset));
}

const localName = /^<\/?(?:[^\s/>:]*:)?([^\s/>:]+)/;

/** Text of the sheet's element, or null where there is none. */
function sheetText(svg: string): string | null {
  const open: string[] = [];
  let text: string | null = null;
  let at = 0;
  for (;;) {
    const next = svg.indexOf('<', at);
    if (text !== null && next < 0) throw new SheetInSvgError('malformed', 'the sheet has no end');
    if (next < 0) return null;
    if (text !== null) text += decoded(svg.slice(at, next));
    if (svg.startsWith('<!--', next)) {
      at = past(svg, '-->', next + 4);
    } else if (svg.startsWith('<![CDATA[', next)) {
      at = past(svg, ']]>', next + 9);
      if (text !== null) text += svg.slice(next + 9, at - 3);
    } else if (svg.startsWith('<?', next)) {
      at = past(svg, '?>', next + 2);
    } else if (svg.startsWith('<!', next)) {
      at = pastDoctype(svg, next);
    } else {
      at = pastTag(svg, next);
      const name = localName.exec(svg.slice(next, Math.min(at, next + 200)))?.[1] ?? '';
      if (svg[next + 1] === '/') {
        if (open.pop() !== name)
          throw new SheetInSvgError('malformed', `</${name}> closes nothing`);
        if (text !== null) return text;
      } else if (text !== null) {
        throw new SheetInSvgError('malformed', `an element <${name}> inside the sheet`);
      } else if (svg[at - 2] !== '/') {
        if (name === sheetElement && open.includes('metadata')) text = '';
        if (open.push(name) > deepest) throw new SheetInSvgError('malformed', 'nested too deep');
      }
    }
  }
}

function depthOf(json: string): number {
  let [depth, most, inString] = [0, 0, false];
  for (let i = 0; i < json.length; i++) {
    const c = json.charCodeAt(i);
    if (inString) {
      if (c === 0x5c) i++;
      else if (c === 0x22) inString = false;
    } else if (c === 0x22) inString = true;
    else if (c === 0x7b || c === 0x5b) most = Math.max(most, ++depth);
    else if (c === 0x7d || c === 0x5d) depth--;
  }
  return most;
}

/**
 * The sheet that an SVG file carries, as plain data still to be checked against its schema.
 *
 * The file is scanned, never rendered or run, and no entity is expanded; the same code runs in Node
 * and in a browser. Files indented or quoted anew by another program are read too.
 *
 * @throws SheetInSvgError `noSheet`, `tooLarge` (above `sheetLimit`) or `malformed` (no XML, no JSON,
 * or nested deeper than 100).
 */
export function sheetFromSvg(svg: string): unknown {
  if (svg.length > sheetLimit) throw new SheetInSvgError('tooLarge', `${svg.length} characters`);
  const text = sheetText(svg);
  if (text === null) throw new SheetInSvgError('noSheet', `no <${sheetElement}> in <metadata>`);
  const json = text.replace(/\s+/g, '');
  if (depthOf(json) > deepest) throw new SheetInSvgError('malformed', 'nested too deep');
  try {
    return JSON.parse(json) as unknown;
  } catch (error) {
    throw new SheetInSvgError('malformed', error instanceof Error ? error.message : 'no JSON');
  }
}
