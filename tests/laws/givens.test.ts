import { describe, expect, it } from 'vitest';
import { givenLaws } from './givens.ts';
import { media } from './substances.ts';
import { tryLaw } from './try.ts';

describe.each(media)('$substance.id', (m) => {
  for (const law of givenLaws.filter(({ of }) => of(m)))
    it(law.name, () => {
      // The slow ones are tried less often; a trial that draws nothing known is passed over.
      const trials = /refused/.test(law.name) ? 20 : 1200;
      const { tested, broken } = tryLaw(law, m, trials, 1);
      expect(broken.slice(0, 5)).toEqual([]);
      expect(tested).toBeGreaterThan(200);
    });
});
