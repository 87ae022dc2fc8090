/** How one clock edge's sample follows from the one before: i[n+1] = slope·i[n] + intercept. */
export interface AffineCycleMap {
  /** The cycle ratio α where the samples are inductor currents. */
  readonly slope: number;
  /** In the samples' unit. */
  readonly intercept: number;
  /** Root mean square of what the line leaves unexplained, in the samples' unit. */
  readonly residual: number;
  /** Root mean square of the samples about their mean: far above `residual`, or the slope says nothing. */
  readonly spread: number;
}

/**
 * Fits i[n+1] = α·i[n] + c to samples at successive clock edges, by least squares.
 *
 * Neither the steady-state value nor the size of a perturbation need be known.
 *
 * @param skipAfter each n whose pair (n, n+1) does not count: a perturbation fell between the two
 * @throws RangeError when fewer than two pairs remain or their samples are all alike: no perturbation
 */
export function affineCycleMap(
  samples: readonly number[],
  skipAfter: readonly number[] = [],
): AffineCycleMap {
  const skipped = new Set(skipAfter);
  const pairs = samples
    .slice(1)
    .flatMap((after, n) => (skipped.has(n) ? [] : [{ before: samples[n]!, after }]));
  if (pairs.length < 2) throw new RangeError(`${pairs.length} pairs of samples do not define a line`);

  const meanBefore = mean(pairs.map((pair) => pair.before));
  const meanAfter = mean(pairs.map((pair) => pair.after));
  const variance = mean(pairs.map((pair) => (pair.before - meanBefore) ** 2));
  if (!(variance > 0)) throw new RangeError('the samples are all alike or no numbers: nothing perturbs them');

  const covariance = mean(pairs.map((pair) => (pair.before - meanBefore) * (pair.after - meanAfter)));
  const slope = covariance / variance;
  const intercept = meanAfter - slope * meanBefore;
  const squares = pairs.map(({ before, after }) => (after - meanAfter - slope * (before - meanBefore)) ** 2);
  return { slope, intercept, residual: Math.sqrt(mean(squares)), spread: Math.sqrt(variance) };
}

function mean(values: readonly number[]): number {
  return values.reduce((sum, value) => sum + value, 0) / values.length;
}
