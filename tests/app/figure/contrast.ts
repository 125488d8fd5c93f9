type Rgb = readonly [number, number, number];

/** sRGB parts from 0 to 1 of a colour written #rrggbb. */
export function rgb(colour: string): Rgb {
  const match = /^#([0-9a-f]{2})([0-9a-f]{2})([0-9a-f]{2})$/i.exec(colour);
  if (!match) throw new RangeError(`not a colour: ${colour}`);
  return [1, 2, 3].map((i) => parseInt(match[i]!, 16) / 255) as unknown as Rgb;
}

/** IEC 61966-2-1: sRGB to linear light (recalled). */
const linear = (c: number): number => (c <= 0.04045 ? c / 12.92 : ((c + 0.055) / 1.055) ** 2.4);
const encoded = (c: number): number =>
  c <= 0.0031308 ? 12.92 * c : 1.055 * Math.min(1, c) ** (1 / 2.4) - 0.055;

/** WCAG 2.2, relative luminance. */
const luminance = (colour: Rgb): number => {
  const [r, g, b] = colour.map(linear) as unknown as Rgb;
  return 0.2126 * r + 0.7152 * g + 0.0722 * b;
};

/** WCAG 2.2, contrast ratio, from 1 to 21. */
export function contrast(a: Rgb, b: Rgb): number {
  const [x, y] = [luminance(a), luminance(b)];
  return (Math.max(x, y) + 0.05) / (Math.min(x, y) + 0.05);
}

/** A translucent colour over another, as screens and PDF mix them: in sRGB parts. */
export const over = (top: Rgb, opacity: number, ground: Rgb): Rgb =>
  top.map((c, i) => c * opacity + ground[i]! * (1 - opacity)) as unknown as Rgb;

/**
 * Matrices for linear light of G. M. Machado, M. M. Oliveira, L. A. F. Fernandes, IEEE Trans. Vis.
 * Comput. Graph. 15, 1291 (2009), severity 1.0 (recalled).
 */
const deficiencies = {
  protanopia: [
    [0.152286, 1.052583, -0.204868],
    [0.114503, 0.786281, 0.099216],
    [-0.003882, -0.048116, 1.051998],
  ],
  deuteranopia: [
    [0.367322, 0.860646, -0.227968],
    [0.280085, 0.672501, 0.047413],
    [-0.01182, 0.04294, 0.968881],
  ],
  tritanopia: [
    [1.255528, -0.076749, -0.178779],
    [-0.078411, 0.930809, 0.147602],
    [0.004733, 0.691367, 0.3039],
  ],
} as const;

export type Deficiency = keyof typeof deficiencies;
export const deficiencyNames = Object.keys(deficiencies) as readonly Deficiency[];

/** A colour as a person with the deficiency sees it. */
export function seen(colour: Rgb, deficiency: Deficiency): Rgb {
  const light = colour.map(linear);
  return deficiencies[deficiency].map((row) =>
    encoded(Math.max(0, row[0] * light[0]! + row[1] * light[1]! + row[2] * light[2]!)),
  ) as unknown as Rgb;
}

/** CIE 1976 L*a*b*, D65, 2°, from sRGB (matrix of IEC 61966-2-1, recalled). */
function lab(colour: Rgb): readonly [number, number, number] {
  const [r, g, b] = colour.map(linear) as unknown as Rgb;
  const f = (t: number): number =>
    t > (6 / 29) ** 3 ? Math.cbrt(t) : t / (3 * (6 / 29) ** 2) + 4 / 29;
  const x = f((0.4124564 * r + 0.3575761 * g + 0.1804375 * b) / 0.95047);
  const y = f(0.2126729 * r + 0.7151522 * g + 0.072175 * b);
  const z = f((0.0193339 * r + 0.119192 * g + 0.9503041 * b) / 1.08883);
  return [116 * y - 16, 500 * (x - y), 200 * (y - z)];
}

/** Colour difference CIE76: the distance in L*a*b*. */
export function difference(a: Rgb, b: Rgb): number {
  const [p, q] = [lab(a), lab(b)];
  return Math.hypot(p[0] - q[0], p[1] - q[1], p[2] - q[2]);
}
