import { engineering } from '../base/engineering.ts';

/** `0.823`, `1.64`: three decimals below one, three digits above, as the terminal prints them. */
export function plainNumber(value: number): string {
  const text = Math.abs(value) < 1 ? value.toFixed(3) : value.toPrecision(3);
  return typeset(text.includes('e') ? String(Number(text)) : text);
}

/** As many digits as are asked for; for numbers put into formulas. */
export function digits(value: number, count: number): string {
  return typeset(String(Number(value.toPrecision(count))));
}

export function percent(ratio: number, count = 2): string {
  return typeset(`${Number((100 * ratio).toPrecision(count))} %`);
}

/** A deviation with its sign. */
export function signedPercent(ratio: number, count = 2): string {
  return `${ratio > 0 ? '+' : ''}${percent(ratio, count)}`;
}

/** A figure with its unit; `1` and nothing are plain numbers, slopes are per microsecond. */
export function figure(value: number | null, unit: string, count = 3): string {
  if (value === null) return '–';
  if (unit === '' || unit === '1') return plainNumber(value);
  if (unit === 'V/s') return typeset(engineering(value / 1e6, 'V/µs', count));
  if (unit === 'A/s') return typeset(engineering(value / 1e6, 'A/µs', count));
  return typeset(engineering(value, unit === 'Ohm' ? 'Ω' : unit, count));
}

/** A voltage that somebody chose: `8 V`, not `8.00 V`. */
export function volts(value: number): string {
  return typeset(`${Number(value.toPrecision(4))} V`);
}

export function interval(low: string, high: string): string {
  return low === high ? low : `${low} to ${high}`;
}

/** A real minus sign, and a figure that stays with its unit. */
export function typeset(text: string): string {
  return text.replace(/(^|\s|\()-(?=\d)/g, '$1−').replace(/ /g, '\u00a0');
}
