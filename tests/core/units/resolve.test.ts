import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  absolutePressure,
  atmosphereAt,
  gaugePressure,
  parseReading,
  pressureAs,
  ReadingError,
  temperature,
  toSI,
} from '../../../core/units/index.ts';

const pressure = (text: string) => parseReading(text, 'pressure');
const issueOf = (action: () => unknown) => {
  try {
    action();
  } catch (error) {
    if (error instanceof ReadingError) return error.issue;
    throw error;
  }
  throw new Error('did not throw');
};

describe('absolutePressure', () => {
  it('gauge adds, vacuum subtracts, absolute stands', () => {
    expect(absolutePressure(pressure('1 bar(g)'), 101325)).toBe(201325);
    expect(absolutePressure(pressure('-0.3 bar(g)'), 101325)).toBe(71325);
    expect(absolutePressure(pressure('600 mmHg vacuum'), toSI(760, 'mmHg'))).toBeCloseTo(
      toSI(160, 'mmHg'),
      8,
    );
    expect(absolutePressure(pressure('50 kPa(a)'), 101325)).toBe(50000);
  });

  // 101.325 − 26 × 3.386388640341 kPa = 13.279 kPa, by hand from the conventional inch of mercury.
  it('26 inHg vacuum is 13.28 kPa at sea level', () => {
    expect(absolutePressure(pressure('26 inHg vacuum'), atmosphereAt(0)) / 1000).toBeCloseTo(
      13.279,
      3,
    );
  });

  it('26 inHg vacuum is impossible at 1600 m, and the error says where it was asked', () => {
    const local = atmosphereAt(1600);
    const reading = pressure('26 inHg vacuum');
    const issue = issueOf(() => absolutePressure(reading, local));
    expect(issue).toEqual({
      code: 'belowZeroAbsolute',
      reading,
      kind: 'vacuum',
      value: local - reading.value,
      local,
    });
    expect(local - reading.value).toBeLessThan(0);
  });

  it('nothing at or below zero passes', () => {
    const codeOf = (text: string) => issueOf(() => absolutePressure(pressure(text), 101325)).code;
    expect(codeOf('0 Pa(a)')).toBe('belowZeroAbsolute');
    expect(codeOf('-1 bar(a)')).toBe('belowZeroAbsolute');
    expect(codeOf('-1.02 bar(g)')).toBe('belowZeroAbsolute');
    expect(codeOf('101325 Pa vac')).toBe('belowZeroAbsolute');
  });

  it('needs a kind, a pressure and a local atmosphere', () => {
    expect(issueOf(() => absolutePressure(pressure('2 bar'), 101325)).code).toBe('unstatedKind');
    expect(issueOf(() => absolutePressure(parseReading('5 K', 'temperature'), 101325)).code).toBe(
      'notThatQuantity',
    );
    expect(() => absolutePressure(pressure('2 bar(a)'), NaN)).toThrow(RangeError);
    expect(() => absolutePressure(pressure('2 bar(g)'), 0)).toThrow(RangeError);
  });

  it('moving to another site moves the absolute pressure by the difference of atmospheres', () => {
    const reading = pressure('15 psig');
    const [low, high] = [atmosphereAt(0), atmosphereAt(2000)];
    expect(absolutePressure(reading, low) - absolutePressure(reading, high)).toBeCloseTo(
      low - high,
      6,
    );
  });
});

describe('pressureAs', () => {
  it('undoes absolutePressure for every kind', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 1, max: 1e9, noNaN: true }),
        fc.double({ min: 2e4, max: 1.1e5, noNaN: true }),
        (p, pLocal) => {
          expect(pressureAs('absolute', p, pLocal)).toBe(p);
          expect(pressureAs('gauge', p, pLocal)).toBe(gaugePressure(p, pLocal));
          expect(pLocal - pressureAs('vacuum', p, pLocal)).toBeCloseTo(p, 5);
          expect(pLocal + pressureAs('gauge', p, pLocal)).toBeCloseTo(p, 5);
        },
      ),
    );
  });
});

describe('temperature', () => {
  it('gives kelvin, of temperatures only', () => {
    expect(temperature(parseReading('0 °C', 'temperature'))).toBe(273.15);
    expect(issueOf(() => temperature(parseReading('5 K', 'temperatureDifference'))).code).toBe(
      'notThatQuantity',
    );
  });
});
