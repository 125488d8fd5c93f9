/**
 * The work that one evaluation of water's Helmholtz energy with all first and second derivatives is
 * measured by: 12 exponentials, 1 logarithm, 1 cube root and 900 multiply-adds on live data. The
 * multiply-adds run in twelve independent chains over coefficients read from memory, so that neither
 * one long chain nor a constant known beforehand decides the time.
 */
export class Yardstick {
  private readonly a: Float64Array;
  private readonly b: Float64Array;

  constructor(random: () => number) {
    // 75 rows of twelve: factors next to 1 keep the chains within range.
    this.a = Float64Array.from({ length: 900 }, () => 1 - 0.01 * random());
    this.b = Float64Array.from({ length: 900 }, () => 0.02 * (random() - 0.5));
  }

  run(x: number, y: number): number {
    const { a, b } = this;
    let c0 = Math.exp(-x);
    let c1 = Math.exp(-y);
    let c2 = Math.exp(-0.9 * x);
    let c3 = Math.exp(-0.9 * y);
    let c4 = Math.exp(-0.8 * x);
    let c5 = Math.exp(-0.8 * y);
    let c6 = Math.exp(-0.7 * x);
    let c7 = Math.exp(-0.7 * y);
    let c8 = Math.exp(-0.6 * x);
    let c9 = Math.exp(-0.6 * y);
    let c10 = Math.exp(-0.5 * x);
    let c11 = Math.exp(-0.5 * y);
    for (let i = 0; i < 900; i += 12) {
      c0 = c0 * a[i]! + b[i]!;
      c1 = c1 * a[i + 1]! + b[i + 1]!;
      c2 = c2 * a[i + 2]! + b[i + 2]!;
      c3 = c3 * a[i + 3]! + b[i + 3]!;
      c4 = c4 * a[i + 4]! + b[i + 4]!;
      c5 = c5 * a[i + 5]! + b[i + 5]!;
      c6 = c6 * a[i + 6]! + b[i + 6]!;
      c7 = c7 * a[i + 7]! + b[i + 7]!;
      c8 = c8 * a[i + 8]! + b[i + 8]!;
      c9 = c9 * a[i + 9]! + b[i + 9]!;
      c10 = c10 * a[i + 10]! + b[i + 10]!;
      c11 = c11 * a[i + 11]! + b[i + 11]!;
    }
    const sum = c0 + c1 + c2 + c3 + c4 + c5 + c6 + c7 + c8 + c9 + c10 + c11;
    return sum + Math.log(x) + Math.cbrt(y);
  }
}
