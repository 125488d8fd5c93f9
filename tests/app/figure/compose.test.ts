import { describe, expect, it } from 'vitest';
import { printColours } from '../../../app/figure/colours.ts';
import type { Figure } from '../../../app/figure/figure.ts';
import { isInside, overlap } from '../../../app/figure/layout/box.ts';
import { mmPerPoint, type Shape, type TextShape } from '../../../app/figure/scene/scene.ts';
import { em, measure, missing } from '../../../app/figure/type/measure.ts';
import { contrast, over, rgb } from './contrast.ts';
import { demos, figureOf, printed, shapesOf, textsOf } from './figures.ts';

const pages = [
  [90, 70],
  [140, 100],
  [190, 130],
  [277, 190],
] as const;
const colours = ['colour', 'grey', 'black'] as const;

const cases = demos.flatMap(([name, data]) =>
  pages.flatMap((page) =>
    colours.map((c) => [`${name} at ${page.join(' × ')} mm in ${c}`, data, page, c] as const),
  ),
);

const wordsOf = (text: TextShape): string => text.runs.map((run) => run.text).join('');

/** Corners of a text as it is printed, in mm. */
function cornersOf(text: TextShape): readonly (readonly [number, number])[] {
  const width = measure(text.runs, text.size, text.spacing);
  const unit = text.size * mmPerPoint;
  const start = { start: 0, middle: -width / 2, end: -width }[text.anchor];
  const angle = ((text.angle ?? 0) * Math.PI) / 180;
  const [x, y] = text.at;
  return [start, start + width].flatMap((u) =>
    [-em.capHeight * unit, em.descent * unit].map(
      (v) =>
        [
          x + u * Math.cos(angle) - v * Math.sin(angle),
          y + u * Math.sin(angle) + v * Math.cos(angle),
        ] as const,
    ),
  );
}

/** What stands beneath a text: the tag on which white letters are, or paper and fields. */
function groundsOf(
  figure: Figure,
  text: TextShape,
): readonly (readonly [number, number, number])[] {
  const shapes = shapesOf(figure);
  const tag = shapes.find(({ id }) => id === `${text.id}/tag`);
  if (tag?.kind === 'rect' && tag.fill) return [rgb(tag.fill.colour)];
  const paper = rgb(figure.view.colours.paper);
  const fields = Object.values(
    figure.view.view.fields === 'none' ? {} : figure.view.colours.fields[figure.view.view.fields],
  ).filter((tint) => tint !== null);
  const grounds = [paper, ...fields.map(rgb)];
  const plate = shapes.find(({ id }) => id === `${text.id}/plate`);
  return plate && 'fill' in plate && plate.fill
    ? grounds.map((ground) => over(rgb(plate.fill!.colour), plate.fill!.opacity ?? 1, ground))
    : grounds;
}

/** Shapes that a reader must see: all but the grid, hatching and paper-coloured edges. */
const strokesOf = (figure: Figure) =>
  figure.scene.layers
    .filter(({ id }) => id !== 'grid' && id !== 'regions')
    .flatMap(({ shapes }) => shapes)
    .flatMap((shape) =>
      'stroke' in shape && shape.stroke ? [{ id: shape.id, ...shape.stroke }] : [],
    )
    .filter(({ colour }) => colour !== figure.view.colours.paper && colour !== '#ffffff');

describe.each(cases)('composeFigure(…) of %s', (_, data, page, c) => {
  const figure = figureOf(printed(data, { page, colours: c }));
  const { frame } = figure.view;

  it('has the size of its page, and a frame on it', () => {
    expect([figure.scene.width, figure.scene.height]).toEqual(page);
    expect(frame.x + frame.width).toBeLessThan(page[0]);
    expect(frame.y + frame.height).toBeLessThan(page[1]);
  });

  it('lays no label on another, and each inside the frame', () => {
    const { boxes } = figure;
    expect(boxes.length).toBeGreaterThan(0);
    for (const [i, a] of boxes.entries()) {
      expect(isInside(a.box, frame), a.id).toBe(true);
      for (const b of boxes.slice(i + 1))
        expect(overlap(a.box, b.box), `${a.id}, ${b.id}`).toBe(false);
    }
  });

  it('keeps every text on the page', () => {
    const off: string[] = [];
    for (const text of textsOf(figure))
      for (const [x, y] of cornersOf(text))
        if (!(x >= 0 && y >= 0 && x <= page[0] && y <= page[1]))
          off.push(`"${wordsOf(text)}" at ${x.toFixed(2)}, ${y.toFixed(2)}`);
    expect(off).toEqual([]);
  });

  it('prints no line thinner than 0.35 pt and no letter smaller than 7 pt, raised ones 6 pt', () => {
    for (const shape of shapesOf(figure)) {
      if ('stroke' in shape && shape.stroke)
        expect(shape.stroke.weight, shape.id).toBeGreaterThanOrEqual(0.35);
      if (shape.kind !== 'text') continue;
      expect(shape.size, wordsOf(shape)).toBeGreaterThanOrEqual(7);
      for (const run of shape.runs)
        expect(shape.size * (run.scale ?? 1), run.text).toBeGreaterThanOrEqual(6);
    }
  });

  it('prints text at 4.5:1 and lines at 3:1 on what is beneath them', () => {
    for (const text of textsOf(figure))
      for (const ground of groundsOf(figure, text))
        expect(contrast(rgb(text.colour), ground), wordsOf(text)).toBeGreaterThanOrEqual(4.5);
    const { paper } = printColours[c];
    for (const { id, colour, opacity = 1 } of strokesOf(figure))
      expect(
        contrast(over(rgb(colour), opacity, rgb(paper)), rgb(paper)),
        id,
      ).toBeGreaterThanOrEqual(3);
  });

  it('uses only signs that its font has', () => {
    for (const text of textsOf(figure)) expect(missing(wordsOf(text)), wordsOf(text)).toEqual([]);
  });

  it('carries its cautions and its sources inside the picture', () => {
    const caption = figure.scene.layers.find(({ id }) => id === 'cautions')!.shapes as TextShape[];
    const said = caption.map(wordsOf).join(' ');
    expect(said).toContain('Lines are equilibrium');
    for (const formulation of figure.view.results.formulations[figure.view.map.substance]!)
      expect(said).toContain(formulation);
    for (const { at } of caption) expect(at[1]).toBeGreaterThan(frame.y + frame.height);
  });

  it('names ids once in a layer', () => {
    for (const { id, shapes } of figure.scene.layers)
      expect(new Set(shapes.map((shape) => shape.id)).size, id).toBe(shapes.length);
  });
});

describe.each(demos)('composeFigure(…) of %s', (_, data) => {
  const sheet = printed(data, {});

  it('gives the same scene twice', () => {
    expect(JSON.stringify(figureOf(sheet).scene)).toBe(JSON.stringify(figureOf(sheet).scene));
  });

  it('finds room on its own page for all but names of small fields, and lists those', () => {
    const figure = figureOf(sheet);
    const fields = figure.view.map.regions.map(({ id }) => id);
    const { unplaced } = figure.scene;
    expect(unplaced.filter(({ id }) => !fields.includes(id))).toEqual([]);
    const drawn = textsOf(figure).map(({ id }) => id);
    for (const { id } of unplaced) expect(drawn).not.toContain(id);
    expect(unplaced.length).toBeLessThanOrEqual(1);
  });

  it('draws each state where its axis says it is', () => {
    const figure = figureOf(sheet);
    const { map, frame } = figure.view;
    for (const state of figure.view.results.states.filter(({ id }) => !map.outside.includes(id))) {
      const dot = shapesOf(figure).find(
        (shape): shape is Extract<Shape, { kind: 'circle' }> => shape.id === state.id,
      )!;
      const share = (dot.at[0] - frame.x) / frame.width;
      const [low, high] = map.T.range;
      if (map.T.kind === 'linear') expect(low + share * (high - low)).toBeCloseTo(state.T, 6);
      const height = (frame.y + frame.height - dot.at[1]) / frame.height;
      const [plow, phigh] = map.p.range;
      const p =
        map.p.kind === 'linear' ? plow + height * (phigh - plow) : plow * (phigh / plow) ** height;
      expect(Math.abs(p / state.p - 1)).toBeLessThan(1e-9);
    }
  });

  it.each([
    [{ temperature: { scale: 'reciprocal' } }],
    [{ temperature: { unit: '°F' } }],
    [{ temperature: { unit: 'K' } }],
    [{ pressure: { unit: 'psi' } }],
    [{ pressure: { unit: 'mTorr' } }],
    [{ pressure: { scale: 'logarithmic', range: null } }],
    [{ pressure: { scale: 'linear', range: null }, temperature: { range: null } }],
    [{ fields: 'none' as const }],
  ])(
    'draws %j with its text on the page, ticks at two places and no label on another',
    (change) => {
      const figure = figureOf(printed(data, change));
      const [width, height] = [figure.scene.width, figure.scene.height];
      const off = textsOf(figure).filter((text) =>
        cornersOf(text).some(([x, y]) => !(x >= 0 && y >= 0 && x <= width && y <= height)),
      );
      expect(off.map(wordsOf)).toEqual([]);
      for (const axis of ['temperature', 'pressure']) {
        const numbers = textsOf(figure).filter(({ id }) => id.startsWith(`tick-${axis}-`));
        expect(numbers.length, axis).toBeGreaterThanOrEqual(2);
      }
      figure.boxes.forEach((a, i) =>
        figure.boxes.slice(i + 1).forEach((b) => expect(overlap(a.box, b.box)).toBe(false)),
      );
    },
  );

  it('keeps tick numbers and axis titles apart', () => {
    const figure = figureOf(sheet);
    const texts = textsOf(figure).filter(({ id }) => /^(tick|title)-/.test(id));
    const boxOf = (text: TextShape) => {
      const corners = cornersOf(text);
      const [xs, ys] = [corners.map(([x]) => x), corners.map(([, y]) => y)];
      return {
        left: Math.min(...xs),
        right: Math.max(...xs),
        top: Math.min(...ys),
        bottom: Math.max(...ys),
      };
    };
    texts.forEach((a, i) =>
      texts.slice(i + 1).forEach((b) => {
        const [p, q] = [boxOf(a), boxOf(b)];
        const apart =
          p.right <= q.left || q.right <= p.left || p.bottom <= q.top || q.bottom <= p.top;
        expect(apart, `${wordsOf(a)}, ${wordsOf(b)}`).toBe(true);
      }),
    );
  });
});
