import type { Interval } from '../base/Quantity.ts';
import type { Law } from '../law/Law.ts';
import { laws } from '../law/laws.ts';
import { nominalPeriod_s } from '../ramp/demandOf.ts';
import type { RegionPoint } from '../region/OperatingRegion.ts';
import type { Specification } from '../spec/Specification.ts';

/** A ramp that is there, whatever inductor will be: absolute, in volts per second at the sense element. */
export interface GivenRamp {
  /** Of `ramp.law` and `ramp.gain`; null where no gain is given. */
  readonly law: {
    readonly law: Law;
    readonly gain: number;
    /** Se per volt of the law's ma·L: Ri/L with both nominal, as the ramp was sized [1/s]. */
    readonly slopePerVolt_per_s: number;
  } | null;
  /** The controller's own, its tolerance the spread that trimming leaves [V/s]. */
  readonly internal_V_per_s: Interval;
  /** Whether the slopes follow the oscillator. */
  readonly followsFrequency: boolean;
  readonly nominalFrequency_Hz: number;
}

/** The ramp that a specification gives; null where it gives none. */
export function givenRamp(specification: Specification): GivenRamp | null {
  const { ramp, inductance, senseGain_V_per_A, controller } = specification;
  const internal = controller?.internalRamp_V_per_s ?? { low: 0, high: 0 };
  const hasLaw = ramp.gain !== null && inductance?.kind === 'value';
  if (!hasLaw && internal.high === 0) return null;
  return {
    law: hasLaw
      ? {
          law: laws[ramp.law],
          gain: ramp.gain,
          slopePerVolt_per_s: senseGain_V_per_A.nominal / inductance.value_H.from.nominal,
        }
      : null,
    internal_V_per_s: { low: internal.low, high: internal.high },
    followsFrequency: ramp.follows === 'frequency',
    nominalFrequency_Hz: 1 / nominalPeriod_s(specification),
  };
}

/** Slope of the whole ramp at a point, least and greatest [V/s]. */
export function rampSlope_V_per_s(ramp: GivenRamp, point: RegionPoint, frequency_Hz: number): Interval {
  const share = ramp.followsFrequency ? frequency_Hz / ramp.nominalFrequency_Hz : 1;
  const own = ramp.law === null ? 0 : ramp.law.law.ramp_V(ramp.law.gain, point) * ramp.law.slopePerVolt_per_s;
  return {
    low: share * (own + ramp.internal_V_per_s.low),
    high: share * (own + ramp.internal_V_per_s.high),
  };
}
