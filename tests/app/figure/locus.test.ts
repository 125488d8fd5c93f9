import { expect, it } from 'vitest';
import { composeFigure } from '../../../app/figure/figure.ts';
import { en } from '../../../app/words/en.ts';
import { evaluateSheet } from '../../../app/worker/evaluateSheet.ts';
import { readSheet } from '../../../core/sheet/read.ts';
import retort from '../../../public/demos/retort.json';

/** Dashes of the step of a run that expands saturated steam. */
async function dashesAt(efficiency: string | null): Promise<readonly (readonly number[] | null)[]> {
  const end = { p: '0 bar(g)', ...(efficiency === null ? {} : { efficiency }) };
  const read = readSheet({
    ...retort,
    items: [
      {
        id: 'run',
        tag: 'A',
        kind: 'path',
        start: { p: '2 bar(g)', vapourFraction: '100 %' },
        steps: [{ id: 'expand', kind: 'isentropic', end }],
      },
    ],
  });
  if (!read.ok) throw new Error(JSON.stringify(read.issues));
  const { scene } = composeFigure(read.sheet, await evaluateSheet(read.sheet), 'main', en);
  const { shapes } = scene.layers.find(({ id }) => id === 'paths')!;
  return shapes
    .filter((s) => s.kind === 'poly' && s.of === 'run.expand' && s.stroke !== undefined)
    .map((s) => (s.kind === 'poly' ? (s.stroke?.dash ?? null) : null));
}

it('draws an ideal machine’s way in full and a real one’s as a dashed locus of exits', async () => {
  expect(await dashesAt(null)).toEqual([null]);
  const real = await dashesAt('75 %');
  expect(real.length).toBeGreaterThan(0);
  for (const dash of real) expect(dash).not.toBeNull();
});
