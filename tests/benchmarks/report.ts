/** Prints one ratio beside its goal; a goal missed is said, not thrown. */
export function report(name: string, ratio: number, goal: number, unit = ''): void {
  const verdict = ratio <= goal ? 'met' : 'missed';
  console.log(`${name}: ${ratio.toPrecision(3)}${unit} (goal ≤ ${goal}${unit}, ${verdict})`);
}
