import { describe, expect, it } from 'vitest';
import type { StateRecord } from '../../../app/cli/state.ts';
import { file, given, ran } from './ran.ts';

const states = (content: string | Uint8Array, ...more: readonly string[]) =>
  given<StateRecord[]>('state', 'water', '--from', file(content), ...more);

const places = async (content: string | Uint8Array) =>
  (await states(content)).map(({ T, p }) => [Number(T.toFixed(6)), Number(p.toFixed(3))]);

const utf16 = (text: string): Uint8Array =>
  new Uint8Array(Buffer.concat([Buffer.from([0xff, 0xfe]), Buffer.from(text, 'utf16le')]));

describe('state --from', () => {
  it.each<[string, string | Uint8Array, readonly (readonly number[])[]]>([
    [
      'SI without units',
      'T,p\n300,100000\n400,2e5\n',
      [
        [300, 1e5],
        [400, 2e5],
      ],
    ],
    ['columns the other way', 'p,T\n100000,300\n', [[300, 1e5]]],
    ['units in the header', 'T [degC],p [bar(g)]\n20,1\n', [[293.15, 201325]]],
    ['round brackets', 'T (°F),p (psig)\n68,0\n', [[293.15, 101325]]],
    ['a mark and CRLF', '\uFEFFT,p\r\n300,100000\r\n', [[300, 1e5]]],
    ['decimal commas', 'T [°C];p [bar(a)]\n20,5;1,013\n', [[293.65, 101300]]],
    ['semicolons with points', 'T [°C];p [bar(a)]\n20.5;1.013\n', [[293.65, 101300]]],
    ['tabs', 'T\tp\n300\t100000\n', [[300, 1e5]]],
    ['quoted cells', '"T","p [Pa]"\n"300","100000"\n', [[300, 1e5]]],
    ['empty lines at the end', 'T,p\n300,100000\n\n,\n  \n', [[300, 1e5]]],
    ['no line break at the end', 'T,p\n300,100000', [[300, 1e5]]],
    ['other columns', 'time,T,note,p\n1,300,"a, b",100000\n', [[300, 1e5]]],
    ['units in the cells', 'T,p\n20 °C,1 bar(g)\n', [[293.15, 201325]]],
    ['UTF-16', utf16('T,p\n300,100000\n'), [[300, 1e5]]],
  ])('reads %s', async (_, content, expected) => {
    expect(await places(content)).toEqual(expected);
  });

  it('gives CSV in SI with the same numbers as JSON', async () => {
    const path = file('T [degC],p [bar(g)]\n20,1\n-20,0\n');
    const { out, err } = await ran('state', 'water', '--from', path);
    const json = await given<StateRecord[]>('state', 'water', '--from', path);
    const [header, ...rows] = out.trimEnd().split('\n');
    expect(header).toBe(
      'T [K],p [Pa],phase,solid,rho [kg/m3],h [J/kg],s [J/(kg K)],u [J/kg],cp [J/(kg K)],cv [J/(kg K)],w [m/s],atmosphere [Pa]',
    );
    expect(rows).toHaveLength(2);
    expect(Number(rows[0]!.split(',')[4]) / json[0]!.rho!).toBeCloseTo(1, 11);
    const ice = rows[1]!.split(',');
    expect(ice.slice(2, 4)).toEqual(['solid', 'ice Ih']);
    expect(ice.slice(-2)).toEqual(['', '101325']);
    expect(err).toMatch(/101\.325 kPa/);
  });

  it('gives CSV that it reads again', async () => {
    const { out } = await ran('state', 'water', '--from', file('T,p\n293.15,201325\n'));
    const again = await states(out);
    expect(again).toMatchObject([{ T: 293.15, p: 201325 }]);
  });

  it.each([
    ['a word', 'T,p\n300,100000\nwarm,100000\n', /line 3: “warm” is no temperature/],
    ['a missing cell', 'T,p\n300\n', /line 2: No pressure is given/],
    ['a line after a quoted break', 'T,p,n\n300,1e5,"a\nb"\nx,1e5,\n', /line 4: “x”/],
    ['a state out of range', 'T,p\n300,100000\n5000,100000\n', /line 3: .*1\u2009273 K/],
    ['a state on a boundary', 'T,p\n450,932203.5642\n', /line 2: .*boiling line/],
    ['an ambiguous comma', 'T [K]\tp\n300\t101.325\n300\t101,325\n', /line 3: “101,325” can mean/],
    ['an open quote', 'T,p\n300,"100000\n', /line 2: a quoted cell/],
    ['no column p', 'T,q\n300,100000\n', /line 1: there is no column p/],
    ['no columns', '1,2\n300,100000\n', /no column T and no column p/],
    ['a column twice', 'T,p,T\n300,1e5,300\n', /column T stands twice/],
    ['an unknown unit', 'T [degX],p\n300,1e5\n', /line 1: “degX” is no unit of temperature/],
    ['a header alone', 'T,p\n\n', /no points/],
    ['nothing', '', /is empty/],
    ['a mark alone', '\uFEFF\r\n', /is empty/],
  ])('%s is refused by its line, with nothing on standard output', async (_, content, message) => {
    const { status, out, err } = await ran('state', 'water', '--from', file(content));
    expect({ status, out }).toEqual({ status: 2, out: '' });
    expect(err).toMatch(/^simmerline: [^\n]+\n$/);
    expect(err).toMatch(message);
  });
});
