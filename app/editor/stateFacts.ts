import type { StateResult } from '../../core/sheet/results.ts';
import type { View } from '../../core/sheet/schema.ts';
import type { Medium } from '../../core/equilibrium/medium.ts';
import type { Margin } from '../../core/map/margins.ts';
import { marginError } from '../../core/sheet/marginError.ts';
import {
  format,
  formatDifference,
  pressureAs,
  type DigitOptions,
  type UnitId,
} from '../../core/units/index.ts';
import type { Words } from '../words/en.ts';

/** A boundary so far off in pressure that it says nothing of this state. */
const isFar = (s: StateResult, margin: Margin): boolean =>
  margin.direction === 'higher pressure' &&
  margin.boundary !== null &&
  margin.distance > 50 * s.p &&
  margin.distance > 10e6;

/** What is true of one state, in rows; `ready` tells how far off its margins may be. */
export function stateFacts(
  s: StateResult,
  view: View,
  local: number,
  words: Words,
  ready: Medium | null,
): readonly (readonly [string, string])[] {
  const { decimal } = words;
  const e = words.editor;
  const facts: [string, string][] = [];
  const unit = (view.second?.unit ?? view.pressure.unit) as UnitId;
  facts.push([
    e.pressure,
    `${format(s.p, view.pressure.unit as UnitId, { digits: 4, kind: 'absolute', decimal })}, ${format(pressureAs('gauge', s.p, local), unit, { digits: 3, kind: 'gauge', decimal })}`,
  ]);
  if (s.problem) facts.push([e.phase, words.problem(s.problem)]);
  if (s.state) {
    const parts = s.state.parts.map((part) => {
      const name = words.phase(part.phase, part.solid);
      return typeof part.fraction === 'number' && s.state!.parts.length > 1
        ? `${format(part.fraction, '%', { digits: 3, decimal })} ${name}`
        : name;
    });
    facts.push([
      e.phase,
      s.touches ? words.cannotTell(words.boundaryKind(s.touches)) : parts.join(', '),
    ]);
    for (const margin of s.margins) {
      if (margin.boundary === null || isFar(s, margin)) continue;
      const thermal = margin.direction === 'warmer' || margin.direction === 'colder';
      const slack =
        ready && (s.error.T > 0 || s.error.p > 0) ? marginError(ready, s, margin, s.error) : null;
      const show = (value: number, digits: DigitOptions): string =>
        thermal
          ? formatDifference(value, view.temperature.unit, { ...digits, decimal })
          : format(value, view.pressure.unit as UnitId, { ...digits, decimal });
      const amount =
        slack === null || slack === 0
          ? show(margin.distance, { digits: 3 })
          : `${show(margin.distance, { uncertainty: slack })} ± ${show(slack, { digits: 1 })}`;
      facts.push([
        words.direction[margin.direction],
        words.margin(margin.direction, margin.kind, s.state.parts[0]!.phase, amount),
      ]);
    }
    const single = s.state.parts.length === 1 ? s.state.parts[0]!.properties : null;
    if (single) {
      facts.push([e.density, format(single.rho, 'kg/m³', { digits: 4, decimal })]);
      facts.push([e.enthalpy, format(single.h, 'kJ/kg', { digits: 4, decimal })]);
    }
  }
  return facts;
}
