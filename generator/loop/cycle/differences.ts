/**
 * Jacobian by central differences: a row per value, a column per unknown.
 *
 * @param scale size of the largest unknown: one near zero is moved by a thousandth of what this would be
 * @param share step, of the unknown that is moved; the error goes with its square
 */
export function differences(
  evaluate: (unknowns: readonly number[]) => number[],
  at: readonly number[],
  scale: number,
  share: number,
): number[][] {
  const columns = at.map((value, place) => {
    const step = share * Math.max(Math.abs(value), 1e-3 * scale);
    const beside = (sign: number) => evaluate(at.map((x, other) => (other === place ? x + sign * step : x)));
    const above = beside(1);
    const below = beside(-1);
    return above.map((high, row) => (high - below[row]!) / (2 * step));
  });
  return columns[0]!.map((_, row) => columns.map((column) => column[row]!));
}
