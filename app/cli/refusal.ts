import type { Medium } from '../../core/equilibrium/medium.ts';
import { OutOfRange, Undetermined, Unknown } from '../../core/errors.ts';
import { boundaryCurves } from '../../core/map/boundary.ts';
import { format, fromSI, ReadingError, type UnitId } from '../../core/units/index.ts';
import { en as words } from '../words/en.ts';

/** What was asked cannot be done; the message is the line that the user reads. */
export class Refusal extends Error {
  override readonly name = 'Refusal';
}

/** What a refusal may speak of: the place of the given, its units, the substance. */
export interface Context {
  readonly place?: string;
  readonly units?: { readonly T?: UnitId; readonly p?: UnitId };
  readonly medium?: Medium;
}

/** A range's end in the unit of the given, six digits, no trailing zeros. */
function shown(value: number, quantity: string, unit: string, units: Context['units']): string {
  if (quantity === 'T' || quantity === 'p') {
    const own = units?.[quantity] ?? (quantity === 'T' ? 'K' : 'Pa');
    const kind = quantity === 'p' ? 'absolute' : 'unstated';
    const rounded = Number(fromSI(value, own).toPrecision(6));
    if (rounded !== 0 && (Math.abs(rounded) < 1e-6 || Math.abs(rounded) >= 1e21))
      return `${rounded} ${own}${kind === 'absolute' ? '(a)' : ''}`;
    const decimals = (String(rounded).split('.')[1] ?? '').length;
    return format(value, own, { decimals, kind });
  }
  return `${Number(value.toPrecision(6))}${unit === '1' ? '' : ` ${unit}`}`;
}

/** A line's name that stands without a map beside it. */
export function boundaryName(m: Medium, id: string): string {
  const curves = boundaryCurves(m);
  const curve = curves.find((c) => c.id === id);
  if (!curve) return id;
  const forms = new Set(curves.filter((c) => c.kind === curve.kind).map((c) => c.form));
  return words.boundary(m.substance.id, curve.kind, curve.form, {
    kind: forms.size === 1,
    line: true,
  });
}

async function sentence(error: unknown, { units, medium }: Context): Promise<string | null> {
  if (error instanceof Refusal) return error.message;
  if (error instanceof ReadingError) return words.reading(error.issue);
  if (!(error instanceof OutOfRange || error instanceof Undetermined || error instanceof Unknown))
    return null;
  // Only a refusal needs the sheet's part of core, which takes its time to load.
  const { problemOf } = await import('../../core/sheet/evaluate.ts');
  const said = words.problem(problemOf(error), {
    boundary: (id) => (medium ? boundaryName(medium, id) : id),
    value: (value, quantity, unit) => shown(value, quantity, unit, units),
  });
  if (!(error instanceof Undetermined) || !medium) return said;
  const kind = boundaryCurves(medium).find((c) => c.id === error.boundary)?.kind;
  return kind ? `${said} ${words.terminal.bothSides(medium.substance.id, kind)}` : said;
}

/** The refusal behind an error that a user's givens can cause; any other error comes back as it is. */
export async function refusalOf(error: unknown, context: Context = {}): Promise<unknown> {
  const said = await sentence(error, context);
  if (said === null) return error;
  return new Refusal(context.place === undefined ? said : `${context.place}: ${said}`);
}
