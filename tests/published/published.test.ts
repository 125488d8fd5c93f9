import { describe, expect, it } from 'vitest';
import { checkRows, evaluateCheck, type CheckRow } from '../../core/checks/check.ts';
import { medium } from '../../core/equilibrium/medium.ts';
import { catalogue } from '../../core/substances/catalogue.ts';

/** Values per substance, so that none is lost unseen. */
const counts: Readonly<Record<string, number>> = {
  water: 354,
  'carbon-dioxide': 195,
  ammonia: 119,
  'ammonia-1993': 150,
  propane: 62,
  isobutane: 143,
  'n-butane': 130,
  r134a: 179,
  r1234yf: 40,
  'r1234ze-e': 40,
  ethanol: 38,
  nitrogen: 165,
  oxygen: 22,
  argon: 146,
  methane: 191,
};

const provenances = [
  'published, two texts',
  'published, one text',
  'recalled',
  'computed elsewhere',
  'computed',
];

const called = ({ kind, at, property, printed, source, provenance }: CheckRow): string => {
  const state = Object.entries(at)
    .map(([k, x]) => `${k} ${x}`)
    .join(', ');
  return `${kind}(${state}).${property} is ${printed}: ${source} [${provenance}]`;
};

const all = await Promise.all(
  catalogue.map(async ({ id, load, checks }) => ({
    id,
    m: medium(await load()),
    rows: checkRows(await checks()),
  })),
);

describe.each(all)('$id', ({ id, m, rows }) => {
  it(`has ${counts[id]} values, each marked with where it comes from`, () => {
    expect(rows).toHaveLength(counts[id]!);
    for (const { provenance, source } of rows) {
      expect(provenances).toContain(provenance);
      expect(source).not.toBe('');
    }
    // Values from outside are most of them; computed ones guard only.
    const outside = rows.filter(({ provenance }) => provenance !== 'computed');
    expect(outside.length).toBeGreaterThan(0.9 * rows.length);
  });

  for (const row of rows)
    it(called(row), () => {
      const { computed, value, toleranceAbs, passes } = evaluateCheck(m, row);
      expect(computed).toBeTypeOf('number');
      expect(Math.abs(computed! - value)).toBeLessThanOrEqual(toleranceAbs);
      expect(passes).toBe(true);
    });
});

describe('evaluateCheck', () => {
  const [{ m, rows }] = all as [(typeof all)[number]];
  it('fails a value that is off by two tolerances', () => {
    const row = { ...rows[0]!, value: rows[0]!.value + 2 * rows[0]!.toleranceAbs };
    expect(evaluateCheck(m, row).passes).toBe(false);
  });
  it('throws RangeError for a kind that it does not know', () => {
    expect(() => evaluateCheck(m, { ...rows[0]!, kind: 'alchemy' })).toThrow(RangeError);
  });
});
