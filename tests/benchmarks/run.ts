/*
 * Ratios within one run; times only for the record: `npm run bench`. Every figure is the median of several rounds
 * in which the work and what it is measured by take turns.
 */
import { medium, type Medium } from '../../core/equilibrium/medium.ts';
import { saturationAt } from '../../core/equilibrium/saturation.ts';
import { carbonDioxide } from '../../core/substances/carbon-dioxide.ts';
import { water } from '../../core/substances/water.ts';
import { boundaryCurves } from '../../core/map/boundary.ts';
import { scale, temperaturePressurePlane } from '../../core/map/plane.ts';
import { trace } from '../../core/map/trace.ts';
import { random } from '../random.ts';
import { report } from './report.ts';
import { drained, median, ratioOf, timesOf } from './timing.ts';
import { Yardstick } from './yardstick.ts';

const states = 4096;

/** Liquid, vapour and supercritical states; no two neighbours share T or ρ. */
function drawStates(m: Medium, seed: number): { T: Float64Array; rho: Float64Array } {
  const r = random(seed);
  const T = new Float64Array(states);
  const rho = new Float64Array(states);
  for (let i = 0; i < states; i++) {
    T[i] = m.triple.T + r() * (1.4 * m.critical.T - m.triple.T);
    rho[i] = m.critical.rho * (r() < 0.5 ? 10 ** (-4 * r()) : 0.2 + 2.8 * r());
  }
  return { T, rho };
}

function evaluations(m: Medium): void {
  const { T, rho } = drawStates(m, 11);
  const { fluid } = m;
  const r = random(12);
  const yardstick = new Yardstick(r);
  const x = Float64Array.from({ length: states }, () => 0.1 + r());
  const evaluateAll = (): number => {
    let sum = 0;
    for (let i = 0; i < states; i++) {
      fluid.evaluate(T[i]!, rho[i]!);
      sum += fluid.aR + fluid.aRdd + fluid.aRtt + fluid.aRdt + fluid.a0 + fluid.a0tt;
    }
    return sum;
  };
  const measureAll = (): number => {
    let sum = 0;
    for (let i = 0; i < states; i++) sum += yardstick.run(x[i]!, x[states - 1 - i]!);
    return sum;
  };
  const { id } = m.substance;
  report(
    `${id}: evaluation, T and ρ new, against the yardstick`,
    ratioOf(evaluateAll, measureAll),
    2.5,
  );

  const sameT = (): number => {
    let sum = 0;
    for (let i = 0; i < states; i++) sum += fluid.residual(600, rho[i]!).aRdd;
    return sum;
  };
  report(`${id}: evaluation, ρ new, against T and ρ new`, ratioOf(sameT, evaluateAll), 1);

  const r2 = random(13);
  const temperatures = Float64Array.from(
    { length: states },
    () => m.triple.T + (m.critical.T - 0.01 - m.triple.T) * r2(),
  );
  const saturateAll = (): number => {
    let sum = 0;
    for (let i = 0; i < states; i++) sum += saturationAt(m, temperatures[i]!).p;
    return sum;
  };
  report(`${id}: saturation state against evaluation`, ratioOf(saturateAll, evaluateAll), 12);
}

/** Every boundary of the whole map at printed size: evaluations a vertex, and milliseconds for the record. */
function wholeMap(
  m: Medium,
  T: readonly [number, number],
  p: readonly [number, number],
  goal: number,
): void {
  const { id } = m.substance;
  let maps = 0;
  const traceAll = (): number => {
    // Another map each time, since points solved before are remembered.
    const shift = 0.01 * maps++;
    const plane = temperaturePressurePlane({
      T: scale('linear', [T[0] + shift, T[1] + shift]),
      p: scale('logarithmic', [p[0] * (1 + shift), p[1] * (1 + shift)]),
      width: 190,
      height: 120,
    });
    return boundaryCurves(m).reduce((n, c) => n + (trace(c, plane)?.points.length ?? 0), 0);
  };
  // The ends of the lines are solved once for a substance, not for a map.
  traceAll();
  const before = m.fluid.count;
  const vertices = traceAll();
  report(`${id}: evaluations a vertex of the whole map`, (m.fluid.count - before) / vertices, goal);
  console.log(`  ${vertices} vertices in ${median(timesOf(traceAll)).toFixed(1)} ms`);
}

evaluations(medium(water));
evaluations(medium(carbonDioxide));
const celsius = (t: number): number => t + 273.15;
wholeMap(medium(water), [celsius(-60), celsius(460)], [1, 1e9], 12);
wholeMap(medium(carbonDioxide), [celsius(-120), celsius(120)], [1e2, 8e8], 12);
if (!Number.isFinite(drained())) throw new Error(`a benchmark gave ${drained()}`);
