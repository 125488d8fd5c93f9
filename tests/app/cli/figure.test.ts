import { mkdirSync, readdirSync, readFileSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { sheetFromSvg } from '../../../app/export/sheetInSvg.ts';
import type { Sheet } from '../../../core/sheet/schema.ts';
import { folder, ran } from './ran.ts';

const sheet: Sheet = {
  version: 1,
  made: { tool: '0.1.0', formulations: {} },
  title: 'Retort',
  pressureKind: 'gauge',
  substances: ['water'],
  sites: [{ id: 'plant', name: 'Plant', altitude: '1480 m' }],
  items: [{ id: 'a', tag: '1', kind: 'state', T: '121.1 °C', p: '2.5 bar(g)' }],
  views: [
    {
      id: 'map',
      page: { width: '170 mm', height: '120 mm' },
      temperature: { unit: '°C', scale: 'linear', range: null },
      pressure: { unit: 'bar', kind: 'absolute', scale: 'linear', range: null },
      second: null,
      fields: 'faint',
      colours: 'colour',
      hidden: [],
      labelOffsets: {},
    },
  ],
  data: {},
};

const home = (content: unknown = sheet): { sheet: string; at: (name: string) => string } => {
  const where = folder();
  const at = (name: string) => join(where, name);
  writeFileSync(at('sheet.json'), typeof content === 'string' ? content : JSON.stringify(content));
  return { sheet: at('sheet.json'), at };
};

describe('figure', () => {
  it('draws a sheet that opens again from its figure, byte for byte the same', async () => {
    const { sheet: from, at } = home();
    expect(await ran('figure', from, at('a.svg'))).toMatchObject({ status: 0 });
    const svg = readFileSync(at('a.svg'), 'utf8');
    expect(svg).toMatch(/^<\?xml[^>]*>\s*<svg /);
    expect(sheetFromSvg(svg)).toEqual(sheet);
    expect((await ran('figure', at('a.svg'), at('b.svg'))).status).toBe(0);
    expect(readFileSync(at('b.svg'), 'utf8')).toBe(svg);
    expect(readdirSync(at('.')).sort()).toEqual(['a.svg', 'b.svg', 'sheet.json']);
  });

  it('--without-sheet leaves the sheet out and says so', async () => {
    const { sheet: from, at } = home();
    const { out } = await ran('figure', from, at('a.svg'), '--without-sheet');
    expect(out).toContain('without its sheet');
    expect(() => sheetFromSvg(readFileSync(at('a.svg'), 'utf8'))).toThrow('noSheet');
  });

  it.each<[string, unknown, string, RegExp]>([
    ['an unknown extension', sheet, 'a.bmp', /must end in \.svg/],
    ['a missing folder', sheet, 'nowhere/a.svg', /no such folder/],
    ['a folder', sheet, 'folder.svg', /it is a folder/],
    ['no JSON', 'retort', 'a.svg', /neither JSON nor an SVG/],
    ['an SVG without sheet', '<svg xmlns="http://www.w3.org/2000/svg"/>', 'a.svg', /no sheet/],
    ['another document', { a: 1 }, 'a.svg', /not a sheet/],
    ['a newer version', { ...sheet, version: 2 }, 'a.svg', /version 2/],
    ['a wrong shape', { ...sheet, title: 3 }, 'a.svg', /title: string belongs here/],
    [
      'a wrong reading',
      { ...sheet, items: [{ ...sheet.items[0], p: '-3 bar(g)' }] },
      'a.svg',
      /items\[0\]\.p: .*no such pressure/,
    ],
    ['a strange substance', { ...sheet, substances: ['mercury'] }, 'a.svg', /“mercury”/],
  ])('%s is refused and leaves nothing behind', async (_, content, to, message) => {
    const { sheet: from, at } = home(content);
    mkdirSync(at('folder.svg'));
    const { status, out, err } = await ran('figure', from, at(to));
    expect({ status, out }).toEqual({ status: 2, out: '' });
    expect(err).toMatch(/^simmerline: [^\n]+\n$/);
    expect(err).toMatch(message);
    expect(readdirSync(at('.')).sort()).toEqual(['folder.svg', 'sheet.json']);
  });
});
