/**
 * Heights for labels in a column: as near to their own as a least distance allows, inside the bounds.
 *
 * Less the distance times the rank, the heights have only to be in order, and the nearest ordered heights
 * are the means of pooled neighbours (isotonic regression).
 * @param wanted heights, in any order
 * @returns heights in the order given
 */
export function spreadLabels(
  wanted: readonly number[],
  distance: number,
  bounds: { readonly low: number; readonly high: number },
): readonly number[] {
  const order = wanted.map((_, index) => index).sort((a, b) => wanted[a]! - wanted[b]! || a - b);
  const ordered = pooled(order.map((index, rank) => wanted[index]! - rank * distance));
  const highest = bounds.high - (wanted.length - 1) * distance;
  const placed: number[] = [];
  order.forEach((index, rank) => {
    placed[index] = Math.max(bounds.low, Math.min(highest, ordered[rank]!)) + rank * distance;
  });
  return placed;
}

/** The nearest values that never fall, by least squares: neighbours out of order share their mean. */
function pooled(values: readonly number[]): readonly number[] {
  const pools: { mean: number; size: number }[] = [];
  for (const value of values) {
    let pool = { mean: value, size: 1 };
    for (let last = pools.at(-1); last !== undefined && last.mean > pool.mean; last = pools.at(-1)) {
      const size = last.size + pool.size;
      pool = { mean: (last.mean * last.size + pool.mean * pool.size) / size, size };
      pools.pop();
    }
    pools.push(pool);
  }
  return pools.flatMap(({ mean, size }) => Array.from({ length: size }, () => mean));
}
