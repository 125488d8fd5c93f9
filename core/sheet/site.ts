import {
  absoluteError,
  atmosphereAt,
  parseReading,
  pressureError,
  probeError,
  standardPressure,
} from '../units/index.ts';
import { kept } from './kept.ts';
import type { Site } from './schema.ts';

/** Absolute pressures (Pa) that a barometer can show where people work; common practice, no source. */
export const barometerRange = { min: 20e3, max: 120e3 } as const;

/**
 * Absolute pressure of the air at a site (Pa): its barometer, else the standard atmosphere at its
 * altitude (ISO 2533), else 101.325 kPa. Throws OutOfRange for an altitude the standard does not
 * cover, ReadingError for a reading that cannot be taken.
 */
export const localPressure = (site: Site | undefined): number =>
  site ? airOf(site) : standardPressure;

const airOf = kept(function airOf({ barometer, altitude }: Site): number {
  if (barometer !== undefined)
    return parseReading(barometer, 'pressure', { defaultKind: 'absolute' }).value;
  if (altitude !== undefined) return atmosphereAt(parseReading(altitude, 'altitude').value);
  return standardPressure;
});

/** Limits of error at a site: of a probe (K) and of a pressure of the kind (Pa); 0 where unsaid. */
export function siteErrors(
  site: Site | undefined,
  kind: 'gauge' | 'absolute' | 'vacuum',
): { readonly T: number; readonly p: number } {
  if (!site) return { T: 0, p: absoluteError(kind, 0, 0) };
  const { T, barometer, instrument } = limitsOf(site);
  return { T, p: absoluteError(kind, instrument, barometer) };
}

/** Limits of error of a site's instruments: probe (K), barometer and gauge (Pa). */
const limitsOf = kept(function limitsOf({ probe, barometerError, gauge }: Site) {
  const T = probe === undefined ? 0 : probeError(parseReading(probe, 'temperatureDifference'));
  const barometer =
    barometerError === undefined
      ? 0
      : Math.abs(parseReading(barometerError, 'pressureDifference').value);
  let instrument = 0;
  if (gauge && 'plusMinus' in gauge)
    instrument = pressureError({
      by: 'plusMinus',
      plusMinus: parseReading(gauge.plusMinus, 'pressureDifference'),
    });
  else if (gauge)
    instrument = pressureError({
      by: 'class',
      class: gauge.class,
      low: parseReading(gauge.low, 'pressure', { defaultKind: 'gauge' }),
      high: parseReading(gauge.high, 'pressure', { defaultKind: 'gauge' }),
    });
  return { T, barometer, instrument };
});
