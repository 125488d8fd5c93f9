import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { absolutePressure, parseReading, temperature } from '../../../core/units/index.ts';
import { readSheet } from '../../../core/sheet/read.ts';
import {
  decimalsFor,
  freshId,
  freshTag,
  pressureReading,
  temperatureReading,
  withItem,
  withSite,
  withView,
} from '../../../app/store/edits.ts';
import {
  duplicated,
  freshLetter,
  freshStepId,
  newPath,
  partsOf,
  removed,
  withPath,
  withStep,
} from '../../../app/store/pathEdits.ts';
import { newSheet } from '../../../app/store/newSheet.ts';
import { path, state, withItems } from './sheets.ts';

const sheet = withItems([
  state('state-1', '1'),
  path('path-1', 'A', ['60 °C', '80 °C']),
  state('state-2', '3'),
]);
const run = sheet.items[1]!;

describe('edits of a sheet', () => {
  it('withItem(…) replaces one item and shares the rest', () => {
    const next = withItem(sheet, 'state-2', (item) => ({ ...item, name: 'end' }));
    expect(next.items[2]).toEqual({ ...sheet.items[2], name: 'end' });
    expect(next.items.slice(0, 2).every((item, i) => item === sheet.items[i])).toBe(true);
    expect(next.views).toBe(sheet.views);
    expect(sheet.items[2]!.name).toBeUndefined();
  });

  it.each<[string, typeof sheet]>([
    ['withItem(…) of an id that is not there', withItem(sheet, 'nothing', (x) => ({ ...x }))],
    ['withItem(…) that changes nothing', withItem(sheet, 'state-1', (x) => x)],
    ['withPath(…) of a state', withPath(sheet, 'state-1', (x) => ({ ...x, tag: 'Z' }))],
    ['removed(…) of an id that is not there', removed(sheet, 'nothing')],
    ['removed(…) of a step that is not there', removed(sheet, 'path-1.step-9')],
    ['removed(…) of a start', removed(sheet, 'path-1.start')],
  ])('%s gives the very same sheet', (_, next) => expect(next).toBe(sheet));

  it('withView(…) and withSite(…) change the one that is named', () => {
    const twice = { ...sheet, sites: [...sheet.sites, { id: 'site-2', name: 'b' }] };
    const next = withSite(twice, 'site-2', (s) => ({ ...s, name: 'c' }));
    expect(next.sites.map(({ name }) => name)).toEqual(['Site 1', 'c']);
    expect(next.sites[0]).toBe(twice.sites[0]);
    expect(withView(sheet, 'main', (v) => ({ ...v, fields: 'none' })).views[0]!.fields).toBe(
      'none',
    );
  });

  it('freshId(…), freshTag(…), freshLetter(…) and freshStepId(…) give the first one free', () => {
    expect(freshId(sheet, 'state')).toBe('state-3');
    expect(freshId(sheet, 'site')).toBe('site-2');
    expect(freshTag(sheet)).toBe('2');
    expect(freshLetter(sheet)).toBe('B');
    expect(freshStepId(run as ReturnType<typeof path>)).toBe('step-3');
    const many = withItems(
      Array.from({ length: 27 }, (_, i) =>
        path(`p-${i}`, i < 26 ? String.fromCharCode(65 + i) : 'A1', []),
      ),
    );
    expect(freshLetter(many)).toBe('B1');
  });

  it('partsOf(…) tells the start, a step and neither', () => {
    expect(partsOf(sheet, 'path-1.start')).toEqual({ path: run, step: null });
    expect(partsOf(sheet, 'path-1.step-2')!.step!.id).toBe('step-2');
    expect(partsOf(sheet, 'path-1')).toBeNull();
    expect(partsOf(sheet, 'state-1')).toBeNull();
  });

  it('removed(…) takes an item, or one step of a path', () => {
    expect(removed(sheet, 'state-1').items.map(({ id }) => id)).toEqual(['path-1', 'state-2']);
    const less = removed(sheet, 'path-1.step-1').items[1]!;
    expect(less.kind === 'path' && less.steps.map(({ id }) => id)).toEqual(['step-2']);
  });

  it('duplicated(…) makes a second one that reads, under an id and a tag of its own', () => {
    for (const id of ['state-1', 'path-1', 'path-1.step-2']) {
      const made = duplicated(sheet, id)!;
      const read = readSheet(made.sheet);
      expect(read.ok ? [] : read.issues).toEqual([]);
      expect(new Set(made.sheet.items.map(({ tag }) => tag)).size).toBe(4);
      expect(made.sheet.items.slice(0, 3)).toEqual(sheet.items);
    }
    expect(duplicated(sheet, 'path-1')!.id).toBe('path-2.start');
    expect(duplicated(sheet, 'nothing')).toBeNull();
  });

  it('newPath(…) with steps put in reads', () => {
    const made = newPath(sheet, { T: '20 °C', p: '0.00 bar(g)' });
    expect(made).toMatchObject({ id: 'path-2', tag: 'B', steps: [] });
    const next = withPath({ ...sheet, items: [...sheet.items, made] }, made.id, (p) => ({
      ...p,
      steps: [{ id: freshStepId(p), kind: 'constantPressure', end: { T: '90 °C' } }],
    }));
    expect(readSheet(next).ok).toBe(true);
    const longer = withStep(next.items[3] as typeof made, 'step-1', (s) => ({
      ...s,
      time: '3 min',
    }));
    expect(longer.steps[0]!.time).toBe('3 min');
  });
});

describe('readings written to a step', () => {
  it.each([
    [0.25, '°C', 1],
    [1, '°C', 0],
    [2, '°C', 0],
    [300, 'kPa', 1],
    [1000, 'kPa', 0],
    [1000, 'bar', 2],
    [20000, 'bar', 1],
    [200000, 'kPa', -2],
  ] as const)('decimalsFor(%d, %s) is %d', (step, unit, decimals) => {
    expect(decimalsFor(step, unit) + 0).toBe(decimals);
  });

  it('what is written reads back within the step, in any unit and kind', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 1e3, max: 3e7, noNaN: true }),
        fc.double({ min: -2, max: 5, noNaN: true }),
        fc.constantFrom('Pa', 'kPa', 'bar', 'psi', 'mmHg', 'inHg', 'kgf/cm²'),
        fc.constantFrom('gauge', 'absolute', 'vacuum'),
        (p, e, unit, kind) => {
          const step = Math.min(10 ** e, p / 100);
          const local = 84.76e3;
          if (kind === 'vacuum' && p > local - step) return;
          const { text } = pressureReading(p, unit, kind, local, step);
          const back = absolutePressure(parseReading(text, 'pressure'), local);
          expect(Math.abs(back - p)).toBeLessThan(step);
        },
      ),
    );
    fc.assert(
      fc.property(
        fc.double({ min: 20, max: 1200, noNaN: true }),
        fc.double({ min: -3, max: 0, noNaN: true }),
        fc.constantFrom('°C', 'K', '°F'),
        (T, e, unit) => {
          const { text } = temperatureReading(T, unit, 10 ** e);
          expect(Math.abs(temperature(parseReading(text, 'temperature')) - T)).toBeLessThan(
            10 ** e,
          );
        },
      ),
    );
  });
});

describe('newSheet', () => {
  it.each([
    { substance: 'water', place: { altitude: '1480 m' }, kind: 'gauge' },
    { substance: 'carbon-dioxide', place: { barometer: '84.8 kPa(a)' }, kind: 'absolute' },
    { substance: 'ammonia', place: { altitude: '-50 m' }, kind: 'gauge' },
  ] as const)('newSheet(%j) reads, whole, and reads as it is written', (start) => {
    const made = newSheet({ ...start, siteName: 'Site 1' });
    const read = readSheet(JSON.parse(JSON.stringify(made)));
    expect(read).toEqual({ ok: true, sheet: made });
    expect(made.sites[0]).toMatchObject(start.place);
    expect(made.views[0]!.second === null).toBe(start.kind === 'absolute');
  });
});
