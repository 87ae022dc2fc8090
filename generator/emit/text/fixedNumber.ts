/**
 * A number as every SPICE engine and spreadsheet reads it: digits, a point, an exponent.
 *
 * Never an engineering suffix: `M` is milli to SPICE and mega to people. Without `digits` it is the
 * shortest text that reads back to the very value; with it, to that many significant digits.
 * @throws RangeError when the value is not finite
 */
export function fixedNumber(value: number, digits?: number): string {
  if (!Number.isFinite(value)) throw new RangeError(`no literal for ${value}`);
  const rounded = digits === undefined ? value : Number(value.toPrecision(digits));
  return String(rounded === 0 ? 0 : rounded).replace('e+', 'e');
}
