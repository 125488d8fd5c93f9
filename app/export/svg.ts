import type { DOMParser as HeadlessParser } from 'linkedom';
import { drawScene } from '../figure/draw.ts';
import type { Scene } from '../figure/scene/scene.ts';
import { serialise } from '../figure/serialise.ts';
import { sheetAsText, sheetElement } from './sheetInSvg.ts';

const svgNamespace = 'http://www.w3.org/2000/svg';

export interface SvgOptions {
  /** Carried inside the file, to open again from it; a JSON value. */
  readonly sheet?: unknown;
  /** Where elements are made; by default the page's, or a headless one in Node. */
  readonly document?: Document;
}

async function someDocument(): Promise<Document> {
  if (typeof document !== 'undefined') return document;
  // A name in a variable keeps the headless DOM out of the page's bundle.
  const name = 'linkedom';
  const { DOMParser } = (await import(/* @vite-ignore */ name)) as {
    DOMParser: typeof HeadlessParser;
  };
  const made = new DOMParser().parseFromString(`<svg xmlns="${svgNamespace}"/>`, 'image/svg+xml');
  return made as unknown as Document;
}

/**
 * A scene as the text of an SVG file: the same elements and digits in a browser and in Node, and the
 * same bytes each time. The sheet, if given, lies in `<metadata>` (see sheetInSvg.ts).
 */
export async function sceneToSvg(scene: Scene, options: SvgOptions = {}): Promise<string> {
  const home = options.document ?? (await someDocument());
  const root = home.createElementNS(svgNamespace, 'svg');
  drawScene(root, scene);
  if (options.sheet !== undefined) {
    const holder = home.createElementNS(svgNamespace, sheetElement);
    holder.append(home.createTextNode(sheetAsText(options.sheet)));
    const metadata = home.createElementNS(svgNamespace, 'metadata');
    metadata.append(holder);
    root.append(metadata);
  }
  return `<?xml version="1.0" encoding="UTF-8"?>\n${serialise(root)}\n`;
}
