import { failure, type Outcome, success } from '../base/Problem.ts';
import { type Interval, outerInterval } from '../base/Quantity.ts';
import type { ReadSpecification } from '../spec/readSpecification.ts';
import type { Specification } from '../spec/Specification.ts';
import { boxCorners, type Coordinates, clipBox, type HalfSpace } from './clipBox.ts';
import { outputAtDuty } from './dutyInverse.ts';
import { impossibleOutputs, impossibleWithoutOutput } from './impossibleRegion.ts';
import { type OperatingRegion, type RegionPoint, regionPoint } from './OperatingRegion.ts';
import type { PowerStage } from './PowerStage.ts';
import { regionCuts } from './regionCuts.ts';
import { dropsAt, lossesVary } from './stageDrops.ts';

/**
 * The operating region: input × output (or every duty up to the maximum) × load × drops, limited to the
 * duties that the controller can make.
 */
export function buildRegion(request: ReadSpecification, stage: PowerStage): Outcome<OperatingRegion> {
  return request.specification.output_V === null
    ? everyDuty(request, stage)
    : knownOutputs(request, stage, request.specification.output_V.map(outerInterval));
}

/** The duty below which the minimum on-time makes the converter skip pulses, at the highest frequency. */
export function leastDuty({ minimumOnTime_s, frequency_Hz }: Specification): number {
  return minimumOnTime_s.high * frequency_Hz.to.high;
}

/**
 * Input, load, drop and share of the losses' tolerance: what varies besides the output.
 *
 * Along each of them, as along output or duty, the damping index is linear-fractional and the limits of
 * duty are linear, so that the extremes are at corners of the box and where its edges cross a limit.
 */
function commonSides(specification: Specification): Interval[] {
  const { input_V, load_A, rectifierDrop_V } = specification;
  return [
    outerInterval(input_V),
    load_A ? outerInterval(load_A) : { low: 0, high: 0 },
    { low: rectifierDrop_V.low, high: rectifierDrop_V.high },
    { low: 0, high: lossesVary(specification) ? 1 : 0 },
  ];
}

/** A point of the box; the output stands last. */
function pointOf(specification: Specification, stage: PowerStage, outputIndex: number) {
  return ([inputVoltage_V, loadCurrent_A, drop_V, share, outputVoltage_V]: Coordinates): RegionPoint =>
    regionPoint(
      stage,
      {
        inputVoltage_V: inputVoltage_V!,
        outputVoltage_V: outputVoltage_V!,
        loadCurrent_A: loadCurrent_A!,
      },
      dropsAt(specification, drop_V!, share!),
      outputIndex,
    );
}

function knownOutputs(
  request: ReadSpecification,
  stage: PowerStage,
  outputs: readonly Interval[],
): Outcome<OperatingRegion> {
  const { specification } = request;
  const most = (point: RegionPoint) => point.down_V - specification.maximumDutyRatio * point.swing_V;
  const least = (point: RegionPoint) => leastDuty(specification) * point.swing_V - point.down_V;
  const verticesOf = (
    output: Interval,
    index: number,
    limits: readonly ((point: RegionPoint) => number)[],
  ) => {
    const at = pointOf(specification, stage, index);
    const planes = limits.map(
      (limit): HalfSpace =>
        (point) =>
          limit(at(point)),
    );
    return clipBox([...commonSides(specification), output], planes).map(at);
  };
  const perOutput = outputs.map((output, index) => verticesOf(output, index, [most, least]));
  const unreachable = outputs.flatMap((output, index) =>
    perOutput[index]!.length > 0 ? [] : [{ output, atLongerDuties: verticesOf(output, index, [most]) }],
  );
  if (unreachable.length > 0) return failure(impossibleOutputs(request, stage, unreachable));
  const vertices = perOutput.flat();
  return success({
    stage,
    inputVoltage_V: outerInterval(specification.input_V),
    outputVoltage_V: hull(vertices.map((vertex) => vertex.outputVoltage_V)),
    duty: hull(vertices.map((vertex) => vertex.duty)),
    vertices,
    cuts: regionCuts(specification, stage),
  });
}

/**
 * Every duty at every input: the output that it makes follows.
 *
 * Down to nothing, where the output is that of a short circuit less the drops: the falling slope of a
 * duty of nothing is nothing.
 */
function everyDuty(request: ReadSpecification, stage: PowerStage): Outcome<OperatingRegion> {
  const { specification } = request;
  const duty = { low: leastDuty(specification), high: specification.maximumDutyRatio };
  const at = pointOf(specification, stage, 0);
  const vertices = boxCorners([...commonSides(specification), duty]).map((point) => {
    const unit = at(point.with(-1, 0));
    return at(point.with(-1, outputAtDuty(stage, unit, unit.drops, point.at(-1)!)));
  });
  if (duty.low > duty.high || vertices.some(({ swing_V }) => !(swing_V > 0)))
    return failure(impossibleWithoutOutput(request, vertices));
  return success({
    stage,
    inputVoltage_V: outerInterval(specification.input_V),
    outputVoltage_V: null,
    duty,
    vertices,
    cuts: regionCuts(specification, stage),
  });
}

function hull(values: readonly number[]): Interval {
  return { low: Math.min(...values), high: Math.max(...values) };
}
