import type { StateResult } from '../../core/sheet/results.ts';
import type { View } from '../../core/sheet/schema.ts';
import { format, formatDifference, pressureAs, type UnitId } from '../../core/units/index.ts';
import type { Words } from '../words/en.ts';

/** What is true of one state, in rows. */
export function stateFacts(
  s: StateResult,
  view: View,
  local: number,
  words: Words,
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
    for (const m of s.margins) {
      if (m.boundary === null) continue;
      const thermal = m.direction === 'warmer' || m.direction === 'colder';
      const amount = thermal
        ? formatDifference(m.distance, view.temperature.unit, {
            ...deserved(s.error.T, 3),
            decimal,
          })
        : format(m.distance, view.pressure.unit as UnitId, { ...deserved(s.error.p, 3), decimal });
      const phase = s.state.parts[0]!.phase;
      const slack = thermal
        ? s.error.T > 0 &&
          ` ± ${formatDifference(s.error.T, view.temperature.unit, { digits: 1, decimal })}`
        : s.error.p > 0 &&
          ` ± ${format(s.error.p, view.pressure.unit as UnitId, { digits: 1, decimal })}`;
      facts.push([
        words.direction[m.direction],
        words.margin(m.direction, m.kind, phase, amount + (slack || '')),
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

const deserved = (error: number, digits: number) =>
  error > 0 ? { uncertainty: error } : { digits };
