import { describe, expect, it } from 'vitest';
import { laws } from './laws.ts';
import { media } from './substances.ts';
import { tryLaw } from './try.ts';

/** Places tried per substance, shared out over the laws; set STATES for another number. */
const states = Number(process.env.STATES ?? 1e6);

describe.each(media)('$substance.id', (m) => {
  const held = laws.filter(({ of }) => of(m));
  for (const law of held)
    it(law.name, () => {
      const seed = Number(process.env.SEED ?? 2);
      const { tested, worst, broken } = tryLaw(law, m, Math.ceil(states / held.length), seed);
      console.log(
        `${m.substance.id}: ${law.name}: ${tested} tests, ${worst.toPrecision(3)} of bound`,
      );
      expect(broken.slice(0, 20)).toEqual([]);
    });
});
