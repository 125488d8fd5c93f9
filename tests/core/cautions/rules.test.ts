import { describe, expect, it } from 'vitest';
import type { CautionCode, Judged } from '../../../core/cautions/caution.ts';
import { cautions } from '../../../core/cautions/rules.ts';
import { carbonDioxide } from '../../../core/substances/carbon-dioxide.ts';
import { water } from '../../../core/substances/water.ts';

/** A quiet place: 20 °C at the local atmosphere. */
const state = (change: Partial<Judged> = {}): Judged => ({
  id: 's',
  substance: 'water',
  hazards: water.hazards,
  T: 293.15,
  p: 101325,
  local: 101325,
  solid: false,
  triplePressure: 611.657,
  ...change,
});
const gas = (change: Partial<Judged> = {}): Judged =>
  state({
    substance: 'carbon-dioxide',
    hazards: carbonDioxide.hazards,
    triplePressure: 517950,
    ...change,
  });
const codes = (...states: Judged[]): readonly CautionCode[] =>
  cautions(states).map(({ code }) => code);
const one = (code: CautionCode, ...states: Judged[]) =>
  cautions(states).find((caution) => caution.code === code);

describe('cautions', () => {
  it('always say that lines are equilibrium, first and of the whole map', () => {
    expect(cautions([])).toEqual([{ code: 'equilibrium lines', at: [], numbers: {} }]);
    expect(cautions([state(), gas()])[0]?.code).toBe('equilibrium lines');
  });

  it('say no more of water at rest in a room', () => {
    expect(codes(state())).toEqual(['equilibrium lines']);
  });

  // Thresholds are common practice, no source.
  it.each<[CautionCode, string, Judged, Judged]>([
    [
      'pressure vessel',
      '0.5 bar of gauge pressure',
      state({ p: 101325 + 50e3 }),
      state({ p: 101325 + 50e3 + 1 }),
    ],
    [
      'pressure vessel',
      '0.5 bar above the air of 1480 m',
      state({ local: 84764, p: 84764 + 50e3 }),
      state({ local: 84764, p: 84764 + 50e3 + 1 }),
    ],
    ['high pressure', '100 MPa', state({ p: 100e6 - 1 }), state({ p: 100e6 })],
    ['scald', '50 °C', state({ T: 323.15 }), state({ T: 323.15 + 1e-6 })],
    ['vacuum', '0.1 bar below the local air', state({ p: 91325 }), state({ p: 91325 - 1 })],
    ['cold burn', '0 °C', gas({ T: 273.15 }), gas({ T: 273.15 - 1e-6 })],
    [
      'dry ice blocks lines',
      '1.2 times the triple pressure',
      gas({ T: 230, p: 517950 * 1.2 + 1 }),
      gas({ T: 230, p: 517950 * 1.2 }),
    ],
    [
      'dry ice blocks lines',
      'a solid at any pressure',
      gas({ T: 230, p: 50e6 }),
      gas({ T: 230, p: 50e6, solid: true }),
    ],
    ['dry ice blocks lines', '−10 °C', gas({ T: 263.15, p: 101325 }), gas({ T: 263.1, p: 101325 })],
  ])('%s is said past %s and not before', (code, _, before, past) => {
    expect(codes(before)).not.toContain(code);
    expect(codes(past)).toContain(code);
  });

  // A hazard of the substance stands wherever the substance does.
  it.each([
    'displaces air',
    'toxic',
    'flammable',
    'mildly flammable',
    'toxic in fire',
    'oxidiser',
    'asphyxiation',
  ] as const)('%s is said of every state of such a substance, and of no other', (hazard) => {
    expect(codes(state({ hazards: [hazard] }))).toContain(hazard);
    expect(codes(state({ hazards: ['pressure'] }))).not.toContain(hazard);
  });

  it('cryogenic is said below −90 °C', () => {
    expect(codes(state({ hazards: ['cryogenic'], T: 183.15 }))).not.toContain('cryogenic');
    expect(codes(state({ hazards: ['cryogenic'], T: 183.1 }))).toContain('cryogenic');
  });

  it('high pressure takes the place of pressure vessel', () => {
    expect(codes(state({ p: 200e6 }))).not.toContain('pressure vessel');
  });

  it('cautions of a substance are not said of another', () => {
    expect(codes(state({ T: 230, p: 101325, solid: true }))).not.toContain('cold burn');
    expect(codes(state({ T: 230, solid: true }))).not.toContain('dry ice blocks lines');
    expect(codes(gas({ T: 350 }))).not.toContain('scald');
    expect(codes(gas())).toContain('asphyxiation');
    expect(codes(state())).not.toContain('asphyxiation');
  });

  it('stand at each state that calls for them, with the worst number of all, once', () => {
    const hot = [
      state({ id: 'a', T: 340 }),
      state({ id: 'b' }),
      state({ id: 'c', T: 390, p: 3e5 }),
    ];
    expect(one('scald', ...hot)).toEqual({ code: 'scald', at: ['a', 'c'], numbers: { T: 390 } });
    expect(one('pressure vessel', ...hot)).toEqual({
      code: 'pressure vessel',
      at: ['c'],
      numbers: { gauge: 3e5 - 101325 },
    });
    const low = [state({ id: 'a', p: 20e3 }), state({ id: 'b', p: 2e3 })];
    expect(one('vacuum', ...low)).toEqual({ code: 'vacuum', at: ['a', 'b'], numbers: { p: 2e3 } });
    const cold = [gas({ id: 'a', T: 250, p: 2e6 }), gas({ id: 'b', T: 200, p: 2e6 })];
    expect(one('cold burn', ...cold)).toEqual({
      code: 'cold burn',
      at: ['a', 'b'],
      numbers: { T: 200 },
    });
    const all = codes(...hot, ...low, ...cold);
    expect(new Set(all).size).toBe(all.length);
  });

  it('never carry a number that is none', () => {
    const wild = [
      state({ p: 1e-12 }),
      state({ p: 9e8, T: 1200 }),
      gas({ T: 90, p: 1e-9, solid: true }),
    ];
    for (const { numbers } of cautions(wild))
      for (const value of Object.values(numbers)) expect(Number.isFinite(value)).toBe(true);
  });
});
