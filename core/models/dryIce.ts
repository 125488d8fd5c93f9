import type { DryIceEquation } from '../substances/substance.ts';
import type { SolidGibbs, SolidModel } from './solidGibbs.ts';

/**
 * Gibbs energy of solid carbon dioxide and its derivatives at T (K) and p (Pa), per kilogram.
 *
 * Domain: 80 K to 300 K, 0 to 500 MPa.
 * Source: A. Jäger, R. Span, J. Chem. Eng. Data 57, 590 (2012), equations 14 to 17 and table 2;
 * molar there, divided by the molar mass here.
 */
export function dryIce(e: DryIceEquation): SolidModel {
  const { T0, p0, n } = e;
  const [g0, g1, g2, g3, g4, g5, g6, g7, g8, g9, g10] = e.g as readonly number[] & { length: 11 };
  const [a0, a1, a2, a3, a4, a5, a6, a7, a8] = e.gAlpha as readonly number[] & { length: 9 };
  const [k0, k1, k2] = e.gKappa as readonly number[] & { length: 3 };
  const unit = (e.R * T0) / e.molarMass;
  const out: SolidGibbs = { g: 0, gT: 0, gp: 0, gTT: 0, gTp: 0, gpp: 0 };

  const W = (th: number, q: number): number =>
    Math.log((th * th + q * q) / (1 + q * q)) -
    ((2 * th) / q) * (Math.atan(th / q) - Math.atan(1 / q));
  const W1 = (th: number, q: number): number => (-2 / q) * (Math.atan(th / q) - Math.atan(1 / q));
  const W2 = (th: number, q: number): number => -2 / (th * th + q * q);

  return (T, p) => {
    const th = T / T0;
    const dth = th - 1;
    const pi = p / p0;
    const up = th * th + a2! * th + a3!;
    const down = th * th - a2! * th + a3!;
    const left = (th - a6!) / a7!;
    const right = (th + a6!) / a7!;
    const F =
      a0! * (th * th - 1) +
      a1! * Math.log(down / (1 - a2! + a3!)) +
      a4! * Math.log(up / (1 + a2! + a3!)) +
      a5! * (Math.atan(left) - Math.atan((1 - a6!) / a7!)) +
      a8! * (Math.atan(right) - Math.atan((1 + a6!) / a7!));
    const leftD = 1 / (1 + left * left) / a7!;
    const rightD = 1 / (1 + right * right) / a7!;
    const F1 =
      2 * a0! * th +
      (a1! * (2 * th - a2!)) / down +
      (a4! * (2 * th + a2!)) / up +
      a5! * leftD +
      a8! * rightD;
    const F2 =
      2 * a0! +
      a1! * (2 / down - ((2 * th - a2!) / down) ** 2) +
      a4! * (2 / up - ((2 * th + a2!) / up) ** 2) -
      2 * a5! * leftD * leftD * left -
      2 * a8! * rightD * rightD * right;
    const K = k0! * th * th + k1! * th + k2!;
    const K1 = 2 * k0! * th + k1!;
    const K2 = 2 * k0!;
    const expF = Math.exp(F);
    const dpi = pi - 1;
    const m = (n - 1) / n;
    const base = pi + g10!;
    const power = Math.exp(m * Math.log(base));
    const rest = Math.exp(m * Math.log(1 + g10!));
    out.g =
      unit *
      (g0! +
        g1! * dth +
        g2! * dth * dth +
        g3! * W(th, g4!) +
        g5! * W(th, g6!) +
        g7! * dpi * (expF + g8! * K) +
        g9! * K * (power - rest));
    out.gT =
      (unit / T0) *
      (g1! +
        2 * g2! * dth +
        g3! * W1(th, g4!) +
        g5! * W1(th, g6!) +
        g7! * dpi * (expF * F1 + g8! * K1) +
        g9! * K1 * (power - rest));
    out.gTT =
      (unit / (T0 * T0)) *
      (2 * g2! +
        g3! * W2(th, g4!) +
        g5! * W2(th, g6!) +
        g7! * dpi * (expF * (F1 * F1 + F2) + g8! * K2) +
        g9! * K2 * (power - rest));
    out.gp = (unit / p0) * (g7! * (expF + g8! * K) + (g9! * K * m * power) / base);
    out.gTp = (unit / (p0 * T0)) * (g7! * (expF * F1 + g8! * K1) + (g9! * K1 * m * power) / base);
    out.gpp = ((unit / (p0 * p0)) * (g9! * K * m * (m - 1) * power)) / (base * base);
    return out;
  };
}
