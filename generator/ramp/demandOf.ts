import { outerInterval, type Quantity } from '../base/Quantity.ts';
import type { KnownCorners } from '../law/loopCorners.ts';
import type { Specification } from '../spec/Specification.ts';
import type { RampDemand } from './RampDemand.ts';

/** Reference that a fixed ramp is fed from: 2.5 V within 1 %, what any shunt reference reaches (common practice). */
export const rampReference = { voltage_V: 2.5, toleranceRatio: 0.01 } as const;

/**
 * Turns a law's gain into the slope that a generator owes per tracked volt.
 *
 *   vin:   Se = k·Ri/L per volt of input
 *   fixed: Se = S·L·Ri/L per V_ref volts of reference
 *
 * with Ri nominal and L the inductance that the gain refers to.
 * @param requiredGain what the worst unit must deliver: k, or S·L in volts
 */
export function demandOf(
  specification: Specification,
  corners: KnownCorners,
  requiredGain: number,
): RampDemand {
  const { frequency_Hz, maximumDutyRatio, ramp } = specification;
  const tracks = ramp.law === 'fixed' ? 'reference' : 'input';
  const reference = rampReference.voltage_V;
  const unit_V = tracks === 'reference' ? reference : 1;
  const gainPerSlope = (unit_V * corners.referenceInductance_H) / corners.senseGain_V_per_A.nominal;
  return {
    law: ramp.law,
    tracks,
    track_V:
      tracks === 'reference' ? { low: reference, high: reference } : outerInterval(specification.input_V),
    trackToleranceRatio: tracks === 'reference' ? rampReference.toleranceRatio : 0,
    requiredSlope_per_s: requiredGain / gainPerSlope,
    givenSlope_per_s: ramp.gain === null ? null : ramp.gain / gainPerSlope,
    gainPerSlope,
    riseTime_s: maximumDutyRatio / frequency_Hz.from.low,
    resetTime_s: (1 - maximumDutyRatio) / frequency_Hz.to.high,
    period_s: nominalPeriod_s(specification),
    supply_V: ramp.supply_V,
    series: ramp.series,
    capacitance_F: ramp.capacitance_F?.nominal ?? null,
    capacitorToleranceRatio: capacitorTolerance(ramp.capacitance_F),
  };
}

/** The wider side; null without a tolerance, for it is still a part that is ordered with one. */
function capacitorTolerance(given: Quantity | null): number | null {
  if (given === null || given.low === given.high) return null;
  return Math.max(given.high - given.nominal, given.nominal - given.low) / given.nominal;
}

/** Period of the nominal frequency, of the middle of a range [s]. */
export function nominalPeriod_s({ frequency_Hz }: Specification): number {
  return 2 / (frequency_Hz.from.nominal + frequency_Hz.to.nominal);
}
