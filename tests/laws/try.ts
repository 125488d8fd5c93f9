import type { Medium } from '../../core/equilibrium/medium.ts';
import { random } from '../random.ts';
import { Finding, type Law } from './laws.ts';

/** Tries a law at `n` seeded random places. A thrown error counts as a breach, not as an end. */
export function tryLaw(law: Law, m: Medium, n: number, seed: number): Finding {
  const r = random(seed);
  const out = new Finding();
  for (let i = 0; i < n; i++) {
    try {
      law.trial(m, r, out);
    } catch (error) {
      out.claim(false, () => String(error));
    }
  }
  return out;
}
