import type { PathItem, Sheet, StateItem } from '../../../core/sheet/schema.ts';
import { newSheet } from '../../../app/store/newSheet.ts';

/** A blank sheet of water at 1480 m, read as gauge. */
export const blank = (): Sheet =>
  newSheet({
    substance: 'water',
    place: { altitude: '1480 m' },
    kind: 'gauge',
    siteName: 'Site 1',
  });

export const state = (id: string, tag: string, T = '20 °C'): StateItem => ({
  kind: 'state',
  id,
  tag,
  T,
  p: '0 bar(g)',
});

export const path = (id: string, tag: string, ends: readonly string[]): PathItem => ({
  kind: 'path',
  id,
  tag,
  start: { T: '20 °C', p: '0 bar(g)' },
  steps: ends.map((T, i) => ({ id: `step-${i + 1}`, kind: 'constantPressure', end: { T } })),
});

export const withItems = (items: Sheet['items']): Sheet => ({ ...blank(), items });
