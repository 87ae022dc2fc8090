/**
 * The value times a power of ten, with no more rounding than the shortest decimal text of the value implies.
 *
 * A product would not do: 4.7 × 1e-6 is not the number nearest to 0.0000047, and texts would not round-trip.
 */
export function shiftDecimal(value: number, places: number): number {
  const [mantissa, exponent] = value.toExponential().split('e');
  return Number(`${mantissa}e${Number(exponent) + places}`);
}
