import type { Motion } from './Motion.ts';

/** A current of constant slope [A/s]: voltages that do not depend on it, across the inductor. */
export function straightMotion(slope: number): Motion {
  return {
    advance(state, time, integral) {
      const from = state[0]!;
      const to = from + slope * time;
      state[0] = to;
      integral[0]! += 0.5 * (from + to) * time;
    },
    timeToReach(state, _watched, rampSlope, level, from, to) {
      const rise = slope + rampSlope;
      const missing = level - state[0]!;
      if (missing <= rise * from) return from;
      const time = rise > 0 ? missing / rise : Number.POSITIVE_INFINITY;
      return time <= to ? time : Number.POSITIVE_INFINITY;
    },
    timeToZero(state, to) {
      if (state[0]! <= 0 && slope <= 0) return 0;
      const time = slope < 0 ? -state[0]! / slope : Number.POSITIVE_INFINITY;
      return time <= to ? time : Number.POSITIVE_INFINITY;
    },
  };
}

/** No current, and nothing that drives one. */
export const stillMotion: Motion = {
  advance() {},
  timeToReach: () => Number.POSITIVE_INFINITY,
  timeToZero: () => 0,
};
