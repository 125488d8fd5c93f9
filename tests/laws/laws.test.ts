import { describe, expect, it } from 'vitest';
import { laws } from './laws.ts';
import { media } from './substances.ts';
import { tryLaw } from './try.ts';

describe.each(media)('$substance.id', (m) => {
  for (const law of laws.filter(({ of }) => of(m)))
    it(law.name, () => {
      const { tested, broken } = tryLaw(law, m, 1500, 1);
      expect(broken.slice(0, 5)).toEqual([]);
      // Places where a law has nothing to say are passed over; they must not be most of them.
      expect(tested).toBeGreaterThan(500);
    });
});
