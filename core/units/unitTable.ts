/** A unit: SI value = (written number + shift) × times / over. */
export interface Unit {
  readonly times: number;
  readonly over?: number;
  readonly shift?: number;
  /** What people write for it, beside the id itself. Case counts only where `caseMatters`. */
  readonly spellings: readonly string[];
  /** Another case would name another unit (MPa, mPa). */
  readonly caseMatters?: true;
}

/*
 * Two integers or exact decimals (times, over) keep a conversion to one rounding each: 760 Torr is
 * 101325 Pa to the last bit.
 *
 * Sources, recalled: [SI] SI brochure, 9th edition (2019). [811] NIST SP 811 (2008), appendix B.
 * [80000-1] ISO 80000-1:2022. [80000-4] ISO 80000-4:2019.
 */
const units = {
  // Temperature. [SI] 2.3.1: t/°C = T/K − 273.15. [811] B.8: T/K = (t/°F + 459.67)/1.8.
  K: { times: 1, spellings: ['kelvin', 'kelvins', '°K'] },
  '°C': { times: 1, shift: 273.15, spellings: ['C', 'Celsius', '°Celsius', 'centigrade'] },
  '°F': { times: 5, over: 9, shift: 459.67, spellings: ['F', 'Fahrenheit', '°Fahrenheit'] },

  // Temperature difference: the degree alone, without the shift. Written C° and F° to tell apart.
  'C°': { times: 1, spellings: ['°C', 'C', 'Celsius°'] },
  'F°': { times: 5, over: 9, spellings: ['°F', 'F', 'Fahrenheit°'] },

  // Pressure. [SI] prefixes; bar [811] and [80000-4].
  Pa: { times: 1, spellings: ['pascal', 'pascals', 'N/m2'] },
  hPa: { times: 100, spellings: ['hectopascal'] },
  kPa: { times: 1e3, spellings: ['kilopascal'] },
  MPa: { times: 1e6, spellings: ['Mpa', 'MPA', 'megapascal', 'N/mm2'], caseMatters: true },
  GPa: { times: 1e9, spellings: ['gigapascal'] },
  bar: { times: 1e5, spellings: ['bars'] },
  mbar: {
    times: 100,
    spellings: ['mBar', 'MBAR', 'mb', 'millibar', 'millibars'],
    caseMatters: true,
  },
  kbar: { times: 1e8, spellings: ['kilobar'] },
  // [811]: standard atmosphere, exact; torr = atm/760, exact.
  atm: { times: 101325, spellings: ['atmosphere', 'atmospheres'] },
  Torr: { times: 101325, over: 760, spellings: ['torr'] },
  mTorr: { times: 101325, over: 760000, spellings: ['mtorr', 'millitorr'], caseMatters: true },
  // [811]: conventional, 13595.1 kg/m³ and 9.80665 m/s²; 13.5951 × 9.80665 exactly.
  mmHg: { times: 133.322387415, spellings: ['mm of Hg', 'mm of mercury'] },
  // [811]: conventional, 25.4 × mmHg.
  inHg: {
    times: 3386.388640341,
    spellings: ['in of Hg', 'inch Hg', 'inches Hg', 'inches of Hg', 'in of mercury', '"Hg'],
  },
  // [811]: micrometre of mercury, mmHg/1000; the word "micron" of vacuum gauges.
  micron: {
    times: 133.322387415,
    over: 1000,
    spellings: ['microns', 'µmHg', 'umHg', 'micron Hg', 'microns Hg'],
  },
  // [811]: conventional, 1000 kg/m³ and 9.80665 m/s²: 25.4 × 9.80665 exactly.
  'inH₂O': {
    times: 249.08891,
    spellings: ['inWC', 'inWG', 'inch H2O', 'inches H2O', 'inch WC', 'inches WC', '"H2O', '"WC'],
  },
  // [811]: lbf = 0.45359237 × 9.80665 N exactly; in² = 0.0254² m² exactly.
  psi: {
    times: 4.4482216152605,
    over: 0.00064516,
    spellings: ['lb/in2', 'lbs/in2', 'lbf/in2', 'lb/sq in', 'lbf/sq in'],
  },
  // [811]: 9.80665 N/cm², exact. On gauges often "kg/cm²" (common practice, no source).
  'kgf/cm²': { times: 98066.5, spellings: ['kg/cm2', 'kp/cm2'] },

  // Mass. [SI] t; [811] lb and oz (lb/16), exact.
  kg: { times: 1, spellings: ['kilogram', 'kilograms', 'kilo', 'kilos'] },
  g: { times: 1, over: 1000, spellings: ['gram', 'grams'] },
  t: { times: 1000, spellings: ['tonne', 'tonnes'] },
  lb: { times: 0.45359237, spellings: ['lbs', 'pound', 'pounds', 'lbm'] },
  oz: { times: 0.45359237, over: 16, spellings: ['ounce', 'ounces'] },

  // Density. [811]: lb/ft³ = 0.45359237/0.3048³; US gallon = 231 in³ = 0.003785411784 m³.
  'kg/m³': { times: 1, spellings: ['g/L', 'kg/cbm'] },
  'kg/L': { times: 1000, spellings: ['kg/dm3', 't/m3'] },
  'g/cm³': { times: 1000, spellings: ['g/mL', 'g/cc'] },
  'lb/ft³': {
    times: 0.45359237,
    over: 0.028316846592,
    spellings: ['lbs/ft3', 'lbm/ft3', 'lb/cu ft'],
  },
  'lb/gal': { times: 0.45359237, over: 0.003785411784, spellings: ['lbs/gal', 'lb/US gal'] },

  // Specific energy. [811]: Btu_IT/lb = 2326 J/kg exactly; cal_IT = 4.1868 J exactly.
  'J/kg': { times: 1, spellings: [] },
  'kJ/kg': { times: 1e3, spellings: ['J/g'] },
  'MJ/kg': { times: 1e6, spellings: [], caseMatters: true },
  'Btu/lb': { times: 2326, spellings: ['Btu/lbm'] },
  'kcal/kg': { times: 4186.8, spellings: ['cal/g'] },

  // Specific entropy and heat capacity. [811]: Btu_IT/(lb·°F) = 4186.8 J/(kg·K) exactly.
  'J/(kg·K)': { times: 1, spellings: ['J/kg/K', 'J/kgK', 'J/(kg °C)', 'J/kg°C'] },
  'kJ/(kg·K)': { times: 1e3, spellings: ['kJ/kg/K', 'kJ/kgK', 'kJ/(kg °C)', 'kJ/kg°C'] },
  'Btu/(lb·°F)': { times: 4186.8, spellings: ['Btu/lb/F', 'Btu/lb/°F', 'Btu/lb°F', 'Btu/lbF'] },
  'kcal/(kg·K)': {
    times: 4186.8,
    spellings: ['kcal/kg/K', 'kcal/kgK', 'kcal/(kg °C)', 'kcal/kg°C'],
  },

  // Length and altitude. [811]: in = 0.0254 m and ft = 0.3048 m exactly.
  m: { times: 1, spellings: ['metre', 'metres', 'meter', 'meters'] },
  mm: {
    times: 1,
    over: 1000,
    spellings: ['millimetre', 'millimetres', 'millimeter', 'millimeters'],
  },
  cm: {
    times: 1,
    over: 100,
    spellings: ['centimetre', 'centimetres', 'centimeter', 'centimeters'],
  },
  km: { times: 1000, spellings: ['kilometre', 'kilometres', 'kilometer', 'kilometers'] },
  in: { times: 254, over: 10000, spellings: ['inch', 'inches', '"'] },
  ft: { times: 3048, over: 10000, spellings: ['foot', 'feet', "'"] },

  // Speed. [811]: mile = 1609.344 m exactly.
  'm/s': { times: 1, spellings: ['m/sec'] },
  'km/h': { times: 1, over: 3.6, spellings: ['km/hr', 'kph'] },
  'ft/s': { times: 3048, over: 10000, spellings: ['ft/sec', 'fps'] },
  'ft/min': { times: 3048, over: 600000, spellings: ['fpm'] },
  mph: { times: 0.44704, spellings: ['mi/h'] },

  // Time. [SI] table 8.
  s: { times: 1, spellings: ['sec', 'secs', 'second', 'seconds'] },
  min: { times: 60, spellings: ['mins', 'minute', 'minutes'] },
  h: { times: 3600, spellings: ['hr', 'hrs', 'hour', 'hours'] },
  d: { times: 86400, spellings: ['day', 'days'] },

  // Rates: the units above, a unit of time.
  'K/s': { times: 1, spellings: ['K/sec'] },
  'K/min': { times: 1, over: 60, spellings: [] },
  'K/h': { times: 1, over: 3600, spellings: ['K/hr'] },
  'C°/s': { times: 1, spellings: ['°C/s', 'C/s', '°C/sec', 'C/sec'] },
  'C°/min': { times: 1, over: 60, spellings: ['°C/min', 'C/min'] },
  'C°/h': { times: 1, over: 3600, spellings: ['°C/h', 'C/h', '°C/hr', 'C/hr'] },
  'F°/s': { times: 5, over: 9, spellings: ['°F/s', 'F/s', '°F/sec', 'F/sec'] },
  'F°/min': { times: 5, over: 540, spellings: ['°F/min', 'F/min'] },
  'F°/h': { times: 5, over: 32400, spellings: ['°F/h', 'F/h', '°F/hr', 'F/hr'] },
  'Pa/s': { times: 1, spellings: ['Pa/sec'] },
  'Pa/min': { times: 1, over: 60, spellings: [] },
  'kPa/s': { times: 1000, spellings: ['kPa/sec'] },
  'kPa/min': { times: 1000, over: 60, spellings: [] },
  'MPa/s': { times: 1e6, spellings: ['MPa/sec'], caseMatters: true },
  'MPa/min': { times: 1e6, over: 60, spellings: [], caseMatters: true },
  'bar/s': { times: 1e5, spellings: ['bar/sec'] },
  'bar/min': { times: 1e5, over: 60, spellings: [] },
  'bar/h': { times: 1e5, over: 3600, spellings: ['bar/hr'] },
  'mbar/s': { times: 100, spellings: ['mbar/sec'], caseMatters: true },
  'mbar/min': { times: 100, over: 60, spellings: [], caseMatters: true },
  'psi/s': { times: 4.4482216152605, over: 0.00064516, spellings: ['psi/sec'] },
  'psi/min': { times: 4.4482216152605, over: 0.0387096, spellings: [] },
  'inHg/min': { times: 3386.388640341, over: 60, spellings: [] },

  // Fraction. The plain number is [80000-1]'s unit one, written as nothing.
  '1': { times: 1, spellings: [] },
  '%': { times: 1, over: 100, spellings: ['percent', 'per cent', 'pct'] },
} as const satisfies Readonly<Record<string, Unit>>;

/** A unit by its canonical written form. */
export type UnitId = keyof typeof units;

/** Every unit the tool reads and writes. */
export const unitTable: Readonly<Record<UnitId, Unit>> = units;
