import { describe, expect, it } from 'vitest';
import { OutOfRange } from '../../core/errors.ts';
import { altitudeOf, atmosphereAt, geopotentialAltitude } from '../../core/units/index.ts';

/*
 * ISO 2533:1975, the same layer as the U.S. Standard Atmosphere 1976 and the ICAO standard
 * atmosphere. Rows recalled; a row counts as agreed within one unit of its last printed digit.
 */
const geometric = [
  [0, 101325, 1],
  [500, 95461, 1],
  [1000, 89876, 1],
  [1500, 84560, 10],
  [2000, 79501, 1],
  [3000, 70121, 1],
  [4000, 61660, 10],
  [5000, 54048, 10],
] as const;

const geopotential = [
  [0, 101325, 1],
  [1000, 89874.6, 0.1],
  [2000, 79495.2, 0.1],
  [5000, 54019.9, 1],
  [10000, 26436, 1],
  [11000, 22632, 1],
] as const;

/** Computed from ISO 2533, not published: kPa to two decimals at geopotential altitudes. */
const computed = [
  [0, 101.33],
  [500, 95.46],
  [1000, 89.87],
  [1500, 84.56],
  [2000, 79.5],
  [3000, 70.11],
  [4000, 61.64],
] as const;

describe('atmosphereAt', () => {
  it.each(geometric)(
    'at geometric %d m is %d Pa within %d (ISO 2533:1975, recalled)',
    (z, p, unit) => {
      expect(Math.abs(atmosphereAt(geopotentialAltitude(z)) - p)).toBeLessThanOrEqual(unit);
    },
  );

  it.each(geopotential)(
    'at geopotential %d m is %d Pa within %d (ISO 2533:1975, recalled)',
    (H, p, unit) => {
      expect(Math.abs(atmosphereAt(H) - p)).toBeLessThanOrEqual(unit);
    },
  );

  it.each(computed)('at %d m is %d kPa (computed from ISO 2533, not published)', (H, kPa) => {
    expect(Math.abs(atmosphereAt(H) / 1000 - kPa)).toBeLessThanOrEqual(0.0051);
  });

  it('obeys hydrostatics: dp/dH = −ρ g with the lapse of the layer', () => {
    for (let H = -1900; H < 11000; H += 700) {
      const slope = (atmosphereAt(H + 1) - atmosphereAt(H - 1)) / 2;
      const density = atmosphereAt(H) / (287.05287 * (288.15 - 0.0065 * H));
      expect(Math.abs(slope / (-density * 9.80665) - 1)).toBeLessThan(1e-7);
    }
  });

  it('covers −2000 to 11000 m, ends included, and nothing else', () => {
    expect(atmosphereAt(-2000)).toBeGreaterThan(atmosphereAt(0));
    expect(atmosphereAt(11000)).toBeGreaterThan(0);
    for (const H of [-2000.1, 11000.1, NaN, Infinity])
      expect(() => atmosphereAt(H)).toThrow(OutOfRange);
  });
});

describe('altitudeOf', () => {
  it('undoes atmosphereAt over the whole layer', () => {
    for (let H = -2000; H <= 11000; H += 250)
      expect(Math.abs(altitudeOf(atmosphereAt(H)) - H)).toBeLessThan(1e-8);
  });

  it('refuses what lies outside', () => {
    for (const p of [0, 20000, 130000, NaN]) expect(() => altitudeOf(p)).toThrow(OutOfRange);
  });
});

describe('geopotentialAltitude', () => {
  // r·z/(r + z) by hand: 1000 − 1000²/6 356 766 = 999.8427.
  it('of 1000 m is 999.8427 m', () => {
    expect(geopotentialAltitude(1000)).toBeCloseTo(999.8427, 4);
  });
});
