import { describe, expect, it } from 'vitest';
import type { CheckResult } from '../../../core/checks/check.ts';
import { catalogue } from '../../../core/substances/catalogue.ts';
import type { Substance } from '../../../core/substances/substance.ts';
import { given, ran } from './ran.ts';

describe('about', () => {
  it.each(catalogue.map(({ id }) => id))(
    'about %s tells sources in full, hazards, and that every value is met',
    async (id) => {
      const { status, out, err } = await ran('about', id);
      expect([status, err]).toEqual([0, '']);
      const substance = await catalogue.find((e) => e.id === id)!.load();
      expect(out).toContain(substance.fluid.source);
      expect(out).toContain(substance.cas);
      for (const { quantity, figure } of substance.uncertainty) {
        expect(out).toContain(quantity);
        expect(out).toContain(figure);
      }
      expect(out).toContain('authorised people decide');
      expect(out).toMatch(/All \d+ values are met within their tolerance\./);
      expect(out).not.toMatch(/undefined|NaN|\[object/);
    },
  );

  it('says which boundaries are not published', async () => {
    const { out } = await ran('about', 'R-134a');
    expect(out).toMatch(/melting line +no equation for it is published/);
    expect(out).toMatch(/sublimation line +no equation for it is published/);
  });

  it('about ammonia --checks has a line for every value, in the units of its source', async () => {
    const { out } = await ran('about', 'ammonia', '--checks');
    const { checks } = await given<{ checks: CheckResult[] }>('about', 'ammonia');
    // K. Gao et al. 2023, check values: 200 K, 50 mol/dm³ (one public transcription).
    expect(out).toMatch(/p +555\.5631 MPa +555\.563\d* +−?0\.0000\d+ +\d+ % +T = 200 K/);
    const table = out.slice(out.indexOf('Every value'));
    expect(table.split('\n').filter((line) => /\d %\s/.test(line))).toHaveLength(checks.length);
  });

  it('about water --json is the substance and every check with its deviation', async () => {
    const { substance, checks } = await given<{ substance: Substance; checks: CheckResult[] }>(
      'about',
      'water',
    );
    expect(substance.id).toBe('water');
    expect(checks.length).toBeGreaterThan(300);
    for (const { computed, value, deviation, toleranceAbs, passes } of checks) {
      expect(passes).toBe(true);
      expect(computed! - value).toBe(deviation);
      expect(Math.abs(deviation!)).toBeLessThanOrEqual(toleranceAbs);
    }
  });

  it.each([
    ['a blend', ['R-407C'], /R-407C.*boils over a range/],
    ['an azeotrope', ['R-507A'], /R-507A.*at one pressure only/],
    ['part of a name', ['ammon'], /ammonia \(NH3\), ammonia-1993 \(NH3\)/],
    ['both ways at once', ['water', '--json', '--checks'], /--checks or --json/],
  ])('%s is refused with one line and status 2', async (_, args, message) => {
    const { status, out, err } = await ran('about', ...args);
    expect([status, out]).toEqual([2, '']);
    expect(err).toMatch(message);
  });
});
