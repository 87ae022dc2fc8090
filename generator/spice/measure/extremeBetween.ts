import { segmentsBetween } from './segments.ts';

/** Lowest and highest value of a stretch of a waveform, and when each is first reached. */
export interface Extremes {
  readonly low: number;
  readonly lowAt_s: number;
  readonly high: number;
  readonly highAt_s: number;
}

/**
 * Extremes of a waveform between two times, the interpolated ends included.
 *
 * @returns values in the column's unit
 * @throws RangeError when the times lie outside the samples or do not increase
 */
export function extremeBetween(time_s: Float64Array, column: Float64Array, t0: number, t1: number): Extremes {
  let low = Number.POSITIVE_INFINITY;
  let high = Number.NEGATIVE_INFINITY;
  let lowAt_s = t0;
  let highAt_s = t0;
  const visit = (t: number, value: number) => {
    if (value < low) {
      low = value;
      lowAt_s = t;
    }
    if (value > high) {
      high = value;
      highAt_s = t;
    }
  };
  for (const { fromTime_s, toTime_s, from, to } of segmentsBetween(time_s, column, t0, t1)) {
    visit(fromTime_s, from);
    visit(toTime_s, to);
  }
  return { low, lowAt_s, high, highAt_s };
}
