import { type Interval, outerInterval, type Quantity } from '../base/Quantity.ts';
import type { InductanceSpecification, Specification } from '../spec/Specification.ts';

/**
 * Spread of what scales the ramp against the inductor's slopes, a unit being at one corner of each.
 *
 * λ = (L/L_ref)(Ri_nom/Ri): the ramp is a voltage at the sense element, so that a larger inductance or a
 * smaller sense gain makes it a larger share of the swing.
 */
export interface LoopCorners {
  /** What the gain of the ramp refers to [H]: the nominal value, or the least of a range. */
  readonly referenceInductance_H: number;
  /** Saturation at the peak limit included [H]. */
  readonly inductance_H: Interval;
  readonly senseGain_V_per_A: Quantity;
  /** λ without the ramp's own tolerance. */
  readonly lambda: Interval;
  /** Equivalent ma·L of a ramp that the controller already adds [V], least and greatest. */
  readonly internalRamp_V: Interval;
  /** L/Lm, least and greatest: what the magnetizing current adds; 0 without a transformer. */
  readonly magnetizingShare: Interval;
}

export function loopCorners(specification: Specification, inductance: ValueInductance): LoopCorners {
  const { senseGain_V_per_A } = specification;
  const referenceInductance_H = inductance.value_H.from.nominal;
  const inductance_H = inductanceInterval(inductance);
  const internal = specification.controller?.internalRamp_V_per_s;
  const magnetizing = specification.magnetizingInductance_H;
  return {
    referenceInductance_H,
    magnetizingShare: {
      low: magnetizing === null ? 0 : inductance_H.low / magnetizing.to.high,
      high: magnetizing === null ? 0 : inductance_H.high / magnetizing.from.low,
    },
    inductance_H,
    senseGain_V_per_A,
    lambda: {
      low: ((inductance_H.low / referenceInductance_H) * senseGain_V_per_A.nominal) / senseGain_V_per_A.high,
      high: ((inductance_H.high / referenceInductance_H) * senseGain_V_per_A.nominal) / senseGain_V_per_A.low,
    },
    internalRamp_V: {
      low: ((internal?.low ?? 0) * inductance_H.low) / senseGain_V_per_A.high,
      high: ((internal?.high ?? 0) * inductance_H.high) / senseGain_V_per_A.low,
    },
  };
}

type ValueInductance = Extract<InductanceSpecification, { kind: 'value' }>;

function inductanceInterval({ value_H, atPeakLimit_H }: ValueInductance): Interval {
  const { low, high } = outerInterval(value_H);
  return { low: Math.min(low, atPeakLimit_H?.low ?? low), high };
}
