import { useState } from 'react';
import { answerAt, lineAtPressure, lineAtTemperature } from '../../core/sheet/answers.ts';
import { siteErrors } from '../../core/sheet/site.ts';
import {
  absolutePressure,
  format,
  formatDifference,
  formatReading,
  parseReading,
  pressureAs,
  ReadingError,
  standardPressure,
  type Reading,
  type UnitId,
} from '../../core/units/index.ts';
import type { Medium } from '../../core/equilibrium/medium.ts';
import type { Words } from '../words/en.ts';
import { airAt } from '../store/places.ts';
import { useApp, useWords } from './context.ts';
import { useMedium } from './useMedium.ts';

interface Here {
  readonly medium: Medium;
  readonly local: number;
  readonly temperatureUnit: '°C' | 'K' | '°F';
  readonly pressureUnit: UnitId;
  readonly kind: 'gauge' | 'absolute';
  readonly name: string;
  /** True without a sheet: nothing says where the reading was taken. */
  readonly atSeaLevel: boolean;
  readonly errors: (kind: 'gauge' | 'absolute' | 'vacuum') => { T: number; p: number };
}

const temperatureText = (T: number, here: Here, error: number, words: Words): string => {
  const { temperatureUnit: unit } = here;
  const { decimal } = words;
  const text = format(T, unit, {
    ...(error > 0 ? { uncertainty: error } : { decimals: 1 }),
    decimal,
  });
  if (!(error > 0)) return text;
  return `${text} ± ${formatDifference(error, unit, { digits: 1, decimal })}`;
};

const pressureText = (p: number, here: Here, words: Words): string =>
  format(pressureAs(here.kind, p, here.local), here.pressureUnit, {
    digits: 3,
    kind: here.kind,
    decimal: words.decimal,
  });

const spoken = (reading: Reading, words: Words): string => formatReading(reading, words.decimal);

/** What a typed reading means here: absolute pressure and boiling point, or boiling pressure. */
function answer(text: string, here: Here, words: Words): string | null {
  const e = words.editor;
  const { decimal } = words;
  let reading;
  try {
    reading = parseReading(text, 'pressure', { defaultKind: here.kind });
  } catch (asPressure) {
    try {
      const { value } = parseReading(text, 'temperature');
      const met = lineAtTemperature(here.medium, value);
      if (!met) return e.noLine(here.name);
      const at = `${format(met.p, 'kPa', { digits: 4, kind: 'absolute', decimal })}, ${pressureText(met.p, { ...here, kind: 'gauge' }, words)}`;
      return met.line === 'saturation' ? e.boilsAt(here.name, at) : e.sublimesAt(here.name, at);
    } catch (asTemperature) {
      const issue = [asTemperature, asPressure].find(
        (x) => x instanceof ReadingError && x.code !== 'wrongQuantity' && x.code !== 'unknownUnit',
      );
      const told = issue ?? asPressure;
      if (told instanceof ReadingError) return words.reading(told.issue);
      throw told;
    }
  }
  try {
    const p = absolutePressure(reading, here.local);
    const kind =
      reading.kind === 'vacuum' ? 'vacuum' : reading.kind === 'absolute' ? 'absolute' : 'gauge';
    const met = lineAtPressure(here.medium, p);
    const other =
      kind === 'absolute'
        ? format(pressureAs('gauge', p, here.local), 'kPa', { digits: 4, kind: 'gauge', decimal })
        : format(p, 'kPa', { digits: 4, kind: 'absolute', decimal });
    // A bare pressure is told with the kind it was taken for.
    const is = `${spoken(reading, words)} ${e.isAbsolute(other, here.atSeaLevel)}`;
    if (!met) return `${is} · ${e.noLine(here.name)}`;
    const error = here.errors(kind).p / met.slope;
    const at = temperatureText(met.T, here, error, words);
    const boils =
      met.line === 'saturation' ? e.boilsAt(here.name, at) : e.sublimesAt(here.name, at);
    return `${is} · ${boils}`;
  } catch (error) {
    if (error instanceof ReadingError) return words.reading(error.issue);
    throw error;
  }
}

/** Where the pointer stands, in a line. */
function placeText(place: { T: number; p: number }, here: Here, words: Words): string {
  const { decimal } = words;
  const at = answerAt(here.medium, place.T, place.p);
  const parts = [
    format(place.T, here.temperatureUnit, { decimals: 1, decimal }),
    pressureText(place.p, here, words),
  ];
  if (at.phase) {
    parts.push(words.phase(at.phase, at.solid));
    const next =
      at.margins.find((m) => m.boundary !== null && m.direction === 'warmer') ??
      at.margins.find((m) => m.boundary !== null && m.direction === 'colder');
    if (next?.boundary)
      parts.push(
        words.margin(
          next.direction,
          next.kind,
          at.phase,
          formatDifference(next.distance, here.temperatureUnit, { digits: 2, decimal }),
        ),
      );
  } else if (at.problem) parts.push(words.problem(at.problem));
  return parts.join(', ');
}

/** The reading line: takes a typed reading without any sheet, and follows the pointer. */
export function ReadingLine() {
  const words = useWords();
  const e = words.editor;
  const sheet = useApp((s) => s.sheet);
  const results = useApp((s) => s.results);
  const pointer = useApp((s) => s.pointer);
  const hint = useApp((s) => s.hint);
  const [text, setText] = useState('');
  const view = sheet?.views[0];
  const medium = useMedium(view?.substance ?? sheet?.substances[0] ?? 'water');
  if (!medium) return <div className="reading" />;
  const site = sheet?.sites[0];
  const here: Here = {
    medium,
    local: sheet ? airAt(sheet, results) : standardPressure,
    temperatureUnit: view?.temperature.unit ?? '°C',
    pressureUnit: (view?.second?.unit ?? view?.pressure.unit ?? 'bar') as UnitId,
    kind: view?.second?.kind ?? view?.pressure.kind ?? sheet?.pressureKind ?? 'gauge',
    name: words.substance(medium.substance.id),
    atSeaLevel: sheet === null,
    errors: (kind) => siteErrors(site, kind),
  };
  return (
    <section className="reading" aria-label={e.readingLineName}>
      <input
        aria-label={e.readingLine}
        placeholder={e.readingHint}
        value={text}
        maxLength={200}
        spellCheck={false}
        autoComplete="off"
        onChange={(event) => setText(event.target.value)}
      />
      <output className="answer">{text.trim() === '' ? '' : answer(text, here, words)}</output>
      <span className="pointer">
        {hint && <em className="hint">{hint.text}</em>}
        {pointer && !hint && (
          <>
            {e.underPointer}: <b>{placeText(pointer, here, words)}</b>
          </>
        )}
      </span>
    </section>
  );
}
