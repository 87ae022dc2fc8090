import type { CycleRun, LinearStage } from './CycleRun.ts';
import { linearMotion } from './linearMotion.ts';
import { solveLinear } from './solveLinear.ts';
import { rampSlope, switching } from './switching.ts';

/** State at the clock edge and control level with which a linear stage runs at a duty. */
export interface DutyOrbit {
  readonly state: readonly number[];
  readonly control_A: number;
}

/**
 * The periodic orbit of a linear stage at a given duty, in continuous conduction.
 *
 * At a fixed duty one cycle is affine, x(T) = Φ·x(0) + c, so that the orbit is one linear equation; the
 * control level is what the comparator then sees, a delay before turn-off.
 * @returns null where no such orbit is: an output with neither load nor loss
 */
export function orbitAtDuty(run: CycleRun & { readonly stage: LinearStage }, duty: number): DutyOrbit | null {
  const { stage, timing } = run;
  const [on, off] = [linearMotion(stage, stage.on), linearMotion(stage, stage.off)];
  const onTime_s = duty * timing.period_s;
  const unread = new Float64Array(run.initial.length);
  const cycle = (from: readonly number[]) => {
    const state = Float64Array.from(from);
    on.advance(state, onTime_s, unread);
    off.advance(state, timing.period_s - onTime_s, unread);
    return state;
  };
  const origin = run.initial.map(() => 0);
  const constant = cycle(origin);
  const columns = origin.map((_, place) => cycle(origin.with(place, 1)));
  const matrix = origin.map((_, row) =>
    columns.map((column, place) => Number(place === row) - (column[row]! - constant[row]!)),
  );
  const state = solveLinear(matrix, [...constant]);
  if (state === null) return null;
  const tripped = Float64Array.from(state);
  const tripTime_s = onTime_s - timing.comparatorDelay_s;
  on.advance(tripped, tripTime_s, unread);
  const slope = rampSlope(switching(run, timing), Float64Array.from(state));
  const seen = stage.trip.reduce((sum, share, place) => sum + share * tripped[place]!, 0);
  return { state, control_A: seen + slope * tripTime_s };
}
