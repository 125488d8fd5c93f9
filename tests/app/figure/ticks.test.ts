import { describe, expect, it } from 'vitest';
import { axisTicks, tickLabel, type Reading, type Tick } from '../../../app/figure/ticks.ts';
import { scale, type Scale } from '../../../core/map/plane.ts';
import { fromSI, toSI, type UnitId } from '../../../core/units/index.ts';
import { seeded } from '../../core/map/frames.ts';

const textOf = (label: Tick['label']): string =>
  (label ?? []).map(({ text, shift }) => (shift ? `^${text}` : text)).join('');

/** The number that a label stands for. */
function numberOf(label: Tick['label']): number {
  const text = textOf(label)
    .replace(/\u2009/g, '')
    .replace(/−/g, '-')
    .replace(',', '.');
  const [, factor, exponent] = /^(?:(-?[\d.]+)·)?10\^(-?\d+)$/.exec(text) ?? [];
  return exponent === undefined ? Number(text) : Number(factor ?? 1) * 10 ** Number(exponent);
}

const reading = (unit: UnitId, offset = 0): Reading => ({ unit, offset, decimal: '.' });
const named = (ticks: readonly Tick[]) => ticks.filter(({ label }) => label !== null);

/** Whether a number has at most `figures` significant digits. */
const isRound = (value: number, figures: number): boolean =>
  value === 0 || Math.abs(Number(value.toPrecision(figures)) / value - 1) < 1e-9;

interface Axis {
  readonly s: Scale;
  readonly length: number;
  readonly spacing: number;
  readonly r: Reading;
}

function axes(seed: number, count: number): readonly Axis[] {
  const random = seeded(seed);
  const between = (a: number, b: number): number => a + (b - a) * random();
  const units: readonly UnitId[] = ['Pa', 'kPa', 'bar', 'MPa', 'psi', 'mmHg', 'inHg', 'kgf/cm²'];
  const degrees: readonly UnitId[] = ['°C', 'K', '°F'];
  return Array.from({ length: count }, (_, i) => {
    const length = between(40, 300);
    const spacing = between(3, 14);
    const kind = (['linear', 'logarithmic', 'reciprocal'] as const)[i % 3]!;
    if (kind === 'reciprocal' || i % 6 === 0) {
      const low = between(60, 600);
      const r = reading(degrees[Math.floor(random() * 3)]!);
      return {
        s: scale(kind === 'reciprocal' ? kind : 'linear', [low, low + 10 ** between(0, 2.8)]),
        length,
        spacing,
        r,
      };
    }
    const unit = units[Math.floor(random() * units.length)]!;
    const offset = random() < 0.5 ? 0 : between(60e3, 105e3);
    if (kind === 'linear') {
      const low = random() < 0.5 ? 0 : 10 ** between(3, 7);
      return {
        s: scale(kind, [low, low + 10 ** between(3, 9)]),
        length,
        spacing,
        r: reading(unit, offset),
      };
    }
    const low = 10 ** between(-3, 5);
    return {
      s: scale(kind, [low, low * 10 ** between(1, 9)]),
      length,
      spacing,
      r: reading(unit, offset),
    };
  });
}

const told = ({ s, length, spacing, r }: Axis): string =>
  `${s.kind} ${s.range.join('..')} in ${r.unit} from ${r.offset}, ${length} mm, ${spacing} mm apart`;

describe('axisTicks', () => {
  const all = axes(8, 600);

  it('stand on the axis in rising order', () => {
    for (const axis of all) {
      const ticks = axisTicks(axis.s, axis.length, axis.spacing, axis.r);
      ticks.forEach(({ share }, i) => {
        expect(share, told(axis)).toBeGreaterThanOrEqual(-1e-9);
        expect(share, told(axis)).toBeLessThanOrEqual(1 + 1e-9);
        if (i > 0) expect(share, told(axis)).toBeGreaterThan(ticks[i - 1]!.share);
      });
    }
  });

  it('say the value at which they stand, in the shown unit and kind', () => {
    const found: string[] = [];
    for (const axis of all) {
      const { s, r } = axis;
      const span = Math.abs(fromSI(s.range[1], r.unit) - fromSI(s.range[0], r.unit));
      for (const { share, label } of named(axisTicks(s, axis.length, axis.spacing, r))) {
        const value = fromSI(s.value(share) - r.offset, r.unit);
        const near =
          s.kind === 'linear' ? 1e-7 * span : 1e-7 * (Math.abs(value) + r.offset / toSI(1, r.unit));
        if (!(Math.abs(numberOf(label) - value) <= Math.max(near, 1e-9)))
          found.push(`"${textOf(label)}" stands at ${value}: ${told(axis)}`);
      }
    }
    expect(found.slice(0, 6)).toEqual([]);
  });

  it('are round numbers', () => {
    const found: string[] = [];
    for (const axis of all) {
      const values = named(axisTicks(axis.s, axis.length, axis.spacing, axis.r)).map(({ label }) =>
        numberOf(label),
      );
      if (axis.s.kind === 'linear') {
        const step = values[1]! - values[0]!;
        const shape = step / 10 ** Math.floor(Math.log10(step) + 1e-9);
        if (![1, 2, 5].some((k) => Math.abs(shape - k) < 1e-6))
          found.push(`step ${step}: ${told(axis)}`);
      } else {
        // Where the axis shows a small part of a scale, as many figures as that part needs.
        const { s, r } = axis;
        const [low, high] = s.range.map((x) => fromSI(x - r.offset, r.unit)) as [number, number];
        const part = Math.max(Math.abs(low), Math.abs(high)) / (high - low);
        const figures = 2 + Math.max(0, Math.ceil(Math.log10(part) + 0.5));
        for (const value of values)
          if (!isRound(value, figures)) found.push(`${value}: ${told(axis)}`);
      }
    }
    expect(found.slice(0, 6)).toEqual([]);
  });

  it('are at least two', () => {
    const bare = all.filter(
      ({ s, length, spacing, r }) => named(axisTicks(s, length, spacing, r)).length < 2,
    );
    expect(bare.map(told).slice(0, 6)).toEqual([]);
  });

  it('have labels that differ', () => {
    for (const axis of all) {
      const texts = named(axisTicks(axis.s, axis.length, axis.spacing, axis.r)).map(({ label }) =>
        textOf(label),
      );
      expect(new Set(texts).size, told(axis)).toBe(texts.length);
    }
  });

  it('stand at least the asked spacing apart', () => {
    const found: string[] = [];
    for (const axis of all) {
      const ticks = named(axisTicks(axis.s, axis.length, axis.spacing, axis.r));
      ticks.slice(1).forEach(({ share }, i) => {
        const gap = (share - ticks[i]!.share) * axis.length;
        // Rarely is an axis so short that two ticks have no room; it has them all the same.
        const sparse = axis.s.kind === 'linear' && axis.length < 3 * axis.spacing;
        if (gap < axis.spacing * 0.999 && !sparse) found.push(`${gap} mm: ${told(axis)}`);
      });
    }
    expect(found.slice(0, 6)).toEqual([]);
  });

  it('are the same each time', () => {
    for (const { s, length, spacing, r } of all.slice(0, 60))
      expect(axisTicks(s, length, spacing, r)).toEqual(axisTicks(s, length, spacing, r));
  });
});

describe('axisTicks on a logarithmic axis', () => {
  const s = scale('logarithmic', [1e3, 1e6]);
  it('name the decades, and two and five between them where there is room', () => {
    const texts = (length: number) =>
      named(axisTicks(s, length, 8, reading('kPa'))).map(({ label }) => textOf(label));
    expect(texts(120)).toEqual([
      '1',
      '2',
      '5',
      '10',
      '20',
      '50',
      '100',
      '200',
      '500',
      '1\u2009000',
    ]);
    expect(texts(40)).toEqual(['1', '10', '100', '1\u2009000']);
  });
  it('have minor ticks at each whole multiple', () => {
    const ticks = axisTicks(s, 120, 8, reading('kPa'));
    expect(ticks).toHaveLength(28);
    expect(s.value(ticks[6]!.share)).toBeCloseTo(7e3, 6);
  });
  it('leave decades out where they crowd', () => {
    const wide = scale('logarithmic', [1e-40, 1e8]);
    const ticks = named(axisTicks(wide, 100, 8, reading('Pa')));
    expect(ticks.length).toBeGreaterThan(3);
    expect(ticks.length).toBeLessThanOrEqual(13);
  });
});

describe('axisTicks of gauge pressure beside a logarithmic axis', () => {
  const local = 84763.7;
  const s = scale('logarithmic', [1e3, 1e7]);
  const ticks = named(axisTicks(s, 120, 3, reading('bar', local)));
  it('has zero at the local atmosphere', () => {
    const zero = ticks.find(({ label }) => textOf(label) === '0')!;
    expect(s.value(zero.share)).toBeCloseTo(local, 6);
  });
  it('goes below zero, and never below vacuum', () => {
    const values = ticks.map(({ label }) => numberOf(label));
    expect(Math.min(...values)).toBeLessThan(0);
    expect(Math.min(...values)).toBeGreaterThan(-local / 1e5);
  });
});

describe('axisTicks of gauge pressure on a linear axis', () => {
  it('are round in gauge, not in absolute pressure', () => {
    const s = scale('linear', [0, 450e3]);
    const ticks = named(axisTicks(s, 100, 8, reading('bar', 84763.7)));
    const texts = ticks.map(({ label }) => textOf(label));
    expect(texts).toContain('0.0');
    expect(s.value(ticks[texts.indexOf('0.0')]!.share)).toBeCloseTo(84763.7, 6);
  });
});

describe('axisTicks of a reciprocal axis', () => {
  it('are round temperatures that stand closer where it is warm', () => {
    const s = scale('reciprocal', [273.15, 473.15]);
    const ticks = named(axisTicks(s, 150, 13, reading('°C')));
    const values = ticks.map(({ label }) => numberOf(label));
    expect(values).toContain(0);
    expect(values).toContain(100);
    const at = (t: number) => s.share(t + 273.15);
    expect(at(50) - at(0)).toBeGreaterThan(at(150) - at(100));
  });
});

describe('tickLabel', () => {
  it.each([
    [0, 0, '0'],
    [0.001, 3, '0.001'],
    [0.0001, 4, '10^−4'],
    [0.0002, 4, '2·10^−4'],
    [999999, 0, '999\u2009999'],
    [1e6, 0, '10^6'],
    [2.5e7, -6, '2.5·10^7'],
    [1169600, -2, '1.1696·10^6'],
    [-1e6, 0, '−10^6'],
    [-40, 0, '−40'],
    [1250, 0, '1\u2009250'],
  ])('tickLabel(%d, %d) is %s', (value, decimals, text) => {
    expect(textOf(tickLabel(value, decimals, '.'))).toBe(text);
  });
  it('takes a decimal comma', () => {
    expect(textOf(tickLabel(0.5, 1, ','))).toBe('0,5');
  });
  it('keeps superscripts legible: six points on an axis of eight', () => {
    for (const { scale: size = 1 } of tickLabel(2e9, -9, '.'))
      expect(size * 8).toBeGreaterThanOrEqual(6);
  });
});
