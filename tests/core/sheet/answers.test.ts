import { describe, expect, it } from 'vitest';
import { answerAt, lineAtPressure, lineAtTemperature } from '../../../core/sheet/answers.ts';
import { media } from '../../laws/substances.ts';

describe.each(media)('single readings of $substance.id', (m) => {
  const { sublimation } = m.substance;
  const coldest = sublimation[0]?.range.Tmin ?? m.triple.T;

  it('meet one line by temperature and by pressure, from the coldest to the critical point', () => {
    for (let i = 0; i <= 50; i++) {
      const T = coldest + ((m.critical.T - coldest) * i) / 50;
      const at = lineAtTemperature(m, Math.min(T, m.critical.T))!;
      expect(at.line).toBe(T < m.triple.T ? 'sublimation' : 'saturation');
      const back = lineAtPressure(m, at.p);
      expect(back?.line).toBe(at.line);
      expect(Math.abs(back!.T - at.T)).toBeLessThan(1e-4);
    }
  });

  it('meet none beyond the lines that are published', () => {
    expect(lineAtTemperature(m, m.critical.T * 1.01)).toBeNull();
    expect(lineAtPressure(m, m.critical.p * 1.01)).toBeNull();
    expect(lineAtTemperature(m, coldest * 0.99)).toBeNull();
  });

  it('are told a phase or a problem, never a guess', () => {
    const cold = answerAt(m, m.triple.T * 0.99, m.triple.p * 100);
    if (m.substance.melting.length > 0) expect(cold.phase).toBe('solid');
    else expect(cold).toMatchObject({ phase: null, problem: { code: 'outOfRange' } });
  });
});
