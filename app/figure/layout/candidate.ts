import type { Rect } from '../scene/scene.ts';
import type { Box, Segment } from './box.ts';
import type { ObstacleIndex } from './obstacles.ts';
import type { TextBox } from './textBox.ts';

/** One place where a label could stand; smaller cost is better. */
export interface Candidate {
  readonly cost: number;
  readonly box: Box;
  /** Degrees, clockwise. */
  readonly angle: number;
  readonly anchor: 'start' | 'middle' | 'end';
  readonly leader?: Segment;
  readonly text: TextBox;
  /** Whether the leader has still to be tried against the lines of the page. */
  readonly isUntried?: boolean;
}

/** What the search for places knows of the page. */
export interface Page {
  readonly frame: Rect;
  readonly obstacles: ObstacleIndex;
}
