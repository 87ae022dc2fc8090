/** One interval of a cycle: L·di/dt = voltage − ohm·i. */
export interface Interval {
  readonly voltage_V: number;
  readonly ohm: number;
}

/** A stage between its two switching instants, for a constant output voltage. */
export interface DeckStage {
  readonly on: Interval;
  readonly off: Interval;
  readonly inductance_H: number;
  readonly period_s: number;
}

/** The cycle that repeats itself with a given peak current. */
export interface DeckOrbit {
  readonly duty: number;
  readonly valley_A: number;
  readonly peak_A: number;
  /** Slopes just before and just after the trip [A/s]; the second is negative. */
  readonly upSlope_A_per_s: number;
  readonly downSlope_A_per_s: number;
}

/** Halvings of the interval in which the duty lies: to the last digits of a double. */
const halvings = 50;

/**
 * The periodic cycle with its resistances, found by its duty: too short an on-time does not get back to the
 * peak, too long a one overshoots it.
 */
export function deckOrbit(stage: DeckStage, peak_A: number): DeckOrbit {
  const { on, off, period_s } = stage;
  const valley = (duty: number) => currentAfter(stage, off, peak_A, (1 - duty) * period_s);
  const duty = dutyAt((share) => currentAfter(stage, on, valley(share), share * period_s) < peak_A);
  const slope = ({ voltage_V, ohm }: Interval) => (voltage_V - ohm * peak_A) / stage.inductance_H;
  return {
    duty,
    valley_A: valley(duty),
    peak_A,
    upSlope_A_per_s: slope(on),
    downSlope_A_per_s: slope(off),
  };
}

/**
 * A small perturbation of the current from one clock edge to the next, resistances included.
 *
 *   α = e^(−R_on·D·T/L) · (di/dt_off + ma)/(di/dt_on + ma) · e^(−R_off·D′·T/L)
 *
 * with the slopes at the trip; without resistances it is 1 − 1/x. The decays pull α towards nought, the
 * flatter rise at the peak pushes it towards −1: neither is part of x, which counts mean voltages.
 * @source the saltation of the project's loop equations, in one dimension
 */
export function perturbationRatio(stage: DeckStage, orbit: DeckOrbit, rampSlope_A_per_s: number): number {
  const { on, off, period_s, inductance_H } = stage;
  const exponent = (on.ohm * orbit.duty + off.ohm * (1 - orbit.duty)) * (period_s / inductance_H);
  const step = (orbit.downSlope_A_per_s + rampSlope_A_per_s) / (orbit.upSlope_A_per_s + rampSlope_A_per_s);
  return step * Math.exp(-exponent);
}

/**
 * What is left of a shift of the current at one clock edge when the next one comes [A].
 *
 * Exact for any size: with resistances the trip of a large shift finds other slopes than that of a small one.
 */
export function shiftAfterCycle(
  stage: DeckStage,
  orbit: DeckOrbit,
  rampSlope_A_per_s: number,
  shift_A: number,
): number {
  const { on, off, period_s } = stage;
  const control_A = orbit.peak_A + rampSlope_A_per_s * orbit.duty * period_s;
  const start_A = orbit.valley_A + shift_A;
  const risen = (duty: number) => currentAfter(stage, on, start_A, duty * period_s);
  const duty = dutyAt((share) => risen(share) + rampSlope_A_per_s * share * period_s < control_A);
  return currentAfter(stage, off, risen(duty), (1 - duty) * period_s) - orbit.valley_A;
}

/** The duty up to which something holds. */
function dutyAt(holds: (duty: number) => boolean): number {
  let low = 0;
  let high = 1;
  for (let halving = 0; halving < halvings; halving += 1) {
    const duty = (low + high) / 2;
    if (holds(duty)) low = duty;
    else high = duty;
  }
  return (low + high) / 2;
}

/** i·e^(−z) + (V/L)·t·(1 − e^(−z))/z with z = R·t/L, which may be nought. */
function currentAfter(
  { inductance_H }: DeckStage,
  { voltage_V, ohm }: Interval,
  from_A: number,
  time_s: number,
): number {
  const z = (ohm * time_s) / inductance_H;
  const share = z === 0 ? 1 : -Math.expm1(-z) / z;
  return from_A * Math.exp(-z) + (voltage_V / inductance_H) * time_s * share;
}
