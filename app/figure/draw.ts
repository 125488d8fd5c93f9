import { select } from 'd3';
import { shared } from '../shared.ts';
import {
  layers,
  mmPerPoint,
  type Fill,
  type PolyShape,
  type Scene,
  type SceneLayer,
  type Shape,
  type Stroke,
  type TextRun,
  type TextShape,
} from './scene/scene.ts';

export interface DrawOptions {
  /** Adds `data-of` and `data-layer` for picking on screen; never set for an export. */
  readonly interactive?: boolean;
  /** Start of the few ids in the document, to tell apart several figures on one page. */
  readonly prefix?: string;
}

type Attributes = Readonly<Record<string, string | number | null>>;

/** Three decimals of a millimetre: far below what is seen, and the same digits in every engine. */
function mm(value: number): number {
  return Math.round(value * 1000) / 1000 + 0;
}

function svgElement({ ownerDocument }: Element, tag: string): Element {
  return ownerDocument.createElementNS('http://www.w3.org/2000/svg', tag);
}

function attributes(element: Element, values: Attributes): void {
  for (const [name, value] of Object.entries(values)) {
    if (value === null) element.removeAttribute(name);
    else element.setAttribute(name, String(value));
  }
}

function strokeOf(stroke: Stroke | undefined): Attributes {
  return {
    stroke: stroke ? stroke.colour : null,
    'stroke-width': stroke ? mm(stroke.weight * mmPerPoint) : null,
    'stroke-dasharray': stroke?.dash?.length
      ? stroke.dash.map((d) => mm(d * mmPerPoint)).join(' ')
      : null,
    'stroke-opacity': stroke?.opacity ?? null,
    'stroke-linecap': stroke?.cap ?? null,
    'stroke-linejoin': stroke?.join ?? null,
  };
}

function fillOf(fill: Fill | undefined): Attributes {
  return { fill: fill ? fill.colour : 'none', 'fill-opacity': fill?.opacity ?? null };
}

function pathOf({ points, closed }: PolyShape): string {
  return points
    .filter((line) => line.length > 0)
    .map((line) => `M${line.map(([x, y]) => `${mm(x)} ${mm(y)}`).join('L')}${closed ? 'Z' : ''}`)
    .join('');
}

function styleOf(run: TextRun, size: number): Attributes {
  return {
    'font-style': run.italic ? 'italic' : null,
    'font-weight': run.bold ? 'bold' : null,
    'font-size': run.scale === undefined || run.scale === 1 ? null : mm(size * run.scale),
  };
}

/** One run without a shift needs no tspan, and plain text is what other programs read best. */
function isPlain(text: TextShape): boolean {
  return text.runs.length <= 1 && !text.runs[0]?.shift;
}

function setText(element: Element, text: TextShape): void {
  const size = text.size * mmPerPoint;
  const [x, y] = [mm(text.at[0]), mm(text.at[1])];
  attributes(element, {
    x,
    y,
    fill: text.colour,
    'text-anchor': text.anchor === 'start' ? null : text.anchor,
    transform: text.angle ? `rotate(${mm(text.angle)} ${x} ${y})` : null,
    'letter-spacing': text.spacing ? mm(text.spacing * size) : null,
    'font-style': null,
    'font-weight': null,
    'font-size': mm(size),
  });
  const [only] = text.runs;
  if (isPlain(text)) {
    if (only)
      attributes(element, { ...styleOf(only, size), 'font-size': mm(size * (only.scale ?? 1)) });
    setOwnText(element, only?.text ?? '');
    return;
  }
  setOwnText(element, '');
  let risen = 0;
  select(element)
    .selectChildren<Element, TextRun>('tspan')
    .data(text.runs)
    .join((enter) => enter.append(() => svgElement(element, 'tspan')))
    .each(function (run) {
      // Rounding the height reached and not the step keeps the last run on the baseline.
      const rise = mm((run.shift ?? 0) * size);
      const dy = mm(risen - rise);
      risen = rise;
      attributes(this, { dy: dy === 0 ? null : dy, ...styleOf(run, size) });
      setOwnText(this, run.text);
    });
}

/** The element's text beside its child elements, at its end, as one node or none. */
function setOwnText(element: Element, text: string): void {
  const nodes = [...element.childNodes].filter((node) => node.nodeType === 3);
  const [first] = nodes;
  for (const node of nodes.slice(text === '' ? 0 : 1)) node.remove();
  if (text === '') return;
  if (!first) element.append(element.ownerDocument.createTextNode(text));
  else if (first.nodeValue !== text) first.nodeValue = text;
}

function setTitle(element: Element, title: string | undefined): void {
  select(element)
    .selectChildren<Element, string>('title')
    .data(title === undefined ? [] : [title])
    .join((enter) => enter.insert(() => svgElement(element, 'title'), ':first-child'))
    .each(function (words) {
      setOwnText(this, words);
    });
}

const tags = {
  poly: 'path',
  circle: 'circle',
  rect: 'rect',
  text: 'text',
} as const;

function setShape(element: Element, shape: Shape, interactive: boolean): void {
  switch (shape.kind) {
    case 'poly':
      attributes(element, { d: pathOf(shape), ...fillOf(shape.fill), ...strokeOf(shape.stroke) });
      break;
    case 'circle':
      attributes(element, {
        cx: mm(shape.at[0]),
        cy: mm(shape.at[1]),
        r: mm(shape.r),
        ...fillOf(shape.fill),
        ...strokeOf(shape.stroke),
      });
      break;
    case 'rect':
      attributes(element, {
        ...boxOf(shape.rect),
        rx: shape.radius ? mm(shape.radius) : null,
        ...fillOf(shape.fill),
        ...strokeOf(shape.stroke),
      });
      break;
    case 'text':
      setText(element, shape);
      break;
  }
  setTitle(element, shape.title);
  attributes(element, { 'data-of': interactive ? (shape.of ?? null) : null });
}

function boxOf(rect: { x: number; y: number; width: number; height: number }): Attributes {
  return { x: mm(rect.x), y: mm(rect.y), width: mm(rect.width), height: mm(rect.height) };
}

/** An element is kept for the same id and the same build; another build is another element. */
function shapeKey(shape: Shape): string {
  const build = shape.kind === 'text' && isPlain(shape) ? 'plain' : shape.kind;
  return `${build} ${shape.id}`;
}

interface Head {
  readonly tag: 'title' | 'desc';
  readonly id: string;
  readonly words: string;
}

function drawHead(root: Element, head: readonly Head[]): void {
  select(root)
    .selectChildren<Element, Head>('title, desc')
    .data(head)
    .join((enter) => enter.append((d) => svgElement(root, d.tag)))
    .each(function (d) {
      attributes(this, { id: d.id });
      setOwnText(this, d.words);
    });
}

function drawClips(root: Element, clipped: readonly SceneLayer[], prefix: string): void {
  select(root)
    .selectChildren<Element, readonly SceneLayer[]>('defs')
    .data(clipped.length ? [clipped] : [])
    .join((enter) => enter.insert(() => svgElement(root, 'defs'), 'g'))
    .selectChildren<Element, SceneLayer>('clipPath')
    .data(
      (list) => list,
      (layer) => layer.id,
    )
    .join((enter) => enter.append(() => svgElement(root, 'clipPath')))
    .each(function (layer) {
      attributes(this, { id: `${prefix}-clip-${layer.id}` });
      if (!this.firstElementChild) this.append(svgElement(root, 'rect'));
      const rect = this.firstElementChild;
      if (rect && layer.clip) attributes(rect, boxOf(layer.clip));
    });
}

/** What an `<svg>` shows, and how it was drawn. */
interface Drawn {
  readonly scene: Scene;
  readonly interactive: boolean;
  readonly prefix: string;
  /** The layer or shape that an element stands for. */
  readonly of: WeakMap<Element, SceneLayer | Shape>;
}
const known = new WeakMap<Element, Drawn>();

/**
 * Draws a scene into an `<svg>` element: the one place where shapes become elements.
 *
 * Elements are kept by the ids of layers and shapes, so that drawing another scene updates in place
 * and leaves the document that drawing it afresh would; layers and shapes that equal what the
 * element shows already are not touched. What the element held beforehand from
 * elsewhere is removed. Presentation attributes only; coordinates in mm with three decimals.
 */
export function drawScene(
  root: SVGSVGElement | Element,
  wanted: Scene,
  options: DrawOptions = {},
): void {
  const { interactive = false, prefix = 'figure' } = options;
  const svg = select(root);
  const last = known.get(root);
  if (!last) root.replaceChildren();
  const isSame = last?.interactive === interactive && last.prefix === prefix;
  const scene = isSame ? shared(last.scene, wanted) : wanted;
  const of = isSame ? last.of : new WeakMap<Element, SceneLayer | Shape>();
  known.set(root, { scene, interactive, prefix, of });
  const isNew = (element: Element, thing: SceneLayer | Shape): boolean => {
    if (of.get(element) === thing) return false;
    of.set(element, thing);
    return true;
  };
  const [width, height] = [mm(scene.width), mm(scene.height)];
  const head: readonly Head[] = [
    { tag: 'title', id: `${prefix}-title`, words: scene.title },
    { tag: 'desc', id: `${prefix}-desc`, words: scene.description },
  ];
  attributes(root, {
    viewBox: `0 0 ${width} ${height}`,
    width: `${width}mm`,
    height: `${height}mm`,
    role: 'img',
    'aria-labelledby': head.map(({ id }) => id).join(' '),
    'font-family': 'Inter, Arial, Helvetica, sans-serif',
    'text-rendering': 'geometricPrecision',
  });

  const drawn = scene.layers
    .filter((layer) => layer.shapes.length > 0)
    .toSorted((a, b) => layers.indexOf(a.id) - layers.indexOf(b.id));
  drawHead(root, head);
  drawClips(
    root,
    drawn.filter((layer) => layer.clip),
    prefix,
  );
  svg
    .selectChildren<Element, SceneLayer>('g')
    .data(drawn, (layer) => layer.id)
    .join((enter) => enter.append(() => svgElement(root, 'g')))
    .filter(function (layer) {
      return isNew(this, layer);
    })
    .each(function (layer) {
      attributes(this, {
        'clip-path': layer.clip ? `url(#${prefix}-clip-${layer.id})` : null,
        'data-layer': interactive ? layer.id : null,
      });
    })
    .selectChildren<Element, Shape>()
    .data((layer) => layer.shapes, shapeKey)
    .join((enter) => enter.append((shape) => svgElement(root, tags[shape.kind])))
    .each(function (shape) {
      if (isNew(this, shape)) setShape(this, shape, interactive);
    });
}
