/**
 * Value of a sampled column at a time, by linear interpolation.
 *
 * @param time_s increasing sample times [s], at least one
 * @param column as long as `time_s`
 * @throws RangeError when `t` lies outside the samples
 */
export function valueAt(time_s: Float64Array, column: Float64Array, t: number): number {
  const after = firstAtOrAfter(time_s, t);
  const t1 = time_s[after];
  const y1 = column[after];
  if (t1 === undefined || y1 === undefined || !(t >= (time_s[0] ?? Number.NaN))) {
    throw new RangeError(`${t} s is outside the samples, ${time_s[0]} s to ${time_s.at(-1)} s`);
  }
  const t0 = time_s[after - 1];
  const y0 = column[after - 1];
  if (t0 === undefined || y0 === undefined || t1 === t) return y1;
  return y0 + ((y1 - y0) * (t - t0)) / (t1 - t0);
}

/** Index of the first sample at or after `t`; the number of samples where there is none. */
export function firstAtOrAfter(time_s: Float64Array, t: number): number {
  let low = 0;
  let high = time_s.length;
  while (low < high) {
    const middle = (low + high) >>> 1;
    if ((time_s[middle] ?? Number.POSITIVE_INFINITY) < t) low = middle + 1;
    else high = middle;
  }
  return low;
}
