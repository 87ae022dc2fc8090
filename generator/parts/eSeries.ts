import type { SeriesName } from '../spec/Specification.ts';

const e24 = [10, 11, 12, 13, 15, 16, 18, 20, 22, 24, 27, 30, 33, 36, 39, 43, 47, 51, 56, 62, 68, 75, 82, 91];

/** Three-digit series are rounded powers; the one exception of IEC 60063 is 9.20 in E192. */
function rounded(count: number): number[] {
  return Array.from({ length: count }, (_, n) => {
    const value = Math.round(100 * 10 ** (n / count));
    return value === 919 ? 920 : value;
  });
}

/** Every `step`-th value, scaled to three digits. */
function everyNth(step: number): number[] {
  return e24.filter((_, index) => index % step === 0).map((value) => value * 10);
}

const mantissas: Record<SeriesName, () => readonly number[]> = {
  E6: () => everyNth(4),
  E12: () => everyNth(2),
  E24: () => everyNth(1),
  E48: () => rounded(48),
  E96: () => rounded(96),
  E192: () => rounded(192),
};

const known = new Map<SeriesName, readonly number[]>();

/**
 * The preferred values of one decade, 100 to 999.
 *
 * @source IEC 60063, preferred number series for resistors and capacitors (from memory)
 */
export function decadeOf(series: SeriesName): readonly number[] {
  const found = known.get(series) ?? mantissas[series]();
  known.set(series, found);
  return found;
}

/** Values of a decade that begins at 10^exponent, by series and exponent. */
const decades = new Map<string, readonly number[]>();

/** Exact decimals, ascending: those of `E6` from 100e-12 begin at 100e-12, 150e-12. */
function valuesFrom(series: SeriesName, exponent: number): readonly number[] {
  const key = `${series} ${exponent}`;
  const found = decades.get(key) ?? decadeOf(series).map((mantissa) => Number(`${mantissa}e${exponent - 2}`));
  decades.set(key, found);
  return found;
}

/** Rounding of a limit's own arithmetic that is forgiven. */
const slack = 1e-12;

/** All preferred values in a closed range, ascending. */
export function preferredValues(series: SeriesName, low: number, high: number): number[] {
  const first = Math.floor(Math.log10(low));
  const last = Math.ceil(Math.log10(high));
  const values: number[] = [];
  for (let exponent = first; exponent <= last; exponent += 1) values.push(...valuesFrom(series, exponent));
  return values.filter((value) => value >= low * (1 - slack) && value <= high * (1 + slack));
}

/** Whether a value belongs to a series, in whatever decade. */
export function isPreferred(series: SeriesName, value: number): boolean {
  return preferredValues(series, value, value).length > 0;
}

/** The largest preferred value that is not above `limit`. */
export function preferredAtMost(series: SeriesName, limit: number): number {
  const exponent = Math.floor(Math.log10(limit * (1 + slack)));
  const below = (value: number) => value <= limit * (1 + slack);
  // The logarithm of a power of ten may round to either side.
  return valuesFrom(series, exponent).findLast(below) ?? valuesFrom(series, exponent - 1).findLast(below)!;
}

/** The smallest preferred value that is not below `limit`. */
export function preferredAtLeast(series: SeriesName, limit: number): number {
  const exponent = Math.floor(Math.log10(limit * (1 - slack)));
  const above = (value: number) => value >= limit * (1 - slack);
  return valuesFrom(series, exponent).find(above) ?? valuesFrom(series, exponent + 1).find(above)!;
}
