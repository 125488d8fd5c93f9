/** Layers of a figure, drawn in this order. */
export const layers = [
  'paper',
  'regions',
  'grid',
  'isolines',
  'windows',
  'boundaries',
  'points',
  'paths',
  'encounters',
  'states',
  'notes',
  'frame',
  'axes',
  'labels',
  'cautions',
] as const;
export type LayerId = (typeof layers)[number];

/** A point on the page in millimetres from its upper left corner. */
export type Point = readonly [x: number, y: number];

export interface Rect {
  readonly x: number;
  readonly y: number;
  readonly width: number;
  readonly height: number;
}

export interface Stroke {
  readonly colour: string;
  /** Line weight in points, true at print. */
  readonly weight: number;
  /** Dash lengths in points. */
  readonly dash?: readonly number[];
  readonly opacity?: number;
  readonly cap?: 'butt' | 'round';
  readonly join?: 'miter' | 'round';
}

export interface Fill {
  readonly colour: string;
  readonly opacity?: number;
}

/** A piece of a line of text with one style; `shift` is in em, positive upwards (subscripts: −0.25). */
export interface TextRun {
  readonly text: string;
  readonly italic?: boolean;
  readonly bold?: boolean;
  /** Size as a share of the line's size. */
  readonly scale?: number;
  readonly shift?: number;
}

/** `id` is stable between redraws and unique in its layer; `title` is read by a screen reader. */
interface Common {
  readonly id: string;
  readonly title?: string;
  /** Id of the item or boundary that the shape stands for, for picking on screen. */
  readonly of?: string;
}

export interface PolyShape extends Common {
  readonly kind: 'poly';
  readonly points: readonly (readonly Point[])[];
  readonly closed: boolean;
  readonly stroke?: Stroke;
  readonly fill?: Fill;
}
export interface CircleShape extends Common {
  readonly kind: 'circle';
  readonly at: Point;
  /** Radius in mm. */
  readonly r: number;
  readonly stroke?: Stroke;
  readonly fill?: Fill;
}
export interface RectShape extends Common {
  readonly kind: 'rect';
  readonly rect: Rect;
  readonly radius?: number;
  readonly stroke?: Stroke;
  readonly fill?: Fill;
}
export interface TextShape extends Common {
  readonly kind: 'text';
  /** Anchor on the baseline. */
  readonly at: Point;
  readonly runs: readonly TextRun[];
  /** Type size in points. */
  readonly size: number;
  readonly anchor: 'start' | 'middle' | 'end';
  /** Degrees, clockwise, about the anchor. */
  readonly angle?: number;
  readonly colour: string;
  /** Added advance after each character, in em. */
  readonly spacing?: number;
}
export type Shape = PolyShape | CircleShape | RectShape | TextShape;

export interface SceneLayer {
  readonly id: LayerId;
  readonly shapes: readonly Shape[];
  /** Shapes of this layer are clipped to the rectangle. */
  readonly clip?: Rect;
}

/** A label that found no room, to be listed beside the page. */
export interface Unplaced {
  readonly id: string;
  readonly text: string;
}

/** A whole page in millimetres: all that is needed to draw it anywhere. */
export interface Scene {
  readonly width: number;
  readonly height: number;
  readonly title: string;
  readonly description: string;
  readonly layers: readonly SceneLayer[];
  readonly unplaced: readonly Unplaced[];
}

/** Millimetres in a typographic point. */
export const mmPerPoint = 25.4 / 72;
