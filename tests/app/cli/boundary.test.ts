import { describe, expect, it } from 'vitest';
import type { BoundaryRecord } from '../../../app/cli/boundaryRecord.ts';
import { file, given, ran } from './ran.ts';

const boundary = (...args: readonly string[]) => given<BoundaryRecord>('boundary', ...args);

describe('boundary', () => {
  it('saturation of water agrees with IAPWS R6-95(2018), table 8', async () => {
    const at = await boundary('water', 'saturation', '--T', '450 K');
    expect(Object.keys(at)).toEqual(['T', 'p', 'liquid', 'vapour', 'basis', 'source']);
    expect(Object.keys(at.liquid!)).toEqual(['rho', 'h', 's', 'cp', 'w']);
    expect(at.p / 932203.564).toBeCloseTo(1, 8);
    expect(at.liquid!.rho! / 890.34125).toBeCloseTo(1, 8);
    expect(at.vapour!.rho! / 4.8120036).toBeCloseTo(1, 8);
    expect(at.liquid!.h! / 749161.585).toBeCloseTo(1, 8);
    expect(at.vapour!.h! / 2774410.78).toBeCloseTo(1, 8);
    expect(at.vapour!.s! / 6609.21221).toBeCloseTo(1, 8);
    expect(at.basis).toBe('equilibrium');
    const back = await boundary('water', 'saturation', '--p', '932203.564 Pa');
    expect(Math.abs(back.T - 450)).toBeLessThan(1e-7);
  });

  it('melting of ice Ih lies at 273.152519 K and 101325 Pa (IAPWS R10-06(2009))', async () => {
    const at = await boundary('water', 'melting', '--p', '101325 Pa');
    expect(Object.keys(at)).toEqual(['T', 'p', 'solid', 'liquid', 'basis', 'source']);
    expect(Math.abs(at.T - 273.152519)).toBeLessThan(2e-6);
    expect(at.solid!.name).toBe('ice Ih');
    // Table 6 of the same release.
    expect(at.solid!.rho! / 916.721463419).toBeCloseTo(1, 9);
    expect(at.solid!.h! / -333354.873637).toBeCloseTo(1, 7);
  });

  it.each([
    ['254 K', 'ice III', 268.685e6],
    ['265 K', 'ice V', 479.64e6],
  ])(
    'melting at %s lists %s at %d Pa after ice Ih (IAPWS R14-08(2011), table 3)',
    async (T, form, p) => {
      const at = await boundary('water', 'melting', '--T', T);
      expect(at.solid!.name).toBe('ice Ih');
      expect(at.also).toHaveLength(1);
      const [other] = at.also!;
      expect(Math.abs(other!.p / p - 1)).toBeLessThan(2e-6);
      expect(other!.solid).toEqual({ name: form, rho: null, h: null, s: null, cp: null });
      expect(other!.basis).toBe('correlation');
      expect(other!.liquid!.rho).toBeGreaterThan(1000);
    },
  );

  it('melting of ice VII has no liquid where the fluid equation ends (IAPWS R14-08(2011), table 3)', async () => {
    const at = await boundary('water', 'melting', '--T', '550 K');
    expect(Math.abs(at.p / 6308.71e6 - 1)).toBeLessThan(2e-6);
    expect(at.solid!.name).toBe('ice VII');
    expect(at.liquid).toEqual({ rho: null, h: null, s: null, cp: null, w: null });
    expect(at.also).toBeUndefined();
  });

  it('sublimation gives solid and vapour (IAPWS R14-08(2011), table 3: 8.94735 Pa at 230 K)', async () => {
    const at = await boundary('water', 'sublimation', '--T', '230 K');
    expect(Object.keys(at)).toEqual(['T', 'p', 'solid', 'vapour', 'basis', 'source']);
    // Equal Gibbs energies against the release's correlation: 0.1 % allowed.
    expect(Math.abs(at.p / 8.94735 - 1)).toBeLessThan(1e-3);
    expect(Object.keys(at.solid!)).toEqual(['name', 'rho', 'h', 's', 'cp']);
  });

  it('dry ice sublimes at 194.6855 K under 101325 Pa (Span and Wagner 1996, within 0.3 %)', async () => {
    const at = await boundary('CO2', 'sublimation', '--T', '194.6855 K');
    expect(Math.abs(at.p / 101325 - 1)).toBeLessThan(3e-3);
    expect(at.solid!.name).toBe('dry ice');
  });

  it('an estimate says that it is one', async () => {
    expect((await boundary('CO2', 'melting', '--T', '300 K')).basis).toBe('estimate');
  });

  it('takes the very ends of a line in other units', async () => {
    // Critical point of water, 647.096 K: IAPWS R6-95(2018).
    expect((await boundary('water', 'saturation', '--T', '373.946 °C')).p).toBeCloseTo(22.064e6, 0);
    const triple = await boundary('water', 'saturation', '--T', '0.01 °C');
    // 611.654771 Pa by the fluid equation (recalled).
    expect(triple.p).toBeCloseTo(611.654771, 5);
  });

  it('a gauge pressure counts from the site', async () => {
    const at = await boundary('water', 'saturation', '--p', '0 bar(g)', '--barometer', '84.8 kPa');
    expect(at).toMatchObject({ p: 84800, atmosphere: 84800 });
    const same = await boundary('water', 'saturation', '--p', '84.8 kPa(a)');
    expect(same.T).toBe(at.T);
    expect(same.atmosphere).toBeUndefined();
  });

  it('text shows both sides, the basis and the further melting lines', async () => {
    const { out } = await ran('boundary', 'water', 'melting', '--T', '255 K');
    expect(out).toMatch(/ice Ih +liquid/);
    expect(out).toContain('ice III at 301.3 MPa(a)');
    expect(out).toContain('IAPWS R10-06(2009)');
  });

  it('--from gives an array in the order of the file, or CSV', async () => {
    const path = file('T [degC]\n100\n\n-20\n50\n');
    const { status, err } = await ran('boundary', 'water', 'saturation', '--from', path);
    expect(status).toBe(2);
    expect(err).toContain('line 4');
    const good = file('p [bar(g)]\n1\n0\n');
    const list = await given<BoundaryRecord[]>('boundary', 'water', 'saturation', '--from', good);
    expect(list.map(({ p }) => p)).toEqual([201325, 101325]);
    const { out } = await ran('boundary', 'water', 'saturation', '--from', good);
    const [header, first] = out.split('\n');
    expect(header).toMatch(/^T \[K\],p \[Pa\],liquid\.rho \[kg\/m3\],/);
    expect(Number(first!.split(',')[0])).toBeCloseTo(list[0]!.T, 8);
  });

  it.each([
    ['no line', ['water'], /no boundary is given/],
    ['an unknown line', ['water', 'boiling', '--T', '300 K'], /saturation, melting or sublimation/],
    ['two givens', ['water', 'saturation', '--T', '300 K', '--p', '1 bar'], /one of --T, --p/],
    ['beyond the critical point', ['water', 'saturation', '--T', '400 °C'], /373\.946 °C/],
    ['colder than the line', ['water', 'saturation', '--T', '-5 °C'], /0\.01 °C/],
    ['above the line', ['water', 'sublimation', '--p', '1 bar'], /611\.655|0\.00611655/],
    ['both columns', ['water', 'saturation', '--from', file('T,p\n300,1e5\n')], /both/],
    ['no column', ['water', 'saturation', '--from', file('x\n300\n')], /no column T or p/],
  ])('%s is refused with one line and status 2', async (_, args, message) => {
    const { status, out, err } = await ran('boundary', ...args);
    expect({ status, out }).toEqual({ status: 2, out: '' });
    expect(err).toMatch(/^simmerline: [^\n]+\n$/);
    expect(err).toMatch(message);
  });
});
