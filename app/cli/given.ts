import {
  absolutePressure,
  atmosphereAt,
  parseReading,
  standardPressure,
  type ParseOptions,
  type Reading,
} from '../../core/units/index.ts';
import { en as words } from '../words/en.ts';
import { Refusal, refusalOf } from './refusal.ts';

/** Local atmosphere (Pa) that gauge and vacuum readings count from, and whether anyone gave it. */
export interface Local {
  readonly p: number;
  readonly given: boolean;
}

/** The local atmosphere from `--altitude` or `--barometer`, else 101.325 kPa. */
export async function localOf(values: ReadonlyMap<string, string>): Promise<Local> {
  const altitude = values.get('altitude');
  const barometer = values.get('barometer');
  if (altitude !== undefined && barometer !== undefined)
    throw new Refusal(words.terminal.eitherOf(['--altitude', '--barometer']));
  try {
    if (altitude !== undefined)
      return { p: atmosphereAt(parseReading(altitude, 'altitude').value), given: true };
    if (barometer !== undefined) {
      const reading = parseReading(barometer, 'pressure', { defaultKind: 'absolute' });
      if (reading.kind !== 'absolute') throw new Refusal(words.terminal.barometerKind);
      return { p: absolutePressure(reading, standardPressure), given: true };
    }
  } catch (error) {
    throw await refusalOf(error, {
      place: altitude === undefined ? '--barometer' : '--altitude',
    });
  }
  return { p: standardPressure, given: false };
}

/** A pressure as given, settled: absolute where no kind was written. */
export interface GivenPressure {
  readonly reading: Reading;
  /** Absolute, Pa. */
  readonly p: number;
  readonly kindWritten: boolean;
  /** Whether the local atmosphere entered. */
  readonly relative: boolean;
}

/** Throws ReadingError. */
export function pressureGiven(
  text: string,
  local: Local,
  options: ParseOptions = {},
): GivenPressure {
  const written = parseReading(text, 'pressure', options);
  const kindWritten = written.kind !== 'unstated';
  const reading = kindWritten
    ? written
    : parseReading(text, 'pressure', { ...options, defaultKind: 'absolute' });
  return {
    reading,
    p: absolutePressure(reading, local.p),
    kindWritten,
    relative: reading.kind !== 'absolute',
  };
}

/** What the output must say of how the pressures were understood. */
export function pressureNotes(
  pressures: readonly Pick<GivenPressure, 'kindWritten' | 'relative'>[],
  local: Local,
): readonly string[] {
  const notes: string[] = [];
  if (pressures.some(({ kindWritten }) => !kindWritten)) notes.push(words.terminal.absolute);
  if (!local.given && pressures.some(({ relative }) => relative))
    notes.push(words.terminal.standardAtmosphere);
  return notes;
}
