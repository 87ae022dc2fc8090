import { type Extreme, extremesOver } from '../region/extremesOver.ts';
import type { OperatingRegion, RegionPoint } from '../region/OperatingRegion.ts';
import { pointsAtDuty } from '../region/pointsAtDuty.ts';
import type { Specification } from '../spec/Specification.ts';
import { type GivenRamp, rampSlope_V_per_s } from './givenRamp.ts';

/** What keeps an inductance from being less, or more, and where. */
export interface WindowBound {
  readonly limit: 'goal' | 'ceiling';
  readonly inductance_H: number;
  readonly at: RegionPoint;
}

/** Inductances at the trip current for which x lies between goal and ceiling; null where nothing binds. */
export interface InductanceWindow {
  readonly least: WindowBound | null;
  /** Of an infinite inductance where a ramp is needed and none is there. */
  readonly largest: WindowBound | null;
}

/**
 * Least and largest inductance for a ramp in volts per second, over a region and every corner of ramp and
 * sense gain.
 *
 *   x = D′ + L·(ΣSe/Ri + free/Lm)/U
 *   L ≥ (x_goal·U − up)/(ΣSe_low/Ri_high + free/Lm_high)
 *   L ≤ (x_ceiling·U − up)/(ΣSe_high/Ri_low + free/Lm_low)
 *
 * each the sharpest over the region; free/Lm is the magnetizing current's share, 0 without a transformer.
 */
export function inductanceWindow(
  specification: Specification,
  region: OperatingRegion,
  ramp: GivenRamp,
  frequency_Hz: number,
): InductanceWindow {
  const { goal } = specification;
  const slope = inductorSlope(specification, region, ramp, frequency_Hz);
  const least = extreme(region, ramp, (at) =>
    quotient(goal.dampingIndex * at.swing_V - at.up_V, slope(at).low),
  );
  const largest = extreme(
    region,
    ramp,
    (at) => -quotient(goal.ceilingIndex * at.swing_V - at.up_V, slope(at).high),
  );
  return {
    least: least.value > 0 ? { limit: 'goal', inductance_H: least.value, at: least.at } : null,
    largest:
      largest.value > Number.NEGATIVE_INFINITY
        ? { limit: 'ceiling', inductance_H: -largest.value, at: largest.at }
        : null,
  };
}

/** Whether any inductance is between the bounds. */
export function isOpen({ least, largest }: InductanceWindow): boolean {
  const from = least?.inductance_H ?? 0;
  return (
    Number.isFinite(from) && (largest === null || (largest.inductance_H > 0 && from <= largest.inductance_H))
  );
}

/** ΣSe/Ri + free/Lm [A/s], at the corners that give least and most. */
function inductorSlope(
  { senseGain_V_per_A: gain, magnetizingInductance_H: magnetizing }: Specification,
  { stage }: OperatingRegion,
  ramp: GivenRamp,
  frequency_Hz: number,
) {
  return (at: RegionPoint) => {
    const slope = rampSlope_V_per_s(ramp, at, frequency_Hz);
    const free_V = stage.freeRamp_V(at);
    return {
      low: slope.low / gain.high + (magnetizing === null ? 0 : free_V / magnetizing.to.high),
      high: slope.high / gain.low + (magnetizing === null ? 0 : free_V / magnetizing.from.low),
    };
  };
}

/** Volts over amperes per second; no ramp holds up no voltage, and lets any pass. */
function quotient(volts: number, slope_A_per_s: number): number {
  if (slope_A_per_s > 0) return volts / slope_A_per_s;
  return volts > 0 ? Number.POSITIVE_INFINITY : 0;
}

/** Greatest value; where the law clamps there is a kink. */
function extreme(region: OperatingRegion, ramp: GivenRamp, figure: (at: RegionPoint) => number): Extreme {
  const clamp = ramp.law?.law.clampOffDuty(ramp.law.gain) ?? null;
  const kinks = clamp === null ? [] : pointsAtDuty(region, 1 - clamp);
  return [extremesOver(region, figure).max, ...kinks.map((at) => ({ at, value: figure(at) }))].reduce(
    (a, b) => (b.value > a.value ? b : a),
  );
}
