import { catalogue } from '../../core/substances/catalogue.ts';
import type { Sheet } from '../../core/sheet/schema.ts';
import { en as words } from '../words/en.ts';
import { readOptions } from './options.ts';
import { Refusal } from './refusal.ts';
import type { Answer } from './terminal.ts';
import { readTextFile } from './textFile.ts';
import { writeWhole } from './writeWhole.ts';

/** A sheet from JSON, or from the SVG that carries it. Throws Refusal. */
async function sheetIn(path: string): Promise<Sheet> {
  const { terminal } = words;
  const text = (await readTextFile(path)).replace(/^\uFEFF/, '');
  const { sheetFromSvg, sheetLimit, SheetInSvgError } = await import('../export/sheetInSvg.ts');
  let data: unknown;
  if (text.length > sheetLimit) throw new Refusal(`${path}: ${terminal.sheetFile.tooLarge}`);
  try {
    data = text.trimStart().startsWith('<') ? sheetFromSvg(text) : (JSON.parse(text) as unknown);
  } catch (error) {
    if (error instanceof SheetInSvgError)
      throw new Refusal(`${path}: ${terminal.sheetFile[error.code]}`);
    if (error instanceof SyntaxError) throw new Refusal(`${path}: ${terminal.sheetFile.noJson}`);
    throw error;
  }
  const { readSheet } = await import('../../core/sheet/read.ts');
  const read = readSheet(data);
  if (!read.ok) {
    const [first, ...others] = read.issues;
    throw new Refusal(`${path}: ${words.sheetIssue(first!)}${terminal.moreIssues(others.length)}`);
  }
  return read.sheet;
}

/** `figure <sheet.json> <out.svg> [--view id] [--without-sheet]` */
export async function figureCommand(args: readonly string[]): Promise<Answer> {
  const { terminal } = words;
  const { positionals, values, flags } = readOptions(
    args,
    { values: ['view'], flags: ['without-sheet'] },
    2,
  );
  const [from, to] = positionals;
  if (from === undefined || to === undefined) throw new Refusal(terminal.figureNeeds);
  if (!/\.svg$/i.test(to)) throw new Refusal(terminal.unknownExtension(to, ['.svg']));
  const sheet = await sheetIn(from);
  const known = catalogue.map(({ id }) => id);
  const strange = sheet.substances.find((id) => !known.includes(id));
  if (strange !== undefined)
    throw new Refusal(`${from}: ${terminal.unknownSubstance(strange, known)}`);
  const views = sheet.views.map(({ id }) => id);
  const view = values.get('view') ?? views[0]!;
  if (!views.includes(view)) throw new Refusal(terminal.unknownView(view, views));

  const [{ evaluateSheet }, { composeFigure }, { sceneToSvg }] = await Promise.all([
    import('../worker/evaluateSheet.ts'),
    import('../figure/figure.ts'),
    import('../export/svg.ts'),
  ]);
  const { scene } = composeFigure(sheet, await evaluateSheet(sheet), view, words);
  const alone = flags.has('without-sheet');
  await writeWhole(to, await sceneToSvg(scene, alone ? {} : { sheet }));
  return {
    out: `${terminal.figureWritten(to, scene.width, scene.height, !alone)}\n`,
    notes: scene.unplaced.length > 0 ? [terminal.unplaced(scene.unplaced.length)] : [],
  };
}
