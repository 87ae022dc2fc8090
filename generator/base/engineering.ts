import { shiftDecimal } from './shiftDecimal.ts';

const prefixOf: ReadonlyMap<number, string> = new Map([
  [-15, 'f'],
  [-12, 'p'],
  [-9, 'n'],
  [-6, 'µ'],
  [-3, 'm'],
  [0, ''],
  [3, 'k'],
  [6, 'M'],
  [9, 'G'],
  [12, 'T'],
]);

/**
 * A value in engineering notation: `engineering(4.7e-6, 'F', 3)` is `4.70 µF`.
 *
 * For people only; µ is U+00B5. A value without a unit, or in %, takes no prefix. For a compound unit give the
 * value in the unit's own measure: `engineering(0.045, 'V/µs', 2)` is `45 mV/µs`.
 * @param digits significant digits, 1 or more
 * @throws RangeError when the value is not finite
 */
export function engineering(value: number, unit: string, digits = 3): string {
  if (!Number.isFinite(value)) throw new RangeError(`no notation for ${value}`);
  if (value === 0) return withUnit('0', unit);
  const rounded = Number(value.toPrecision(digits));
  const exponent = takesPrefix(unit) ? prefixExponent(rounded) : 0;
  return withUnit(digitsOf(shiftDecimal(rounded, -exponent), digits), `${prefixOf.get(exponent)}${unit}`);
}

function takesPrefix(unit: string): boolean {
  return unit !== '' && unit !== '%' && unit !== '°';
}

/** The multiple of three below the value's decade, as far as prefixes reach. */
function prefixExponent(value: number): number {
  const decade = Number(value.toExponential().split('e')[1]);
  return Math.min(12, Math.max(-15, 3 * Math.floor(decade / 3)));
}

/** Never an exponent where plain digits do: 470 to two digits is `470`, not `4.7e+2`. */
function digitsOf(mantissa: number, digits: number): string {
  const text = mantissa.toPrecision(digits);
  return text.includes('e') ? String(mantissa) : text;
}

function withUnit(number: string, unit: string): string {
  if (unit === '') return number;
  return `${number} ${unit}`;
}
