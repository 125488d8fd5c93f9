/**
 * Makes the fonts in public/fonts and the table of advances, once; both are kept in the repository.
 *
 * Run: npx tsx app/figure/type/makeFont.ts
 *
 * Kerning and marks stay in the subsets; contextual alternates go, so that a text keeps the
 * advances in the table (they would turn "10x10" or "->" into other glyphs).
 */
import { copyFile, mkdir, readFile, writeFile } from 'node:fs/promises';
import { createRequire } from 'node:module';
import { dirname, join } from 'node:path';
import { fileURLToPath } from 'node:url';
import { format } from 'prettier';
import { metricsOf, type Metrics } from './sfnt.ts';

type Subset = (
  font: Buffer,
  text: string,
  options: {
    readonly targetFormat: 'truetype' | 'woff2';
    readonly keepFeatures: readonly string[];
    readonly preserveNameIds: readonly number[];
    readonly noHinting: boolean;
  },
) => Promise<Buffer>;

const load = createRequire(import.meta.url);
const subset = load('subset-font') as Subset;
const here = dirname(fileURLToPath(import.meta.url));
const root = join(here, '../../..');
const inter = dirname(load.resolve('@expo-google-fonts/inter/package.json'));

const faces = {
  regular: '400Regular',
  italic: '400Regular_Italic',
  bold: '700Bold',
} as const;

const ranges: readonly (readonly [number, number])[] = [
  [0x20, 0x7e],
  [0xa0, 0x17f],
  [0x2bc, 0x2bc],
  [0x300, 0x304],
  [0x307, 0x308],
  [0x384, 0x3ce],
  [0x3d1, 0x3d6],
  [0x3f5, 0x3f5],
  [0x1e40, 0x1e41],
  [0x1e9e, 0x1e9e],
  [0x2002, 0x200a],
  [0x2010, 0x2015],
  [0x2018, 0x201e],
  [0x2020, 0x2022],
  [0x2026, 0x2026],
  [0x202f, 0x2030],
  [0x2032, 0x2033],
  [0x2039, 0x203a],
  [0x2044, 0x2044],
  [0x205f, 0x205f],
  [0x2070, 0x209c],
  [0x20ac, 0x20ac],
  [0x2103, 0x2103],
  [0x2109, 0x2109],
  [0x2113, 0x2113],
  [0x2122, 0x2122],
  [0x2126, 0x2126],
  [0x2150, 0x215e],
  [0x2190, 0x2199],
  [0x21c4, 0x21c4],
  [0x21cc, 0x21cc],
  [0x21d2, 0x21d4],
  [0x2200, 0x2215],
  [0x2217, 0x221f],
  [0x2220, 0x222b],
  [0x223c, 0x223c],
  [0x2243, 0x2248],
  [0x2260, 0x226b],
  [0x25a0, 0x25a1],
  [0x25b2, 0x25b3],
  [0x25b6, 0x25b7],
  [0x25bc, 0x25bd],
  [0x25c0, 0x25c1],
  [0x25c6, 0x25c7],
  [0x25cb, 0x25cf],
  [0x2713, 0x2713],
  [0x2717, 0x2717],
];
const text = ranges
  .flatMap(([from, to]) => Array.from({ length: to - from + 1 }, (_, i) => from + i))
  .map((c) => String.fromCodePoint(c))
  .join('');

const fonts = join(root, 'public/fonts');
await mkdir(fonts, { recursive: true });
await copyFile(join(inter, 'LICENSE_FONT'), join(fonts, 'OFL.txt'));

const metrics: Record<string, Metrics> = {};
for (const [face, folder] of Object.entries(faces)) {
  const whole = await readFile(join(inter, folder, `Inter_${folder}.ttf`));
  const name = `Inter-${face.charAt(0).toUpperCase()}${face.slice(1)}`;
  for (const [targetFormat, ending] of [
    ['truetype', 'ttf'],
    ['woff2', 'woff2'],
  ] as const) {
    const bytes = await subset(whole, text, {
      targetFormat,
      keepFeatures: ['kern', 'mark', 'mkmk', 'ccmp', 'tnum'],
      preserveNameIds: [13, 14],
      noHinting: true,
    });
    await writeFile(join(fonts, `${name}.${ending}`), bytes);
    if (ending === 'ttf') metrics[face] = metricsOf(bytes);
  }
}

const regular = metrics.regular as Metrics;
const codePoints = [...regular.advances.keys()].sort((a, b) => a - b);
const rows = Object.entries(metrics).map(([face, m]) => {
  const advances = codePoints.map((c) => m.advances.get(c) ?? regular.advances.get(c));
  return `${face}: { ascent: ${m.ascent}, descent: ${m.descent}, capHeight: ${m.capHeight}, xHeight: ${m.xHeight}, advances: [${advances.join(', ')}] },`;
});
const source = `// Written by makeFont.ts from the fonts in public/fonts (Inter, SIL Open Font License 1.1).

/** Font units in an em. */
export const unitsPerEm = ${regular.unitsPerEm};

/** Code points of the fonts, ascending. */
export const codePoints: readonly number[] = [${codePoints.join(', ')}];

export interface Face {
  readonly ascent: number;
  readonly descent: number;
  readonly capHeight: number;
  readonly xHeight: number;
  /** Advance widths in font units, in the order of \`codePoints\`. */
  readonly advances: readonly number[];
}
export type FaceName = 'regular' | 'italic' | 'bold';

export const faces: Readonly<Record<FaceName, Face>> = {
  ${rows.join('\n')}
};
`;
const style = { parser: 'typescript', printWidth: 100, singleQuote: true } as const;
await writeFile(join(here, 'advances.ts'), await format(source, style));
