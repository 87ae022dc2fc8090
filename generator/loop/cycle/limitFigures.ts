import { type CycleRun, endings } from './CycleRun.ts';
import { periodicOrbit } from './periodicOrbit.ts';

/** What the current limit leaves, in the inductor's frame. */
export interface LimitFigures {
  readonly peak_A: number;
  /** Mean inductor current: what a buck or forward converter delivers. */
  readonly meanCurrent_A: number;
  /** Mean current while the switch is off, over the whole period: what the others deliver. */
  readonly offCurrent_A: number;
  readonly onTime_s: number;
}

/**
 * The steady state in which the current limit, and nothing else, ends each on-time.
 *
 * The independent check of peak limit = limit − ma·D·T (where the limit sees the ramp) + m1·delay, and of
 * mean = peak − ½·m2·D′·T.
 * @returns null where the run has no limit, or the limit is not what ends the on-time
 */
export function limitFigures(run: CycleRun): LimitFigures | null {
  if (run.limit === null) return null;
  const orbit = periodicOrbit({ ...run, control_A: Number.POSITIVE_INFINITY });
  if (orbit === null || orbit.cycle.ending[0] !== endings.limit) return null;
  const { peak_A, onTime_s, means, onCharge_C } = orbit.cycle;
  return {
    peak_A: peak_A[0]!,
    meanCurrent_A: means[0]![0]!,
    offCurrent_A: means[0]![0]! - onCharge_C[0]! / run.timing.period_s,
    onTime_s: onTime_s[0]!,
  };
}
