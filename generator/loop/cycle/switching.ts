import { type CycleSettings, type CycleTiming, endings, type LinearStage } from './CycleRun.ts';
import { exponentialMotion } from './exponentialMotion.ts';
import { linearMotion } from './linearMotion.ts';
import type { Motion } from './Motion.ts';
import { stillMotion, straightMotion } from './straightMotion.ts';

/** A stage and its comparator, made ready for many cycles. */
export interface Switching {
  readonly on: Motion;
  readonly off: Motion;
  /** Null: the current may reverse. */
  readonly idle: Motion | null;
  /** Output voltage at the end of a cycle [V]; null where it does not move. */
  readonly output_V: ((state: Float64Array) => number) | null;
  readonly settings: CycleSettings;
  readonly period_s: number;
  readonly latest_s: number;
  readonly blanked_s: number;
  readonly delay_s: number;
  readonly skipsPulses: boolean;
}

/** @throws RangeError when a slope, time or voltage cannot be, naming it */
export function switching(settings: CycleSettings, timing: CycleTiming): Switching {
  const { stage } = settings;
  refuse(settings, timing);
  const delay_s = timing.comparatorDelay_s;
  return {
    ...(stage.kind === 'linear' ? linearMotions(stage, timing) : idealMotions(stage, timing)),
    settings,
    period_s: timing.period_s,
    latest_s: timing.maximumDuty * timing.period_s,
    blanked_s: Math.max(0, timing.minimumOnTime_s - delay_s),
    delay_s,
    skipsPulses: timing.skipsPulses,
  };
}

type Motions = Pick<Switching, 'on' | 'off' | 'idle' | 'output_V'>;

function idealMotions(
  stage: Extract<CycleSettings['stage'], { kind: 'ideal-output' }>,
  timing: CycleTiming,
): Motions {
  const { inductance_H: L } = stage;
  const motion = (volts: number, ohm: number) =>
    ohm > 0 ? exponentialMotion(volts / L, ohm / L) : straightMotion(volts / L);
  return {
    on: motion(stage.up_V, stage.up_ohm),
    off: motion(-stage.down_V, stage.down_ohm),
    idle: timing.rectifies ? stillMotion : null,
    output_V: null,
  };
}

function linearMotions(stage: LinearStage, timing: CycleTiming): Motions {
  const { row, constant } = stage.off.output;
  return {
    on: linearMotion(stage, stage.on),
    off: linearMotion(stage, stage.off),
    idle: timing.rectifies && stage.idle !== null ? linearMotion(stage, stage.idle) : null,
    output_V: (state) => row.reduce((sum, share, place) => sum + share * state[place]!, constant),
  };
}

function refuse(settings: CycleSettings, timing: CycleTiming): void {
  const least: readonly (readonly [string, number, number])[] = [
    ['ramp slope', settings.rampSlope_A_per_s, 0],
    ['internal ramp slope', settings.internalSlope_A_per_s, 0],
    ['period', timing.period_s, Number.MIN_VALUE],
    ['maximum duty', timing.maximumDuty, 0],
    ['minimum on-time', timing.minimumOnTime_s, 0],
    ['comparator delay', timing.comparatorDelay_s, 0],
    ['room above the maximum duty', 1 - timing.maximumDuty, 0],
  ];
  for (const [name, value, bound] of least)
    if (!(value >= bound)) throw new RangeError(`${name} must be ${bound} or more, got ${value}`);
}

/** What one cycle did; written over by the next. */
export interface CycleOutcome {
  onTime_s: number;
  peak_A: number;
  onCharge_C: number;
  conduction_s: number;
  ending: number;
}

/**
 * Moves the state through one cycle, and adds its integral.
 *
 * The switch turns on at the clock edge, off when current and ramp reach the control level or the limit
 * and the comparator's delay has passed, at the clock's turn-off in any case.
 */
export function runCycle(
  circuit: Switching,
  state: Float64Array,
  integral: Float64Array,
  outcome: CycleOutcome,
): void {
  decide(circuit, state, outcome);
  const onTime = outcome.onTime_s;
  circuit.on.advance(state, onTime, integral);
  outcome.peak_A = state[0]!;
  outcome.onCharge_C = integral[0]!;
  finish(circuit, state, integral, outcome, circuit.period_s - onTime);
}

/** On-time and what ends it. */
function decide(circuit: Switching, state: Float64Array, outcome: CycleOutcome): void {
  const { on, settings, blanked_s, latest_s, delay_s } = circuit;
  const slope = rampSlope(circuit, state);
  const level = settings.control_A;
  let trip = Number.POSITIVE_INFINITY;
  if (level !== trip) trip = on.timeToReach(state, 'trip', slope, level, blanked_s, latest_s);
  let ending: number = endings.comparator;
  const { limit } = settings;
  if (limit !== null) {
    const until = Math.min(trip, latest_s);
    const hit = on.timeToReach(state, 'current', limit.seesRamp ? slope : 0, limit.level_A, blanked_s, until);
    if (hit < trip) {
      trip = hit;
      ending = endings.limit;
    }
  }
  const early = trip <= blanked_s;
  outcome.ending = early ? endings.minimumOnTime : ending;
  outcome.onTime_s = trip + delay_s;
  if (early && circuit.skipsPulses) {
    outcome.ending = endings.skipped;
    outcome.onTime_s = 0;
  } else if (!(outcome.onTime_s < latest_s)) {
    outcome.ending = endings.maximumDuty;
    outcome.onTime_s = latest_s;
  }
}

/** Slope at the comparator through the coming cycle: held, as by a filter between the output and the ramp. */
export function rampSlope({ settings, output_V }: Switching, state: Float64Array): number {
  const perVolt = settings.rampPerOutputVolt_A_per_Vs;
  const followed = output_V === null || perVolt === 0 ? 0 : perVolt * output_V(state);
  return Math.max(0, settings.rampSlope_A_per_s + followed) + settings.internalSlope_A_per_s;
}

/** A rectifier that hesitates at zero more often than this in one cycle does not conduct any more in it. */
const restarts = 8;

/** The rest of a cycle: the switch off, current flowing until it reaches zero, and again where it is driven. */
function finish(
  { off, idle, period_s }: Switching,
  state: Float64Array,
  integral: Float64Array,
  outcome: CycleOutcome,
  offTime_s: number,
): void {
  let left = offTime_s;
  outcome.conduction_s = period_s;
  for (let turn = 0; idle !== null && left > 0; turn += 1) {
    const zero = off.timeToZero(state, left);
    if (zero >= left) break;
    off.advance(state, zero, integral);
    state[0] = 0;
    left -= zero;
    const still = turn < restarts ? Math.min(idle.timeToReach(state, 'restart', 0, 0, 0, left), left) : left;
    idle.advance(state, still, integral);
    outcome.conduction_s -= still;
    left -= still;
  }
  off.advance(state, left, integral);
}
