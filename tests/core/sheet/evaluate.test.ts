import { describe, expect, it } from 'vitest';
import { evaluate } from '../../../core/sheet/evaluate.ts';
import {
  demos,
  deepFreeze,
  notNumbers,
  resultsOf,
  sheetOf,
  someFrame,
  substances,
  waterSheet,
} from './sheets.ts';

/**
 * Saturation pressure of water (Pa), IAPWS SR1-86(1992), equation 1; coefficients recalled. It agrees
 * with the equation of state within 0.02 % up to 600 K or so.
 */
function vapourPressure(T: number): number {
  const tau = 1 - T / 647.096;
  const a = [-7.85951783, 1.84408259, -11.7866497, 22.6807411, -15.9618719, 1.80122502];
  const e = [1, 1.5, 3, 3.5, 4, 7.5];
  return 22.064e6 * Math.exp((647.096 / T) * a.reduce((sum, k, i) => sum + k * tau ** e[i]!, 0));
}

const state = (data: unknown, i = 0) => resultsOf(data).states[i]!;

describe.each(demos)('evaluate(…) of %s', (_, data) => {
  it('gives the same twice, from a sheet that it cannot change', () => {
    const sheet = deepFreeze(sheetOf(data));
    const first = evaluate(sheet, substances, someFrame);
    expect(evaluate(sheet, substances, someFrame)).toEqual(first);
    // The order of work leaves no trace: another sheet between the two.
    for (const [, other] of demos) resultsOf(other);
    expect(JSON.stringify(evaluate(sheet, substances, someFrame))).toBe(JSON.stringify(first));
  });

  it('gives plain data without a number that is none', () => {
    const results = resultsOf(data);
    expect(structuredClone(results)).toEqual(results);
    expect(notNumbers(results)).toEqual([]);
  });

  it('says of each state its place, and problem or parts whose fractions make one', () => {
    const results = resultsOf(data);
    const states = [...results.states, ...results.paths.flatMap((path) => path.states)];
    expect(states.length).toBeGreaterThan(0);
    for (const { state: at, problem, margins } of states) {
      expect(at === null).toBe(problem !== null);
      if (!at) continue;
      const whole = at.parts.reduce((sum, { fraction }) => sum + (fraction as number), 0);
      expect(whole).toBeCloseTo(1, 12);
      expect(margins).toHaveLength(4);
    }
  });

  it('draws each view with boundaries and fields', () => {
    const { maps } = resultsOf(data);
    expect(maps).toHaveLength(sheetOf(data).views.length);
    for (const map of maps) {
      expect(map.boundaries.length).toBeGreaterThan(0);
      expect(map.regions.length).toBeGreaterThan(1);
      expect([map.width, map.height]).toEqual([150, 100]);
    }
  });
});

describe('evaluate(…) at a site', () => {
  const boiling = { p: '0 bar(g)', vapourFraction: '0 %' };

  it('knows the air at 1480 m and that water boils there at less', () => {
    const data = waterSheet([boiling], [{ altitude: '1480 m' }]);
    const [site] = resultsOf(data).sites;
    // ISO 2533:1975, computed: 101325 (1 − 0.0065·1480/288.15)^5.25588.
    expect(site!.local).toBeCloseTo(84763.7, 0);
    expect(site!.from).toBe('altitude');
    const { T, p } = state(data);
    expect(p).toBe(site!.local);
    expect(Math.abs(vapourPressure(T) / p - 1)).toBeLessThan(2e-4);
    expect(T - 273.15).toBeGreaterThan(95);
    expect(T - 273.15).toBeLessThan(95.3);
  });

  it('takes a barometer before an altitude, and the standard atmosphere without both', () => {
    const local = (site: Record<string, unknown>) => resultsOf(waterSheet([], [site])).sites[0]!;
    expect(local({ altitude: '1480 m', barometer: '860 hPa' })).toMatchObject({
      local: 86000,
      from: 'barometer',
    });
    expect(local({})).toMatchObject({ local: 101325, from: 'standard' });
  });

  it('moving a state to another site keeps its reading and moves its absolute pressure', () => {
    const sites = [{ altitude: '0 m' }, { altitude: '1480 m' }];
    const at = (site: string) =>
      sheetOf(waterSheet([{ T: '120 °C', p: '1.5 bar(g)', site }], sites));
    const [low, high] = [at('site-1'), at('site-2')];
    const item = (sheet: typeof low) => sheet.items[0] as { readonly p?: string };
    expect(item(high).p).toBe(item(low).p);
    const p = (sheet: typeof low) => evaluate(sheet, substances, someFrame).states[0]!.p;
    expect(p(low)).toBeCloseTo(251325, 6);
    expect(p(low) - p(high)).toBeCloseTo(101325 - 84763.7, 0);
    expect(p(sheetOf(waterSheet([{ T: '120 °C', p: '2.5 bar(a)', site: 'site-2' }], sites)))).toBe(
      250000,
    );
  });

  it('a vacuum counts down from the air of its site', () => {
    const sites = [{ altitude: '1480 m' }];
    expect(state(waterSheet([{ T: '20 °C', p: '600 mmHg vacuum' }], sites)).p).toBeCloseTo(
      84763.7 - 600 * 133.322387415,
      0,
    );
  });

  it('a pressure without a kind takes that of the sheet', () => {
    const items = [{ T: '20 °C', p: '2 bar' }];
    expect(state(waterSheet(items, [], { pressureKind: 'gauge' }))).toMatchObject({
      p: 301325,
      kind: 'gauge',
    });
    expect(state(waterSheet(items, [], { pressureKind: 'absolute' }))).toMatchObject({
      p: 200000,
      kind: 'absolute',
    });
  });
});

describe('evaluate(…) with instruments', () => {
  const site = {
    altitude: '0 m',
    barometerError: '1.5 kPa',
    gauge: { class: 1.6, low: '0 bar(g)', high: '6 bar(g)' },
    probe: '0.5 K',
  };

  it('adds 1.6 % of span and barometer to a gauge pressure, and gives the probe to the temperature', () => {
    // Class is percent of span: EN 837-1 (recalled): 1.6 % of 6 bar is 9.6 kPa.
    const { error } = state(waterSheet([{ T: '20 °C', p: '1 bar(g)' }], [site]));
    expect(error.p).toBeCloseTo(9600 + 1500, 6);
    expect(error.T).toBeCloseTo(0.5, 12);
    expect(state(waterSheet([{ T: '20 °C', p: '1 bar(a)' }], [site])).error.p).toBeCloseTo(9600, 6);
    expect(state(waterSheet([{ T: '20 °C', p: '1 bar(g)' }])).error).toEqual({ T: 0, p: 0 });
  });

  it('says when the box of errors touches a line, in temperature or in pressure, and not before', () => {
    // Water boils at 373.1243 K at 101.325 kPa: IAPWS SR1-86(1992).
    const touches = (T: number, change: Record<string, unknown>) =>
      state(waterSheet([{ T: `${T} K`, p: '101.325 kPa(a)' }], [{ ...change }])).touches;
    expect(touches(372.7, { probe: '0.5 K' })).toBe('saturation');
    expect(touches(372.5, { probe: '0.5 K' })).toBeNull();
    expect(touches(373.5, { probe: '0.5 K' })).toBe('saturation');
    const gauge = { gauge: { plusMinus: '2 kPa' } };
    // 3.6 kPa a kelvin there: half a kelvin off is 1.8 kPa, one kelvin 3.6 kPa.
    expect(touches(372.62, gauge)).toBe('saturation');
    expect(touches(372.1, gauge)).toBeNull();
    expect(touches(372.62, {})).toBeNull();
  });

  it('says that the corner of the box touches a line that neither side meets', () => {
    // 0.3 K and 1.1 kPa short of boiling at once need 0.6 K or 2.2 kPa of either alone.
    const { touches } = state(
      waterSheet(
        [{ T: '372.55 K', p: '101.325 kPa(a)' }],
        [{ probe: '0.4 K', gauge: { plusMinus: '1.5 kPa' } }],
      ),
    );
    expect(touches).toBe('saturation');
  });
});

describe('evaluate(…) of a state that cannot be', () => {
  it('names the problem and goes on with the others', () => {
    const { states, maps } = resultsOf(
      waterSheet([
        { T: '2000 K', p: '1 bar(a)' },
        { T: '20 °C', p: '1 bar(a)' },
        { T: '20 °C', p: '5 GPa(a)' },
        { T: '400 °C', vapourFraction: '50 %' },
      ]),
    );
    const found = new Map(states.map((s) => [s.id, s]));
    expect(found.get('s1')!.problem).toMatchObject({
      code: 'outOfRange',
      quantity: 'T',
      value: 2000,
      unit: 'K',
    });
    expect(found.get('s1')!.problem).toHaveProperty('source');
    expect(found.get('s2')!.state!.parts[0]!.phase).toBe('liquid');
    expect(found.get('s3')!.problem).toMatchObject({ code: 'outOfRange', quantity: 'p' });
    expect(maps[0]!.boundaries.length).toBeGreaterThan(0);
  });

  it('tells a state on a line that a fraction is needed', () => {
    const first = state(waterSheet([{ p: '1 bar(a)', vapourFraction: '0 %' }]));
    const again = state(waterSheet([{ T: `${first.T} K`, p: '1 bar(a)' }]));
    expect(again.state).toBeNull();
    expect(again.problem).toEqual({
      code: 'onBoundary',
      boundary: 'saturation',
      needs: 'vapour fraction',
    });
  });

  it('throws a RangeError that names a substance that was not loaded', () => {
    expect(() => evaluate(sheetOf(waterSheet([])), new Map(), someFrame)).toThrow('water');
  });
});

describe('evaluate(…) finds a range', () => {
  const free = (items: readonly Record<string, unknown>[], scale: string) => {
    const data = waterSheet(items, [{ altitude: '1480 m' }]);
    const [view] = data.views as {
      temperature: { range: unknown };
      pressure: { range: unknown; scale: string };
    }[];
    view!.temperature.range = null;
    view!.pressure.range = null;
    view!.pressure.scale = scale;
    return resultsOf(data).maps[0]!;
  };
  const run = [
    { T: '20 °C', p: '0 bar(g)' },
    { T: '130 °C', p: '2.4 bar(g)' },
  ];

  it.each(['linear', 'logarithmic'])(
    'that holds the run and the lines about it, on a %s axis',
    (scale) => {
      const map = free(run, scale);
      expect(map.outside).toEqual([]);
      expect(map.T.range[0]).toBeLessThan(293.15);
      expect(map.T.range[1]).toBeGreaterThan(403.15);
      expect(map.T.range[1] - map.T.range[0]).toBeLessThan(3 * 110);
      expect(map.boundaries.map(({ id }) => id)).toContain('saturation');
    },
  );

  it('of the whole map where there is no run', () => {
    const map = free([], 'logarithmic');
    const ids = map.points.map(({ id }) => id);
    expect(ids).toContain('critical');
    expect(map.boundaries.map(({ kind }) => kind)).toEqual(
      expect.arrayContaining(['sublimation', 'melting', 'saturation']),
    );
  });
});
