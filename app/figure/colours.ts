import type { PhaseName } from '../../core/equilibrium/phase.ts';

/** All colours of a figure in one way of printing it. */
export interface Colours {
  readonly ink: string;
  readonly muted: string;
  readonly paper: string;
  readonly grid: string;
  /** Tints of the fields; null leaves the paper. */
  readonly fields: Readonly<Record<'faint' | 'full', Readonly<Record<PhaseName, string | null>>>>;
  /** The user's own things, in the order in which they come. */
  readonly own: readonly string[];
}

const ink = '#1f2a33';
const muted = '#5b6770';
const none = { solid: null, liquid: null, vapour: null, supercritical: null };

export const printColours: Readonly<Record<'colour' | 'grey' | 'black', Colours>> = {
  colour: {
    ink,
    muted,
    paper: '#ffffff',
    grid: '#e9eaeb',
    fields: {
      faint: { solid: '#f1f4f7', liquid: '#eef5f4', vapour: '#fdfaf2', supercritical: '#f6f3f7' },
      full: { solid: '#e7edf2', liquid: '#dfeeed', vapour: '#fbf5e8', supercritical: '#efebf2' },
    },
    own: ['#b3401f', '#0b5d86', '#543c9c', '#0c3c18'],
  },
  grey: {
    ink: '#222222',
    muted: '#5e5e5e',
    paper: '#ffffff',
    grid: '#e8e8e8',
    fields: {
      faint: { solid: '#eeeeee', liquid: '#f6f6f6', vapour: null, supercritical: '#f2f2f2' },
      full: { solid: '#e0e0e0', liquid: '#eeeeee', vapour: '#fafafa', supercritical: '#e7e7e7' },
    },
    own: ['#222222', '#555555', '#333333', '#5e5e5e'],
  },
  black: {
    ink: '#000000',
    muted: '#000000',
    paper: '#ffffff',
    grid: '#dddddd',
    fields: { faint: none, full: none },
    own: ['#000000', '#000000', '#000000', '#000000'],
  },
};
