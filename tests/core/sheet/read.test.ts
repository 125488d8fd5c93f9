import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { evaluate } from '../../../core/sheet/evaluate.ts';
import { isPressureUnit, readSheet, type SheetIssue } from '../../../core/sheet/read.ts';
import { demo, demos, notNumbers, someFrame, substances, waterSheet } from './sheets.ts';

const issuesOf = (data: unknown): readonly SheetIssue[] => {
  const read = readSheet(data);
  return read.ok ? [] : read.issues;
};
const told = (data: unknown): readonly string[] =>
  issuesOf(data).map(({ place, code }) => `${place}: ${code}`);

/** The sheet with the value at a place replaced, or taken away if undefined. */
function changed(data: unknown, path: readonly (string | number)[], value: unknown): unknown {
  const whole = structuredClone(data) as Record<string, unknown>;
  let at: Record<string | number, unknown> = whole;
  for (const key of path.slice(0, -1)) at = at[key] as Record<string | number, unknown>;
  const last = path.at(-1)!;
  if (value === undefined) delete at[last];
  else at[last] = value;
  return whole;
}

describe('readSheet of demos', () => {
  it('there are some', () => expect(demos.length).toBeGreaterThanOrEqual(4));
  it.each(demos)('%s reads, and reads as it is written', (_, data) => {
    const read = readSheet(data);
    expect(read.ok ? [] : read.issues).toEqual([]);
    expect(read).toEqual({ ok: true, sheet: data });
  });
});

const water = waterSheet(
  [
    { T: '20 °C', p: '1 bar(a)' },
    { T: '90 °C', p: '1.2 bar(g)' },
  ],
  [{}],
);

describe('readSheet says what is wrong and where', () => {
  it.each<[string, readonly (string | number)[], unknown, readonly string[]]>([
    ['a pressure below zero absolute', ['items', 1, 'p'], '-2 bar(g)', ['items[1].p: reading']],
    ['a vacuum of more than the air', ['items', 0, 'p'], '31 inHg vacuum', ['items[0].p: reading']],
    ['a temperature below absolute zero', ['items', 0, 'T'], '-300 °C', ['items[0].T: reading']],
    ['a reading of another quantity', ['items', 0, 'T'], '3 bar', ['items[0].T: reading']],
    ['a reading that is no number', ['items', 0, 'T'], 'warm', ['items[0].T: reading']],
    ['an unknown site', ['items', 1, 'site'], 'elsewhere', ['items[1].site: unknownId']],
    ['an unknown substance', ['items', 1, 'substance'], 'beer', ['items[1].substance: unknownId']],
    ['an id used twice', ['items', 1, 'id'], 's1', ['items[1].id: twice']],
    ['one given only', ['items', 0, 'T'], undefined, ['items[0]: givens']],
    ['three givens', ['items', 0, 'vapourFraction'], '10 %', ['items[0]: givens']],
    ['an unknown key', ['items', 0, 'colour'], 'red', ['items[0].colour: shape']],
    ['an unknown kind of item', ['items', 0, 'kind'], 'spell', ['items[0].kind: shape']],
    ['an unknown key of the sheet', ['extra'], 1, ['extra: shape']],
    ['a missing part', ['views'], undefined, ['views: shape']],
    ['no view', ['views'], [], ['views: shape']],
    ['a bad unit', ['views', 0, 'pressure', 'unit'], 'parsec', ['views[0].pressure.unit: unit']],
    [
      'a unit of another quantity',
      ['views', 0, 'pressure', 'unit'],
      'kg',
      ['views[0].pressure.unit: unit'],
    ],
    [
      'a range upside down',
      ['views', 0, 'temperature', 'range'],
      ['90 °C', '10 °C'],
      ['views[0].temperature.range: emptyRange'],
    ],
    [
      'an empty range',
      ['views', 0, 'pressure', 'range'],
      ['2 bar(a)', '200 kPa(a)'],
      ['views[0].pressure.range: emptyRange'],
    ],
    ['a page of no size', ['views', 0, 'page', 'width'], '1 mm', ['views[0].page.width: shape']],
    [
      'a page given in bar',
      ['views', 0, 'page', 'height'],
      '1 bar',
      ['views[0].page.height: reading'],
    ],
    [
      'an altitude above the standard atmosphere',
      ['sites', 0, 'altitude'],
      '20 km',
      ['sites[0].altitude: shape'],
    ],
    ['an older version', ['version'], 0, ['version: shape']],
    ['a version that is no number', ['version'], '1', ['version: shape']],
  ])('%s', (_, path, value, wanted) => {
    expect(told(water)).toEqual([]);
    expect(told(changed(water, path, value))).toEqual(wanted);
  });

  it('a newer version is refused by its number alone', () => {
    expect(issuesOf({ version: 7, whatever: true })).toEqual([
      { place: 'version', code: 'newerVersion', version: 7 },
    ]);
  });

  it.each([null, undefined, 3, 'sheet', [], [1], true, {}, { title: 'x' }, () => 1])(
    '%j is not a sheet',
    (data) => {
      expect(told(data)).toEqual([': notASheet']);
    },
  );

  it('carries what was given and understood', () => {
    const [issue] = issuesOf(changed(water, ['items', 1, 'p'], '-2 bar(g)'));
    expect(issue).toMatchObject({
      given: '-2 bar(g)',
      issue: { code: 'belowZeroAbsolute', value: 101325 - 200e3, local: 101325 },
    });
  });

  it('knows that a state that is possible down here may not be up there', () => {
    const at = (altitude: string) =>
      told(waterSheet([{ T: '20 °C', p: '-0.9 bar(g)' }], [{ altitude }]));
    expect(at('0 m')).toEqual([]);
    // 79.5 kPa at 2000 m: ISO 2533.
    expect(at('2000 m')).toEqual(['items[0].p: reading']);
  });

  // A site whose pressure cannot be is wrong where it is written, not an exception.
  it.each(['0 bar(a)', '-1 bar(a)', '0 bar(g)', '-5 kPa(g)', '700 mmHg vacuum', '1000 hPa(g)'])(
    'a barometer at %s is told at its place',
    (barometer) => {
      const data = waterSheet([{ T: '20 °C', p: '1 bar(g)' }], [{ barometer }]);
      expect(told(data).every((line) => line.startsWith('sites[0].barometer'))).toBe(true);
      expect(told(data)).toHaveLength(1);
    },
  );

  it.each<[string, unknown]>([
    ['equal ends', { class: 1.6, low: '0 bar(g)', high: '0 bar(g)' }],
    ['ends of other zeros', { class: 1.6, low: '0 bar(a)', high: '6 bar(g)' }],
  ])('a gauge of %s is told at its place', (_, gauge) => {
    const data = waterSheet([{ T: '20 °C', p: '1 bar(g)' }], [{ gauge }]);
    expect(told(data)).toHaveLength(1);
    expect(told(data)[0]).toMatch(/^sites\[0\]\.gauge/);
  });

  it.each<[string, readonly string[], Record<string, unknown>]>([
    ['zero kelvin', ['0 K', '300 K'], { unit: 'K', scale: 'reciprocal' }],
  ])('a reciprocal axis from %s is told at its place', (_, range, axis) => {
    const data = changed(water, ['views', 0, 'temperature'], { ...axis, range });
    expect(told(data)).toHaveLength(1);
    expect(told(data)[0]).toMatch(/^views\[0\]\.temperature\.range/);
  });

  it('holds no more issues than can be read', () => {
    const many = waterSheet(Array.from({ length: 400 }, () => ({ T: 5, p: 7 })));
    expect(issuesOf(many).length).toBeLessThanOrEqual(20);
  });
});

describe('isPressureUnit', () => {
  it.each(['Pa', 'bar', 'psi', 'inHg', 'mTorr', 'kgf/cm²'])('takes %s', (unit) =>
    expect(isPressureUnit(unit)).toBe(true),
  );
  it.each(['', 'K', 'm', '1', '%', 'constructor', '__proto__', 'bar ', 'BAR', 'bar(g)'])(
    'refuses %j',
    (unit) => expect(isPressureUnit(unit)).toBe(false),
  );
});

const units =
  '°C K °F bar(g) bar(a) kPa MPa(a) inHg_vacuum mmHg_vacuum Pa(a) % m mm ft km psi(g) micron GPa'
    .split(' ')
    .map((unit) => unit.replace('_', ' '));

/** What a person, a program or an ill will might write for a quantity. */
const anyReading = fc.oneof(
  fc
    .tuple(
      fc.oneof(
        fc.integer({ min: -1000, max: 10_000 }),
        fc.integer({ min: -100_000, max: 1_000_000 }).map((n) => n / 1000),
        fc.constantFrom(0, -0, 1e308, -1e308, 5e-324, 1e-30, 1e30, 273.16, 647.096, 611.657),
      ),
      fc.constantFrom('', ...units),
    )
    .map(([n, unit]) => `${n} ${unit}`.slice(0, 64)),
  fc.string({ minLength: 1, maxLength: 12 }),
);

/** The given reading with another number, so that most still read. */
const otherNumber = (given: string): fc.Arbitrary<string> =>
  fc
    .oneof(
      fc.integer({ min: -300, max: 2000 }),
      fc.integer({ min: -50, max: 50 }).map((n) => n / 10),
      fc.constantFrom(0, 1e9, 1e-9),
    )
    .map((n) => given.replace(/^-?[\d.]+/, String(n)));

/** Places of all plain values and lists in a sheet. */
function places(
  value: unknown,
  path: readonly (string | number)[] = [],
): (readonly (string | number)[])[] {
  if (typeof value !== 'object' || value === null) return [path];
  const inner = Array.isArray(value)
    ? value.flatMap((x, i) => places(x, [...path, i]))
    : Object.entries(value).flatMap(([key, x]) => places(x, [...path, key]));
  return path.length > 0 ? [path, ...inner] : inner;
}

const valueAt = (data: unknown, path: readonly (string | number)[]): unknown =>
  path.reduce((at: unknown, key) => (at as Record<string | number, unknown>)[key], data);

const mutated = fc.constantFrom(...demos.map(([, data]) => data)).chain((data) => {
  const change = fc.constantFrom(...places(data)).chain((path) => {
    const given = valueAt(data, path);
    const isReading = typeof given === 'string' && /^-?\d.* ./.test(given);
    return fc.tuple(
      fc.constant(path),
      fc.oneof(
        { weight: isReading ? 12 : 0, arbitrary: otherNumber(String(given)) },
        { weight: 2, arbitrary: anyReading },
        {
          weight: 2,
          arbitrary: fc.constantFrom<unknown>(
            ...[undefined, null, '', 'absolute', 'gauge', 'K', '°F', 'logarithmic', 'reciprocal'],
            ...['linear', 'water', 'carbon-dioxide', 'grey', 'none', 'mTorr'],
          ),
        },
        { weight: 1, arbitrary: fc.jsonValue({ maxDepth: 2 }) },
      ),
    );
  });
  return fc.array(change, { minLength: 1, maxLength: 3 }).map((changes) => {
    let made: unknown = data;
    for (const [path, value] of changes) {
      try {
        made = changed(made, path, value);
      } catch {
        // An earlier change took the place away.
      }
    }
    return made;
  });
});

describe('readSheet of anything', () => {
  it('readSheet(…) of any JSON value gives a sheet or issues', () => {
    fc.assert(
      fc.property(fc.jsonValue(), (data) => {
        const read = readSheet(data);
        expect(read.ok || read.issues.length > 0).toBe(true);
      }),
      { numRuns: 500 },
    );
  });

  it('readSheet(…) of any value with a version gives a sheet or issues', () => {
    fc.assert(
      fc.property(
        fc.dictionary(
          fc.constantFrom(
            'version',
            'title',
            'items',
            'views',
            'sites',
            '__proto__',
            'made',
            'data',
          ),
          fc.jsonValue(),
        ),
        (rest) => {
          const read = readSheet({ version: 1, ...rest });
          expect(read.ok || read.issues.length > 0).toBe(true);
        },
      ),
      { numRuns: 300 },
    );
  });

  it('readSheet(…) bears nesting of any depth', () => {
    let deep: unknown = 1;
    for (let i = 0; i < 100_000; i++) deep = [deep];
    expect(told(deep)).toEqual([': notASheet']);
    for (const key of ['title', 'items', 'data', 'views', 'made'])
      expect(told({ ...demo('retort'), [key]: deep }).length).toBeGreaterThan(0);
    expect(told({ ...demo('retort'), data: { x: deep } }).length).toBeGreaterThan(0);
  });

  it('readSheet(…) never throws on a changed demo, and what it takes evaluates to finite numbers', () => {
    let taken = 0;
    let refused = 0;
    const run = (data: unknown): void => {
      const read = readSheet(data);
      if (!read.ok) {
        refused++;
        expect(read.issues.length).toBeGreaterThan(0);
        return;
      }
      taken++;
      if (!read.sheet.substances.every((id) => substances.has(id))) return;
      expect(notNumbers(evaluate(read.sheet, substances, someFrame))).toEqual([]);
    };
    fc.assert(fc.property(mutated, run), { numRuns: 1500, seed: 20260 });
    expect(taken).toBeGreaterThan(100);
    expect(refused).toBeGreaterThan(100);
  });

  it('evaluate(…) bears every state that reads', () => {
    const pressure = fc
      .tuple(
        fc.oneof(
          fc.integer({ min: -6000, max: 9500 }).map((e) => (10 ** (e / 1000)).toPrecision(6)),
          fc.constantFrom(0, 611.657, 22.064e6, 101325, 1e9, 208.566e6, 517950),
        ),
        fc.constantFrom('Pa(a)', 'Pa(a)', 'Pa(g)', 'Pa vacuum'),
      )
      .map(([n, unit]) => `${n} ${unit}`);
    const warmth = fc
      .oneof(
        fc.integer({ min: 0, max: 1_500_000 }).map((n) => n / 1000),
        fc.integer({ min: 200_000, max: 700_000 }).map((n) => n / 1000),
        fc.constantFrom(273.16, 647.096, 216.592, 304.1282, 50, 80, 1273, 0.01, 251.165, 327.7),
      )
      .map((n) => `${n} K`);
    const fraction = fc.integer({ min: 0, max: 1000 }).map((n) => `${n / 1000}`);
    const givens = fc.oneof(
      fc.record({ T: warmth, p: pressure }),
      fc.record({ T: warmth, vapourFraction: fraction }),
      fc.record({ p: pressure, vapourFraction: fraction }),
    );
    let taken = 0;
    fc.assert(
      fc.property(
        fc.array(givens, { minLength: 1, maxLength: 4 }),
        fc.constantFrom('water', 'carbon-dioxide'),
        (items, id) => {
          const data = waterSheet(items, [{}], { substances: [id] });
          const read = readSheet(data);
          if (!read.ok) return;
          taken++;
          expect(notNumbers(evaluate(read.sheet, substances, someFrame))).toEqual([]);
        },
      ),
      { numRuns: 1000, seed: 4 },
    );
    expect(taken).toBeGreaterThan(300);
  });
});
