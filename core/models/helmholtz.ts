import type { FluidEquation, ResidualTerm } from '../substances/substance.ts';

type SeparableTerm = Exclude<ResidualTerm, { kind: 'nonanalytic' }>;
type NonanalyticTerm = Extract<ResidualTerm, { kind: 'nonanalytic' }>;

/** Density factors that share exp(E(δ)): E = 0, −δ^c or −η(δ − ε)². */
interface Family {
  readonly c: number;
  readonly eta: number;
  readonly epsilon: number;
  /** Terms of one family and one exponent d form a group, Σ over τ apart from δ. */
  readonly d: number[];
  first: number;
}

const densityKey = (t: SeparableTerm): string =>
  t.kind === 'power' ? 'c0' : t.kind === 'exponential' ? `c${t.c}` : `g${t.eta},${t.epsilon}`;

/**
 * The reduced Helmholtz energy of a fluid, α(δ, τ) = α0 + αR, with all first and second
 * derivatives in one pass.
 *
 * Every term but the non-analytic ones is a product of a function of δ and a function of τ, so a
 * change of temperature collapses the equation to a short sum over powers of δ; at one temperature
 * further densities cost only that sum. Nothing is allocated per call and no power is taken by
 * `pow`.
 *
 * Derivatives are kept multiplied by their variables: `aRd` = δ ∂αR/∂δ, `aRtt` = τ² ∂²αR/∂τ²,
 * `aRdt` = δτ ∂²αR/∂δ∂τ, and so on; so they stay finite at δ → 0.
 *
 * Domain: T > 0 K, ρ ≥ 0 (validity is the business of the equilibrium functions). At the critical
 * point of an equation with non-analytic terms their second derivatives, infinite there, are taken
 * as zero.
 * Source: form as in IAPWS R6-95(2018), equations 5 and 6, tables 4 and 5; R. Span, W. Wagner,
 * J. Phys. Chem. Ref. Data 25, 1509 (1996), table 32; low-temperature addition IAPWS G9-12.
 */
export class Helmholtz {
  readonly R: number;
  readonly Tr: number;
  readonly rhor: number;

  /** Number of evaluations so far, for the benchmarks. */
  count = 0;

  T = NaN;
  tau = NaN;
  delta = NaN;
  aR = 0;
  aRd = 0;
  aRdd = 0;
  aRt = 0;
  aRtt = 0;
  aRdt = 0;
  a0 = 0;
  a0t = 0;
  a0tt = 0;

  private readonly ideal: FluidEquation['ideal'];
  private readonly families: Family[] = [];
  private readonly groupFirst: Int32Array;
  private readonly n: Float64Array;
  private readonly nt: Float64Array;
  private readonly ntt: Float64Array;
  /** Place of τ^t in the table of powers. */
  private readonly place: Int32Array;
  /** Terms with a factor in τ beyond the power, by their place, else −1. */
  private readonly shape: Int32Array;
  private readonly shapes: { beta: number; gamma: number; b: number; t: number }[] = [];
  private readonly nonanalytic: readonly NonanalyticTerm[];

  private readonly exponents: Float64Array;
  private readonly whole: Int32Array;
  private readonly eighths: Int32Array;
  private readonly powers: Float64Array;
  private readonly integerPowers: Float64Array;
  private readonly deltaPowers: Float64Array;
  private readonly shapeValue: Float64Array;
  private readonly shapeK: Float64Array;
  private readonly shapeKK: Float64Array;
  private readonly theta: Float64Array;
  private readonly thetat: Float64Array;
  private readonly thetatt: Float64Array;

  private idealT = NaN;
  private idealA = 0;

  constructor(equation: FluidEquation) {
    this.R = equation.R;
    this.Tr = equation.reducing.T;
    this.rhor = equation.reducing.rho;
    this.ideal = equation.ideal;
    this.nonanalytic = equation.residual.filter((t) => t.kind === 'nonanalytic');

    const separable = equation.residual.filter((t) => t.kind !== 'nonanalytic');
    const groups = new Map<string, Map<number, SeparableTerm[]>>();
    for (const t of separable) {
      const family = groups.get(densityKey(t)) ?? new Map<number, SeparableTerm[]>();
      groups.set(densityKey(t), family);
      family.set(t.d, [...(family.get(t.d) ?? []), t]);
    }
    const ordered: SeparableTerm[] = [];
    const firsts: number[] = [];
    for (const family of groups.values()) {
      const byPower = [...family].sort(([d1], [d2]) => d1 - d2);
      const sample = byPower[0]![1][0]!;
      this.families.push({
        c: sample.kind === 'exponential' ? sample.c : 0,
        eta: 'eta' in sample ? sample.eta : 0,
        epsilon: 'epsilon' in sample ? sample.epsilon : 0,
        d: byPower.map(([d]) => d),
        first: firsts.length,
      });
      for (const [, members] of byPower) {
        firsts.push(ordered.length);
        ordered.push(...members);
      }
    }
    firsts.push(ordered.length);
    this.groupFirst = Int32Array.from(firsts);

    const exponents = [...new Set(ordered.map((t) => t.t))].sort((a, b) => a - b);
    this.exponents = Float64Array.from(exponents);
    this.whole = Int32Array.from(exponents, (t) => Math.floor(t));
    this.eighths = Int32Array.from(exponents, (t) => {
      const k = (t - Math.floor(t)) * 8;
      return Number.isInteger(k) && t >= -8 ? k : -1;
    });
    this.powers = new Float64Array(exponents.length);
    const top = Math.max(1, ...exponents.map((t) => Math.floor(Math.abs(t)) + 1));
    this.integerPowers = new Float64Array(top + 1);
    this.deltaPowers = new Float64Array(Math.max(...ordered.map((t) => t.d), 1) + 1);

    this.n = Float64Array.from(ordered, (t) => t.n);
    this.nt = Float64Array.from(ordered, (t) => t.n * t.t);
    this.ntt = Float64Array.from(ordered, (t) => t.n * t.t * (t.t - 1));
    this.place = Int32Array.from(ordered, (t) => exponents.indexOf(t.t));
    this.shape = Int32Array.from(ordered, (t) => {
      if (t.kind !== 'gaussian' && t.kind !== 'associating') return -1;
      const b = t.kind === 'associating' ? t.b : 0;
      const known = this.shapes.findIndex(
        (s) => s.beta === t.beta && s.gamma === t.gamma && s.b === b && s.t === t.t,
      );
      if (known >= 0) return known;
      return this.shapes.push({ beta: t.beta, gamma: t.gamma, b, t: t.t }) - 1;
    });
    this.shapeValue = new Float64Array(this.shapes.length);
    this.shapeK = new Float64Array(this.shapes.length);
    this.shapeKK = new Float64Array(this.shapes.length);
    this.theta = new Float64Array(firsts.length - 1);
    this.thetat = new Float64Array(firsts.length - 1);
    this.thetatt = new Float64Array(firsts.length - 1);
  }

  /** Residual part and its derivatives at T (K) and ρ (kg/m³), left in this object's fields. */
  residual(T: number, rho: number): this {
    if (T !== this.T) this.setTemperature(T);
    this.setDensity(rho / this.rhor);
    return this;
  }

  /** Residual and ideal part with all derivatives at T (K) and ρ (kg/m³), left in the fields. */
  evaluate(T: number, rho: number): this {
    this.residual(T, rho);
    if (T !== this.idealT) this.setIdeal(T);
    this.a0 = Math.log(this.delta) + this.idealA;
    return this;
  }

  private setTemperature(T: number): void {
    const tau = this.Tr / T;
    this.T = T;
    this.tau = tau;
    this.setPowers(tau);
    const { n, nt, ntt, place, powers, shape, groupFirst, theta, thetat, thetatt } = this;
    for (let i = 0; i < this.shapes.length; i++) {
      const s = this.shapes[i]!;
      const y = tau - s.gamma;
      let E, TE, TTE;
      if (s.b === 0) {
        E = -s.beta * y * y;
        TE = -2 * s.beta * tau * y;
        TTE = -2 * s.beta * tau * (2 * tau - s.gamma);
      } else {
        const G = 1 / (s.beta * y * y + s.b);
        const G1 = -2 * s.beta * y * G * G;
        const G2 = -2 * s.beta * G * G - 4 * s.beta * y * G * G1;
        E = G;
        TE = tau * G1;
        TTE = tau * G1 + tau * tau * G2;
      }
      const K = s.t + TE;
      this.shapeValue[i] = Math.exp(E);
      this.shapeK[i] = K;
      this.shapeKK[i] = K * K - K + TTE;
    }
    for (let g = 0; g < theta.length; g++) {
      let v = 0;
      let vt = 0;
      let vtt = 0;
      const end = groupFirst[g + 1]!;
      for (let i = groupFirst[g]!; i < end; i++) {
        const power = powers[place[i]!]!;
        const s = shape[i]!;
        if (s < 0) {
          v += n[i]! * power;
          vt += nt[i]! * power;
          vtt += ntt[i]! * power;
        } else {
          const A = n[i]! * power * this.shapeValue[s]!;
          v += A;
          vt += A * this.shapeK[s]!;
          vtt += A * this.shapeKK[s]!;
        }
      }
      theta[g] = v;
      thetat[g] = vt;
      thetatt[g] = vtt;
    }
  }

  /** τ^t for all exponents: multiples of 1/8 from square roots and products, others by exp and log. */
  private setPowers(tau: number): void {
    const { powers, exponents, whole, eighths, integerPowers: I } = this;
    I[0] = 1;
    I[1] = tau;
    for (let k = 2; k < I.length; k++) I[k] = I[k >> 1]! * I[k - (k >> 1)]!;
    const half = Math.sqrt(tau);
    const quarter = Math.sqrt(half);
    const eighth = Math.sqrt(quarter);
    let log = NaN;
    for (let i = 0; i < powers.length; i++) {
      const e = eighths[i]!;
      if (e < 0) {
        if (Number.isNaN(log)) log = Math.log(tau);
        powers[i] = Math.exp(exponents[i]! * log);
        continue;
      }
      const k = whole[i]!;
      let power = k >= 0 ? I[k]! : 1 / I[-k]!;
      if (e & 4) power *= half;
      if (e & 2) power *= quarter;
      if (e & 1) power *= eighth;
      powers[i] = power;
    }
  }

  private setDensity(delta: number): void {
    this.count++;
    this.delta = delta;
    const { deltaPowers: P, theta, thetat, thetatt } = this;
    P[0] = 1;
    P[1] = delta;
    for (let k = 2; k < P.length; k++) P[k] = P[k >> 1]! * P[k - (k >> 1)]!;
    let a = 0;
    let ad = 0;
    let add = 0;
    let at = 0;
    let att = 0;
    let adt = 0;
    for (let f = 0; f < this.families.length; f++) {
      const { c, eta, epsilon, d, first } = this.families[f]!;
      let E = 1;
      let DE = 0;
      let DDE = 0;
      if (c > 0) {
        const x = P[c] ?? delta ** c;
        E = Math.exp(-x);
        DE = -c * x;
        DDE = c * DE;
      } else if (eta > 0) {
        const x = delta - epsilon;
        E = Math.exp(-eta * x * x);
        DE = -2 * eta * delta * x;
        DDE = -2 * eta * delta * (2 * delta - epsilon);
      }
      let s = 0;
      let sd = 0;
      let sdd = 0;
      let st = 0;
      let stt = 0;
      let sdt = 0;
      for (let k = 0; k < d.length; k++) {
        const g = first + k;
        const A = P[d[k]!]!;
        const v = A * theta[g]!;
        const vt = A * thetat[g]!;
        const L = d[k]! + DE;
        s += v;
        sd += v * L;
        sdd += v * (L * L - L + DDE);
        st += vt;
        sdt += vt * L;
        stt += A * thetatt[g]!;
      }
      a += E * s;
      ad += E * sd;
      add += E * sdd;
      at += E * st;
      att += E * stt;
      adt += E * sdt;
    }
    this.aR = a;
    this.aRd = ad;
    this.aRdd = add;
    this.aRt = at;
    this.aRtt = att;
    this.aRdt = adt;
    for (let i = 0; i < this.nonanalytic.length; i++) this.addNonanalytic(this.nonanalytic[i]!);
  }

  private addNonanalytic(term: NonanalyticTerm): void {
    const { delta, tau } = this;
    const { n, a, b, beta, A, B, C, D } = term;
    const x = delta - 1;
    const y = tau - 1;
    const x2 = x * x;
    const exponent = C * x2 + D * y * y;
    // Beyond this the term is below the rounding of the rest, however often differentiated.
    if (exponent > 60) return;
    const psi = Math.exp(-exponent);
    // (x²)^(1/(2β) − 1); β is 0.3 in both published equations, which makes it a cube root.
    const m = 1 / (2 * beta);
    let root;
    if (beta === 0.3) {
      const c = Math.cbrt(x2);
      root = c * c;
    } else root = x2 === 0 ? 0 : Math.exp((m - 1) * Math.log(x2));
    let xa;
    if (a === 3.5) xa = x2 * x2 * Math.abs(x);
    else if (a === 3) xa = x2 * x2;
    else xa = x2 === 0 ? 0 : Math.exp((a - 1) * Math.log(x2));
    const th = -y + A * x2 * root;
    const thd = (A / beta) * x * root;
    const thdd = (A / beta) * (2 * m - 1) * root;
    const W = th * th + B * x2 * xa;
    if (W === 0) return;
    const Wd = 2 * th * thd + 2 * a * B * xa * x;
    const Wdd = 2 * thd * thd + 2 * th * thdd + 2 * a * (2 * a - 1) * B * xa;
    const Wt = -2 * th;
    const Wdt = -2 * thd;
    const P = Math.exp(b * Math.log(W));
    const Q = (b * P) / W;
    const S = ((b - 1) * Q) / W;
    const Pd = Q * Wd;
    const Pt = Q * Wt;
    const Pdd = Q * Wdd + S * Wd * Wd;
    const Ptt = 2 * Q + S * Wt * Wt;
    const Pdt = Q * Wdt + S * Wd * Wt;
    const psid = -2 * C * x * psi;
    const psidd = (4 * C * C * x2 - 2 * C) * psi;
    const psit = -2 * D * y * psi;
    const psitt = (4 * D * D * y * y - 2 * D) * psi;
    const psidt = 4 * C * D * x * y * psi;
    const G = delta * psi;
    const Gd = psi + delta * psid;
    const Gdd = 2 * psid + delta * psidd;
    const Gt = delta * psit;
    const Gtt = delta * psitt;
    const Gdt = psit + delta * psidt;
    this.aR += n * P * G;
    this.aRd += n * delta * (Pd * G + P * Gd);
    this.aRdd += n * delta * delta * (Pdd * G + 2 * Pd * Gd + P * Gdd);
    this.aRt += n * tau * (Pt * G + P * Gt);
    this.aRtt += n * tau * tau * (Ptt * G + 2 * Pt * Gt + P * Gtt);
    this.aRdt += n * delta * tau * (Pdt * G + Pd * Gt + Pt * Gd + P * Gdt);
  }

  private setIdeal(T: number): void {
    this.idealT = T;
    const { tau, ideal } = this;
    const logTau = Math.log(tau);
    let a = ideal.a1 + ideal.a2 * tau + ideal.logTau * logTau;
    let at = ideal.a2 * tau + ideal.logTau;
    let att = -ideal.logTau;
    for (const { n, theta } of ideal.planckEinstein) {
      const x = theta * tau;
      const e = -Math.expm1(-x);
      const q = 1 / e - 1;
      a += n * Math.log(e);
      at += n * x * q;
      att -= n * x * x * q * (1 + q);
    }
    if (ideal.powers)
      for (const { n, t } of ideal.powers) {
        const v = n * Math.exp(t * logTau);
        a += v;
        at += v * t;
        att += v * t * (t - 1);
      }
    if (ideal.electronic)
      for (const { n, g, theta } of ideal.electronic) {
        const x = theta * tau;
        const e = g * Math.exp(-x);
        const q = e / (1 + e);
        a += n * Math.log1p(e);
        at -= n * x * q;
        att += n * x * x * q * (1 - q);
      }
    const low = ideal.lowTemperature;
    if (low && T < low.T) {
      const eps = this.Tr / low.T;
      const r = tau / eps;
      const log = Math.log(r);
      a +=
        low.E *
        (-1 / (2 * tau) -
          (3 / (eps * eps)) * (tau + eps) * log -
          9 / (2 * eps) +
          (9 * tau) / (2 * eps * eps) +
          (tau * tau) / (2 * eps ** 3));
      at +=
        low.E *
        tau *
        (1 / (2 * tau * tau) -
          3 / (tau * eps) -
          (3 / (eps * eps)) * log +
          3 / (2 * eps * eps) +
          tau / eps ** 3);
      att += low.E * tau * tau * (1 / eps - 1 / tau) ** 3;
    }
    this.idealA = a;
    this.a0t = at;
    this.a0tt = att;
  }
}
