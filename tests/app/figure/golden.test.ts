import { existsSync, mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { expect, it } from 'vitest';
import { sceneToSvg } from '../../../app/export/svg.ts';
import { demos, figureOf, sheetOf } from './figures.ts';

/*
 * Drawings of the demo sheets beside those kept in golden/, coordinates rounded to 0.01 mm. After a
 * change that is wanted: UPDATE_GOLDEN=1 npx vitest run --project unit tests/app/figure/golden.test.ts
 * What was drawn otherwise is left in golden/__mismatch__/.
 */
const folder = join(dirname(fileURLToPath(import.meta.url)), 'golden');

const rounded = (svg: string): string =>
  svg
    .replace(/-?\d+\.\d+/g, (number) => String(Math.round(Number(number) * 100) / 100 + 0))
    .replace(/></g, '>\n<');

function keep(where: string, name: string, svg: string): void {
  mkdirSync(where, { recursive: true });
  writeFileSync(join(where, `${name}.svg`), svg);
}

it.each(demos)('the drawing of %s is the one kept', async (name, data) => {
  const drawn = rounded(await sceneToSvg(figureOf(sheetOf(data)).scene));
  const file = join(folder, `${name}.svg`);
  if (process.env.UPDATE_GOLDEN) {
    keep(folder, name, drawn);
  }
  expect(existsSync(file), `${file} is missing: run with UPDATE_GOLDEN=1`).toBe(true);
  const kept = readFileSync(file, 'utf8');
  const mismatch = join(folder, '__mismatch__');
  if (drawn !== kept) keep(mismatch, name, drawn);
  expect(drawn === kept, `${name} differs from ${mismatch}/${name}.svg`).toBe(true);
});
