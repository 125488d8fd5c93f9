import type { PathState, StepResult } from '../../core/sheet/results.ts';
import type { Step } from '../../core/process/steps/index.ts';
import { stepKinds } from '../../core/process/steps/index.ts';
import {
  absolutePressure,
  formatReading,
  parseReading,
  ReadingError,
  type Quantity,
  type UnitId,
} from '../../core/units/index.ts';
import { pressureReading, temperatureReading } from '../store/edits.ts';
import type { Words } from '../words/en.ts';
import type { Sentence, Slot } from '../words/sentence.ts';

/** What fields of a step need from round about. */
export interface StepPlace {
  readonly words: Words;
  readonly tag: string;
  readonly substance: string;
  /** States at the step's start and end, as far as the run gets. */
  readonly from: PathState | undefined;
  readonly to: PathState | undefined;
  readonly result: StepResult | undefined;
  readonly pressureKind: 'gauge' | 'absolute';
  readonly local: number;
  readonly temperatureUnit: UnitId;
  readonly pressureUnit: UnitId;
}

/** Encounters at which vapour forms or vanishes. */
const changes: ReadonlySet<string> = new Set([
  'boils',
  'condenses',
  'sublimes',
  'deposits',
  'follows',
]);

type End = Readonly<Record<string, string | undefined>>;

const quantities: Readonly<Record<string, Quantity>> = {
  T: 'temperature',
  p: 'pressure',
  vapourFraction: 'fraction',
  solidFraction: 'fraction',
  heat: 'specificEnergy',
  efficiency: 'fraction',
};

/** Ways for a step of a kind to end, as one word each: the end's keys, a boundary by its own kind. */
const endsOf: Readonly<Record<Step['kind'], readonly string[]>> = {
  constantPressure: [
    'T',
    'saturation',
    'melting',
    'sublimation',
    'vapourFraction',
    'solidFraction',
  ],
  constantTemperature: [
    'p',
    'saturation',
    'melting',
    'sublimation',
    'vapourFraction',
    'solidFraction',
  ],
  ramp: ['T p', 'T saturation', 'p saturation'],
  follow: ['T', 'p', 'T vapourFraction', 'p vapourFraction', 'T heat', 'p heat', 'T solidFraction'],
  hold: ['none', 'heat', 'vapourFraction', 'solidFraction'],
  throttle: ['p', 'saturation', 'sublimation'],
  isentropic: ['p', 'p efficiency'],
  closedVessel: ['T', 'p', 'saturation', 'melting'],
  heatAmount: ['heat'],
};

/** Kinds of step whose vapour may leave. */
const mayVent: ReadonlySet<Step['kind']> = new Set([
  'constantPressure',
  'constantTemperature',
  'ramp',
  'follow',
  'hold',
]);

const vapourOf = (step: Step): 'stays' | 'leaves' | undefined =>
  'vapour' in step ? step.vapour : undefined;

function endWord(step: Step): string {
  const end: End = step.end;
  const keys = Object.keys(end).filter((key) => end[key] !== undefined && key !== 'boundary');
  const boundary = end.boundary;
  if (boundary !== undefined) return keys.length > 0 ? `${keys[0]} ${boundary}` : boundary;
  if (keys.length === 0) return 'none';
  return ['T', 'p', 'vapourFraction', 'solidFraction', 'heat', 'efficiency']
    .filter((key) => keys.includes(key))
    .join(' ');
}

const canonicalText = (text: string, quantity: Quantity, place: StepPlace): string =>
  parseReading(text, quantity, {
    ...(quantity === 'temperature' ? { defaultUnit: place.temperatureUnit } : {}),
    ...(quantity === 'pressure'
      ? { defaultUnit: place.pressureUnit, defaultKind: place.pressureKind }
      : {}),
    ...(quantity === 'fraction' ? { defaultUnit: '%' as const } : {}),
    ...(quantity === 'specificEnergy' ? { defaultUnit: 'kJ/kg' as const } : {}),
  }).text;

/** A step's sentence with its fields. */
export function stepSentence(step: Step, place: StepPlace): Sentence {
  const { words, tag, result, from, to } = place;
  const does = {
    T: from && to ? Math.sign(+(to.T - from.T).toFixed(6)) : 0,
    p: from && to ? Math.sign(+(to.p - from.p).toPrecision(9)) : 0,
  };
  const labels = words.stepKinds(does);
  const ends = endsOf[step.kind];
  const word = endWord(step);
  const end: End = step.end;
  const slot = (field: keyof typeof quantities): Slot => ({
    field: `end.${field}`,
    text:
      end[field] === undefined
        ? ''
        : formatReading(parseReading(end[field], quantities[field]!), words.decimal),
    name: words.stepField(field as 'T', tag),
    quantity: quantities[field]!,
  });
  const values = ['T', 'p', 'vapourFraction', 'solidFraction', 'heat', 'efficiency'].filter(
    (key) => end[key] !== undefined,
  );
  const names = words.endKinds as Readonly<Record<string, string>>;
  const twoPhase =
    [from, to].some((s) => (s?.state.parts.length ?? 1) > 1) ||
    (result?.encounters.some(({ code }) => changes.has(code)) ?? false);
  const vapour: Slot | null =
    mayVent.has(step.kind) && (twoPhase || vapourOf(step) !== undefined)
      ? {
          field: 'vapour',
          text: vapourOf(step) ?? 'stays',
          name: words.stepField('vapour', tag),
          choices: (['stays', 'leaves'] as const).map((value) => ({
            value,
            label: words.vapourWays[value],
          })),
        }
      : null;
  return words.stepSentence({
    kind: {
      field: 'kind',
      text: step.kind,
      name: words.stepField('kind', tag),
      choices: stepKinds.map(({ kind }) => ({ value: kind, label: labels[kind] })),
    },
    end:
      ends.length > 1
        ? {
            field: 'end',
            text: word,
            name: words.stepField('end', tag),
            quiet: !/saturation|melting|sublimation/.test(word),
            choices: [...new Set([...ends, word])].map((value) => ({
              value,
              label: names[value] ?? value,
            })),
          }
        : null,
    values: values.map(slot),
    time: {
      field: 'time',
      text: timeText(step, words),
      name: words.stepField('time', tag),
      hint: words.noTime,
    },
    vapour,
    vapourName: words.vapourName(place.substance),
  });
}

function timeText(step: Step, words: Words): string {
  if (step.time !== undefined) return formatReading(parseReading(step.time, 'time'), words.decimal);
  return step.rate ?? '';
}

/** A step of another kind, or with another sort of end, that ends where this one does. */
function reshaped(step: Step, kind: Step['kind'], word: string, place: StepPlace): Step {
  const at = place.to ?? place.from;
  const old: End = step.end;
  const T = old.T ?? temperatureReading(at?.T ?? 373.15, place.temperatureUnit, 0.1).text;
  const p =
    old.p ??
    pressureReading(at?.p ?? place.local, place.pressureUnit, place.pressureKind, place.local, 1000)
      .text;
  const ends: Readonly<Record<string, End>> = {
    T: { T },
    p: { p },
    'T p': { T, p },
    saturation: { boundary: 'saturation' },
    melting: { boundary: 'melting' },
    sublimation: { boundary: 'sublimation' },
    'T saturation': { T, boundary: 'saturation' },
    'p saturation': { p, boundary: 'saturation' },
    vapourFraction: { vapourFraction: old.vapourFraction ?? '50 %' },
    solidFraction: { solidFraction: old.solidFraction ?? '50 %' },
    'T vapourFraction': { T, vapourFraction: old.vapourFraction ?? '10 %' },
    'p vapourFraction': { p, vapourFraction: old.vapourFraction ?? '10 %' },
    'T solidFraction': { T, solidFraction: old.solidFraction ?? '50 %' },
    'T heat': { T, heat: old.heat ?? '0 kJ/kg' },
    'p heat': { p, heat: old.heat ?? '0 kJ/kg' },
    heat: { heat: old.heat ?? '0 kJ/kg' },
    'p efficiency': { p, efficiency: old.efficiency ?? '75 %' },
    none: {},
  };
  const { id, time, rate } = step;
  const vapour = mayVent.has(kind) ? vapourOf(step) : undefined;
  return {
    id,
    kind,
    ...(time !== undefined ? { time } : {}),
    ...(rate !== undefined && kind !== 'hold' && kind !== 'heatAmount' ? { rate } : {}),
    ...(vapour !== undefined ? { vapour } : {}),
    end: ends[word]!,
  };
}

/** The step after a figure in its sentence was changed; throws ReadingError for what cannot be read. */
export function withField(step: Step, field: string, text: string, place: StepPlace): Step {
  if (field === 'kind') {
    const kind = stepKinds.find((k) => k.kind === text)?.kind ?? step.kind;
    return reshaped(step, kind, endsOf[kind][0]!, place);
  }
  if (field === 'end') return reshaped(step, step.kind, text, place);
  if (field === 'vapour')
    return { ...step, vapour: text === 'leaves' ? 'leaves' : 'stays' } as Step;
  if (field === 'time') return withTime(step, text);
  const key = field.replace(/^end\./, '');
  const taken = canonicalText(text, quantities[key]!, place);
  if (key === 'p')
    absolutePressure(
      parseReading(taken, 'pressure', { defaultKind: place.pressureKind }),
      place.local,
    );
  return { ...step, end: { ...step.end, [key]: taken } } as Step;
}

/** A time, or a rate of temperature or pressure, whichever the text is; nothing takes both away. */
function withTime(step: Step, text: string): Step {
  const rest = { ...step };
  delete rest.time;
  delete rest.rate;
  if (text.trim() === '') return rest;
  const problems: unknown[] = [];
  for (const quantity of ['time', 'temperatureRate', 'pressureRate'] as const) {
    try {
      const { text: taken } = parseReading(
        text,
        quantity,
        quantity === 'time' ? { defaultUnit: 'min' } : {},
      );
      return quantity === 'time' ? { ...rest, time: taken } : { ...rest, rate: taken };
    } catch (error) {
      if (!(error instanceof ReadingError)) throw error;
      problems.push(error);
    }
  }
  throw problems[0];
}
