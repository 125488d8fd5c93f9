import type { UnitId } from './unitTable.ts';

export interface QuantityRow {
  /** The SI unit of the stored value first among equals of factor 1. */
  readonly si: UnitId;
  readonly units: readonly UnitId[];
  /** Least value that can exist, SI. */
  readonly minimum?: number;
  /** The unit of a number without one, where writing none is the rule. */
  readonly bare?: UnitId;
  /** Spellings that hold for this quantity only. */
  readonly spellings?: Readonly<Partial<Record<UnitId, readonly string[]>>>;
}

const pressureUnits = [
  'Pa',
  'hPa',
  'kPa',
  'MPa',
  'GPa',
  'bar',
  'mbar',
  'kbar',
  'atm',
  'psi',
  'Torr',
  'mmHg',
  'inHg',
  'inH₂O',
  'kgf/cm²',
  'mTorr',
  'micron',
] as const;

const entropyUnits = ['J/(kg·K)', 'kJ/(kg·K)', 'Btu/(lb·°F)', 'kcal/(kg·K)'] as const;

const table = {
  temperature: { si: 'K', units: ['°C', 'K', '°F'], minimum: 0 },
  temperatureDifference: { si: 'K', units: ['K', 'C°', 'F°'] },
  pressure: { si: 'Pa', units: pressureUnits },
  /** No kind: a drop, a band, an accuracy. */
  pressureDifference: { si: 'Pa', units: pressureUnits, spellings: { psi: ['psid'] } },
  density: {
    si: 'kg/m³',
    units: ['kg/m³', 'kg/L', 'g/cm³', 'lb/ft³', 'lb/gal'],
    minimum: 0,
  },
  specificEnergy: { si: 'J/kg', units: ['J/kg', 'kJ/kg', 'MJ/kg', 'Btu/lb', 'kcal/kg'] },
  specificEntropy: { si: 'J/(kg·K)', units: entropyUnits },
  heatCapacity: { si: 'J/(kg·K)', units: entropyUnits },
  speed: { si: 'm/s', units: ['m/s', 'km/h', 'ft/s', 'ft/min', 'mph'] },
  time: { si: 's', units: ['s', 'min', 'h', 'd'] },
  temperatureRate: {
    si: 'K/s',
    units: ['K/s', 'K/min', 'K/h', 'C°/s', 'C°/min', 'C°/h', 'F°/s', 'F°/min', 'F°/h'],
  },
  pressureRate: {
    si: 'Pa/s',
    units: [
      'Pa/s',
      'Pa/min',
      'kPa/s',
      'kPa/min',
      'MPa/s',
      'MPa/min',
      'bar/s',
      'bar/min',
      'bar/h',
      'mbar/s',
      'mbar/min',
      'psi/s',
      'psi/min',
      'inHg/min',
    ],
  },
  length: { si: 'm', units: ['m', 'mm', 'cm', 'km', 'in', 'ft'] },
  altitude: {
    si: 'm',
    units: ['m', 'km', 'ft'],
    spellings: { m: ['m asl', 'm amsl', 'masl'], ft: ['ft asl', 'ft amsl'] },
  },
  fraction: { si: '1', units: ['1', '%'], bare: '1' },
  mass: { si: 'kg', units: ['kg', 'g', 't', 'lb', 'oz'], minimum: 0 },
} as const satisfies Readonly<Record<string, QuantityRow>>;

/** What a reading is a reading of. */
export type Quantity = keyof typeof table;

/** The units in which a quantity may be read. */
export type UnitOf<Q extends Quantity> = (typeof table)[Q]['units'][number];

/** Every quantity with its units. */
export const quantities: Readonly<Record<Quantity, QuantityRow>> = table;
