import type { RegionPoint } from '../../region/OperatingRegion.ts';

/** Cycles simulated, and the clock edges before which the inductor current is shifted. */
export const cyclePlan = { settled: 9, shiftedEdges: [12, 19], total: 26 } as const;

/** Share of the off-time at which the shifting pulse begins and ends. */
const pulseFrom = 0.5;
const pulseTo = 0.95;

/** A voltage pulse in series with the inductor that shifts its current while the switch is off. */
export interface Perturbation {
  readonly shift_A: number;
  /** Corners of the piecewise-linear source: time, voltage, time, voltage … */
  readonly corners: readonly number[];
}

/**
 * As large as the clocked turn-off and the shortest on-time allow: the cycle map is affine there, so that a
 * large shift only makes the time step's granularity smaller against it.
 *
 * A shift δ moves the trip by δ/(m1 + ma) earlier, and the next one by α times as much.
 */
export function perturbation(
  point: RegionPoint,
  inductance_H: number,
  period_s: number,
  ramp_V: number,
  ratio: number,
  maximumDuty: number,
): Perturbation {
  const earlier = 0.4 * point.duty;
  const later = ratio < 0 ? (0.6 * (maximumDuty - point.duty)) / -ratio : earlier;
  const shift_A = ((point.up_V + ramp_V) / inductance_H) * Math.min(earlier, later) * period_s;
  const offTime = 1 - point.duty;
  const corners = cyclePlan.shiftedEdges.flatMap((edge) => {
    const from = (edge - 1 + point.duty + pulseFrom * offTime) * period_s;
    const to = (edge - 1 + point.duty + pulseTo * offTime) * period_s;
    const slope = period_s / 1000;
    const pulse_V = (shift_A * inductance_H) / (to - from - slope);
    return [from, 0, from + slope, pulse_V, to - slope, pulse_V, to, 0];
  });
  return { shift_A, corners: [0, 0, ...corners] };
}
