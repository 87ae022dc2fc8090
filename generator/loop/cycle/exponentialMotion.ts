import type { Motion } from './Motion.ts';

/** Below this r·t closed forms cancel, and cost more; the series is then exact to rounding. */
const seriesBelow = 1e-2;
/** Times nearer than this share of the range are one. */
const resolution = 4e-16;

/**
 * A current through a resistance: di/dt = s − r·i, with s = V/L [A/s] and r = R/L > 0 [1/s].
 *
 *   i(t) = i0 + (s − r·i0)·(1 − e^(−r·t))/r
 */
export function exponentialMotion(s: number, r: number): Motion {
  return {
    advance(state, time, integral) {
      const from = state[0]!;
      const slope = s - r * from;
      state[0] = from + slope * rise(r, time);
      integral[0]! += from * time + slope * riseIntegral(r, time);
    },
    timeToReach(state, _watched, rampSlope, level, from, to) {
      const start = state[0]!;
      return firstReach(s - r * start, r, rampSlope, level - start, from, to);
    },
    timeToZero(state, to) {
      const start = state[0]!;
      if (start <= 0 && s <= 0) return 0;
      // It falls more and more slowly; e^(−r·t) = s/(s − r·i0) where it is zero.
      if (s >= 0 || start + (s - r * start) * to > 0) return Number.POSITIVE_INFINITY;
      const time = Math.log1p((r * start) / -s) / r;
      return time <= to ? time : Number.POSITIVE_INFINITY;
    },
  };
}

/** (1 − e^(−r·t))/r */
function rise(r: number, time: number): number {
  const z = r * time;
  if (z > seriesBelow) return -Math.expm1(-z) / r;
  return time * (1 - (z / 2) * (1 - (z / 3) * (1 - (z / 4) * (1 - (z / 5) * (1 - (z / 6) * (1 - z / 7))))));
}

/** ∫(1 − e^(−r·τ))/r dτ over [0, t]. */
function riseIntegral(r: number, time: number): number {
  const z = r * time;
  if (z > seriesBelow) return (time - rise(r, time)) / r;
  return ((time * time) / 2) * (1 - (z / 3) * (1 - (z / 4) * (1 - (z / 5) * (1 - (z / 6) * (1 - z / 7)))));
}

/**
 * First time at which slope·(1 − e^(−r·t))/r + rampSlope·t ≥ missing.
 *
 * From the left by f + f′τ + Mτ²/2 = 0, M bounding |f″| from there on: Newton's method that never steps
 * over the first root, and converges as fast.
 */
function firstReach(
  slope: number,
  r: number,
  rampSlope: number,
  missing: number,
  from: number,
  to: number,
): number {
  let time = from;
  for (;;) {
    const risen = rise(r, time);
    const short = missing - slope * risen - rampSlope * time;
    if (short <= 0) return time;
    const now = slope * (1 - r * risen);
    const steepness = now + rampSlope;
    const bend = Math.abs(r * now);
    const root = Math.sqrt(steepness * steepness + 2 * bend * short);
    const step = (2 * short) / (steepness + root);
    if (time + step <= time || step <= resolution * to) return time;
    time += step;
    if (!(time <= to)) return Number.POSITIVE_INFINITY;
  }
}
