/**
 * Where a function that is not positive at `low` and positive at `high` changes sign.
 *
 * @returns the last point at which it is not positive, within rounding; an end of the bracket where the
 *   sign does not change inside
 */
export function bisect(excess: (at: number) => number, low: number, high: number): number {
  if (excess(low) > 0) return low;
  if (excess(high) <= 0) return high;
  let [below, above] = [low, high];
  for (let step = 0; step < 200; step += 1) {
    const middle = below + (above - below) / 2;
    if (middle === below || middle === above) break;
    if (excess(middle) > 0) above = middle;
    else below = middle;
  }
  return below;
}
