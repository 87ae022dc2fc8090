/**
 * Heights for labels in a column: each as near to its own as a least distance allows, inside the bounds.
 *
 * @param wanted heights, in any order
 * @returns heights in the order given
 */
export function spreadLabels(
  wanted: readonly number[],
  distance: number,
  bounds: { readonly low: number; readonly high: number },
): readonly number[] {
  const order = wanted.map((_, index) => index).sort((a, b) => wanted[a]! - wanted[b]! || a - b);
  const placed = order.map((index) => Math.min(bounds.high, Math.max(bounds.low, wanted[index]!)));
  for (let pass = 0; pass < 100 && pushApart(placed, distance); pass += 1);
  const overrun = Math.max(0, (placed.at(-1) ?? 0) - bounds.high);
  const shifted = placed.map((height) => height - overrun);
  for (let rank = shifted.length - 2; rank >= 0; rank -= 1)
    shifted[rank] = Math.min(shifted[rank]!, shifted[rank + 1]! - distance);
  const result: number[] = [];
  order.forEach((index, rank) => {
    result[index] = shifted[rank]!;
  });
  return result;
}

/** One pass over the neighbours, both giving way alike; false when all stood far enough apart. */
function pushApart(heights: number[], distance: number): boolean {
  let moved = false;
  for (let rank = 1; rank < heights.length; rank += 1) {
    const lack = distance - (heights[rank]! - heights[rank - 1]!);
    if (lack <= 1e-6) continue;
    heights[rank - 1]! -= lack / 2;
    heights[rank]! += lack / 2;
    moved = true;
  }
  return moved;
}
