import type { RampDemand } from '../../ramp/RampDemand.ts';
import type { BoardOpampSizing } from './candidate.ts';
import { limits } from './limits.ts';
import { resetTimeNeeded_s } from './resetTime.ts';

/** An inequality `left ≤ right` that a set of parts meets or breaks. */
export interface Bound {
  readonly id:
    | 'amplitude high'
    | 'amplitude low'
    | 'current high'
    | 'current low'
    | 'summing low'
    | 'summing high'
    | 'reset'
    | 'spread';
  readonly left: number;
  readonly right: number;
}

/** What holds a set of parts within the range where the build is known to behave. */
export function boundsOf(demand: RampDemand, sizing: BoardOpampSizing): readonly Bound[] {
  const { amplitude_V, spread, headroom, chargingCurrent_A, summing_ohm, sense_ohm } = sizing;
  const currentLow_A = (chargingCurrent_A * demand.track_V.low) / demand.track_V.high;
  return [
    { id: 'amplitude high', left: amplitude_V * spread.high, right: headroom.ramp_V },
    { id: 'amplitude low', left: limits.amplitudeShareLow * headroom.ramp_V, right: amplitude_V },
    { id: 'current high', left: chargingCurrent_A, right: limits.chargingCurrentHigh_A },
    { id: 'current low', left: limits.chargingCurrentLow_A, right: currentLow_A },
    { id: 'summing low', left: limits.summingRatioLow * sense_ohm, right: summing_ohm },
    { id: 'summing high', left: summing_ohm, right: limits.summingResistorHigh_ohm },
    { id: 'reset', left: resetTimeNeeded_s(demand, sizing.capacitance_F), right: demand.resetTime_s },
    { id: 'spread', left: limits.spreadLow, right: spread.low },
  ];
}

export function isBroken({ left, right }: { readonly left: number; readonly right: number }): boolean {
  return !(left <= right);
}
