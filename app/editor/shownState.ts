import type { PathState, StateResult } from '../../core/sheet/results.ts';
import type { View } from '../../core/sheet/schema.ts';
import { format, formatDifference, pressureAs, type UnitId } from '../../core/units/index.ts';
import type { Words } from '../words/en.ts';

/** Digits that a number deserves: those of its limits of error, else a number of significant ones. */
export const deserved = (error: number, otherwise: { digits: number } | { decimals: number }) =>
  error > 0 ? { uncertainty: error } : otherwise;

/** A state as the run table shows it, in the view's units. */
export function shownState(
  s: StateResult | PathState,
  view: View,
  local: number,
  pressureUnit: UnitId,
  words: Words,
): { readonly T: string; readonly p: string; readonly phase: string; readonly next: string } {
  const { decimal } = words;
  const unit = view.temperature.unit;
  const T = format(s.T, unit, { decimals: 1, decimal });
  const p = format(pressureAs(s.kind, s.p, local), pressureUnit, {
    // What is planned is told to a tenth of what the gauge can tell.
    ...(s.error.p > 0 ? { uncertainty: s.error.p / 10 } : { digits: 4 }),
    kind: s.kind,
    decimal,
  });
  return { T, p, phase: phaseText(s, words), next: nextText(s, view, words) };
}

const lineOf = (s: StateResult | PathState): string | null =>
  'on' in s ? s.on : s.state && s.state.parts.length > 1 ? 'saturation' : null;

/** The phase or phases, with shares where they are known; what the instruments leave open is said. */
export function phaseText(s: StateResult | PathState, words: Words): string {
  if (s.problem) return words.problem(s.problem);
  if (!s.state) return '';
  const on = lineOf(s);
  if (on === null && s.touches) return words.cannotTell(words.boundaryKind(s.touches));
  const { parts } = s.state;
  const [only] = parts;
  if (parts.length === 1)
    return on === null
      ? words.phase(only!.phase, only!.solid)
      : words.saturated(words.phase(only!.phase, only!.solid));
  const shares = parts.map((part) => {
    const name = words.phase(part.phase, part.solid);
    if (typeof part.fraction !== 'number') return name;
    return `${format(part.fraction, '%', { digits: 3, decimal: words.decimal })} ${name}`;
  });
  return shares.join(' + ');
}

/** The first boundary met warmer, else colder: what happens there and how far off it is. */
export function nextText(s: StateResult | PathState, view: View, words: Words): string {
  if (!s.state) return '';
  const on = lineOf(s);
  if (on !== null) return words.onThe(words.boundaryKind(on));
  const next =
    s.margins.find((m) => m.boundary !== null && m.direction === 'warmer') ??
    s.margins.find((m) => m.boundary !== null && m.direction === 'colder');
  if (!next?.boundary)
    return words.noMargin[s.margins[0]?.boundary === null ? s.margins[0].reason : 'none'];
  const amount = formatDifference(next.distance, view.temperature.unit, {
    ...deserved(s.error.T, { digits: 3 }),
    decimal: words.decimal,
  });
  return words.margin(next.direction, next.kind, s.state.parts[0]!.phase, amount);
}
