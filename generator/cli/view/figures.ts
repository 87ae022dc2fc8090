import { engineering } from '../../base/engineering.ts';

/** `0.823`, `1.64`: three decimals below one, three digits above. */
export function plainNumber(value: number): string {
  const text = Math.abs(value) < 1 ? value.toFixed(3) : value.toPrecision(3);
  return minus(text.includes('e') ? String(Number(text)) : text);
}

/** A hyphen is no minus sign. */
function minus(text: string): string {
  return text.replace(/^-/, '−');
}

export function percent(ratio: number, digits = 2): string {
  return `${minus(String(Number((100 * ratio).toPrecision(digits))))} %`;
}

/** A figure with its unit; `1` and nothing are plain numbers. */
export function figure(value: number | null, unit: string): string {
  if (value === null) return 'no figure';
  if (unit === '' || unit === '1') return plainNumber(value);
  if (unit === 'V/s') return minus(engineering(value / 1e6, 'V/µs'));
  return minus(engineering(value, unit === 'Ohm' ? 'Ω' : unit));
}

/** A voltage that somebody chose: `8 V`, not `8.00 V`. */
export function volts(value: number): string {
  return minus(`${Number(value.toPrecision(4))} V`);
}
