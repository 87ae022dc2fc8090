import { shiftDecimal } from '../../base/shiftDecimal.ts';
import { type DimensionName, dimensions } from './dimensions.ts';

const prefixes = ['f', 'p', 'n', 'µ', 'm', '', 'k', 'M', 'G', 'T'];

/** The prefix that leaves one to three digits before the point, and its power of ten. */
export function prefixFor(
  value: number,
  name: DimensionName,
): { readonly prefix: string; readonly places: number } {
  const { written } = dimensions[name];
  if (value === 0 || name === 'ratio' || name === 'number') return { prefix: '', places: written.places };
  const decade = Number(shiftDecimal(value, -written.places).toExponential().split('e')[1]);
  const step = Math.min(4, Math.max(-5, Math.floor(decade / 3)));
  return { prefix: prefixes[step + 5]!, places: written.places + 3 * step };
}

/** One value in the shortest digits that read back to the very number: `4.7 µH`, `45 mV/µs`, `90 %`. */
export function valueText(value: number, name: DimensionName): string {
  const { prefix, places } = prefixFor(value, name);
  const { unit } = dimensions[name].written;
  const digits = String(shiftDecimal(value, -places));
  return unit === '' ? digits : `${digits} ${prefix}${unit}`;
}
