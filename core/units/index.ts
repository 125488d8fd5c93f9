export { quantities, type Quantity, type QuantityRow, type UnitOf } from './quantity.ts';
export { unitTable, type Unit, type UnitId } from './unitTable.ts';
export { fromSI, stepSI, toSI } from './convert.ts';
export { type PressureKind } from './pressureKind.ts';
export { canonical, readingFromSI, readingOf, type Reading } from './reading.ts';
export { longestReading, parseReading, type ParseOptions } from './parseReading.ts';
export { ReadingError, type ReadingErrorCode, type ReadingIssue } from './readingError.ts';
export { absolutePressure, gaugePressure, pressureAs, temperature } from './resolve.ts';
export {
  altitudeOf,
  atmosphereAt,
  geopotentialAltitude,
  standardPressure,
  weatherSwing,
} from './atmosphere.ts';
export {
  absoluteError,
  gaugeClasses,
  pressureError,
  probeError,
  spanOf,
  type GaugeClass,
  type PressureAccuracy,
} from './accuracy.ts';
export {
  digitsFor,
  format,
  formatDifference,
  formatNumber,
  formatReading,
  type DigitOptions,
  type FormatOptions,
} from './format.ts';
export { type DecimalMark } from './writtenNumber.ts';
