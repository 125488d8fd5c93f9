import type { CautionCode } from '../../core/cautions/caution.ts';
import type { BoundaryKind } from '../../core/map/boundary.ts';
import type { Direction, NoMargin } from '../../core/map/margins.ts';
import type { PhaseName } from '../../core/equilibrium/phase.ts';
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
  outsideFrame: (tags: readonly string[]): string =>
    `${tags.join(', ')} ${tags.length > 1 ? 'lie' : 'lies'} outside this map`,
  description: (substance: string, states: number): string =>
    `Pressure–temperature map of ${substance}${states > 0 ? ` with ${states} state${states > 1 ? 's' : ''}` : ''}`,

  /** The workplace round the map. */
  editor: {
    tool: 'Simmerline',
    map: 'map',
    mapHelp:
      'Pressure–temperature map. Arrows move the map or nudge the selected thing, plus and minus zoom, Escape lets go.',
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
    close: 'Close',
    dismiss: 'Dismiss',
    state: 'State',
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
    isAbsolute: (text: string): string => `is ${text} here`,
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
    opened: (title: string): string => `Opened “${title}”.`,
    exported: (name: string): string =>
      `Exported ${name}. The sheet travels inside and opens again from it.`,
    lostWorker: 'The calculation was interrupted and started again; nothing was lost.',
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
    keeping: '…',
    keptSheets: 'Sheets on this device',
    removeSheet: (title: string): string => `Remove ${title || 'untitled sheet'} from this device`,
    tooLarge: 'it is larger than 40 MB.',
    show: 'show',
    hide: 'hide',
    shown: (name: string): string => `${name} shown`,
    basis: 'Basis',
    source: 'Source',
    cautions: 'Cautions',
    runTable: 'Run table',
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
    autosave: {
      notKept:
        'This device could not keep the sheet (its storage is full or closed). Your work is still here: save it as a file.',
      keptAgain: 'The sheet is kept on this device again.',
      otherTab: 'changes from another tab',
      ownCopy:
        'Another tab changed this sheet at the same time. Both are kept; this tab goes on with a copy of its own.',
    },
  },

  /** A state as a sentence with figures in it. */
  stateSentence: (
    item: { readonly T?: string; readonly p?: string; readonly vapourFraction?: string },
    tag: string,
  ): Sentence => {
    const T: Slot = {
      field: 'T',
      text: item.T ?? '',
      name: `temperature of ${tag}`,
      quantity: 'temperature',
    };
    const p: Slot = {
      field: 'p',
      text: item.p ?? '',
      name: `pressure of ${tag}`,
      quantity: 'pressure',
    };
    const x: Slot = {
      field: 'vapourFraction',
      text: item.vapourFraction ?? '',
      name: `vapour fraction of ${tag}`,
      quantity: 'fraction',
    };
    if (item.vapourFraction === undefined) return ['At ', T, ' and ', p];
    return ['On the boiling line at ', item.T === undefined ? p : T, ', ', x, ' vapour'];
  },
};

export type Words = typeof en;
