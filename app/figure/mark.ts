import type { MapResult, Results } from '../../core/sheet/results.ts';
import type { Sheet, View } from '../../core/sheet/schema.ts';
import type { Plane } from '../../core/map/plane.ts';
import type { Words } from '../words/en.ts';
import type { Colours } from './colours.ts';
import type { Obstacles } from './layout/obstacles.ts';
import type { LabelRequest } from './layout/request.ts';
import type { LayerId, Point, Rect, Shape } from './scene/scene.ts';

/** All that a mark may gather its data from. */
export interface MarkView {
  readonly sheet: Sheet;
  readonly view: View;
  readonly results: Results;
  readonly map: MapResult;
  readonly plane: Plane;
  /** The frame on the page, in mm. */
  readonly frame: Rect;
  /** Place on the page of a temperature (K) and a pressure (Pa). */
  readonly project: (T: number, p: number) => Point;
  readonly colours: Colours;
  readonly words: Words;
}

/**
 * What stands still while something on the map is moved: all that a mark may look at besides its own
 * data once that is gathered, so that equal data need not be drawn anew.
 */
export interface StillView extends Pick<
  MarkView,
  'plane' | 'frame' | 'project' | 'colours' | 'words'
> {
  readonly view: Pick<View, 'temperature' | 'pressure' | 'second' | 'fields'>;
  readonly map: Omit<MapResult, 'tracks' | 'outside'>;
}

/** One kind of thing on the figure: results in, shapes and label requests out. */
export interface Mark<D extends object> {
  readonly id: string;
  readonly layer: LayerId;
  /** Whether its shapes end at the frame; the same for all marks of a layer. */
  readonly clipped: boolean;
  /** Plain data, told apart by content. */
  readonly data: (view: MarkView) => readonly D[];
  readonly shapes: (d: D, view: StillView) => readonly Shape[];
  readonly labels?: (d: D, view: StillView) => readonly LabelRequest[];
  /** What labels keep away from. */
  readonly obstacles?: (d: D, view: StillView) => Obstacles;
}
