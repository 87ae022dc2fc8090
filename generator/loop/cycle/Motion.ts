/** What is watched: the comparator's signal, the inductor current, or whether a current at zero is driven again. */
export type Watched = 'trip' | 'current' | 'restart';

/**
 * How the states move while no switch does.
 *
 * Works in place, on state vectors that the caller owns: nothing is allocated from cycle to cycle.
 */
export interface Motion {
  /** Moves the state on by a time [s], and adds its integral over that time. */
  advance(state: Float64Array, time_s: number, integral: Float64Array): void;
  /**
   * The first time in [from, to] at which watched + slope·t ≥ level, t counted from the state given;
   * infinity where there is none.
   */
  timeToReach(
    state: Float64Array,
    watched: Watched,
    slope_A_per_s: number,
    level_A: number,
    from_s: number,
    to_s: number,
  ): number;
  /** The first time up to `to` at which the current has fallen to zero; infinity where there is none. */
  timeToZero(state: Float64Array, to_s: number): number;
}
