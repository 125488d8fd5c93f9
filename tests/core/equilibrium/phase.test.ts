import { describe, expect, it } from 'vitest';
import { medium } from '../../../core/equilibrium/medium.ts';
import { stablePhase } from '../../../core/equilibrium/phase.ts';
import { meltingPressureRange } from '../../../core/equilibrium/solidLines.ts';
import { Undetermined, Unknown } from '../../../core/errors.ts';
import { carbonDioxide } from '../../../core/substances/carbon-dioxide.ts';
import { water } from '../../../core/substances/water.ts';

describe('stablePhase', () => {
  const gas = medium(carbonDioxide);
  const steam = medium(water);

  it('knows a solid up to the end of the equations, and tells where a melting line ends before', () => {
    const tops = carbonDioxide.melting.map((line) => meltingPressureRange(gas, line)[1]);
    const top = Math.max(...tops);
    const { pmax } = carbonDioxide.fluid.validity;
    expect(top).toBeGreaterThan(0.99 * pmax);
    expect(stablePhase(gas, 150, pmax)).toMatchObject({ phase: 'solid', solid: 'dry ice' });
    if (top * (1 + 1e-4) < pmax)
      for (const T of [150, 250, 320]) expect(() => stablePhase(gas, T, pmax)).toThrow(Unknown);
    expect(stablePhase(gas, 500, pmax).phase).toBe('supercritical');
  });

  it('names which fraction fixes a state on a boundary', () => {
    const caught = (call: () => unknown): unknown => {
      try {
        return call();
      } catch (error) {
        return error;
      }
    };
    const { T, p } = steam.triple;
    expect(caught(() => stablePhase(steam, T, p))).toBeInstanceOf(Undetermined);
    expect(caught(() => stablePhase(gas, gas.triple.T, gas.triple.p))).toBeInstanceOf(Undetermined);
  });

  it('leaves the form of ices III to VII open and gives no density', () => {
    for (const [T, p] of [
      [250, 300e6],
      [260, 500e6],
      [290, 900e6],
    ] as const)
      expect(stablePhase(steam, T, p)).toMatchObject({ phase: 'solid', solid: null, rho: null });
  });
});
