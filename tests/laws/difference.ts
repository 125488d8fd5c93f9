/** Derivative of f at x by the six-point central difference: error h⁶ f⁽⁷⁾ / 140. */
export function difference(f: (x: number) => number, x: number, h: number): number {
  return (
    (45 * (f(x + h) - f(x - h)) - 9 * (f(x + 2 * h) - f(x - 2 * h)) + f(x + 3 * h) - f(x - 3 * h)) /
    (60 * h)
  );
}
