import type { RampDemand } from '../../ramp/RampDemand.ts';
import type { BoardOpampSizing } from './candidate.ts';

/** How many times faster than just in time the buffer has to fall. */
const slewMargin = 2;

/**
 * Slew rate that the buffer needs to bring the comparator's input down with the capacitor [V/s].
 *
 *   2·A_max/t_reset: what the comparator sees is reset by the buffer, not by the switch alone
 */
export function slewNeeded_V_per_s(
  { amplitude_V, spread }: Pick<BoardOpampSizing, 'amplitude_V' | 'spread'>,
  { resetTime_s }: RampDemand,
): number {
  return (slewMargin * amplitude_V * spread.high) / resetTime_s;
}
