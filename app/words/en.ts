import type { CautionCode } from '../../core/cautions/caution.ts';
import type { UnknownReason } from '../../core/errors.ts';
import type { BlendReason } from '../../core/substances/catalogue.ts';
import type { BoundaryKind } from '../../core/map/boundary.ts';
import type { Direction, NoMargin } from '../../core/map/margins.ts';
import type { PhaseName } from '../../core/equilibrium/phase.ts';
import type { Encounter } from '../../core/process/encounter.ts';
import type { StepProblem } from '../../core/process/problem.ts';
import type { HeatAbsent } from '../../core/process/outcome.ts';
import type { SheetIssue } from '../../core/sheet/read.ts';
import type { StateProblem } from '../../core/sheet/results.ts';
import type { AbsenceReason, Hazard, ReferenceState } from '../../core/substances/substance.ts';
import { format, type Quantity, type ReadingIssue } from '../../core/units/index.ts';
import type { Step } from '../../core/process/steps/index.ts';
import type { Sentence, Slot } from './sentence.ts';

/** Names of substances as the map writes them: of the fluid phases and of the solid. */
const substances: Readonly<
  Record<string, { readonly name: string; readonly liquid: string; readonly vapour: string }>
> = {
  water: { name: 'water', liquid: 'liquid water', vapour: 'steam' },
  'carbon-dioxide': {
    name: 'carbon dioxide',
    liquid: 'liquid carbon dioxide',
    vapour: 'carbon dioxide gas',
  },
  ammonia: { name: 'ammonia', liquid: 'liquid ammonia', vapour: 'ammonia gas' },
  'ammonia-1993': {
    name: 'ammonia (1993 formulation)',
    liquid: 'liquid ammonia',
    vapour: 'ammonia gas',
  },
  propane: { name: 'propane', liquid: 'liquid propane', vapour: 'propane gas' },
  isobutane: { name: 'isobutane', liquid: 'liquid isobutane', vapour: 'isobutane gas' },
  'n-butane': { name: 'n-butane', liquid: 'liquid n-butane', vapour: 'n-butane gas' },
  r134a: { name: 'R-134a', liquid: 'liquid R-134a', vapour: 'R-134a vapour' },
  r1234yf: { name: 'R-1234yf', liquid: 'liquid R-1234yf', vapour: 'R-1234yf vapour' },
  'r1234ze-e': { name: 'R-1234ze(E)', liquid: 'liquid R-1234ze(E)', vapour: 'R-1234ze(E) vapour' },
  ethanol: { name: 'ethanol', liquid: 'liquid ethanol', vapour: 'ethanol vapour' },
  nitrogen: { name: 'nitrogen', liquid: 'liquid nitrogen', vapour: 'nitrogen gas' },
  oxygen: { name: 'oxygen', liquid: 'liquid oxygen', vapour: 'oxygen gas' },
  argon: { name: 'argon', liquid: 'liquid argon', vapour: 'argon gas' },
  methane: { name: 'methane', liquid: 'liquid methane', vapour: 'methane gas' },
};

/** Why a boundary or a phase is not told. */
const absences = {
  'not published': 'no equation for it is published',
} satisfies Record<AbsenceReason, string>;
const unknowns = {
  'melting not published': 'no melting line is published that would tell solid from liquid here',
  'sublimation not published':
    'no sublimation line is published that would tell solid from vapour here',
  'beyond the melting line': 'the published melting line ends below this pressure',
  'no equation for the solid': 'no equation of the solid is published',
} satisfies Record<UnknownReason, string>;

/** What a substance does to people and plant. */
const hazards = {
  scald: 'scalds',
  pressure: 'stands under pressure when shut in and warmed',
  asphyxiation: 'suffocates, and is toxic by itself',
  'displaces air': 'displaces air and suffocates without warning',
  'cold burn': 'its cold burns skin',
  cryogenic: 'cryogenic: burns skin, makes steel brittle, bursts what traps its liquid',
  'dry ice blocks lines': 'turns to solid that blocks lines below its triple pressure',
  toxic: 'toxic and corrosive',
  flammable: 'flammable',
  'mildly flammable': 'mildly flammable',
  'toxic in fire': 'turns into toxic, corrosive gas in flames and on hot surfaces',
  oxidiser: 'feeds fire: oil, grease and unsuitable materials burn in it',
} satisfies Record<Hazard, string>;

/** Why a blend is refused. */
const blends = {
  'boils over a range':
    'is a blend: it boils over a range of temperatures, while its parts leave it unevenly, and is no pure substance',
  azeotrope:
    'is a blend: its parts boil together at one pressure only, and it is no pure substance',
} satisfies Record<BlendReason, string>;

const quantityNames: Readonly<Record<Quantity, string>> = {
  temperature: 'temperature',
  temperatureDifference: 'temperature difference',
  pressure: 'pressure',
  pressureDifference: 'pressure difference',
  density: 'density',
  specificEnergy: 'specific energy',
  specificEntropy: 'specific entropy',
  heatCapacity: 'heat capacity',
  speed: 'speed',
  time: 'time',
  temperatureRate: 'rate of temperature',
  pressureRate: 'rate of pressure',
  length: 'length',
  altitude: 'altitude',
  fraction: 'fraction',
  mass: 'mass',
};

/** What a person typed, short enough to stand inside a sentence. */
const quote = (text: string): string =>
  `“${text.trim().length > 60 ? `${text.trim().slice(0, 60)}…` : text.trim()}”`;

/** "a, b or c"; only the first eight of many. */
const oneOf = (list: readonly string[]): string =>
  list.length > 8
    ? `${list.slice(0, 8).join(', ')} or another`
    : list.length > 1
      ? `${list.slice(0, -1).join(', ')} or ${list.at(-1)!}`
      : (list[0] ?? '');

const kPa = (p: number): string => format(p, 'kPa', { kind: 'absolute', decimals: 3 });

/** Why a reading cannot be taken. */
function readingSentence(issue: ReadingIssue): string {
  switch (issue.code) {
    case 'empty':
      return `No ${quantityNames[issue.quantity]} is given.`;
    case 'tooLong':
      return `${issue.length} characters are too many for a ${quantityNames[issue.quantity]}: at most ${issue.limit}.`;
    case 'notANumber':
      return `${quote(issue.text)} is no ${quantityNames[issue.quantity]}: it does not start with a number that can be read.`;
    case 'ambiguousNumber':
      return `${quote(issue.text)} can mean ${issue.readings[0].text} or ${issue.readings[1].text}: write the number with a decimal point.`;
    case 'missingUnit':
      return `${quote(issue.text)} has no unit: write ${oneOf(issue.expected)}.`;
    case 'unknownUnit':
      return `${quote(issue.unit)} is no unit of ${quantityNames[issue.quantity]}: write ${oneOf(issue.expected)}.`;
    case 'wrongQuantity':
      return `${quote(issue.text)} is no ${quantityNames[issue.quantity]}: ${issue.unit} measures ${oneOf(issue.found.map((q) => quantityNames[q]))}.`;
    case 'belowMinimum':
      return issue.quantity === 'temperature'
        ? `${quote(issue.text)} lies below absolute zero.`
        : `${quote(issue.text)} is below zero: there is no such ${quantityNames[issue.quantity]}.`;
    case 'negativeVacuum':
      return `${quote(issue.text)}: a vacuum is counted downwards from the local atmosphere and takes no minus sign.`;
    case 'unstatedKind':
      return `${quote(issue.reading.text)} is neither gauge nor absolute: write (g) or (a) after the unit.`;
    case 'belowZeroAbsolute':
      return issue.kind === 'absolute'
        ? `${quote(issue.reading.text)} is no pressure that a state can have: it must be above zero.`
        : `${quote(issue.reading.text)} would be ${kPa(issue.value)} where the local atmosphere is ${kPa(issue.local)}: there is no such pressure.`;
    case 'notThatQuantity':
      return `${quote(issue.reading.text)} is no ${quantityNames[issue.quantity]} but a ${quantityNames[issue.reading.quantity]}.`;
    case 'noSpan':
      return `${quote(issue.low.text)} to ${quote(issue.high.text)} is no scale: its ends must differ and count from the same zero.`;
  }
}

/** What is wrong at a place of a sheet; the place is named first. */
function sheetIssueSentence(issue: SheetIssue): string {
  const at = issue.place === '' ? '' : `${issue.place}: `;
  switch (issue.code) {
    case 'notASheet':
      return 'This is not a sheet.';
    case 'newerVersion':
      return `This sheet has version ${issue.version}; this program reads version 1. A newer program opens it.`;
    case 'shape':
      return `${at}${issue.expected} belongs here, not ${quote(issue.received)}.`;
    case 'reading':
      return `${at}${readingSentence(issue.issue)}`;
    case 'unknownId':
      return `${at}the sheet has no ${issue.of} with the id ${quote(issue.given)}.`;
    case 'twice':
      return `${at}the id ${quote(issue.given)} stands twice.`;
    case 'givens':
      return `${at}a state takes two givens of temperature, pressure and vapour fraction; ${issue.given.length === 0 ? 'none is here' : `here ${issue.given.length === 1 ? 'is' : 'are'} ${issue.given.join(', ')}`}.`;
    case 'unit':
      return `${at}${quote(issue.given)} is no unit of pressure.`;
    case 'emptyRange':
      return `${at}the range is empty: its upper end must lie above its lower end, and a logarithmic one above zero.`;
    case 'tooLarge':
      return `${at}this is larger than a sheet may be.`;
  }
}

/** How a problem is told where the substance and the units of the givens are at hand. */
interface ProblemTold {
  /** A line's name from its id. */
  readonly boundary: (id: string) => string;
  /** An SI value with its unit. */
  readonly value: (value: number, quantity: string, unit: string) => string;
}

const problemTold: ProblemTold = {
  boundary: (id) =>
    id.startsWith('melting')
      ? 'melting line'
      : id.startsWith('sublimation')
        ? 'sublimation line'
        : 'boiling line',
  value: (value, quantity, unit) =>
    quantity === 'T'
      ? format(value, '°C', { decimals: 2 })
      : quantity === 'p'
        ? format(value, value < 1e6 ? 'kPa' : 'MPa', { kind: 'absolute', digits: 5 })
        : `${Number(value.toPrecision(6))}${unit === '1' ? '' : ` ${unit}`}`,
};

const problemQuantities: Readonly<Record<string, string>> = {
  T: 'The temperature',
  p: 'The pressure',
  altitude: 'The altitude',
  pressure: 'The pressure',
  'vapour fraction': 'The vapour fraction',
  enthalpy: 'The enthalpy',
  entropy: 'The entropy',
  density: 'The density',
  'internal energy': 'The internal energy',
  superheat: 'The superheat',
  subcooling: 'The subcooling',
  efficiency: 'The efficiency',
};

/** Why a state has no result. */
function problemSentence(problem: StateProblem, told: ProblemTold): string {
  switch (problem.code) {
    case 'outOfRange': {
      const { quantity, unit, source } = problem;
      const [value, min, max] = [problem.value, problem.min, problem.max].map((x) =>
        told.value(x, quantity, unit),
      );
      return `${problemQuantities[quantity] ?? quantity} ${value} lies outside the range from ${min} to ${max} (${source}).`;
    }
    case 'onBoundary':
      return `Temperature and pressure lie on the ${told.boundary(problem.boundary)}, where they do not fix the state: give a ${problem.needs}.`;
    case 'unknown':
      return `The phase is not known: ${unknowns[problem.reason]}.`;
    case 'unsolved':
      return 'The equations could not be solved here; move the state a little and tell us what you gave.';
  }
}

const how = 'Run it as: npm run -s simmerline -- <command> …';
const pressureHelp = `A pressure without a kind is absolute. Gauge and vacuum readings, such as "2.5 bar(g)",
"35 psig" or "20 inHg vac", count from the local atmosphere, which --altitude
(ISO 2533) or --barometer gives; without either it is 101.325 kPa.`;
const fileHelp = `A file has a header on line 1 with units in brackets, such as "T [degC]" or
"p [bar(g)]", SI where none (K, Pa absolute), and a point on each further line.
Columns may be parted by comma, semicolon or tab; beside a semicolon or a tab
commas may be decimal. One bad line refuses the whole file.`;
const referenceHelp = `Zero of h, u and s:
  water           u = s = 0 for saturated liquid at the triple point (IAPWS)
  carbon dioxide  h = s = 0 for the ideal gas at 298.15 K and 101.325 kPa
  others          as the command about says; never compare across substances`;
const exitHelp = `Exit status: 0 done, 2 refused with one line on standard error that says why,
1 a fault of the program itself.`;

/** Help and texts of the terminal tool. */
const terminal = {
  help: {
    general: `Simmerline: states, boundaries and figures of pure substances from published
equations of state.

  state <substance> --T … --p …            phase and properties at a point
  boundary <substance> <line> --T … | --p … both sides of a boundary
  figure <sheet.json> <out.svg>            the figure of a sheet
  about <substance>                        sources, validity, hazards, and the checks it passes
  substances                               what there is
  help [command]                           this, or more about a command
  --version                                the version

${how}
Put readings and names of several words in quotes: --T "-20 °C".
${pressureHelp}

${referenceHelp}

${exitHelp}
`,
    state: `state <substance> --T "…" --p "…" [--altitude "…" | --barometer "…"] [--json]
state <substance> --from points.csv [--altitude "…" | --barometer "…"] [--json]

Phase and properties at a temperature and a pressure. The substance answers to its
id, name, formula, CAS number or ISO 817 number.

  --T "121.1 °C"         temperature, with its unit
  --p "2.5 bar(g)"       pressure, with its unit
  --from points.csv      many points from the columns T and p, in any order
  --altitude "1480 m"    where the gauge is read
  --barometer "84.8 kPa" or what a barometer shows there (absolute)
  --json                 JSON in SI: T, p, phase, rho, h, s, u, cp, cv, w; null where the
                         sources define nothing; solid and its form for a solid; atmosphere
                         (Pa) where a gauge or vacuum reading was given

Without --json a point gives a table and a file gives CSV in SI.
${fileHelp}
${pressureHelp}
Closer to a boundary than one part in 10⁹, temperature and pressure do not fix the
state: it is refused, and the boundary named.

${referenceHelp}

${exitHelp}
`,
    boundary: `boundary <substance> saturation|melting|sublimation --T "…" | --p "…" | --from points.csv
         [--altitude "…" | --barometer "…"] [--json]

A boundary at a temperature or at a pressure, with the properties of both sides.

  --T "-20 °C"           temperature, with its unit
  --p "2.5 bar(g)"       pressure, with its unit
  --from points.csv      many points from one column, T or p
  --altitude "1480 m"    where the gauge is read
  --barometer "84.8 kPa" or what a barometer shows there (absolute)
  --json                 JSON in SI: T, p, both sides by name, basis and source

Where one temperature meets several melting lines, the lowest pressure is given and
the others after it (in JSON as also). The basis is equilibrium (equal Gibbs energies),
correlation (a published equation for the line alone) or estimate.
${fileHelp}
${pressureHelp}

${referenceHelp}

${exitHelp}
`,
    figure: `figure <sheet.json> <out.svg> [--view id] [--without-sheet]

Draws the figure of a sheet, as the page draws it. The sheet is read from JSON or
from an SVG that carries it. The file is written whole or not at all.

  --view id              another view than the first
  --without-sheet        leave the sheet out of the file, for passing it outside

${exitHelp}
`,
    about: `about <substance> [--checks | --json]

Constants, full citations, ranges, uncertainties and hazards of a substance, and how
the values that its sources print compare with what is computed here.

  --checks               every value: published, computed, deviation
  --json                 JSON in SI: the substance's file and every check with its
                         value, computed value, deviation and tolerance

${exitHelp}
`,
    substances: `substances

Every substance with its id, formula, CAS number, ISO 817 number and names.
`,
    help: `help [command]

General help, or help on one command.
`,
  },
  refused: (message: string): string => `simmerline: ${message}`,
  fault: (detail: string): string => `simmerline: a fault of the program itself: ${detail}`,
  noCommand: (names: readonly string[]): string =>
    `no command is given: ${oneOf(names)}; help says more.`,
  unknownCommand: (word: string, names: readonly string[]): string =>
    `${quote(word)} is no command: ${oneOf(names)}.`,
  unknownOption: (option: string, known: readonly string[]): string =>
    `${quote(option)} is no option here${known.length > 0 ? `: ${oneOf(known)}` : ''}.`,
  twice: (option: string): string => `${option} is given twice.`,
  noValue: (option: string): string => `${option} takes no value.`,
  valueMissing: (option: string): string => `${option} has no value.`,
  tooMany: (word: string): string =>
    `${quote(word)} is one word too many: put readings and names of several words in quotes.`,
  eitherOf: (options: readonly string[]): string =>
    `give either ${options.join(' or ')}, not both.`,
  stateNeeds: 'a state needs --T and --p, or --from with a file.',
  boundaryNeeds: 'a boundary needs one of --T, --p and --from.',
  figureNeeds: 'a figure needs a sheet and the file to write: figure <sheet.json> <out.svg>.',
  substanceMissing: (all: readonly string[]): string =>
    `no substance is given: ${oneOf(all)}; the command substances says more.`,
  unknownSubstance: (word: string, all: readonly string[]): string =>
    `there is no substance ${quote(word)}; there is ${all.join(', ')}.`,
  whichSubstance: (word: string, candidates: readonly string[]): string =>
    `${quote(word)} does not say which substance: ${candidates.length > 1 ? 'one of ' : ''}${candidates.join(', ')}?`,
  unknownKind: (word: string | undefined, kinds: readonly string[]): string =>
    word === undefined
      ? `no boundary is given: ${oneOf(kinds)}.`
      : `${quote(word)} is no boundary: ${oneOf(kinds)}.`,
  noLine: (substance: string, kind: string, reason: AbsenceReason | null): string =>
    `no ${kind} line of ${substance} is known${reason === null ? '' : `: ${absences[reason]}`}.`,
  bothSides: (substance: string, kind: string): string =>
    `The command boundary ${substance} ${kind} gives both sides.`,
  barometerKind: 'a barometer shows an absolute pressure.',
  absolute: 'A pressure without a kind is absolute.',
  standardAtmosphere:
    'Gauge and vacuum readings without a site count from a local atmosphere of 101.325 kPa.',

  place: (file: string, line: number): string => `${file}, line ${line}`,
  cannotRead: (file: string, code: string): string =>
    code === 'ENOENT'
      ? `there is no file ${quote(file)}.`
      : code === 'EISDIR'
        ? `${quote(file)} is a folder, not a file.`
        : `${quote(file)} cannot be read (${code}).`,
  cannotWrite: (file: string, code: string): string =>
    code === 'ENOENT'
      ? `${quote(file)} cannot be written: there is no such folder.`
      : code === 'EISDIR'
        ? `${quote(file)} cannot be written: it is a folder.`
        : `${quote(file)} cannot be written (${code}).`,
  emptyFile: (file: string): string => `${file} is empty.`,
  noPoints: (file: string): string => `${file} has a header and no points.`,
  brokenQuotes: (file: string, line: number): string =>
    `${file}, line ${line}: a quoted cell is not closed or has text behind its quotes.`,
  columnTwice: (file: string, column: string): string =>
    `${file}, line 1: the column ${column} stands twice.`,
  columnsMissing: (file: string, missing: readonly string[]): string =>
    `${file}, line 1: there is no column ${missing.join(' and no column ')}; the header names T and p, with units in brackets.`,
  oneColumn: (file: string, found: number): string =>
    found === 0
      ? `${file}, line 1: there is no column T or p.`
      : `${file}, line 1: one column is wanted, T or p, and there are both.`,
  unknownExtension: (file: string, known: readonly string[]): string =>
    `${quote(file)} is no kind of file that can be written: its name must end in ${oneOf(known)}.`,
  unknownView: (word: string, views: readonly string[]): string =>
    `the sheet has no view ${quote(word)}: ${oneOf(views)}.`,
  sheetFile: {
    noSheet: 'this SVG carries no sheet.',
    tooLarge: 'this file is larger than a sheet may be.',
    malformed: 'this file is damaged: no sheet can be read from it.',
    noJson: 'this file is neither JSON nor an SVG that carries a sheet.',
  },
  moreIssues: (count: number): string => (count > 0 ? ` And ${count} more.` : ''),
  figureWritten: (file: string, width: number, height: number, carries: boolean): string =>
    `${file}: ${Number(width.toFixed(1))} mm × ${Number(height.toFixed(1))} mm${carries ? ', carries its sheet' : ', without its sheet'}.`,
  unplaced: (count: number): string =>
    `${count} label${count > 1 ? 's' : ''} found no room on the figure.`,

  substanceColumns: ['id', 'formula', 'CAS', 'ISO 817', 'names'],
  symbols: {
    T: 'temperature T',
    p: 'pressure p',
    atmosphere: 'local atmosphere',
    rho: 'density ρ',
    h: 'enthalpy h',
    s: 'entropy s',
    u: 'internal energy u',
    cp: 'heat capacity cp',
    cv: 'heat capacity cv',
    w: 'speed of sound w',
  },
  notDefined: '—: not defined by the sources.',
  equations: (list: readonly string[]): string => `Equations: ${list.join('; ')}.`,
  referenceState: {
    'liquid at the triple point': 'Zero: u = s = 0 for saturated liquid at the triple point.',
    'liquid at the triple point: h = s = 0':
      'Zero: h = s = 0 for saturated liquid at the triple point.',
    'ideal gas at 298.15 K and 101.325 kPa':
      'Zero: h = s = 0 for the ideal gas at 298.15 K and 101.325 kPa.',
    'ideal gas at 298.15 K and 101.325 kPa: 8670 J/mol, 191.5 J/(mol K)':
      'Zero: h = 8670 J/mol and s = 191.5 J/(mol·K) for the ideal gas at 298.15 K and 101.325 kPa.',
    'ideal gas at 298.15 K and 101.325 kPa: 8680 J/mol, 205.043 J/(mol K)':
      'Zero: h = 8680 J/mol and s = 205.043 J/(mol·K) for the ideal gas at 298.15 K and 101.325 kPa.',
    'liquid at 273.15 K: 200 kJ/kg, 1 kJ/(kg K)':
      'Zero: h = 200 kJ/kg and s = 1 kJ/(kg·K) for saturated liquid at 273.15 K.',
    'liquid at the normal boiling point':
      'Zero: h = s = 0 for saturated liquid at the normal boiling point.',
    'as published': 'Zero of h, u and s as published.',
  } satisfies Record<ReferenceState, string>,
  boundaryTitle: (substance: string, line: string): string => `${substance}: ${line}`,
  alsoMelts: (form: string, p: string): string =>
    `Also melts at this temperature: ${form} at ${p}.`,
  alsoInJson: (count: number): string =>
    `${count} temperature${count > 1 ? 's meet' : ' meets'} further melting lines at higher pressures: --json lists them.`,
  basis: (basis: string, source: string): string => `Basis: ${basis} (${source}).`,
};

/** English. */
export const en = {
  language: 'en',
  decimal: '.' as const,

  substance: (id: string): string => substances[id]?.name ?? id,

  /** A field's name, in capitals but for the letter of an ice. */
  region: (substance: string, phase: PhaseName, solid: string | null): string => {
    switch (phase) {
      case 'liquid':
        return (substances[substance]?.liquid ?? 'liquid').toUpperCase();
      case 'vapour':
        return (substances[substance]?.vapour ?? 'vapour').toUpperCase();
      case 'supercritical':
        return 'SUPERCRITICAL';
      case 'solid':
        return (solid ?? 'solid, form not resolved').toUpperCase().replace(/ IH$/, ' Ih');
    }
  },
  phase: (phase: PhaseName, solid: string | null): string =>
    phase === 'solid' ? (solid ?? 'solid, form not resolved') : phase,

  /** A line's name; `alone` where no other line of its kind, or no other line at all, is about. */
  boundary: (
    substance: string,
    kind: BoundaryKind,
    form: string | null,
    alone: { readonly kind: boolean; readonly line: boolean },
  ): string => {
    const name = substances[substance]?.name ?? substance;
    switch (kind) {
      case 'saturation':
        return alone.line ? `boiling line of ${name}` : 'boiling line';
      case 'melting':
        return alone.kind || form === null ? 'melting line' : `melting line of ${form}`;
      case 'sublimation':
        return 'sublimation line';
      case 'critical':
        return 'critical';
    }
  },
  estimated: 'estimate',

  triplePoint: (phases: readonly string[]): string =>
    phases.includes('vapour')
      ? 'triple point'
      : `${phases[0]}–${phases[1]!.replace('ice ', '')}–${phases[2]}`,
  criticalPoint: 'critical point',

  axis: {
    temperature: { K: 'T', other: 't' },
    absolute: 'absolute',
    gauge: (site: string | null): string => (site ? `gauge at ${site}` : 'gauge'),
  },

  /** What a state is: "liquid", "boiling", "20 % vapour". */
  stateOnLine: 'boiling',
  cannotTell: (boundary: string): string =>
    `on or off the ${boundary}: cannot be told from these instruments`,

  saturated: (phase: string): string => `saturated ${phase}`,
  onThe: (line: string): string => `on the ${line}`,

  /** A margin in trade words: what happens and how far. */
  margin: (direction: Direction, kind: BoundaryKind, from: PhaseName, amount: string): string => {
    const happens: Record<BoundaryKind, string> = {
      saturation: from === 'vapour' ? 'condenses' : 'boils',
      melting: from === 'solid' ? 'melts' : 'freezes',
      sublimation: from === 'solid' ? 'sublimes' : 'turns to solid',
      critical: 'passes the critical point',
    };
    const way: Record<Direction, string> = {
      warmer: 'warmer',
      colder: 'colder',
      'higher pressure': 'higher',
      'lower pressure': 'lower',
    };
    return `${happens[kind]} ${amount} ${way[direction]}`;
  },
  noMargin: {
    none: 'no boundary that way',
    'beyond the critical point': 'nothing boils or condenses beyond the critical point',
    'between solid forms': 'changes between solid forms are not in these equations',
    'not published': 'no boundary is published that way',
  } satisfies Record<NoMargin, string>,

  /** What happens where a run meets a boundary. */
  encounter: ({
    code,
    boundaryKind,
    from,
  }: Pick<Encounter, 'code' | 'boundaryKind' | 'from'>): string => {
    const line: Record<BoundaryKind, string> = {
      saturation: 'boiling line',
      melting: 'melting line',
      sublimation: 'sublimation line',
      critical: 'critical point',
    };
    const state: Record<BoundaryKind, string> = {
      saturation: from.phase === 'vapour' ? 'condensing' : 'boiling',
      melting: from.phase === 'solid' ? 'melting' : 'freezing',
      sublimation: from.phase === 'solid' ? 'subliming' : 'turning to solid',
      critical: 'the critical point',
    };
    switch (code) {
      case 'reaches':
        return `reaches ${state[boundaryKind]}`;
      case 'leaves':
        return `leaves the ${line[boundaryKind]}`;
      case 'touches':
        return `touches the ${line[boundaryKind]}`;
      case 'follows':
        return `follows the ${line[boundaryKind]}`;
      case 'deposits':
        return 'turns to solid';
      case 'passesAboveCritical':
        return 'passes above the critical point';
      default:
        return code;
    }
  },
  /** Why a step's heat is not told. */
  heatAbsent: (why: HeatAbsent): string => {
    switch (why.code) {
      case 'noEquation':
        return `no equation is published for ${
          why.phase.phase === 'solid'
            ? (why.phase.solid ?? 'this solid, whose form is not resolved')
            : `the ${why.phase.phase} here`
        }`;
      case 'openFraction':
        return why.at === 'end'
          ? 'how much changes over is not said: give a fraction or a heat at the end'
          : 'the fraction at the start of this step is not known';
      case 'openMass':
        return 'how much vapour has left before is not known';
      case 'notReached':
        return 'the step does not reach its end';
    }
  },

  /** Why a step does not reach its end, and what to do. */
  stepProblem: (problem: StepProblem): string => {
    const line: Readonly<Record<string, string>> = {
      saturation: 'boiling line',
      melting: 'melting line',
      sublimation: 'sublimation line',
      critical: 'critical point',
    };
    switch (problem.code) {
      case 'noBoundary': {
        if (problem.keeps !== 'p' && problem.keeps !== 'T')
          return `no ${problem.boundary ? line[problem.boundary] : 'line'} is met on the way: choose another end`;
        const kept =
          problem.keeps === 'p'
            ? format(problem.value, 'kPa', { digits: 4, kind: 'absolute' })
            : format(problem.value, '°C', { digits: 4 });
        return `no ${problem.boundary ? line[problem.boundary] : 'line'} is met at ${kept}: choose another end`;
      }
      case 'noSuchPhase':
        return `no line with ${problem.fraction} is met here: end at a temperature or a pressure`;
      case 'notOnBoundary':
        return 'it does not start on a line: end the step before on one';
      case 'nothingLeft':
        return 'all of it has left as vapour';
      case 'nothingCondensesBack':
        return `the vapour has left and cannot condense back: give at least ${format(problem.least, '%', { digits: 3 })}`;
      case 'heatRange':
        return `that heat goes past the change of phase: give ${format(problem.least, 'kJ/kg', { digits: 4 })} to ${format(problem.most, 'kJ/kg', { digits: 4 })}`;
      case 'reading':
        return readingSentence(problem.issue);
      case 'notRun':
        return 'an earlier step does not reach its end';
      default:
        return problemSentence(problem, problemTold);
    }
  },

  /** One line inside the picture. */
  caution: {
    'equilibrium lines':
      'Lines are equilibrium: liquids can superheat and bump, and supercool before they freeze.',
    'pressure vessel': 'Pressure: makers’ ratings and local code decide.',
    'high pressure': 'High pressure: makers’ ratings and authorised people decide.',
    scald: 'Hot water and steam scald; zero on a gauge is no proof of zero pressure.',
    vacuum: 'Vacuum: vessels implode, liquids boil over; makers’ ratings decide.',
    asphyxiation:
      'Carbon dioxide suffocates and is toxic: ventilation and gas detection by local code.',
    'displaces air':
      'Displaces air and suffocates without warning: ventilation and oxygen monitoring by local code.',
    toxic:
      'Toxic: gas detection, breathing protection and escape by local code; authorised people only.',
    flammable:
      'Flammable: ignition sources, zoning and ventilation by local code; authorised people decide.',
    'mildly flammable': 'Mildly flammable: charge, ventilation and ignition sources by local code.',
    'toxic in fire': 'Flames and hot surfaces turn it into toxic, corrosive gas.',
    oxidiser:
      'Feeds fire: oil, grease and unsuitable materials burn in it; suppliers’ written procedures decide.',
    cryogenic:
      'Cryogenic: burns skin, makes steel brittle, bursts what traps it; suppliers’ written procedures decide.',
    'cold burn': 'Cold burns skin and makes steel brittle.',
    'dry ice blocks lines':
      'Below its triple pressure it turns to solid that blocks lines: never re-pressurise but by the gas supplier’s procedure.',
  } satisfies Record<CautionCode, string>,

  sources: (substance: string, list: readonly string[]): string =>
    `Lines of pure ${substance} from ${list.join('; ')}.`,
  basis: {
    equilibrium: 'equal Gibbs energies of the equations of state',
    correlation: 'published melting or sublimation equation',
    estimate: 'estimate, dashed',
    convention: 'convention',
  },
  basisShort: {
    equilibrium: 'solved',
    correlation: 'correlation',
    estimate: 'estimate',
    convention: 'convention',
  },
  /** A boundary by its id, in running text. */
  boundaryKind: (id: string): string =>
    id.startsWith('melting')
      ? 'melting line'
      : id.startsWith('sublimation')
        ? 'sublimation line'
        : 'boiling line',
  direction: {
    warmer: 'Warmer',
    colder: 'Colder',
    'higher pressure': 'Higher pressure',
    'lower pressure': 'Lower pressure',
  } satisfies Record<Direction, string>,
  site: (name: string, local: string): string => `${name}: local atmosphere ${local}.`,
  noSource: 'beyond the published range',
  /** Where a field ends because nobody has published the line that would bound it. */
  notPublished: 'solid: no line is published',
  linesNotPublished: (boundaries: readonly ('melting' | 'sublimation')[]): string =>
    `Its ${boundaries.join(' and ')} ${boundaries.length > 1 ? 'lines are' : 'line is'} not published: liquid and vapour end where their equation does.`,
  /** Why a blend cannot be drawn. */
  blend: (word: string, reason: BlendReason): string => `${quote(word)} ${blends[reason]}.`,

  /** The card of a substance. */
  card: {
    title: (substance: string): string => `About ${substance}`,
    close: 'Close',
    search: 'Find a substance by name, formula, ISO 817 or CAS number',
    searchHint: 'ammonia, NH3, R-717',
    notFound: (word: string): string => `There is no substance ${quote(word)} here.`,
    candidate: (name: string, formula: string, refrigerant: string | null): string =>
      [name, formula, ...(refrigerant && refrigerant !== name ? [refrigerant] : [])].join(', '),
    identity: 'Identity',
    names: 'names',
    formula: 'formula',
    cas: 'CAS number',
    refrigerant: 'ISO 817 number',
    molarMass: 'molar mass',
    points: 'Fixed points',
    critical: 'critical point',
    criticalOfEquation: 'critical point of the equation',
    triple: (phases: readonly string[]): string => `triple point ${phases.join('–')}`,
    normal: { boiling: 'normal boiling point', sublimation: 'normal sublimation point' },
    equations: 'Equations',
    fluid: 'fluid',
    printed: 'as printed',
    validity: 'valid for liquid and vapour',
    vapour: 'vapour used down to',
    range: (low: string, high: string): string => `${low} to ${high}`,
    upTo: (p: string): string => `up to ${p}`,
    solid: (name: string): string => name,
    line: (kind: 'melting' | 'sublimation', form: string, alone: boolean): string =>
      alone ? `${kind} line` : `${kind} line of ${form}`,
    absent: (kind: 'melting' | 'sublimation'): string => `${kind} line`,
    absence: absences,
    saturation: 'first guesses of the boiling line',
    zero: 'reference state',
    uncertainty: 'Uncertainty',
    provenance: { published: 'published', recalled: 'recalled' },
    hazards: 'Hazards',
    hazard: hazards,
    hazardsDefer:
      'Local codes, suppliers’ data sheets and written procedures, and authorised people decide.',
    checks: 'Checks',
    checking: 'Checking…',
    checkSummary: (passed: number, all: number): string =>
      passed === all
        ? `All ${all} values are met within their tolerance.`
        : `${passed} of ${all} values are met within their tolerance.`,
    checkGroup: (source: string, provenance: string, passed: number, all: number): string =>
      `${source} (${provenance}): ${passed === all ? `all ${all}` : `${passed} of ${all}`} met`,
    state: 'state',
    quantity: 'quantity',
    published: 'published',
    computed: 'computed',
    deviation: 'deviation',
    ofTolerance: 'of tolerance',
    undefined: 'not defined',
    everyValue: 'Every value',
    origin: {
      'published, one text': 'digits from one public transcription',
      'published, two texts': 'digits agree in two public texts',
      recalled: 'recalled',
      'computed elsewhere': 'computed by an independent program',
      computed: 'computed once; guards against change only',
    } as Readonly<Record<string, string>>,
  },
  outsideFrame: (tags: readonly string[]): string =>
    `${tags.join(', ')} ${tags.length > 1 ? 'lie' : 'lies'} outside this map`,
  description: (substance: string, states: number): string =>
    `Pressure–temperature map of ${substance}${states > 0 ? ` with ${states} state${states > 1 ? 's' : ''}` : ''}`,

  /** The map told in words, for those who do not see it. */
  summary: {
    title: 'The map in words',
    axes: (temperature: string, pressure: string): string =>
      `Temperature from ${temperature}, pressure from ${pressure}.`,
    span: (low: string, high: string): string => `${low} to ${high}`,
    place: (T: string, p: string): string => `${T} and ${p}`,
    lines: 'Lines',
    line: (name: string, from: string, to: string): string => `${name}, from ${from} to ${to}`,
    points: 'Points',
    states: 'States',
    noStates: 'No states yet.',
    item: (parts: readonly string[]): string => `${parts.filter(Boolean).join(', ')}.`,
    outside: 'outside this map',
  },

  /** The workplace round the map. */
  editor: {
    tool: 'Simmerline',
    map: 'map',
    mapHelp:
      'Pressure–temperature map. Arrows move the map or nudge the selected thing, plus and minus zoom, Escape lets go; a double click places a state, or a step of the selected run.',
    undo: 'Undo',
    redo: 'Redo',
    undoOf: (name: string): string => `Undo: ${name}`,
    redoOf: (name: string): string => `Redo: ${name}`,
    sheets: 'Sheets',
    open: 'Open',
    save: 'Save',
    export: 'Export',
    title: 'name of the sheet',
    untitled: 'Untitled sheet',
    showRun: 'Show the run',
    showWhole: 'Show the whole map',
    noRoom: (texts: readonly string[]): string => `No room on this map for: ${texts.join(', ')}`,
    onThisMap: 'On this map',
    selected: (tag: string, name: string | null): string => (name ? `${tag}, ${name}` : tag),
    axesAndPage: 'Axes and page',
    temperature: 'Temperature',
    pressure: 'Pressure',
    secondScale: 'Second scale',
    page: 'Page',
    fields: 'Fields',
    add: 'Add a state',
    remove: 'Remove',
    duplicate: 'Duplicate',
    copy: 'Copy',
    copyOf: (title: string): string => `${title || 'Untitled sheet'}, copy`,
    close: 'Close',
    dismiss: 'Dismiss',
    state: 'State',
    run: 'Run',
    heat: 'Heat',
    clock: 'Clock',
    meets: 'Meets',
    work: 'Work',
    left: 'Left as vapour',
    trouble: 'Not reached',
    step: 'Step',
    levelT: (tag: string): string => `temperature of ${tag}`,
    levelP: (tag: string): string => `pressure of ${tag}`,
    addStep: 'Add a step',
    addPath: 'Plan a run',
    total: 'Whole run',
    removeStep: (tag: string): string => `Remove the step to ${tag}`,
    whatIsDone: 'What is done',
    phase: 'Phase',
    next: 'Next boundary',
    density: 'Density',
    enthalpy: 'Enthalpy',
    margins: 'Margins',
    readingLine: 'a reading of your gauge or thermometer',
    readingHint: '1.2 bar(g) or 118 °C',
    underPointer: 'under the pointer',
    here: 'here',
    isAbsolute: (text: string, atSeaLevel: boolean): string =>
      `is ${text} ${atSeaLevel ? 'at sea level' : 'here'}`,
    boilsAt: (substance: string, text: string): string => `pure ${substance} boils at ${text}`,
    sublimesAt: (substance: string, text: string): string =>
      `pure ${substance} sublimes at ${text}`,
    noLine: (substance: string): string =>
      `${substance} neither boils nor sublimes at this reading`,
    demos: 'Demo sheets',
    demosIntro: 'Invented plants, real equations. Open one and change it.',
    openFile: 'Open a sheet or an exported figure',
    badFile: (name: string, reason: string): string => `${name} was not opened: ${reason}`,
    notASheet: 'it holds no Simmerline sheet.',
    notRead: 'it could not be read.',
    opened: (title: string): string => `Opened “${title}”.`,
    exported: (name: string): string =>
      `Exported ${name}. The sheet travels inside and opens again from it.`,
    lostWorker: 'The calculation was interrupted and started again; nothing was lost.',
    broke: 'This sheet could not be shown. It is kept on this device as it was; open another one.',
    failed: (message: string): string => `This sheet could not be evaluated: ${message}`,
    scales: {
      linear: 'linear',
      logarithmic: 'logarithmic',
      reciprocal: 'reciprocal',
    },
    kinds: { absolute: 'absolute', gauge: 'gauge' },
    fieldChoices: { faint: 'faint', full: 'stronger', none: 'none' },
    colourChoices: { colour: 'colour', grey: 'grey', black: 'black on white' },
    noSecond: 'none',
    gaugeAt: (site: string): string => `gauge at ${site}`,
    tagOf: (what: string, tag: string): string => `${what} of ${tag}`,
    vapourFraction: 'vapour fraction',
    logNeedsAbsolute: 'A logarithmic axis is absolute; the second scale can show gauge readings.',
    logAboveZero: 'A logarithmic axis starts above zero pressure.',
    rangeOrder: 'The low end must lie below the high end.',
    pageSize: 'A page is 40 mm to 2 m on a side.',
    fractionRange: 'A fraction lies between 0 and 100 %.',
    kept: 'kept on this device',
    copyNotKept: 'This device could not keep the copy: its storage is full or closed.',
    keeping: '…',
    keptSheets: 'Sheets on this device',
    removeSheet: (title: string): string => `Remove ${title || 'untitled sheet'} from this device`,
    tooLarge: 'it is larger than 40 MB.',
    show: 'show',
    hide: 'hide',
    basis: 'Basis',
    source: 'Source',
    cautions: 'Cautions',
    runTable: 'Run table',
    fold: 'Fold the run table',
    unfold: 'Show the run table',
    readingLineName: 'Reading line',
    to: 'to',
    lowest: (what: string): string => `lowest ${what.toLowerCase()} on the map`,
    highest: (what: string): string => `highest ${what.toLowerCase()} on the map`,
    unitOf: (what: string): string => `unit of ${what.toLowerCase()}`,
    scaleOf: (what: string): string => `scale of ${what.toLowerCase()}`,
    kindOf: 'kind of pressure on the axis',
    pageWidth: 'page width',
    pageHeight: 'page height',
    printColours: 'print colours',
    sites: 'Where readings are taken',
    addSite: 'Add a site',
    newSite: (n: number): string => `Site ${n}`,
    barometerRange: 'A barometer reads an absolute pressure between 20 and 120 kPa.',
    newMap: 'A new map',
    drawIt: 'Draw it',
    autosave: {
      notKept:
        'This device could not keep the sheet (its storage is full or closed). Your work is still here: save it as a file.',
      keptAgain: 'The sheet is kept on this device again.',
      otherTab: 'changes from another tab',
      ownCopy:
        'Another tab changed this sheet at the same time. Both are kept; this tab goes on with a copy of its own.',
    },
  },

  /** A site as a sentence: where it is and how well its instruments tell. */
  siteSentence: (
    site: {
      readonly name: string;
      readonly altitude: string;
      readonly barometer: string;
      readonly barometerError: string;
      readonly gaugeClass: string;
      readonly low: string | null;
      readonly high: string | null;
      readonly probe: string;
      readonly local: string;
    },
    classes: readonly string[],
  ): Sentence => {
    const of = (what: string): string => `${what} at ${site.name}`;
    const gauge: Sentence =
      site.low === null
        ? []
        : [
            ', from ',
            {
              field: 'low',
              text: site.low,
              name: of('low end of the gauge'),
              quantity: 'pressure',
            },
            ' to ',
            {
              field: 'high',
              text: site.high ?? '',
              name: of('high end of the gauge'),
              quantity: 'pressure',
            },
          ];
    return [
      { field: 'name', text: site.name, name: 'name of the site', hint: 'name' },
      ', ',
      {
        field: 'altitude',
        text: site.altitude,
        name: of('altitude'),
        quantity: 'altitude',
        hint: 'altitude',
      },
      ', barometer ',
      {
        field: 'barometer',
        text: site.barometer,
        name: of('barometer'),
        quantity: 'pressure',
        hint: 'not read',
      },
      `: air at ${site.local} ± `,
      {
        field: 'barometerError',
        text: site.barometerError,
        name: of('error of the air pressure'),
        quantity: 'pressureDifference',
        hint: 'not said',
      },
      '. Gauge ',
      {
        field: 'class',
        text: site.gaugeClass,
        name: of('gauge class'),
        choices: [
          { value: 'none', label: 'class not said' },
          ...classes.map((c) => ({ value: c, label: `class ${c}` })),
        ],
      },
      ...gauge,
      '. Probe ± ',
      {
        field: 'probe',
        text: site.probe,
        name: of('error of the probe'),
        quantity: 'temperatureDifference',
        hint: 'not said',
      },
      '.',
    ];
  },

  /** What an item is called and where it is read. */
  itemSentence: (
    item: { readonly tag: string; readonly name: string; readonly site: string },
    sites: readonly { readonly value: string; readonly label: string }[],
  ): Sentence => [
    'Called ',
    { field: 'name', text: item.name, name: `name of ${item.tag}`, hint: 'nothing yet' },
    ...(sites.length > 1
      ? [
          ', read at ',
          { field: 'site', text: item.site, name: `site of ${item.tag}`, choices: sites },
        ]
      : []),
    '.',
  ],

  /** What a blank start asks, in one sentence. */
  startSentence: (
    start: { readonly substance: string; readonly where: string; readonly kind: string },
    list: readonly { readonly value: string; readonly label: string }[],
  ): Sentence => [
    'A map of ',
    { field: 'substance', text: start.substance, name: 'substance', choices: list },
    ' for a plant at ',
    { field: 'where', text: start.where, name: 'altitude or barometer of the plant', hint: '0 m' },
    ', whose pressures are read as ',
    {
      field: 'kind',
      text: start.kind,
      name: 'kind of pressure',
      choices: [
        { value: 'gauge', label: 'gauge' },
        { value: 'absolute', label: 'absolute' },
      ],
    },
    '.',
  ],

  /** What a step is, as the run table's first words; told by what it does where that is known. */
  stepKinds: (does: {
    readonly T: number;
    readonly p: number;
  }): Readonly<Record<Step['kind'], string>> => ({
    constantPressure:
      does.T > 0
        ? 'Heat at constant pressure'
        : does.T < 0
          ? 'Cool at constant pressure'
          : 'Go at constant pressure',
    constantTemperature:
      does.p > 0
        ? 'Raise the pressure at constant temperature'
        : does.p < 0
          ? 'Lower the pressure at constant temperature'
          : 'Go at constant temperature',
    ramp: 'Go in a straight line',
    follow: 'Follow the line',
    hold: 'Hold',
    throttle: 'Let down through a valve',
    isentropic:
      does.p > 0
        ? 'Pump or compress without heat'
        : does.p < 0
          ? 'Expand in a machine without heat'
          : 'Compress or expand without heat',
    closedVessel:
      does.T > 0
        ? 'Heat in a closed vessel'
        : does.T < 0
          ? 'Cool in a closed vessel'
          : 'Heat or cool in a closed vessel',
    heatAmount: 'Add heat at constant pressure',
  }),
  endKinds: {
    T: 'a temperature',
    p: 'a pressure',
    'T p': 'temperature and pressure',
    saturation: 'the boiling line',
    melting: 'the melting line',
    sublimation: 'the sublimation line',
    'T saturation': 'the boiling line at a temperature of',
    'p saturation': 'the boiling line at a pressure of',
    'T vapourFraction': 'a temperature, with a share of',
    'p vapourFraction': 'a pressure, with a share of',
    'T solidFraction': 'a temperature, with a share of',
    'p solidFraction': 'a pressure, with a share of',
    'T heat': 'a temperature, with a heat of',
    'p heat': 'a pressure, with a heat of',
    heat: 'a heat of',
    'p efficiency': 'a pressure, at an efficiency of',
    vapourFraction: 'a share of vapour',
    solidFraction: 'a share of solid',
    none: 'as it is',
  },
  /** The start of a path as a sentence. */
  pathStart: (slots: readonly Slot[], pair: Slot): Sentence =>
    slots.some(({ field }) => field.endsWith('Fraction'))
      ? [
          'Start on the line at ',
          slots[0]!,
          ' with ',
          slots[1]!,
          slots[1]!.field === 'solidFraction' ? ' solid' : ' vapour',
          pair,
        ]
      : ['Start at ', slots[0]!, ' and ', slots[1]!, pair],
  /** Pairs of givens that pin a state. */
  pairs: {
    'T p': 'temperature and pressure',
    'T vapourFraction': 'boiling at a temperature',
    'p vapourFraction': 'boiling at a pressure',
  },
  pairOf: (tag: string): string => `what is given of ${tag}`,
  /** A step as a sentence: what it does, to where, how long, and what becomes of the steam. */
  stepSentence: (parts: {
    readonly kind: Slot;
    readonly end: Slot | null;
    readonly values: readonly Slot[];
    readonly time: Slot;
    readonly vapour: Slot | null;
    readonly vapourName: string;
  }): Sentence => [
    parts.kind,
    ...(parts.end && !(parts.kind.text === 'hold' && parts.values.length === 0)
      ? [' to ', ...(parts.end.quiet ? [] : [parts.end])]
      : []),
    ...parts.values.flatMap((slot, i) => [
      i === 0 ? (parts.end?.quiet ? '' : ' ') : ' and ',
      slot,
      slot.field === 'end.vapourFraction' ? ` ${parts.vapourName}` : '',
      slot.field === 'end.solidFraction' ? ' solid' : '',
      slot.field === 'end.efficiency' ? ' efficiency' : '',
    ]),
    ...(parts.end?.quiet ? [parts.end] : []),
    parts.time.text.includes('/')
      ? ' at '
      : parts.kind.text === 'hold' && parts.values.length === 0
        ? ' for '
        : ' in ',
    parts.time,
    ...(parts.vapour ? [`, ${parts.vapourName} `, parts.vapour] : []),
  ],
  noTime: 'no time said',
  /** Names of the fields of a step, read aloud. */
  stepField: (
    what:
      | 'kind'
      | 'end'
      | 'T'
      | 'p'
      | 'vapourFraction'
      | 'solidFraction'
      | 'heat'
      | 'efficiency'
      | 'time'
      | 'vapour',
    tag: string,
  ): string =>
    `${
      {
        kind: 'kind of step',
        end: 'end of step',
        T: 'temperature',
        p: 'pressure',
        vapourFraction: 'share of vapour',
        solidFraction: 'share of solid',
        heat: 'heat',
        efficiency: 'isentropic efficiency',
        time: 'time or rate',
        vapour: 'what becomes of the vapour',
      }[what]
    } of ${tag}`,
  /** The vapour of a substance, in running text. */
  vapourName: (substance: string): string => (substance === 'water' ? 'steam' : 'vapour'),
  vapourWays: { stays: 'stays', leaves: 'leaves' },
  encounterAt: (what: string, at: string): string => `${what} at ${at}`,
  stateNote: (what: string, at: string): string => `${what}, ${at}`,
  onLine: (id: string): string =>
    id.startsWith('melting') ? 'melting' : id.startsWith('sublimation') ? 'subliming' : 'boiling',
  vapourShare: (text: string): string => `${text} vapour`,
  massLeft: (text: string): string => `${text} left`,

  /** A state as a sentence with figures in it. */
  stateSentence: (slots: readonly Slot[], pair: Slot): Sentence =>
    slots.some(({ field }) => field === 'vapourFraction')
      ? ['On the boiling line at ', slots[0]!, ', ', slots[1]!, ' vapour', pair]
      : ['At ', slots[0]!, ' and ', slots[1]!, pair],

  quantity: quantityNames,
  reading: readingSentence,
  sheetIssue: sheetIssueSentence,
  problem: (problem: StateProblem, told: ProblemTold = problemTold): string =>
    problemSentence(problem, told),
  terminal,
};

export type Words = typeof en;
