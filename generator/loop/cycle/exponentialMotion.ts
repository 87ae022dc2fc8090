import type { Motion } from './Motion.ts';

/** Below this r·t the integral's closed form cancels; the series is then exact to rounding. */
const seriesBelow = 1e-2;
/** Times nearer than this share of the range are one. */
const resolution = 4e-16;

/**
 * A current through a resistance: di/dt = s − r·i, with s = V/L [A/s] and r = R/L > 0 [1/s].
 *
 *   i(t) = i0 + (s − r·i0)·(1 − e^(−r·t))/r
 */
export function exponentialMotion(s: number, r: number): Motion {
  const rise = (time: number) => -Math.expm1(-r * time) / r;
  return {
    advance(state, time, integral) {
      const from = state[0]!;
      const slope = s - r * from;
      state[0] = from + slope * rise(time);
      integral[0]! += from * time + slope * riseIntegral(r, time);
    },
    timeToReach(state, _watched, rampSlope, level, from, to) {
      const start = state[0]!;
      const slope = s - r * start;
      return firstReach(slope, r, rampSlope, level - start, from, to);
    },
    timeToZero(state, to) {
      const start = state[0]!;
      if (start <= 0 && s <= 0) return 0;
      // Zero where e^(−r·t) = s/(s − r·i0).
      const time = s < 0 ? Math.log1p((r * start) / -s) / r : Number.POSITIVE_INFINITY;
      return time <= to ? time : Number.POSITIVE_INFINITY;
    },
  };
}

/** ∫(1 − e^(−r·τ))/r dτ over [0, t]. */
function riseIntegral(r: number, time: number): number {
  const z = r * time;
  if (z > seriesBelow) return (time - -Math.expm1(-z) / r) / r;
  return time * time * (1 / 2 - z / 6 + (z * z) / 24 - z ** 3 / 120 + z ** 4 / 720 - z ** 5 / 5040);
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
    const short = missing - (slope * -Math.expm1(-r * time)) / r - rampSlope * time;
    if (short <= 0) return time;
    const now = slope * Math.exp(-r * time);
    const steepness = now + rampSlope;
    const bend = Math.abs(r * now);
    const root = Math.sqrt(steepness * steepness + 2 * bend * short);
    const step = (2 * short) / (steepness + root);
    if (time + step <= time || step <= resolution * to) return time;
    time += step;
    if (!(time <= to)) return Number.POSITIVE_INFINITY;
  }
}
