import { engineering } from '../base/engineering.ts';
import type { Problem } from '../base/Problem.ts';
import { type Interval, outerInterval } from '../base/Quantity.ts';
import type { ReadSpecification } from '../spec/readSpecification.ts';
import type { RegionPoint } from './OperatingRegion.ts';
import type { PowerStage } from './PowerStage.ts';

/** An output without a single point, and the points that it would have without the minimum on-time. */
export interface UnreachableOutput {
  readonly output: Interval;
  readonly atLongerDuties: readonly RegionPoint[];
}

/** Why no point can be regulated, for each output that is out of reach everywhere. */
export function impossibleOutputs(
  request: ReadSpecification,
  stage: PowerStage,
  outputs: readonly UnreachableOutput[],
): Problem[] {
  return outputs.map(({ output, atLongerDuties }) =>
    atLongerDuties.length > 0
      ? tooLongOnTime(request, Math.max(...atLongerDuties.map(({ duty }) => duty)), reachOf(output))
      : outOfReach(request, stage, output),
  );
}

/** Why no duty can be made where the output is not known. */
export function impossibleWithoutOutput(
  request: ReadSpecification,
  vertices: readonly RegionPoint[],
): Problem[] {
  const stalled = vertices.find(({ swing_V }) => !(swing_V > 0));
  return [
    stalled === undefined
      ? tooLongOnTime(request, request.specification.maximumDutyRatio, 'any output')
      : lossesAboveInput(request, stalled),
  ];
}

function outOfReach(
  { specification, place }: ReadSpecification,
  stage: PowerStage,
  output: Interval,
): Problem {
  const { high } = outerInterval(specification.input_V);
  return {
    code: 'impossible',
    severity: 'error',
    key: 'output',
    place: place('output'),
    expected: `an output that a ${stage.kind} can make from at most ${engineering(high, 'V')} at duties up to ${percent(specification.maximumDutyRatio)}`,
    received: reachOf(output),
    fix: 'lower the output, raise the input or the maximum duty, or choose another converter',
  };
}

function tooLongOnTime({ specification, place }: ReadSpecification, duty: number, output: string): Problem {
  const longest_s = duty / specification.frequency_Hz.to.high;
  return {
    code: 'impossible',
    severity: 'error',
    key: 'minimumOnTime',
    place: place('minimumOnTime'),
    expected: `a minimum on-time of at most ${engineering(longest_s, 's')}, the longest on-time that ${output} takes at the highest frequency`,
    received: `a minimum on-time of ${engineering(specification.minimumOnTime_s.high, 's')}`,
    fix: 'lower the minimum on-time or the frequency',
  };
}

function lossesAboveInput({ place }: ReadSpecification, at: RegionPoint): Problem {
  const lost_V = at.loadCurrent_A * (at.drops.switch_ohm - at.drops.rectifier_ohm);
  return {
    code: 'impossible',
    severity: 'error',
    key: 'losses',
    place: place('losses'),
    expected: `losses of the switch at full load below ${engineering(at.inputVoltage_V, 'V')}, the lowest input`,
    received: engineering(lost_V, 'V'),
    fix: 'lower the resistance of the switch or the load, or raise the input',
  };
}

function reachOf({ low, high }: Interval): string {
  return low === high ? engineering(low, 'V') : `${engineering(low, 'V')} to ${engineering(high, 'V')}`;
}

function percent(ratio: number): string {
  return `${Number((100 * ratio).toPrecision(4))} %`;
}
