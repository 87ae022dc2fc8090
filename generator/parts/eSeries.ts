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

/** Exact decimal value of a mantissa of 100 to 999 at a decade: `preferredValue(220, -12)` is 220e-12. */
function preferredValue(mantissa: number, exponent: number): number {
  return Number(`${mantissa}e${exponent}`);
}

/** All preferred values in a closed range, ascending. */
export function preferredValues(series: SeriesName, low: number, high: number): number[] {
  const first = Math.floor(Math.log10(low)) - 2;
  const last = Math.ceil(Math.log10(high)) - 2;
  const values: number[] = [];
  for (let exponent = first; exponent <= last; exponent += 1)
    for (const mantissa of decadeOf(series)) values.push(preferredValue(mantissa, exponent));
  return values.filter((value) => value >= low * (1 - 1e-12) && value <= high * (1 + 1e-12));
}

/** The largest preferred value that is not above `limit`. */
export function preferredAtMost(series: SeriesName, limit: number): number {
  return preferredValues(series, limit / 2, limit).at(-1)!;
}

/** The smallest preferred value that is not below `limit`. */
export function preferredAtLeast(series: SeriesName, limit: number): number {
  return preferredValues(series, limit, limit * 2)[0]!;
}

/** The preferred value nearest in ratio. */
export function preferredNearest(series: SeriesName, target: number): number {
  const below = preferredAtMost(series, target);
  const above = preferredAtLeast(series, target);
  return target / below <= above / target ? below : above;
}
