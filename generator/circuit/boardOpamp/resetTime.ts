import type { RampDemand } from '../../ramp/RampDemand.ts';
import { nodeCapacitance_F, switchResistance_ohm } from '../DeviceModels.ts';
import { limits } from './limits.ts';

/** Least time in which the timing capacitor falls to one per cent, edges included [s]. */
export function resetTimeNeeded_s(demand: RampDemand, capacitance_F: number): number {
  const switch_ohm = switchResistance_ohm(demand.supply_V.low);
  return limits.resetOverhead_s + Math.log(100) * switch_ohm * (capacitance_F + nodeCapacitance_F);
}
