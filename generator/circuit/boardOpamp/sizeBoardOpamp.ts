import { failure, type Outcome, success } from '../../base/Problem.ts';
import { preferredValues } from '../../parts/eSeries.ts';
import type { RampDemand } from '../../ramp/RampDemand.ts';
import type { ReadSpecification } from '../../spec/readSpecification.ts';
import { nodeCapacitance_F } from '../DeviceModels.ts';
import { boundsOf, isBroken } from './bounds.ts';
import { type BoardOpampSizing, candidate, currentPerVolt } from './candidate.ts';
import { chooseDivider, type Divider } from './divider.ts';
import { type Headroom, headroom } from './headroom.ts';
import { limits } from './limits.ts';
import { refusals, refuseNearest } from './refusals.ts';

/**
 * The best set of standard parts for a demand: every timing capacitor of its series with every set
 * resistor that keeps the amplitude within bounds, the ramp resistor following from both.
 *
 * @returns the set of least cost, or the inequalities that no set meets (code `no-circuit`)
 */
export function sizeBoardOpamp(demand: RampDemand, request: ReadSpecification): Outcome<BoardOpampSizing> {
  const room = headroom(demand);
  const refused = refusals(demand, room, request);
  if (refused.length > 0) return failure(refused);
  const divider = chooseDivider(demand, room.setVoltage_V);
  const sets = timingCapacitors(demand).flatMap((capacitance_F) =>
    setResistors(demand, divider, room, capacitance_F).map((set_ohm) =>
      candidate(demand, divider, room, capacitance_F, set_ohm),
    ),
  );
  const sound = sets.filter((set) => !boundsOf(demand, set).some(isBroken));
  if (sound.length === 0) return failure(refuseNearest(demand, sets, request));
  return success(sound.reduce((a, b) => (b.cost < a.cost ? b : a)));
}

export function timingCapacitors(demand: RampDemand): readonly number[] {
  if (demand.capacitance_F !== null) return [demand.capacitance_F];
  return preferredValues(demand.series.capacitor, limits.capacitanceLow_F, limits.capacitanceHigh_F);
}

/** Set resistors for amplitudes between the least and the greatest possible. */
function setResistors(demand: RampDemand, divider: Divider, room: Headroom, capacitance_F: number): number[] {
  const rise = (demand.track_V.high * demand.riseTime_s) / (capacitance_F + nodeCapacitance_F);
  const oneOhm_V = currentPerVolt(divider, 1) * rise;
  return preferredValues(
    demand.series.resistor,
    oneOhm_V / room.ramp_V,
    oneOhm_V / (limits.amplitudeShareLow * room.ramp_V),
  );
}
