import { segmentsBetween } from './segments.ts';

/**
 * Slope of the straight line that fits a waveform best between two times.
 *
 * Least squares over time, not over samples: engines crowd their samples around events, and each stretch of
 * time shall count by its length. With u the time from the middle and T the whole,
 *
 *   slope = (12/T³) · ∫ u·y dt
 *
 * which is exact for the straight pieces between samples.
 *
 * @returns in the column's unit per second
 * @throws RangeError when the times lie outside the samples or do not increase
 */
export function slopeBetween(time_s: Float64Array, column: Float64Array, t0: number, t1: number): number {
  const segments = segmentsBetween(time_s, column, t0, t1);
  const middle = (t0 + t1) / 2;
  // Any constant has no part in the integral; without the offset fewer digits cancel.
  const offset = segments[0]?.from ?? 0;
  let moment = 0;
  for (const { fromTime_s, toTime_s, from, to } of segments) {
    const ua = fromTime_s - middle;
    const ub = toTime_s - middle;
    const ya = from - offset;
    const yb = to - offset;
    moment += ((toTime_s - fromTime_s) / 6) * (2 * ua * ya + ua * yb + ub * ya + 2 * ub * yb);
  }
  return (12 * moment) / (t1 - t0) ** 3;
}
