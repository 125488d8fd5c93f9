import { describe, expect, it } from 'vitest';
import { givenLaws } from './givens.ts';
import { media } from './substances.ts';
import { tryLaw } from './try.ts';

/** Places tried per substance, shared out over the laws; set STATES for another number. */
const states = Number(process.env.STATES ?? 1e6);

describe.each(media)('$substance.id', (m) => {
  const held = givenLaws.filter(({ of }) => of(m));
  for (const law of held)
    it(law.name, () => {
      const seed = Number(process.env.SEED ?? 3);
      const share = Math.ceil(states / held.length);
      const trials = /refused/.test(law.name) ? Math.ceil(share / 100) : share;
      const { tested, worst, broken } = tryLaw(law, m, trials, seed);
      console.log(
        `${m.substance.id}: ${law.name}: ${tested} tests, ${worst.toPrecision(3)} of bound`,
      );
      expect(broken.slice(0, 20)).toEqual([]);
    });
});
