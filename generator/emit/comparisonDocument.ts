import type { Interval } from '../base/Quantity.ts';
import type { Comparison } from '../loop/Comparison.ts';
import type { ComparedLaw } from '../loop/compareLaws.ts';
import type { ComparisonDocument } from './comparisonSchema.ts';

/** A comparison in the shape of `compare --json`. */
export function comparisonDocument(comparison: Comparison): ComparisonDocument {
  const { region, lightLoad } = comparison;
  return {
    schema: 'counterslope/comparison/1',
    laws: comparison.laws.map(lawFigures),
    verdict: { preferred: comparison.verdict.preferred, reasons: [...comparison.verdict.reasons] },
    region: {
      inputVoltage_V: pair(region.inputVoltage_V),
      outputVoltage_V: region.outputVoltage_V && pair(region.outputVoltage_V),
      duty: pair(region.duty),
      cut: region.cuts.map((cut) => ({ ...cut })),
    },
    lightLoad: lightLoad && {
      borderLoad_A: pair(lightLoad.borderLoad_A),
      reached: lightLoad.reached,
      notes: [...lightLoad.notes],
    },
    neededRamp: comparison.neededRamp.map((need) => ({
      inputVoltage_V: need.inputVoltage_V,
      outputVoltage_V: need.outputVoltage_V,
      dutyRatio: need.duty,
      rampOverUpSlopeRatio: need.rampOverUpSlope,
    })),
    notes: [...comparison.notes],
    assumptions: comparison.request.assumptions.map(({ key, value, unit, reason }) => ({
      key,
      value,
      unit,
      reason,
    })),
  };
}

function lawFigures(compared: ComparedLaw): ComparisonDocument['laws'][number] {
  return {
    kind: compared.law.kind,
    gain: compared.required.gain,
    dampingIndexMin: compared.extremes.min.dampingIndex,
    dampingIndexMax: compared.extremes.max.dampingIndex,
    cycleRatioMin: compared.cycleRatio.low,
    cycleRatioMax: compared.cycleRatio.high,
    settlingCyclesMax: compared.settlingCyclesMax,
    dampingQMax: compared.dampingQMax,
    rampShare: pair(compared.rampShare),
    peakLimit_A: compared.peakLimit_A && pair(compared.peakLimit_A),
    outputLimit_A: compared.outputLimit_A && pair(compared.outputLimit_A),
    lineResponse_A_per_V: compared.lineResponse_A_per_V && pair(compared.lineResponse_A_per_V),
  };
}

function pair({ low, high }: Interval): [number, number] {
  return [low, high];
}
