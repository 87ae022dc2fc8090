import type { Assumption } from '../base/Assumption.ts';
import { circuitFigures } from '../circuit/circuitFigures.ts';
import { rampFigures, rampTiming, senseAttenuation } from '../circuit/rampFigures.ts';
import type { SizedDesign } from '../circuit/SizedDesign.ts';
import { tripSignals } from '../circuit/tripSignals.ts';
import { cycleRatio, dampingQ, settlingCycles } from '../law/innerLoop.ts';
import type { IndexExtreme } from '../law/leastGain.ts';
import { billOfMaterials } from './billOfMaterials.ts';
import { designAssumptions } from './designAssumptions.ts';
import type { Result, RuleOutcome, Simulation, WorstPoint } from './resultSchema.ts';

/** Names of the files of a design's set besides the manifest, in the order of the contract. */
export type FileNames = readonly string[];

/** Everything that a design comes to, in the shape of `result.json`. */
export function resultOf(
  design: SizedDesign,
  rules: readonly RuleOutcome[],
  simulation: Simulation | null,
  files: FileNames,
): Result {
  return {
    schema: 'counterslope/result/1',
    specification: design.request.specification as unknown as Record<string, unknown>,
    assumptions: allAssumptions(design).map(plainAssumption),
    corners: cornerList(design),
    region: regionFigures(design),
    law: lawFigures(design),
    stability: stabilityFigures(design),
    ramp: rampSummary(design),
    parts: billOfMaterials(design.circuit),
    circuitFigures: [...circuitFigures(design)],
    rules: [...rules],
    simulation,
    files: [...files],
  };
}

/** Those of the specification, and those with a figure of the design, which replace what it said before. */
function allAssumptions(design: SizedDesign): Assumption[] {
  const own = designAssumptions(design);
  const weighed = new Set(own.map(({ key }) => key));
  return [...design.request.assumptions.filter(({ key }) => !weighed.has(key)), ...own];
}

function plainAssumption({ key, value, unit, reason }: Assumption) {
  return { key, value, unit, reason };
}

function cornerList({ corners, sizing, region }: SizedDesign): Result['corners'] {
  const { senseGain_V_per_A, inductance_H } = corners;
  return [
    { parameter: 'inductance', ...inductance_H, unit: 'H' },
    { parameter: 'sense gain', low: senseGain_V_per_A.low, high: senseGain_V_per_A.high, unit: 'V/A' },
    { parameter: 'ramp against nominal', ...sizing.spread, unit: '' },
    {
      parameter: 'rectifier drop',
      low: Math.min(...region.vertices.map(({ drops }) => drops.rectifierDrop_V)),
      high: Math.max(...region.vertices.map(({ drops }) => drops.rectifierDrop_V)),
      unit: 'V',
    },
  ];
}

function regionFigures({ region }: SizedDesign): Result['region'] {
  const { inputVoltage_V, outputVoltage_V, duty } = region;
  return {
    inputVoltage_V: [inputVoltage_V.low, inputVoltage_V.high],
    outputVoltage_V: outputVoltage_V && [outputVoltage_V.low, outputVoltage_V.high],
    duty: [duty.low, duty.high],
    cut: region.cuts.map((cut) => ({ ...cut })),
  };
}

function lawFigures({ chosen, corners, region, request }: SizedDesign): Result['law'] {
  const output = request.specification.output_V === null ? null : region.outputVoltage_V;
  const { low, high } = region.inputVoltage_V;
  const slopeAt = (inputVoltage_V: number) => ({
    inputVoltage_V,
    outputVoltage_V: output?.high ?? null,
    value:
      chosen.law.ramp_V(chosen.realisedGain, { ...region.vertices[0]!, inputVoltage_V }) /
      corners.referenceInductance_H,
  });
  return {
    kind: chosen.law.kind,
    requiredGain: chosen.required.gain,
    gain: chosen.gain,
    realisedGain: chosen.realisedGain,
    slope_A_per_s: [slopeAt(low), slopeAt((low + high) / 2), slopeAt(high)],
  };
}

function stabilityFigures({ chosen: { extremes } }: SizedDesign): Result['stability'] {
  const { min, max } = extremes;
  const settling = [settlingCycles(min.dampingIndex), settlingCycles(max.dampingIndex)];
  return {
    dampingIndexMin: min.dampingIndex,
    dampingIndexMax: max.dampingIndex,
    at: worstPoint(min),
    atMax: worstPoint(max),
    cycleRatioMin: cycleRatio(min.dampingIndex),
    cycleRatioMax: cycleRatio(max.dampingIndex),
    dampingQMax: dampingQ(min.dampingIndex),
    settlingCyclesMax:
      settling[0] === null || settling[1] === null ? null : Math.max(settling[0]!, settling[1]!),
  };
}

function worstPoint({ at }: IndexExtreme): WorstPoint {
  return { inputVoltage_V: at.inputVoltage_V, outputVoltage_V: at.outputVoltage_V, dutyRatio: at.duty };
}

function rampSummary(design: SizedDesign): Result['ramp'] {
  const { demand, sizing } = design;
  const low = rampFigures(design, demand.track_V.low);
  const high = rampFigures(design, demand.track_V.high);
  const { ends } = tripSignals(design);
  return {
    build: design.circuit.build,
    capacitance_F: sizing.capacitance_F,
    current_A: [low.chargingCurrent_A, high.chargingCurrent_A],
    capacitorSlope_V_per_s: [low.capacitorSlope_V_per_s, high.capacitorSlope_V_per_s],
    comparatorSlope_V_per_s: [low.comparatorSlope_V_per_s, high.comparatorSlope_V_per_s],
    amplitude_V: [low.amplitude_V, high.amplitude_V],
    resetTime_s: rampTiming(design).reset_s,
    injectionGainRatio: sizing.sense_ohm / sizing.summing_ohm,
    senseAttenuationRatio: senseAttenuation(design),
    rampAtTrip_V: ends.map(({ ramp_V }) => ramp_V),
    signalAtTrip_V: ends.map(({ signal_V }) => signal_V),
  };
}
