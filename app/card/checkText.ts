import type { CheckResult } from '../../core/checks/check.ts';
import type { Words } from '../words/en.ts';

/** A check as a person reads it: all three numbers in the unit that the source prints. */
export interface CheckText {
  readonly state: string;
  readonly quantity: string;
  readonly published: string;
  readonly computed: string;
  readonly deviation: string;
  /** Deviation as a share of the tolerance. */
  readonly share: string;
}

const symbols: Readonly<Record<string, string>> = {
  rho: 'ρ',
  kappaT: 'κT',
  kappaS: 'κS',
  dh: 'Δh',
  ds: 'Δs',
  alpha: 'α',
  beta: 'β',
  phi: 'φ',
  dpdT: 'dp/dT',
};

/** ρL is written ρ′, ρV ρ″, as tables of saturation do. */
function quantity(property: string): string {
  const [, base, side] = /^(rho|h|s|u|cp|cv|w)([LV])$/.exec(property) ?? [null, property, ''];
  const symbol = symbols[base] ?? base;
  return symbol + (side === 'L' ? '′' : side === 'V' ? '″' : '');
}

const state = ({ at }: CheckResult): string =>
  [
    at.correlation ?? '',
    at.T === undefined ? '' : `T = ${Number(at.T.toPrecision(9))} K`,
    at.p === undefined ? '' : `p = ${Number(at.p.toPrecision(9))} Pa`,
    at.rho === undefined ? '' : `ρ = ${Number(at.rho.toPrecision(9))} kg/m³`,
  ]
    .filter(Boolean)
    .join(', ');

/** A check in the unit of its source; one digit more is computed than is printed. */
export function checkText(check: CheckResult, words: Words): CheckText {
  const { printed, value, computed, deviation, toleranceAbs } = check;
  const number = parseFloat(printed);
  const unit = /[^\d.e+-].*$/.exec(printed)?.[0].trim() ?? '';
  // Only Celsius has another zero; every other unit is a factor.
  const factor = unit === '°C' ? 1 : value === 0 || number === 0 ? 1 : number / value;
  const mantissa = /^-?(\d+)(?:\.(\d*))?/.exec(printed);
  const digits = Math.max(3, (mantissa![1]! + (mantissa![2] ?? '')).replace(/^0+/, '').length) + 1;
  return {
    state: state(check),
    quantity: quantity(check.property),
    published: printed.replace(/m3\b/, 'm³').replace(/^-/, '−'),
    computed:
      computed === null
        ? words.card.undefined
        : String(Number((number + deviation! * factor).toPrecision(Math.min(16, digits)))).replace(
            /^-/,
            '−',
          ),
    deviation:
      deviation === null
        ? words.card.undefined
        : Number((deviation * factor).toPrecision(2))
            .toString()
            .replace(/^-/, '−'),
    share: deviation === null ? '' : `${Math.round((100 * Math.abs(deviation)) / toleranceAbs)} %`,
  };
}
