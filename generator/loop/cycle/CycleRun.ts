/**
 * An inductor current between two voltages that do not move: the output held by an ideal source.
 *
 * While the switch is on L·di/dt = up − i·R_up, while it is off L·di/dt = −(down + i·R_down). Every
 * converter of the region is one, in the frame of its inductor.
 */
export interface IdealOutputStage {
  readonly kind: 'ideal-output';
  readonly inductance_H: number;
  readonly up_V: number;
  readonly down_V: number;
  readonly up_ohm: number;
  readonly down_ohm: number;
}

/** dx/dt = A·x + b while the switches stand as they do; output voltage = row·x + constant [V]. */
export interface LinearInterval {
  readonly matrix: readonly (readonly number[])[];
  readonly source: readonly number[];
  readonly output: { readonly row: readonly number[]; readonly constant: number };
}

/**
 * A power stage of several states, of which the first is the inductor current [A].
 *
 * Further states may be anything linear: a capacitor's voltage, an error amplifier's, a sine that is
 * injected.
 */
export interface LinearStage {
  readonly kind: 'linear';
  readonly on: LinearInterval;
  readonly off: LinearInterval;
  /** With the current at zero and no path for it; null: the stage conducts in both directions. */
  readonly idle: LinearInterval | null;
  /** What the comparator sees beside ramp and control level, inductor-referred: row·x [A]. */
  readonly trip: readonly number[];
}

export type CycleStage = IdealOutputStage | LinearStage;

/** A ceiling on the sensed current beside the control level; without the ramp in it, a clamp that follows the ramp. */
export interface CurrentLimit {
  readonly level_A: number;
  readonly seesRamp: boolean;
}

/** Everything that an event may change, inductor-referred. */
export interface CycleSettings {
  readonly stage: CycleStage;
  /** Compensating slope, from zero at each clock edge [A/s]. */
  readonly rampSlope_A_per_s: number;
  /** What the slope gains per volt of output, read at each clock edge [A/(V·s)]; linear stages only. */
  readonly rampPerOutputVolt_A_per_Vs: number;
  /** A ramp that the controller adds besides [A/s]. */
  readonly internalSlope_A_per_s: number;
  /** The current at which the comparator would trip without a ramp [A]; infinite: the limit alone decides. */
  readonly control_A: number;
  readonly limit: CurrentLimit | null;
}

/** A change at the clock edge that begins a cycle. */
export interface CycleEvent extends Partial<CycleSettings> {
  readonly cycle: number;
  /** Added to the inductor current [A]. */
  readonly shift_A?: number;
}

export interface CycleTiming {
  readonly period_s: number;
  /** The clock turns the switch off here in any case. */
  readonly maximumDuty: number;
  /** The comparator is not heard before this, less its own delay [s]. */
  readonly minimumOnTime_s: number;
  /** From trip to turn-off [s]. */
  readonly comparatorDelay_s: number;
  /** Whether a pulse that would be ended before the minimum on-time is left out; else it lasts that long. */
  readonly skipsPulses: boolean;
  /** Whether a rectifier keeps the current from reversing; else conduction is continuous at any load. */
  readonly rectifies: boolean;
}

export interface CycleRun extends CycleSettings {
  readonly timing: CycleTiming;
  readonly cycles: number;
  /** State at the first clock edge: the current alone for an ideal output. */
  readonly initial: readonly number[];
  readonly events?: readonly CycleEvent[];
}

/** What ended an on-time. */
export const endings = {
  comparator: 0,
  limit: 1,
  maximumDuty: 2,
  minimumOnTime: 3,
  skipped: 4,
} as const;

/** A run, cycle by cycle. */
export interface CycleRecord {
  /** One column per state: its values at the clock edges, one more than there are cycles; shifts are not in them. */
  readonly edges: readonly Float64Array[];
  /** One column per state: its mean over each cycle. */
  readonly means: readonly Float64Array[];
  readonly onTime_s: Float64Array;
  /** Inductor current at turn-off [A]. */
  readonly peak_A: Float64Array;
  /** Charge through the inductor while the switch is on [A·s]. */
  readonly onCharge_C: Float64Array;
  /** How long current flows in each cycle, the period where conduction is continuous [s]. */
  readonly conduction_s: Float64Array;
  /** One of `endings` per cycle. */
  readonly ending: Uint8Array;
}
