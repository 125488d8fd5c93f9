import type { Point, TextRun } from '../scene/scene.ts';

interface CommonRequest {
  readonly id: string;
  readonly runs: readonly TextRun[];
  /** Type size in points. */
  readonly size: number;
  readonly colour: string;
  readonly spacing?: number;
  /** Smaller is placed first. */
  readonly priority: number;
  /** Translucent white plate behind the text. */
  readonly plate?: boolean;
  /** Where the user moved the label, in mm from its automatic anchor. */
  readonly offset?: Point;
  readonly of?: string;
}

/** A label beside a point, at one of eight sides, on a short leader where `leader` says so. */
export interface PointLabel extends CommonRequest {
  readonly kind: 'point';
  readonly at: Point;
  /** Clear distance from the point in mm. */
  readonly gap: number;
  readonly leader?: boolean;
  /** A filled rounded tag in this colour in place of a plain text. */
  readonly tag?: string;
}
/** A label along a line, rotated straight text, just beside it; `side` names where the reader looks for it. */
export interface LineLabel extends CommonRequest {
  readonly kind: 'line';
  readonly along: readonly Point[];
  readonly side: 'above' | 'below' | 'either';
}
/** A name inside an area, at its widest place. */
export interface AreaLabel extends CommonRequest {
  readonly kind: 'area';
  readonly ring: readonly Point[];
}
export type LabelRequest = PointLabel | LineLabel | AreaLabel;
