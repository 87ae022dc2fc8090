import { firstAtOrAfter, valueAt } from './valueAt.ts';

/** A straight piece of a sampled waveform. */
export interface Segment {
  readonly fromTime_s: number;
  readonly toTime_s: number;
  readonly from: number;
  readonly to: number;
}

/**
 * The waveform between two times as straight pieces, its ends interpolated.
 *
 * @throws RangeError when the times lie outside the samples or do not increase
 */
export function segmentsBetween(
  time_s: Float64Array,
  column: Float64Array,
  t0: number,
  t1: number,
): readonly Segment[] {
  if (!(t1 > t0)) throw new RangeError(`no time passes from ${t0} s to ${t1} s`);
  const end = { time_s: t1, value: valueAt(time_s, column, t1) };
  let before = { time_s: t0, value: valueAt(time_s, column, t0) };
  const segments: Segment[] = [];
  const connect = (after: typeof before) => {
    // Engines may print a breakpoint twice.
    if (after.time_s > before.time_s) {
      segments.push({
        fromTime_s: before.time_s,
        toTime_s: after.time_s,
        from: before.value,
        to: after.value,
      });
    }
    before = after;
  };
  for (let i = firstAtOrAfter(time_s, t0); (time_s[i] ?? Number.POSITIVE_INFINITY) < t1; i++) {
    connect({ time_s: time_s[i] ?? t1, value: column[i] ?? Number.NaN });
  }
  connect(end);
  return segments;
}
