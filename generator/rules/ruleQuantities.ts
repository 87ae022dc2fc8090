import { outerInterval } from '../base/Quantity.ts';
import { resetTimeNeeded_s } from '../circuit/boardOpamp/resetTime.ts';
import { bipolar, followerLag_s, nodeCapacitance_F, opamp } from '../circuit/DeviceModels.ts';
import { currentSourceVoltages, rampFigures, senseAttenuation } from '../circuit/rampFigures.ts';
import type { SizedDesign } from '../circuit/SizedDesign.ts';
import { tripSignals } from '../circuit/tripSignals.ts';
import { cycleRatio } from '../law/innerLoop.ts';
import type { DesignQuantities } from './quantities.ts';

/** Divider filter and op-amp until a step of the input stands in the slope to one tenth: ln 10 time constants. */
const settlingTimeConstants = Math.log(10);

/** Capacitance at the comparator's input that the summing resistors have to charge [F] (common practice). */
const senseInput_F = 5e-12;

/** The named quantities of a design that its rules speak of, SI units, worst case where the name says so. */
export function ruleQuantities(design: SizedDesign): DesignQuantities {
  const { specification } = design.request;
  const input = outerInterval(specification.input_V);
  return {
    ...loopQuantities(design),
    ...rampQuantities(design),
    ...sourceQuantities(design),
    inputVoltageMax: input.high,
    inputVoltageMin: input.low,
    supplyVoltage: specification.ramp.supply_V.low,
    maximumDuty: specification.maximumDutyRatio,
    minimumOnTime: specification.minimumOnTime_s.high,
    switchingPeriod: design.demand.period_s,
  };
}

function loopQuantities({ request, chosen }: SizedDesign): DesignQuantities {
  const { min, max } = chosen.extremes;
  const { goal } = request.specification;
  return {
    dampingIndexMin: min.dampingIndex,
    dampingIndexMax: max.dampingIndex,
    dampingIndexGoal: goal.dampingIndex,
    dampingIndexCeiling: goal.ceilingIndex,
    cycleRatioMin: cycleRatio(min.dampingIndex),
    cycleRatioMax: cycleRatio(max.dampingIndex),
    realisedGain: chosen.realisedGain,
    requiredGain: chosen.required.gain,
    designGain: chosen.gain,
    gainExcess: chosen.realisedGain / chosen.gain - 1,
  };
}

function rampQuantities(design: SizedDesign): DesignQuantities {
  const { demand, sizing } = design;
  const low = rampFigures(design, demand.track_V.low);
  const high = rampFigures(design, demand.track_V.high);
  const parallel = (sizing.summing_ohm * sizing.sense_ohm) / (sizing.summing_ohm + sizing.sense_ohm);
  return {
    signalAtTripMin: tripSignals(design).leastSignal_V,
    signalFloor: design.request.specification.goal.signalFloor_V,
    rampAmplitudeMax: sizing.amplitude_V * sizing.spread.high,
    rampHeadroom: sizing.headroom.ramp_V,
    resetTime: demand.resetTime_s,
    resetTimeNeeded: resetTimeNeeded_s(demand, sizing.capacitance_F),
    residualVoltage: high.residual_V,
    residualRatio: high.residual_V / high.amplitude_V,
    timingCapacitance: sizing.capacitance_F,
    strayCapacitance: nodeCapacitance_F,
    chargingCurrentLow: low.chargingCurrent_A,
    chargingCurrentHigh: high.chargingCurrent_A,
    senseAttenuation: senseAttenuation(design),
    senseFilterTime: parallel * senseInput_F,
    injectionResistance: sizing.summing_ohm,
    rampToleranceRatio: 1 - sizing.spread.low,
    bufferLag: followerLag_s,
  };
}

function sourceQuantities(design: SizedDesign): DesignQuantities {
  const { demand, sizing } = design;
  const low = currentSourceVoltages(design, demand.track_V.low);
  const high = currentSourceVoltages(design, demand.track_V.high);
  const filter_s = sizing.divider.source_ohm * (sizing.divider.filter_F ?? opamp.inputCapacitance_F);
  return {
    mirrorHeadroom: demand.supply_V.low - high.degeneration_V - bipolar.baseEmitterHigh_V - high.set_V,
    mirrorHeadroomFloor: bipolar.saturation_V,
    mirrorDegeneration: low.degeneration_V,
    dividerResistance: sizing.divider.source_ohm,
    dividerBiasError: (opamp.inputBias_A * sizing.divider.source_ohm) / low.set_V,
    dividerSettlingTime: settlingTimeConstants * filter_s,
    controlVoltageLow: low.set_V,
  };
}
