import { inputAtDuty, outputAtDuty } from '../region/dutyInverse.ts';
import { type OperatingRegion, type RegionPoint, regionPoint } from '../region/OperatingRegion.ts';
import type { LawKind, Specification } from '../spec/Specification.ts';
import type { ComparedLaw } from './compareLaws.ts';
import type { CycleRun } from './cycle/CycleRun.ts';
import { runCycles } from './cycle/runCycles.ts';
import { type LoopUnit, rampSlope_A_per_s } from './peakLimits.ts';

/** The input steps up and later down again, control level and output held. */
export interface LineStep {
  readonly low: RegionPoint;
  readonly high: RegionPoint;
  /** First cycle at the higher and first again at the lower input. */
  readonly up: number;
  readonly down: number;
  readonly responses: readonly LineStepResponse[];
}

export interface LineStepResponse {
  readonly kind: LawKind;
  /** Mean inductor current of each cycle, less that before the step [A]. */
  readonly deviation_A: readonly number[];
}

/** Cycles before the step, and least and most of them shown after each. */
const before = 3;
const after = { least: 12, most: 40 } as const;

/**
 * What an input step does to the inductor current of a nominal unit under each law, cycle by cycle.
 *
 * The control level is the one that holds the current before the step; conduction is continuous. Null
 * where there is no inductance, or no two inputs at which one output can be held.
 */
export function lineStep(
  specification: Specification,
  region: OperatingRegion,
  compared: readonly ComparedLaw[],
): LineStep | null {
  const units = compared.flatMap(({ unit }) => (unit === null ? [] : [unit]));
  const points = stepPoints(region, compared.find(({ law }) => law.kind === 'fixed')!);
  if (units.length === 0 || points === null) return null;
  const settling = Math.max(...compared.map(({ settlingCyclesMax }) => settlingCyclesMax ?? after.most));
  const shown = Math.min(after.most, Math.max(after.least, settling));
  const step = { ...points, up: before, down: before + shown };
  return {
    ...step,
    responses: units.map((unit) => ({
      kind: unit.law.kind,
      deviation_A: deviations(specification, unit, step, step.down + shown),
    })),
  };
}

/**
 * The lowest and highest input at the output where the fixed ramp is furthest from deadbeat; at half of what
 * the lowest input can make where that is next to nothing.
 */
function stepPoints({ stage, inputVoltage_V, outputVoltage_V, duty }: OperatingRegion, fixed: ComparedLaw) {
  const { at } = fixed.extremes.max;
  const point = (inputVoltage_V: number, output_V: number) =>
    regionPoint(stage, { ...at, inputVoltage_V, outputVoltage_V: output_V }, at.drops, at.outputIndex);
  const most_V = outputAtDuty(stage, { ...at, inputVoltage_V: inputVoltage_V.low }, at.drops, duty.high);
  const output_V = outputVoltage_V === null ? most_V / 2 : at.outputVoltage_V;
  const inputFor = (share: number) =>
    inputAtDuty(stage, { ...at, outputVoltage_V: output_V }, at.drops, share);
  const low_V = Math.max(inputVoltage_V.low, inputFor(duty.high));
  const high_V = Math.min(inputVoltage_V.high, duty.low > 0 ? inputFor(duty.low) : Number.POSITIVE_INFINITY);
  if (!(high_V > low_V * 1.001)) return null;
  return { low: point(low_V, output_V), high: point(high_V, output_V) };
}

function deviations(
  { maximumDutyRatio, minimumOnTime_s }: Specification,
  unit: LoopUnit,
  { low, high, up, down }: Pick<LineStep, 'low' | 'high' | 'up' | 'down'>,
  cycles: number,
): number[] {
  const slope = rampSlope_A_per_s(unit, low);
  const onTime_s = low.duty * unit.period_s;
  const run: CycleRun = {
    ...settingsAt(unit, low),
    rampPerOutputVolt_A_per_Vs: 0,
    internalSlope_A_per_s: 0,
    // The current before the step starts each cycle from zero; only differences are shown.
    control_A: (low.up_V / unit.inductance_H + slope) * onTime_s,
    limit: null,
    timing: {
      period_s: unit.period_s,
      maximumDuty: maximumDutyRatio,
      minimumOnTime_s: minimumOnTime_s.high,
      comparatorDelay_s: 0,
      skipsPulses: false,
      rectifies: false,
    },
    cycles,
    initial: [0],
    events: [
      { cycle: up, ...settingsAt(unit, high) },
      { cycle: down, ...settingsAt(unit, low) },
    ],
  };
  const means = runCycles(run).means[0]!;
  return [...means].map((mean) => mean - means[0]!);
}

function settingsAt(unit: LoopUnit, point: RegionPoint): Pick<CycleRun, 'stage' | 'rampSlope_A_per_s'> {
  return {
    stage: {
      kind: 'ideal-output',
      inductance_H: unit.inductance_H,
      up_V: point.up_V,
      down_V: point.down_V,
      up_ohm: 0,
      down_ohm: 0,
    },
    rampSlope_A_per_s: rampSlope_A_per_s(unit, point),
  };
}
