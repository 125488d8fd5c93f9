import type { CheckResult } from '../../core/checks/check.ts';
import type { Medium } from '../../core/equilibrium/medium.ts';
import { formatNumber, fromSI, type UnitId } from '../../core/units/index.ts';
import type { Words } from '../words/en.ts';

/** A line of a card: what, and what is known of it, with where it comes from. */
export interface CardRow {
  readonly label: string;
  readonly text: string;
  readonly source?: string;
}
export interface CardSection {
  readonly title: string;
  readonly rows: readonly CardRow[];
  /** A sentence under the rows. */
  readonly note?: string;
}

/** A number with the digits it has, at most seven. */
function shown(value: number, unit: UnitId, label: string = unit): string {
  const rounded = Number(fromSI(value, unit).toPrecision(7));
  if (rounded !== 0 && Math.abs(rounded) < 1e-3) {
    const [mantissa, power] = rounded.toExponential().split('e');
    return `${mantissa} × 10^${power!.replace('-', '−')} ${label}`;
  }
  const decimals = (String(rounded).split('.')[1] ?? '').length;
  return `${formatNumber(rounded, decimals)} ${label}`;
}

const pressureText = (p: number): string =>
  p < 1e3 ? shown(p, 'Pa') : p < 1e6 ? shown(p, 'kPa') : shown(p, 'MPa');
const temperatureText = (T: number): string => shown(T, 'K');

/** What there is to say of a substance: identity, fixed points, equations, uncertainty, hazards. */
export function cardSections(m: Medium, words: Words): readonly CardSection[] {
  const { card, terminal, basis } = words;
  const { substance: s } = m;
  const range = (low: number, high: number): string =>
    card.range(temperatureText(low), temperatureText(high));
  const point = ({ T, p, rho }: { T: number; p: number; rho?: number }): string =>
    [temperatureText(T), pressureText(p), ...(rho === undefined ? [] : [shown(rho, 'kg/m³')])].join(
      ', ',
    );
  const { critical, fluid } = s;
  const own =
    Math.abs(critical.equation.T / critical.T - 1) > 1e-6 ||
    Math.abs(critical.equation.rho / critical.rho - 1) > 1e-4;
  const kinds = [
    ['melting', s.melting],
    ['sublimation', s.sublimation],
  ] as const;
  return [
    {
      title: card.identity,
      rows: [
        { label: card.names, text: [s.name, ...s.otherNames].join(', ') },
        { label: card.formula, text: s.formula },
        { label: card.cas, text: s.cas },
        ...(s.refrigerant ? [{ label: card.refrigerant, text: s.refrigerant }] : []),
        {
          label: card.molarMass,
          text: `${Number((s.molarMass.value * 1000).toPrecision(10))} g/mol`,
          source: s.molarMass.source,
        },
      ],
    },
    {
      title: card.points,
      rows: [
        { label: card.critical, text: point(critical), source: critical.source },
        ...(own
          ? [
              {
                label: card.criticalOfEquation,
                text: point(critical.equation),
                source: fluid.formulation,
              },
            ]
          : []),
        ...s.triplePoints.map((t) => ({
          label: card.triple(t.phases),
          text: point(t),
          source: t.source,
        })),
        {
          label: card.normal[s.normalPoint.kind],
          text: temperatureText(s.normalPoint.T),
          source: s.normalPoint.source,
        },
      ],
    },
    {
      title: card.equations,
      rows: [
        { label: card.fluid, text: fluid.formulation, source: fluid.source },
        ...(fluid.printed ? [{ label: card.printed, text: fluid.printed }] : []),
        {
          label: card.validity,
          text: `${range(fluid.validity.Tmin, fluid.validity.Tmax)}, ${card.upTo(pressureText(fluid.validity.pmax))}`,
          source: fluid.validity.source,
        },
        ...(fluid.validity.vapourTmin < fluid.validity.Tmin
          ? [{ label: card.vapour, text: temperatureText(fluid.validity.vapourTmin) }]
          : []),
        ...s.solids.map((solid) => ({
          label: card.solid(solid.solid),
          text: `${range(solid.validity.Tmin, solid.validity.Tmax)}, ${card.upTo(pressureText(solid.validity.pmax))}`,
          source: solid.source,
        })),
        ...kinds.flatMap(([kind, lines]) =>
          lines.map((line) => ({
            label: card.line(kind, line.form, lines.length === 1),
            text: `${basis[line.route]}, ${range(line.range.Tmin, line.range.Tmax)}`,
            source: line.equation.citation ?? line.equation.source,
          })),
        ),
        ...s.absent.map(({ boundary, reason }) => ({
          label: card.absent(boundary),
          text: card.absence[reason],
        })),
        { label: card.saturation, text: s.saturation.pressure.source },
        { label: card.zero, text: terminal.referenceState[s.referenceState] },
      ],
    },
    {
      title: card.uncertainty,
      rows: s.uncertainty.map(({ quantity, figure, source, provenance }) => ({
        label: quantity,
        text: figure,
        source: `${source}, ${card.provenance[provenance]}`,
      })),
    },
    {
      title: card.hazards,
      rows: s.hazards.map((code) => ({ label: '', text: card.hazard[code] })),
      note: card.hazardsDefer,
    },
  ];
}

/** How many values of each source are met. */
export function checkSummary(checks: readonly CheckResult[], words: Words): CardSection {
  const { card } = words;
  const groups = new Map<string, { source: string; origin: string; all: number; met: number }>();
  for (const { source, provenance, passes } of checks) {
    const key = `${source}|${provenance}`;
    const group = groups.get(key) ?? {
      source,
      origin: card.origin[provenance] ?? provenance,
      all: 0,
      met: 0,
    };
    group.all++;
    if (passes) group.met++;
    groups.set(key, group);
  }
  const met = checks.filter(({ passes }) => passes).length;
  return {
    title: card.checks,
    rows: [...groups.values()].map((g) => ({
      label: '',
      text: card.checkGroup(g.source, g.origin, g.met, g.all),
    })),
    note: card.checkSummary(met, checks.length),
  };
}
