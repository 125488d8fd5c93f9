/**
 * What a pressure is counted from: the local atmosphere upwards (gauge) or downwards (vacuum),
 * nothing (absolute), or what the writer left unsaid.
 */
export type PressureKind = 'gauge' | 'absolute' | 'vacuum' | 'unstated';

/** What each kind adds to the unit in canonical text. */
export const kindSuffix: Readonly<Record<PressureKind, string>> = {
  gauge: '(g)',
  absolute: '(a)',
  vacuum: ' vacuum',
  unstated: '',
};

/** What people write after the unit, in lower case and without spaces or dots. */
export const kindWords: Readonly<Record<string, PressureKind>> = {
  g: 'gauge',
  ga: 'gauge',
  gauge: 'gauge',
  gage: 'gauge',
  a: 'absolute',
  abs: 'absolute',
  absolute: 'absolute',
  vac: 'vacuum',
  vacuum: 'vacuum',
};
