import { preferredAtMost } from '../../parts/eSeries.ts';
import type { RampDemand } from '../../ramp/RampDemand.ts';
import { bipolar, mirrorRatio, nodeCapacitance_F } from '../DeviceModels.ts';
import type { Divider } from './divider.ts';
import type { Headroom } from './headroom.ts';
import { limits, preferences } from './limits.ts';
import { type SpreadCause, spreadCauses, worstSpread } from './rampSpread.ts';

/** One complete set of parts and what it does. */
export interface BoardOpampSizing {
  readonly divider: Divider;
  readonly headroom: Headroom;
  readonly capacitance_F: number;
  readonly totalCapacitance_F: number;
  readonly set_ohm: number;
  readonly degeneration_ohm: number;
  readonly sense_ohm: number;
  readonly summing_ohm: number;
  /** Slopes per tracked volt [(V/s)/V]: at the capacitor, and referred to the sense element. */
  readonly capacitorSlope_per_s: number;
  readonly senseSlope_per_s: number;
  /** What the nominal parts have to deliver for the worst unit to meet the demand [(V/s)/V]. */
  readonly wantedSlope_per_s: number;
  readonly causes: readonly SpreadCause[];
  readonly spread: { readonly low: number; readonly high: number };
  /** At the highest tracked voltage, nominal. */
  readonly chargingCurrent_A: number;
  readonly amplitude_V: number;
  /** The search takes the least. */
  readonly cost: number;
}

/** Charging current per tracked volt of a set resistor [A/V]: V-to-I, then the mirror's base currents. */
export function currentPerVolt(divider: Divider, set_ohm: number): number {
  return (divider.ratio / set_ohm) * mirrorRatio(bipolar.currentGain);
}

/**
 * The set of parts that follows from a timing capacitor and a set resistor.
 *
 *   dV_C/dt per volt = d·M/(R_set·C),  referred to the sense element: × R_sense/R_ramp
 *
 * The ramp resistor is rounded down, to the steeper and so the stable side. Whether the set is any good
 * its bounds say.
 */
export function candidate(
  demand: RampDemand,
  divider: Divider,
  room: Headroom,
  capacitance_F: number,
  set_ohm: number,
): BoardOpampSizing {
  const totalCapacitance_F = capacitance_F + nodeCapacitance_F;
  const perVolt = currentPerVolt(divider, set_ohm);
  const chargingCurrent_A = perVolt * demand.track_V.high;
  const capacitorSlope_per_s = perVolt / totalCapacitance_F;
  const amplitude_V = capacitorSlope_per_s * demand.track_V.high * demand.riseTime_s;
  const setCurrent_A = (divider.ratio * demand.track_V.high) / set_ohm;
  const degeneration_ohm = preferredAtMost(demand.series.resistor, room.degeneration_V / setCurrent_A);
  const span = demand.track_V.low / demand.track_V.high;
  const causes = spreadCauses(demand, {
    capacitance_F,
    totalCapacitance_F,
    dividerRatio: divider.ratio,
    dividerSource_ohm: divider.source_ohm,
    setVoltageLow_V: divider.ratio * demand.track_V.low,
    degenerationLow_V: degeneration_ohm * setCurrent_A * span,
    chargingCurrentLow_A: chargingCurrent_A * span,
  });
  const spread = worstSpread(causes);
  const wantedSlope_per_s =
    demand.givenSlope_per_s ?? demand.requiredSlope_per_s / Math.max(spread.low, limits.spreadLow);
  const summing_ohm = preferredAtMost(
    demand.series.resistor,
    (limits.senseResistor_ohm * capacitorSlope_per_s) / wantedSlope_per_s,
  );
  const senseSlope_per_s = (capacitorSlope_per_s * limits.senseResistor_ohm) / summing_ohm;
  return {
    divider,
    headroom: room,
    capacitance_F,
    totalCapacitance_F,
    set_ohm,
    degeneration_ohm,
    sense_ohm: limits.senseResistor_ohm,
    summing_ohm,
    capacitorSlope_per_s,
    senseSlope_per_s,
    wantedSlope_per_s,
    causes,
    spread,
    chargingCurrent_A,
    amplitude_V,
    cost: cost(
      senseSlope_per_s / wantedSlope_per_s - 1,
      (amplitude_V * spread.high) / room.ramp_V,
      capacitance_F,
      chargingCurrent_A,
    ),
  };
}

/**
 * What makes one set better than another: too much ramp first, then distance from the preferences in octaves.
 *
 * One per cent of excess weighs as much as a factor of 1.5 in capacitance.
 */
function cost(excess: number, amplitudeShare: number, capacitance_F: number, current_A: number): number {
  return (
    60 * excess +
    octaves(amplitudeShare / preferences.amplitudeShare) +
    preferenceCost(capacitance_F, current_A)
  );
}

/** The part of the cost that capacitor and set resistor decide alone; the rest is never negative. */
export function preferenceCost(capacitance_F: number, current_A: number): number {
  return (
    octaves(capacitance_F / preferences.capacitance_F) +
    0.5 * octaves(current_A / preferences.chargingCurrent_A)
  );
}

function octaves(ratio: number): number {
  return Math.abs(Math.log2(ratio));
}
