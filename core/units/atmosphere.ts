import { OutOfRange } from '../errors.ts';

const source = 'ISO 2533:1975';
const sea = { p: 101325, T: 288.15 };
/** Kelvin a geopotential metre. */
const lapse = 0.0065;
const exponent = 9.80665 / (287.05287 * lapse);
/** Nominal radius of the earth, m. */
const radius = 6356766;

const pressureAt = (H: number): number => sea.p * (1 - (lapse * H) / sea.T) ** exponent;

/** Geopotential altitude, m, for which the standard atmosphere is used here. */
const altitudeRange = { min: -2000, max: 11000 } as const;
const pressureRange = { min: pressureAt(altitudeRange.max), max: pressureAt(altitudeRange.min) };

/** Pressure of the standard atmosphere at sea level, Pa. Source: ISO 2533:1975. */
export const standardPressure = sea.p;

/**
 * How far weather moves the local pressure either way, Pa. Common practice, no source; for sites
 * that give an altitude and no barometer.
 */
export const weatherSwing = 3000;

/**
 * Pressure (Pa) of the standard atmosphere at geopotential altitude H (m).
 *
 * Method: p = 101325 Pa · (1 − 0.0065 H / 288.15)^(g/(R·0.0065)), with g = 9.80665 m/s² and
 * R = 287.05287 J/(kg·K): the layer of constant lapse.
 * Domain: −2000 m to 11000 m, ends included; elsewhere, NaN included, throws OutOfRange. Source:
 * ISO 2533:1975, the same as the ICAO standard atmosphere. Altitudes on maps are near enough
 * geopotential for a plant: 1000 m differs by 0.16 m or 2 Pa.
 *
 * @example atmosphereAt(1000) // ≈ 89874.6
 */
export function atmosphereAt(H: number): number {
  if (!(H >= altitudeRange.min && H <= altitudeRange.max))
    throw new OutOfRange('altitude', H, altitudeRange, source, 'm');
  return pressureAt(H);
}

/**
 * Geopotential altitude (m) at which the standard atmosphere has pressure p (Pa): the inverse of
 * `atmosphereAt`, over the same layer. Elsewhere, NaN included, throws OutOfRange.
 */
export function altitudeOf(p: number): number {
  if (!(p >= pressureRange.min && p <= pressureRange.max))
    throw new OutOfRange('pressure', p, pressureRange, source, 'Pa');
  return (sea.T / lapse) * (1 - (p / sea.p) ** (1 / exponent));
}

/**
 * Geopotential altitude (m) of geometric altitude z (m): r·z/(r + z) with r = 6 356 766 m.
 * Source: ISO 2533:1975.
 */
export function geopotentialAltitude(z: number): number {
  return (radius * z) / (radius + z);
}
