import { format } from '../../core/units/index.ts';

type Mark = '.' | ',';

/** Heat with its sign, kJ/kg: to ones from 100, else to tenths, small ones to hundredths. */
export function heatText(heat: number, decimal: Mark): string {
  const size = Math.abs(heat);
  const decimals = size >= 1e5 ? 0 : size >= 1e3 ? 1 : 2;
  const text = format(heat, 'kJ/kg', { decimals, decimal });
  // What rounds to nothing has no sign.
  return heat > 0 && /[1-9]/.test(text.replace('kJ/kg', '')) ? `+${text}` : text;
}

/** A time in minutes, with a decimal only where it has one. */
export function timeText(seconds: number, decimal: Mark): string {
  const minutes = seconds / 60;
  const decimals = Math.abs(minutes - Math.round(minutes)) < 0.005 ? 0 : 1;
  return format(seconds, 'min', { decimals, decimal });
}
