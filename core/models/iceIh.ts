import type { IceIhEquation } from '../substances/substance.ts';
import type { SolidGibbs, SolidModel } from './solidGibbs.ts';

/**
 * Gibbs energy of ice Ih and its derivatives at T (K) and p (Pa).
 *
 * Domain: 0 < T ≤ 273.16 K, 0 ≤ p ≤ 210 MPa; the equation extrapolates a little beyond.
 * Source: IAPWS R10-06(2009), equations 1 to 5 and table 4. The entropy constant is the one that
 * agrees with IAPWS R6-95 at the triple point.
 */
export function iceIh(e: IceIhEquation): SolidModel {
  const { Tt, pt, p0, s0 } = e;
  const [g00, g01, g02, g03, g04] = e.g0;
  const [r20, r21, r22] = e.r2;
  const out: SolidGibbs = { g: 0, gT: 0, gp: 0, gTT: 0, gTp: 0, gpp: 0 };

  // K(t), L(t) and N(t) of the release for complex t and real θ, left in these six.
  let Kr = 0;
  let Ki = 0;
  let Lr = 0;
  let Li = 0;
  let Nr = 0;
  let Ni = 0;
  const setKernel = (tr: number, ti: number, th: number): void => {
    const mr = tr - th;
    const qr = tr + th;
    const m2 = mr * mr + ti * ti;
    const q2 = qr * qr + ti * ti;
    const t2 = tr * tr + ti * ti;
    const logM = 0.5 * Math.log(m2);
    const argM = Math.atan2(ti, mr);
    const logQ = 0.5 * Math.log(q2);
    const argQ = Math.atan2(ti, qr);
    const logT = 0.5 * Math.log(t2);
    const argT = Math.atan2(ti, tr);
    Kr =
      mr * logM -
      ti * argM +
      qr * logQ -
      ti * argQ -
      2 * (tr * logT - ti * argT) -
      (th * th * tr) / t2;
    Ki =
      mr * argM +
      ti * logM +
      qr * argQ +
      ti * logQ -
      2 * (tr * argT + ti * logT) +
      (th * th * ti) / t2;
    Lr = logQ - logM - (2 * th * tr) / t2;
    Li = argQ - argM + (2 * th * ti) / t2;
    Nr = mr / m2 + qr / q2 - (2 * tr) / t2;
    Ni = -ti / m2 - ti / q2 + (2 * ti) / t2;
  };

  return (T, p) => {
    const th = T / Tt;
    const x = (p - p0) / pt;
    setKernel(e.t1.re, e.t1.im, th);
    const { re: r1r, im: r1i } = e.r1;
    const K1 = r1r * Kr - r1i * Ki;
    const L1 = r1r * Lr - r1i * Li;
    const N1 = r1r * Nr - r1i * Ni;
    setKernel(e.t2.re, e.t2.im, th);
    const rr = r20.re + x * (r21.re + x * r22.re);
    const ri = r20.im + x * (r21.im + x * r22.im);
    const dr = (r21.re + 2 * x * r22.re) / pt;
    const di = (r21.im + 2 * x * r22.im) / pt;
    const ddr = (2 * r22.re) / (pt * pt);
    const ddi = (2 * r22.im) / (pt * pt);
    const g0 = g00 + x * (g01 + x * (g02 + x * (g03 + x * g04)));
    const g0p = (g01 + x * (2 * g02 + x * (3 * g03 + x * 4 * g04))) / pt;
    const g0pp = (2 * g02 + x * (6 * g03 + x * 12 * g04)) / (pt * pt);
    out.g = g0 - s0 * T + Tt * (K1 + rr * Kr - ri * Ki);
    out.gT = -s0 + L1 + rr * Lr - ri * Li;
    out.gTT = (N1 + rr * Nr - ri * Ni) / Tt;
    out.gp = g0p + Tt * (dr * Kr - di * Ki);
    out.gpp = g0pp + Tt * (ddr * Kr - ddi * Ki);
    out.gTp = dr * Lr - di * Li;
    return out;
  };
}
