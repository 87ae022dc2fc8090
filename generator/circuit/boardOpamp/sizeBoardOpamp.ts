import { failure, type Outcome, success } from '../../base/Problem.ts';
import { preferredValues } from '../../parts/eSeries.ts';
import type { RampDemand } from '../../ramp/RampDemand.ts';
import type { ReadSpecification } from '../../spec/readSpecification.ts';
import { nodeCapacitance_F } from '../DeviceModels.ts';
import { boundsOf, isBroken } from './bounds.ts';
import { type BoardOpampSizing, candidate, currentPerVolt, preferenceCost } from './candidate.ts';
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
  const { best, broken } = search(demand, divider, room);
  return best === null ? failure(refuseNearest(demand, broken, request)) : success(best);
}

interface SearchResult {
  readonly best: BoardOpampSizing | null;
  /** Sets that were looked at and break a bound. */
  readonly broken: readonly BoardOpampSizing[];
}

/**
 * Every pair of capacitor and set resistor, cheapest first by what its preferences alone cost: once that
 * is more than the best set costs in all, no later pair can be better.
 */
function search(demand: RampDemand, divider: Divider, room: Headroom): SearchResult {
  const pairs = timingCapacitors(demand).flatMap((capacitance_F) =>
    setResistors(demand, divider, room, capacitance_F).map((set_ohm) => ({
      capacitance_F,
      set_ohm,
      floor: preferenceCost(capacitance_F, currentPerVolt(divider, set_ohm) * demand.track_V.high),
    })),
  );
  const broken: BoardOpampSizing[] = [];
  let best: BoardOpampSizing | null = null;
  for (const pair of pairs.sort((a, b) => a.floor - b.floor)) {
    if (best !== null && pair.floor >= best.cost) break;
    const set = candidate(demand, divider, room, pair.capacitance_F, pair.set_ohm);
    if (boundsOf(demand, set).some(isBroken)) broken.push(set);
    else if (best === null || set.cost < best.cost) best = set;
  }
  return { best, broken };
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
