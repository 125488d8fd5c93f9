import type { View } from '../../core/sheet/schema.ts';
import {
  absolutePressure,
  formatReading,
  parseReading,
  temperature,
  type Quantity,
  type UnitId,
} from '../../core/units/index.ts';
import { withView } from '../store/edits.ts';
import { airAt } from '../store/places.ts';
import type { Sentence, Slot } from '../words/sentence.ts';
import { useApp, useAppStore, useWords } from './context.ts';
import { Figured } from './Figured.tsx';
import { Folding } from './Folding.tsx';
import { withRanges } from './mapHands.ts';
import { tried } from './say.ts';

const temperatureUnits = ['°C', 'K', '°F'] as const;
const pressureUnits: readonly UnitId[] = [
  'Pa',
  'hPa',
  'kPa',
  'MPa',
  'bar',
  'mbar',
  'psi',
  'atm',
  'Torr',
  'mmHg',
  'inHg',
  'kgf/cm²',
] as const;

/** Axes and page, as sentences. */
export function AxesAndPage() {
  const store = useAppStore();
  const words = useWords();
  const e = words.editor;
  const sheet = useApp((s) => s.sheet)!;
  const results = useApp((s) => s.results);
  const map = results?.maps[0];
  const view = sheet.views[0]!;
  if (!map) return null;
  const local = airAt(sheet, results, view.pressure.site);
  const change = (name: string, make: (v: View) => View): void =>
    store.getState().edit(name, (s) => withView(s, view.id, make));
  const choices = (list: readonly string[], labels: Readonly<Record<string, string>> = {}) =>
    list.map((value) => ({ value, label: labels[value] ?? value }));
  const current = withRanges(view, { T: map.T.range, p: map.p.range }, local);
  const [Tlow, Thigh] = current.temperature.range!;
  const [plow, phigh] = current.pressure.range!;
  const bare = (text: string, quantity: Quantity): string => {
    const r = parseReading(text, quantity);
    return formatReading({ ...r, kind: 'unstated' }, words.decimal).replace(/\u00a0.*$/, '');
  };
  const quantity = (field: string, text: string, name: string, q: Quantity): Slot => ({
    field,
    text,
    name,
    quantity: q,
  });
  const choice = (
    field: string,
    text: string,
    name: string,
    list: ReturnType<typeof choices>,
  ): Slot => ({ field, text, name, choices: list });

  const commit = (field: string, text: string): string | null => {
    const T = { low: map.T.range[0], high: map.T.range[1] };
    const p = { low: map.p.range[0], high: map.p.range[1] };
    switch (field) {
      case 'T.low':
      case 'T.high': {
        const read = tried(words, () =>
          temperature(parseReading(text, 'temperature', { defaultUnit: view.temperature.unit })),
        );
        if ('trouble' in read) return read.trouble;
        T[field === 'T.low' ? 'low' : 'high'] = read.ok;
        if (!(T.high > T.low)) return e.rangeOrder;
        change('temperature range', (v) =>
          withRanges(v, { T: [T.low, T.high], p: map.p.range }, local),
        );
        return null;
      }
      case 'p.low':
      case 'p.high': {
        const read = tried(words, () => {
          const r = parseReading(text, 'pressure', {
            defaultUnit: view.pressure.unit as UnitId,
            defaultKind: view.pressure.kind,
          });
          return r.kind === 'absolute' && r.value === 0 ? 0 : absolutePressure(r, local);
        });
        if ('trouble' in read) return read.trouble;
        p[field === 'p.low' ? 'low' : 'high'] = read.ok;
        if (!(p.high > p.low)) return e.rangeOrder;
        if (view.pressure.scale === 'logarithmic' && p.low <= 0) return e.logAboveZero;
        change('pressure range', (v) =>
          withRanges(v, { T: map.T.range, p: [p.low, p.high] }, local),
        );
        return null;
      }
      case 'T.unit':
        change('temperature unit', (v) =>
          withRanges(
            { ...v, temperature: { ...v.temperature, unit: text as View['temperature']['unit'] } },
            { T: map.T.range, p: map.p.range },
            local,
          ),
        );
        return null;
      case 'T.scale':
        change('temperature scale', (v) => ({
          ...v,
          temperature: { ...v.temperature, scale: text as View['temperature']['scale'] },
        }));
        return null;
      case 'p.unit':
        change('pressure unit', (v) =>
          withRanges(
            { ...v, pressure: { ...v.pressure, unit: text } },
            { T: map.T.range, p: map.p.range },
            local,
          ),
        );
        return null;
      case 'p.scale': {
        const scale = text as View['pressure']['scale'];
        change('pressure scale', (v) => {
          // What suits a logarithmic axis leaves a linear one empty, and the other way round.
          const range = scale === v.pressure.scale ? v.pressure.range : null;
          const kind = scale === 'logarithmic' ? 'absolute' : v.pressure.kind;
          return { ...v, pressure: { ...v.pressure, scale, range, kind } };
        });
        return null;
      }
      case 'p.kind':
        if (text === 'gauge' && view.pressure.scale === 'logarithmic') {
          store.getState().tell('news', e.logNeedsAbsolute);
          return null;
        }
        change('kind of pressure', (v) =>
          withRanges(
            { ...v, pressure: { ...v.pressure, kind: text as View['pressure']['kind'] } },
            { T: map.T.range, p: map.p.range },
            local,
          ),
        );
        return null;
      case 'second': {
        if (text === 'none') change('second scale', (v) => ({ ...v, second: null }));
        else {
          const [kind, site] = text.split('@') as ['gauge' | 'absolute', string | undefined];
          change('second scale', (v) => ({
            ...v,
            second: { unit: v.second?.unit ?? 'bar', kind, ...(site ? { site } : {}) },
          }));
        }
        return null;
      }
      case 'second.unit':
        change('second scale', (v) => ({ ...v, second: v.second && { ...v.second, unit: text } }));
        return null;
      case 'width':
      case 'height': {
        const read = tried(words, () => parseReading(text, 'length', { defaultUnit: 'mm' }));
        if ('trouble' in read) return read.trouble;
        if (!(read.ok.value >= 0.04 && read.ok.value <= 2)) return e.pageSize;
        change('page size', (v) => ({ ...v, page: { ...v.page, [field]: read.ok.text } }));
        return null;
      }
      case 'colours':
        change('print colours', (v) => ({ ...v, colours: text as View['colours'] }));
        return null;
      case 'fields':
        change('fields', (v) => ({ ...v, fields: text as View['fields'] }));
        return null;
    }
    return null;
  };

  const seconds = [
    { value: 'none', label: e.noSecond },
    ...(sheet.sites.length > 0
      ? sheet.sites.map(({ id, name }) => ({ value: `gauge@${id}`, label: e.gaugeAt(name) }))
      : [{ value: 'gauge', label: e.kinds.gauge }]),
    { value: 'absolute', label: e.kinds.absolute },
  ];
  const second = view.second;
  const secondValue = !second
    ? 'none'
    : second.kind === 'absolute'
      ? 'absolute'
      : sheet.sites.length > 0
        ? `gauge@${second.site ?? sheet.sites[0]!.id}`
        : 'gauge';
  const rows: readonly (readonly [string, Sentence])[] = [
    [
      e.temperature,
      [
        quantity('T.low', bare(Tlow, 'temperature'), e.lowest(e.temperature), 'temperature'),
        ` ${e.to} `,
        quantity('T.high', bare(Thigh, 'temperature'), e.highest(e.temperature), 'temperature'),
        ' ',
        choice('T.unit', view.temperature.unit, e.unitOf(e.temperature), choices(temperatureUnits)),
        ', ',
        choice(
          'T.scale',
          view.temperature.scale,
          e.scaleOf(e.temperature),
          choices(['linear', 'reciprocal'], e.scales),
        ),
      ],
    ],
    [
      e.pressure,
      [
        quantity('p.low', bare(plow, 'pressure'), e.lowest(e.pressure), 'pressure'),
        ` ${e.to} `,
        quantity('p.high', bare(phigh, 'pressure'), e.highest(e.pressure), 'pressure'),
        ' ',
        choice('p.unit', view.pressure.unit, e.unitOf(e.pressure), choices(pressureUnits)),
        ' ',
        choice('p.kind', view.pressure.kind, e.kindOf, choices(['absolute', 'gauge'], e.kinds)),
        ', ',
        choice(
          'p.scale',
          view.pressure.scale,
          e.scaleOf(e.pressure),
          choices(['linear', 'logarithmic'], e.scales),
        ),
      ],
    ],
    [
      e.secondScale,
      [
        choice('second', secondValue, e.secondScale, seconds),
        ...(second
          ? [
              ', ',
              choice('second.unit', second.unit, e.unitOf(e.secondScale), choices(pressureUnits)),
            ]
          : []),
      ],
    ],
    [
      e.page,
      [
        quantity('width', view.page.width, e.pageWidth, 'length'),
        ' × ',
        quantity('height', view.page.height, e.pageHeight, 'length'),
        ', ',
        choice(
          'colours',
          view.colours,
          e.printColours,
          choices(['colour', 'grey', 'black'], e.colourChoices),
        ),
      ],
    ],
    [
      e.fields,
      [choice('fields', view.fields, e.fields, choices(['faint', 'full', 'none'], e.fieldChoices))],
    ],
  ];
  return (
    <Folding title={e.axesAndPage}>
      <dl className="sentences">
        {rows.map(([name, sentence]) => (
          <div key={name}>
            <dt>{name}</dt>
            <dd>
              <Figured sentence={sentence} commit={commit} />
            </dd>
          </div>
        ))}
      </dl>
      <p className="actions">
        <button
          onClick={() =>
            change('show the run', (v) => ({
              ...v,
              temperature: { ...v.temperature, range: null },
              pressure: { ...v.pressure, range: null },
            }))
          }
        >
          {e.showRun}
        </button>
      </p>
    </Folding>
  );
}
