/** Abscissae on [0, 1] of a symmetric rule, its weight there, and the weight of the rule of 7 points inside it. */
const kronrod = [
  [0.2077849550078985, 0.2044329400752989, 0],
  [0.4058451513773972, 0.1903505780647854, 0.3818300505051189],
  [0.5860872354676911, 0.1690047266392679, 0],
  [0.7415311855993945, 0.1406532597155259, 0.2797053914892767],
  [0.8648644233597691, 0.1047900103222502, 0],
  [0.9491079123427585, 0.0630920926299786, 0.1294849661688697],
  [0.9914553711208126, 0.0229353220105292, 0],
] as const;
const middleWeight = 0.2094821410847278;
const middleInside = 0.4179591836734694;

/**
 * ∫ f from a to b: Gauss–Kronrod with 7 inside 15 points, halved at most 14 times until the two rules
 * agree to the absolute `tolerance`, which the wider one then betters by far.
 *
 * Source: A. S. Kronrod, Nodes and Weights of Quadrature Formulas (1965); digits recalled and tested
 * by exactness to degree 22.
 */
export function integral(
  f: (x: number) => number,
  a: number,
  b: number,
  tolerance: number,
  depth = 0,
): number {
  if (a === b) return 0;
  const middle = 0.5 * (a + b);
  const half = 0.5 * (b - a);
  const centre = f(middle);
  let wide = middleWeight * centre;
  let inside = middleInside * centre;
  for (const [x, w, v] of kronrod) {
    const pair = f(middle - half * x) + f(middle + half * x);
    wide += w * pair;
    inside += v * pair;
  }
  if (Math.abs((wide - inside) * half) <= tolerance || depth >= 14) return wide * half;
  return (
    integral(f, a, middle, 0.5 * tolerance, depth + 1) +
    integral(f, middle, b, 0.5 * tolerance, depth + 1)
  );
}
