import type { Caution } from '../../core/cautions/caution.ts';
import type { FrameOf } from '../../core/sheet/evaluate.ts';
import type { Results } from '../../core/sheet/results.ts';
import type { Sheet, View } from '../../core/sheet/schema.ts';
import { format, parseReading } from '../../core/units/index.ts';
import type { Words } from '../words/en.ts';
import type { Rect } from './scene/scene.ts';
import { mmPerPoint } from './scene/scene.ts';
import { measure, room } from './type/measure.ts';

/** Type sizes of the page in points. */
export const type = { tick: 8, title: 9, label: 8, region: 9.5, caption: 7 } as const;

/** Space round the frame in mm; the caption's height comes on top. */
const margin = { left: 17.5, right: 6, second: 16.5, top: 5, bottom: 14 } as const;
const captionLine = type.caption * 1.32 * mmPerPoint;
const captionSide = 6;

export interface Page {
  readonly width: number;
  readonly height: number;
  readonly frame: Rect;
  readonly caption: readonly {
    readonly text: string;
    readonly weight: 'caution' | 'source';
    /** Baseline from the page's top, mm. */
    readonly y: number;
  }[];
  readonly captionLeft: number;
}

/** Breaks a paragraph into lines of at most `width` mm. */
export function wrap(text: string, size: number, width: number): readonly string[] {
  const lines: string[] = [];
  let line = '';
  for (const word of text.split(' ')) {
    const longer = line === '' ? word : `${line} ${word}`;
    if (line !== '' && measure([{ text: longer }], size) > width) {
      lines.push(line);
      line = word;
    } else line = longer;
  }
  if (line !== '') lines.push(line);
  return lines;
}

type About = Pick<Results, 'cautions' | 'sites' | 'formulations' | 'absent'>;

/** What stands under the map: cautions first, then where the lines come from. */
export interface CaptionText {
  readonly cautions: string;
  readonly sources: string;
}

/** Geometry of a view's page: the frame takes what margins and caption leave. */
export function pageOf(view: View, text: CaptionText): Page {
  const width = parseReading(view.page.width, 'length').value * 1000;
  const height = parseReading(view.page.height, 'length').value * 1000;
  // Where another typeface stands in, lines run longer than measured.
  const inner = (width - 2 * captionSide) / room;
  const lines = [
    ...wrap(text.cautions, type.caption, inner).map((t) => ({
      text: t,
      weight: 'caution' as const,
    })),
    ...wrap(text.sources, type.caption, inner).map((t) => ({ text: t, weight: 'source' as const })),
  ];
  const captionHeight = lines.length * captionLine + 3;
  const left = margin.left;
  const right = view.second ? margin.second : margin.right;
  return {
    width,
    height,
    frame: {
      x: left,
      y: margin.top,
      width: Math.max(20, width - left - right),
      height: Math.max(20, height - margin.top - margin.bottom - captionHeight),
    },
    caption: lines.map((line, i) => ({
      ...line,
      y: height - 3 - (lines.length - 1 - i) * captionLine,
    })),
    captionLeft: captionSide,
  };
}

/** Cautions as one paragraph: those that a state calls for, then that lines are equilibrium. */
export function cautionText(cautions: readonly Caution[], words: Words): string {
  const general = cautions.filter(({ at }) => at.length === 0);
  const special = cautions.filter(({ at }) => at.length > 0);
  return [...special, ...general].map(({ code }) => words.caution[code]).join(' ');
}

/** What the caption of a view says, in a language. */
export function captionText(view: View, sheet: Sheet, about: About, words: Words): CaptionText {
  const substance = view.substance ?? sheet.substances[0]!;
  const shown = [view.pressure.site, view.second?.site, ...sheet.items.map(({ site }) => site)];
  const used = about.sites.filter(
    ({ id }, i) => (i === 0 && sheet.items.length > 0) || shown.includes(id),
  );
  const sites = used.map(({ name, local }) =>
    words.site(name, format(local, 'kPa', { digits: 4, kind: 'absolute', decimal: words.decimal })),
  );
  const lines = words.sources(words.substance(substance), about.formulations[substance] ?? []);
  const absent = about.absent[substance] ?? [];
  const lacking = absent.length > 0 ? [words.linesNotPublished(absent)] : [];
  return {
    cautions: cautionText(about.cautions, words),
    sources: [lines, ...lacking, ...sites].join(' '),
  };
}

/** The frame sizes that evaluation needs, for a sheet in a language. */
export function frameOf(sheet: Sheet, words: Words): FrameOf {
  return (view, about) => pageOf(view, captionText(view, sheet, about, words)).frame;
}
