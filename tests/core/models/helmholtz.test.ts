import { describe, expect, it } from 'vitest';
import { fluidProperties, pressure } from '../../../core/models/fluidProperties.ts';
import { Helmholtz } from '../../../core/models/helmholtz.ts';
import type { FluidEquation, ResidualTerm } from '../../../core/substances/substance.ts';
import { difference } from '../../laws/difference.ts';
import { media } from '../../laws/substances.ts';
import { random } from '../../random.ts';

/** Invented equation of one ideal gas and the terms under test. */
const equation = (
  residual: readonly ResidualTerm[],
  ideal: Partial<FluidEquation['ideal']> = {},
): FluidEquation => ({
  formulation: 'invented',
  source: 'invented',
  R: 100,
  reducing: { T: 300, rho: 400 },
  ideal: { a1: 1.5, a2: -2.5, logTau: 3, planckEinstein: [], ...ideal },
  residual,
  validity: { Tmin: 100, Tmax: 1000, pmax: 1e9, vapourTmin: 100, source: 'invented' },
});

/** αR by the definition of each term, one after the other, with powers taken by `**`. */
function byDefinition(terms: readonly ResidualTerm[], d: number, t: number): number {
  let sum = 0;
  for (const k of terms) {
    if (k.kind === 'power') sum += k.n * d ** k.d * t ** k.t;
    else if (k.kind === 'exponential') sum += k.n * d ** k.d * t ** k.t * Math.exp(-(d ** k.c));
    else if (k.kind === 'gaussian')
      sum +=
        k.n *
        d ** k.d *
        t ** k.t *
        Math.exp(-k.eta * (d - k.epsilon) ** 2 - k.beta * (t - k.gamma) ** 2);
    else if (k.kind === 'associating')
      sum +=
        k.n *
        d ** k.d *
        t ** k.t *
        Math.exp(-k.eta * (d - k.epsilon) ** 2 + 1 / (k.beta * (t - k.gamma) ** 2 + k.b));
    else {
      const theta = 1 - t + k.A * ((d - 1) ** 2) ** (1 / (2 * k.beta));
      const Delta = theta ** 2 + k.B * ((d - 1) ** 2) ** k.a;
      sum += k.n * Delta ** k.b * d * Math.exp(-k.C * (d - 1) ** 2 - k.D * (t - 1) ** 2);
    }
  }
  return sum;
}

const kinds: readonly (readonly [name: string, terms: readonly ResidualTerm[]])[] = [
  [
    'powers with exponents in eighths, others, negative, zero and large',
    [-0.5, 0, 0.125, 0.875, 1, 1.5, 2.2, 1 / 3, 12, 50, -2.75].map((t, i) => ({
      kind: 'power' as const,
      n: 0.3 - 0.07 * i,
      d: 1 + (i % 5),
      t,
    })),
  ],
  [
    'exponentials of several orders',
    [1, 2, 3, 4, 6].flatMap((c) => [
      { kind: 'exponential' as const, n: 0.4, d: 1, t: 0.5 * c, c },
      { kind: 'exponential' as const, n: -0.2, d: c, t: 3, c },
    ]),
  ],
  [
    'gaussians, alone and in one family',
    [
      { kind: 'gaussian', n: 0.6, d: 1, t: 1, eta: 1.1, epsilon: 0.8, beta: 1.4, gamma: 1.3 },
      { kind: 'gaussian', n: -0.3, d: 3, t: 2.5, eta: 1.1, epsilon: 0.8, beta: 0.9, gamma: 1.1 },
      { kind: 'gaussian', n: 0.2, d: 2, t: 0, eta: 20, epsilon: 1, beta: 150, gamma: 1.21 },
    ],
  ],
  [
    'associating terms beside gaussians',
    [
      { kind: 'gaussian', n: 0.6, d: 1, t: 1, eta: 0.4, epsilon: 0.9, beta: 0.8, gamma: 1.2 },
      {
        kind: 'associating',
        n: 0.07,
        d: 1,
        t: 3.5,
        eta: 0.35,
        epsilon: 0.6,
        beta: 0.7,
        gamma: 1.1,
        b: 1.4,
      },
      {
        kind: 'associating',
        n: -0.05,
        d: 2,
        t: 0.7,
        eta: 0.35,
        epsilon: 0.6,
        beta: 0.2,
        gamma: 0.8,
        b: 0.9,
      },
    ],
  ],
  [
    'non-analytic terms with the published and with other exponents',
    [
      { kind: 'nonanalytic', n: 0.3, a: 3.5, b: 0.85, beta: 0.3, A: 0.32, B: 0.2, C: 28, D: 70 },
      { kind: 'nonanalytic', n: -0.2, a: 3, b: 0.9, beta: 0.3, A: 0.7, B: 0.3, C: 10, D: 27 },
      { kind: 'nonanalytic', n: 0.1, a: 2.7, b: 1.2, beta: 0.35, A: 0.5, B: 0.4, C: 2, D: 5 },
    ],
  ],
];

describe.each(kinds)('Helmholtz of %s', (_, terms) => {
  const model = new Helmholtz(equation([{ kind: 'power', n: 0.01, d: 1, t: 1 }, ...terms]));
  const whole: readonly ResidualTerm[] = [{ kind: 'power', n: 0.01, d: 1, t: 1 }, ...terms];
  const r = random(3);
  const places = Array.from({ length: 60 }, () => ({ d: 0.05 + 2 * r(), t: 0.6 + 1.1 * r() }));
  const at = (d: number, t: number): Helmholtz => model.evaluate(300 / t, 400 * d);

  it('residual has the value of its definition', () => {
    for (const { d, t } of places) {
      const value = byDefinition(whole, d, t);
      const size = whole.reduce((s, term) => s + Math.abs(byDefinition([term], d, t)), 0);
      expect(Math.abs(at(d, t).aR - value)).toBeLessThan(1e-13 * size + 1e-24);
    }
  });

  it('first and second derivatives are those of differences', () => {
    for (const { d, t } of places) {
      if (Math.abs(d - 1) < 0.05) continue;
      const { aR, aRd, aRdd, aRt, aRtt, aRdt } = { ...at(d, t) };
      const scale = [aR, aRd, aRdd, aRt, aRtt, aRdt].reduce((s, x) => s + Math.abs(x), 0);
      const h = Math.min(1e-3, 0.005 * Math.abs(d - 1));
      const over = {
        d: (f: (m: Helmholtz) => number) => difference((x) => f(at(d * Math.exp(x), t)), 0, h),
        t: (f: (m: Helmholtz) => number) => difference((x) => f(at(d, t * Math.exp(x))), 0, h),
      };
      const near = (found: number, expected: number): void =>
        expect(Math.abs(found - expected) / scale).toBeLessThan(1e-8);
      near(
        over.d((m) => m.aR),
        aRd,
      );
      near(
        over.d((m) => m.aRd),
        aRd + aRdd,
      );
      near(
        over.d((m) => m.aRt),
        aRdt,
      );
      near(
        over.t((m) => m.aR),
        aRt,
      );
      near(
        over.t((m) => m.aRt),
        aRt + aRtt,
      );
      near(
        over.t((m) => m.aRd),
        aRdt,
      );
    }
  });
});

describe('Helmholtz of an ideal part', () => {
  const model = new Helmholtz(
    equation([{ kind: 'power', n: 0.01, d: 1, t: 1 }], {
      planckEinstein: [{ n: 1.2, theta: 2.5 }],
      powers: [
        { n: 0.3, t: -1.01 },
        { n: -0.2, t: 2 },
      ],
      electronic: [{ n: 0.9, g: 1.5, theta: 3 }],
      lowTemperature: { E: 0.28, T: 130, source: 'invented' },
    }),
  );

  it('has the value of its definition', () => {
    const [d, t] = [0.7, 1.3];
    const value =
      Math.log(d) +
      1.5 -
      2.5 * t +
      3 * Math.log(t) +
      1.2 * Math.log(1 - Math.exp(-2.5 * t)) +
      0.3 * t ** -1.01 -
      0.2 * t ** 2 +
      0.9 * Math.log(1 + 1.5 * Math.exp(-3 * t));
    expect(Math.abs(model.evaluate(300 / t, 400 * d).a0 - value)).toBeLessThan(1e-14 * 10);
  });

  it('derivatives are those of differences, below and above the low-temperature limit', () => {
    for (const T of [60, 90, 120, 129, 131, 200, 500, 900]) {
      const { a0t, a0tt } = { ...model.evaluate(T, 100) };
      const over = (f: () => number) =>
        difference((x) => (model.evaluate(T * Math.exp(-x), 100), f()), 0, 1e-3);
      expect(Math.abs(over(() => model.a0) - a0t)).toBeLessThan(1e-9);
      expect(Math.abs(over(() => model.a0t) - a0t - a0tt)).toBeLessThan(1e-9);
    }
  });

  it('has no step in value and two derivatives where the low-temperature term begins', () => {
    const below = { ...model.evaluate(130 * (1 - 1e-9), 100) };
    const above = { ...model.evaluate(130 * (1 + 1e-9), 100) };
    for (const name of ['a0', 'a0t', 'a0tt'] as const)
      expect(Math.abs(below[name] - above[name])).toBeLessThan(1e-7);
  });
});

describe.each(media)('Helmholtz, $substance.id', (m) => {
  const { fluid, critical } = m;

  it('remembers nothing of the state before', () => {
    const fresh = (T: number, rho: number) => {
      const { aR, aRd, aRdd, aRt, aRtt, aRdt, a0, a0t, a0tt } = new Helmholtz(
        m.substance.fluid,
      ).evaluate(T, rho);
      return { aR, aRd, aRdd, aRt, aRtt, aRdt, a0, a0t, a0tt };
    };
    const r = random(8);
    for (let i = 0; i < 200; i++) {
      // Now and then the temperature stays, or only the residual part is asked for.
      const T = r() < 0.3 && fluid.T > 0 ? fluid.T : critical.T * (0.5 + r());
      const rho = critical.rho * 3 * r();
      if (r() < 0.3) fluid.residual(T, rho * 0.9);
      expect(fluid.evaluate(T, rho)).toMatchObject(fresh(T, rho));
    }
  });

  it('stays finite at the critical point, on its isochore and isotherm and at no density', () => {
    const { T, rho } = m.substance.fluid.reducing;
    for (const [t, r] of [
      [T, rho],
      [T * (1 + 1e-15), rho],
      [T, rho * (1 + 1e-15)],
      [T * 0.99, rho],
      [T * 1.01, rho],
      [T, rho * 0.5],
      [T, rho * 1.5],
      [T, 0],
    ] as const) {
      fluid.residual(t, r);
      for (const name of ['aR', 'aRd', 'aRdd', 'aRt', 'aRtt', 'aRdt'] as const)
        expect(Number.isFinite(fluid[name])).toBe(true);
    }
    expect(pressure(fluid.residual(T, 0))).toBe(0);
  });

  it('is an ideal gas at low density', () => {
    for (const T of [0.8, 1, 2].map((x) => x * critical.T)) {
      fluid.evaluate(T, 1e-9);
      expect(Math.abs(pressure(fluid) / (1e-9 * fluid.R * T) - 1)).toBeLessThan(1e-9);
      const { cp, cv, w } = fluidProperties(fluid);
      expect(Math.abs((cp! - cv!) / fluid.R - 1)).toBeLessThan(1e-8);
      expect(Math.abs(w! ** 2 / ((cp! / cv!) * fluid.R * T) - 1)).toBeLessThan(1e-8);
    }
  });

  it('fluidProperties gives null, never a number that is none, where the fluid is unstable', () => {
    let unstable = 0;
    for (let i = 1; i < 300; i++) {
      fluid.evaluate(0.9 * critical.T, (3 * critical.rho * i) / 300);
      if (1 + 2 * fluid.aRd + fluid.aRdd > 0) continue;
      unstable++;
      expect(fluidProperties(fluid)).toMatchObject({ cp: null, w: null });
    }
    expect(unstable).toBeGreaterThan(10);
  });

  it('fluidProperties obeys h = u + p/ρ and g = h − T s', () => {
    const T = 1.1 * critical.T;
    fluid.evaluate(T, critical.rho);
    const { h, u, s } = fluidProperties(fluid);
    const g = fluid.R * T * (1 + fluid.a0 + fluid.aR + fluid.aRd);
    const size = Math.abs(h) + Math.abs(T * s) + fluid.R * T;
    expect(Math.abs(h - u - pressure(fluid) / critical.rho)).toBeLessThan(1e-12 * size);
    expect(Math.abs(h - T * s - g)).toBeLessThan(1e-12 * size);
  });
});
