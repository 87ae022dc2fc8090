import { type Interval, outerInterval, type Quantity } from '../base/Quantity.ts';
import { extremesOver } from '../region/extremesOver.ts';
import type { OperatingRegion, RegionPoint } from '../region/OperatingRegion.ts';
import type { InductanceSpecification, Specification } from '../spec/Specification.ts';

/**
 * Spread of what scales the ramp against the inductor's slopes at one operating point, a unit being at one
 * corner of each.
 */
export interface PointCorners {
  /**
   * λ = (L/L_ref)(Ri_nom/Ri) without the ramp's own tolerance: the ramp is a voltage at the sense element,
   * so that a larger inductance or a smaller sense gain makes it a larger share of the swing.
   */
  readonly lambda: Interval;
  /** Equivalent ma·L of a ramp that the controller already adds [V], least and greatest. */
  readonly internalRamp_V: Interval;
  /** L/Lm, least and greatest: what the magnetizing current adds; 0 without a transformer. */
  readonly magnetizingShare: Interval;
}

export interface LoopCorners {
  /** What gains refer to [H]: the nominal value, or the least of a range; null where it is not known. */
  readonly referenceInductance_H: number | null;
  /** Over the region, saturation at the peak limit included [H]. */
  readonly inductance_H: Interval | null;
  readonly senseGain_V_per_A: Quantity;
  /** Whether every point has the same corners: extremes are then at the vertices of the region. */
  readonly isUniform: boolean;
  at(point: RegionPoint): PointCorners;
}

/** Corners of a converter whose inductance is known: what a circuit needs. */
export type KnownCorners = LoopCorners & {
  readonly referenceInductance_H: number;
  readonly inductance_H: Interval;
};

export function hasInductance(corners: LoopCorners): corners is KnownCorners {
  return corners.referenceInductance_H !== null && corners.inductance_H !== null;
}

/**
 * @param attenuation what a summing network leaves of the sensed current: a ramp that the controller adds
 *   behind it counts for the inverse; 1 without one, or where it is not known yet
 */
export function loopCorners(
  specification: Specification,
  region: OperatingRegion,
  attenuation = 1,
): LoopCorners {
  const { inductance } = specification;
  if (inductance === null) return uniform(specification, null, null, attenuation);
  if (inductance.kind === 'value') {
    const reference_H = inductance.value_H.from.nominal;
    return uniform(specification, reference_H, inductanceInterval(inductance), attenuation);
  }
  const inductanceAt = (point: RegionPoint) => rippleInductance(specification, inductance, point);
  const inductance_H = {
    low: extremesOver(region, (point) => inductanceAt(point).low).min.value,
    high: extremesOver(region, (point) => inductanceAt(point).high).max.value,
  };
  return {
    ...uniform(specification, inductance_H.low, inductance_H, attenuation),
    isUniform: false,
    at: (point) => pointCorners(specification, inductance_H.low, inductanceAt(point), attenuation),
  };
}

/** The same converter with every unit nominal, for what the region alone costs. */
export function nominalCorners(specification: Specification, corners: LoopCorners): LoopCorners {
  const reference_H = corners.referenceInductance_H;
  const exact = reference_H === null ? null : { low: reference_H, high: reference_H };
  const { nominal } = specification.senseGain_V_per_A;
  const exactGain = { ...specification, senseGain_V_per_A: { nominal, low: nominal, high: nominal } };
  return uniform(exactGain, reference_H, exact, 1);
}

function uniform(
  specification: Specification,
  reference_H: number | null,
  inductance_H: Interval | null,
  attenuation: number,
): LoopCorners {
  const everywhere = pointCorners(specification, reference_H, inductance_H, attenuation);
  return {
    referenceInductance_H: reference_H,
    inductance_H,
    senseGain_V_per_A: specification.senseGain_V_per_A,
    isUniform: true,
    at: () => everywhere,
  };
}

/** Without an inductance only the sense gain spreads, and ramps in V/s cannot be counted. */
function pointCorners(
  { senseGain_V_per_A: gain, controller, magnetizingInductance_H: magnetizing }: Specification,
  reference_H: number | null,
  inductance_H: Interval | null,
  attenuation: number,
): PointCorners {
  const { low, high } = inductance_H === null || reference_H === null ? { low: 0, high: 0 } : inductance_H;
  const share = (value: number) => (reference_H === null ? 1 : value / reference_H);
  const internal = controller?.internalRamp_V_per_s;
  return {
    lambda: {
      low: (share(low) * gain.nominal) / gain.high,
      high: (share(high) * gain.nominal) / gain.low,
    },
    internalRamp_V: {
      low: ((internal?.low ?? 0) * low) / (gain.high * attenuation),
      high: ((internal?.high ?? 0) * high) / (gain.low * attenuation),
    },
    magnetizingShare: {
      low: magnetizing === null ? 0 : low / magnetizing.to.high,
      high: magnetizing === null ? 0 : high / magnetizing.from.low,
    },
  };
}

type ValueInductance = Extract<InductanceSpecification, { kind: 'value' }>;
type RippleInductance = Extract<InductanceSpecification, { kind: 'ripple' }>;

function inductanceInterval({ value_H, atPeakLimit_H }: ValueInductance): Interval {
  const { low, high } = outerInterval(value_H);
  return { low: Math.min(low, atPeakLimit_H?.low ?? low), high };
}

/** L = up·D/(f·ripple): who uses the converter chooses it for the own input and output. */
function rippleInductance(
  { frequency_Hz }: Specification,
  { rippleRatio, of_A }: RippleInductance,
  { up_V, duty }: RegionPoint,
): Interval {
  const flux = up_V * duty;
  return {
    low: flux / (frequency_Hz.to.high * rippleRatio.to.high * of_A.high),
    high: flux / (frequency_Hz.from.low * rippleRatio.from.low * of_A.low),
  };
}
