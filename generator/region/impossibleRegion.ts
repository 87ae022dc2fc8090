import { engineering } from '../base/engineering.ts';
import type { Problem } from '../base/Problem.ts';
import { type Interval, outerInterval } from '../base/Quantity.ts';
import type { ReadSpecification } from '../spec/readSpecification.ts';
import type { PowerStage } from './PowerStage.ts';

/** Why no point of the region can be regulated, for each output that is out of reach everywhere. */
export function impossibleRegion(
  { specification, place }: ReadSpecification,
  stage: PowerStage,
  outputs: readonly (Interval | null)[],
): Problem[] {
  const input = outerInterval(specification.input_V);
  return outputs.map((output) => ({
    code: 'impossible',
    severity: 'error',
    key: output === null ? 'minimumOnTime' : 'output',
    place: place(output === null ? 'minimumOnTime' : 'output'),
    expected:
      output === null
        ? 'a minimum on-time shorter than the on-time at maximum duty'
        : `an output that a ${stage.kind} can make from at most ${engineering(input.high, 'V')} at duties up to ${percent(specification.maximumDutyRatio)}`,
    received:
      output === null
        ? `a minimum on-time of ${engineering(specification.minimumOnTime_s.high, 's')}`
        : reachOf(output),
    fix:
      output === null
        ? 'lower the minimum on-time or the frequency'
        : 'lower the output, raise the input or the maximum duty, or choose another converter',
  }));
}

function reachOf({ low, high }: Interval): string {
  return low === high ? engineering(low, 'V') : `${engineering(low, 'V')} to ${engineering(high, 'V')}`;
}

function percent(ratio: number): string {
  return `${Number((100 * ratio).toPrecision(4))} %`;
}
