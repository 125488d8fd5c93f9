import type { CautionCode } from '../../core/cautions/caution.ts';
import type { BoundaryKind } from '../../core/map/boundary.ts';
import type { Direction, NoMargin } from '../../core/map/margins.ts';
import type { PhaseName } from '../../core/equilibrium/phase.ts';

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
  site: (name: string, local: string): string => `${name}: local atmosphere ${local}.`,
  noSource: 'beyond the published range',
  outsideFrame: (tags: readonly string[]): string =>
    `${tags.join(', ')} ${tags.length > 1 ? 'lie' : 'lies'} outside this map`,
  description: (substance: string, states: number): string =>
    `Pressure–temperature map of ${substance}${states > 0 ? ` with ${states} state${states > 1 ? 's' : ''}` : ''}`,
};

export type Words = typeof en;
