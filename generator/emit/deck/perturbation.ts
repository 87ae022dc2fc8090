import { followerLag_s } from '../../circuit/DeviceModels.ts';
import { type DeckOrbit, type DeckStage, perturbationRatio, shiftAfterCycle } from './deckOrbit.ts';

/** Cycles simulated, and the clock edges before which the inductor current is shifted. */
export const cyclePlan = { settled: 5, shiftedEdges: [8, 13], total: 18 } as const;

/** Share of the off-time at which the shifting pulse begins and ends. */
const pulseFrom = 0.5;
const pulseTo = 0.95;

/** A voltage pulse in series with the inductor that shifts its current while the switch is off. */
export interface Perturbation {
  readonly shift_A: number;
  /** Corners of the piecewise-linear source: time, voltage, time, voltage … */
  readonly corners: readonly number[];
}

/** Shares of the on-time by which a trip may come earlier, and of what is left to the clocked turn-off later. */
const most = { earlier: 0.4, later: 0.6 } as const;
/** Share of the on-time where the ramp has not settled and is not straight. */
const unsettled = 0.1;
/** Deviation from α at which a shift still counts as small; resistances bend the map. */
const straight = 0.004;
/** On-time after which it has, in time constants of the buffer. */
const lagsToSettle = 10;

/**
 * As large as the clocked turn-off, the shortest on-time and the resistances allow: the cycle map is affine
 * there, so that a large shift only makes the time step's granularity smaller against it.
 *
 * A shift δ moves the trip by δ/(m1 + ma) earlier, and the next one by α times as much.
 */
export function perturbation(
  stage: DeckStage,
  orbit: DeckOrbit,
  rampSlope_A_per_s: number,
  maximumDuty: number,
): Perturbation {
  const { period_s, inductance_H } = stage;
  const ratio = perturbationRatio(stage, orbit, rampSlope_A_per_s);
  const isSettled = orbit.duty * period_s >= lagsToSettle * followerLag_s;
  const earlier = (isSettled ? most.earlier : unsettled) * orbit.duty;
  const later = ratio < 0 ? (most.later * (maximumDuty - orbit.duty)) / -ratio : earlier;
  const allowed_A = (orbit.upSlope_A_per_s + rampSlope_A_per_s) * Math.min(earlier, later) * period_s;
  const bend = (size_A: number) =>
    Math.abs(shiftAfterCycle(stage, orbit, rampSlope_A_per_s, size_A) / size_A - ratio);
  const sizes = Array.from({ length: 4 }, (_, halving) => allowed_A / 2 ** halving);
  const shift_A = sizes.find((size_A) => bend(size_A) <= straight) ?? sizes.at(-1)!;
  const offTime = 1 - orbit.duty;
  const corners = cyclePlan.shiftedEdges.flatMap((edge) => {
    const from = (edge - 1 + orbit.duty + pulseFrom * offTime) * period_s;
    const to = (edge - 1 + orbit.duty + pulseTo * offTime) * period_s;
    const slope = period_s / 1000;
    const pulse_V = (shift_A * inductance_H) / (to - from - slope);
    return [from, 0, from + slope, pulse_V, to - slope, pulse_V, to, 0];
  });
  return { shift_A, corners: [0, 0, ...corners] };
}
