import { failure, type Outcome, success } from '../base/Problem.ts';
import { type Interval, outerInterval } from '../base/Quantity.ts';
import type { ReadSpecification } from '../spec/readSpecification.ts';
import type { Specification } from '../spec/Specification.ts';
import { clipBox, type HalfSpace } from './clipBox.ts';
import { dutyExcess_V, outputAtDuty } from './dutyInverse.ts';
import { impossibleRegion } from './impossibleRegion.ts';
import { type OperatingRegion, type RegionPoint, regionPoint } from './OperatingRegion.ts';
import type { PowerStage, StageDrops } from './PowerStage.ts';
import { regionCuts } from './regionCuts.ts';
import { dropCorners } from './stageDrops.ts';

/**
 * The operating region: input × output (or every duty up to the maximum) × load × drops, limited to the
 * duties that the controller can make.
 */
export function buildRegion(request: ReadSpecification, stage: PowerStage): Outcome<OperatingRegion> {
  const { specification } = request;
  const outputs = specification.output_V?.map(outerInterval) ?? [null];
  const perOutput = outputs.map((output, index) => verticesFor(specification, stage, output, index));
  const unreachable = outputs.filter((_, index) => perOutput[index]!.length === 0);
  if (unreachable.length > 0) return failure(impossibleRegion(request, stage, unreachable));
  const vertices = perOutput.flat();
  return success({
    stage,
    inputVoltage_V: outerInterval(specification.input_V),
    outputVoltage_V: specification.output_V && hull(vertices.map((vertex) => vertex.outputVoltage_V)),
    duty: specification.output_V
      ? hull(vertices.map((vertex) => vertex.duty))
      : { low: leastDuty(specification), high: specification.maximumDutyRatio },
    vertices,
    cuts: regionCuts(specification, stage),
  });
}

/** The duty below which the minimum on-time makes the converter skip pulses, at the highest frequency. */
export function leastDuty({ minimumOnTime_s, frequency_Hz }: Specification): number {
  return minimumOnTime_s.high * frequency_Hz.to.high;
}

function verticesFor(
  specification: Specification,
  stage: PowerStage,
  output: Interval | null,
  outputIndex: number,
): readonly RegionPoint[] {
  const loadCurrent_A = specification.load_A ? outerInterval(specification.load_A) : { low: 0, high: 0 };
  const inputVoltage_V = outerInterval(specification.input_V);
  return dropCorners(specification).flatMap((drops) => {
    const outputVoltage_V = output ?? everyOutput(specification, stage, drops, inputVoltage_V, loadCurrent_A);
    const limits = dutyLimits(specification, stage, drops);
    return clipBox({ inputVoltage_V, outputVoltage_V, loadCurrent_A }, limits).map((point) =>
      regionPoint(stage, point, drops, outputIndex),
    );
  });
}

/** Output voltages that hold every duty that the controller can make, at any input and load. */
function everyOutput(
  specification: Specification,
  stage: PowerStage,
  drops: StageDrops,
  input: Interval,
  load: Interval,
): Interval {
  const least = { inputVoltage_V: input.low, outputVoltage_V: 0, loadCurrent_A: load.high };
  const most = { inputVoltage_V: input.high, outputVoltage_V: 0, loadCurrent_A: load.low };
  return {
    low: outputAtDuty(stage, least, drops, leastDuty(specification)),
    high: outputAtDuty(stage, most, drops, specification.maximumDutyRatio),
  };
}

function dutyLimits(specification: Specification, stage: PowerStage, drops: StageDrops): HalfSpace[] {
  const least = leastDuty(specification);
  return [
    (point) => dutyExcess_V(stage, point, drops, specification.maximumDutyRatio),
    (point) => -dutyExcess_V(stage, point, drops, least),
  ];
}

function hull(values: readonly number[]): Interval {
  return { low: Math.min(...values), high: Math.max(...values) };
}
