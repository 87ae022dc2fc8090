import type { CycleRun, LinearInterval } from './CycleRun.ts';
import type { Motion } from './Motion.ts';
import { visitCycles } from './runCycles.ts';
import { rampSlope, runCycle, type Switching } from './switching.ts';

/** A stretch of a run as waveforms; every switching instant is in it, with the values on both sides. */
export interface CycleWaveforms {
  /** From the first clock edge of the run [s]; never falling. */
  readonly time_s: Float64Array;
  /** One column per state. */
  readonly states: readonly Float64Array[];
  /** What current and ramp are compared with, less the ramp: the current trips the comparator on it [A]. */
  readonly threshold_A: Float64Array;
  /** Null where the output is ideal. */
  readonly output_V: Float64Array | null;
  /** 1 while the switch is on. */
  readonly on: Uint8Array;
}

/**
 * Waveforms of the last cycles of a run, for plots.
 *
 * @param from first cycle shown; the run is computed from its beginning
 * @param pieces into how many equal parts each interval between switching instants is cut: 1 suffices for
 *   straight lines
 */
export function sampleCycles(run: CycleRun, from: number, pieces: number): CycleWaveforms {
  const rows: Row[] = [];
  visitCycles(
    run,
    () => {},
    (circuit, state, cycle) => {
      if (cycle < from) return;
      const begin_s = cycle * circuit.period_s;
      for (const row of cycleRows(circuit, state, pieces))
        rows.push({ ...row, time_s: begin_s + row.time_s });
    },
  );
  return columnsOf(rows, run);
}

interface Row {
  readonly time_s: number;
  readonly state: Float64Array;
  readonly threshold_A: number;
  readonly output_V: number | null;
  readonly on: boolean;
}

/** A stretch of one motion as it was run. */
interface Stretch {
  readonly name: 'on' | 'off' | 'idle';
  readonly motion: Motion;
  readonly state: Float64Array;
  readonly time_s: number;
}

/** One cycle from its first state, run once more to see its stretches. */
function cycleRows(circuit: Switching, first: Float64Array, pieces: number): Row[] {
  const { stage } = circuit.settings;
  const slope = rampSlope(circuit, first);
  const unread = new Float64Array(first.length);
  let begin_s = 0;
  return stretchesOf(circuit, first).flatMap(({ name, motion, state, time_s }) => {
    const from_s = begin_s;
    begin_s += time_s;
    return Array.from({ length: pieces + 1 }, (_, piece): Row => {
      if (piece > 0) motion.advance(state, time_s / pieces, unread);
      const now_s = from_s + (time_s * piece) / pieces;
      return {
        time_s: now_s,
        state: state.slice(),
        threshold_A: threshold(circuit, slope, now_s),
        output_V: stage.kind === 'linear' ? outputOf(stage[name]!, state) : null,
        on: name === 'on',
      };
    });
  });
}

/** Runs the cycle on a copy of the state, its motions overheard. */
function stretchesOf(circuit: Switching, first: Float64Array): Stretch[] {
  const stretches: Stretch[] = [];
  const overheard = (name: Stretch['name'], motion: Motion): Motion => ({
    ...motion,
    advance(state, time_s, integral) {
      if (time_s > 0) stretches.push({ name, motion, state: state.slice(), time_s });
      motion.advance(state, time_s, integral);
    },
  });
  const { on, off, idle } = circuit;
  runCycle(
    {
      ...circuit,
      on: overheard('on', on),
      off: overheard('off', off),
      idle: idle && overheard('idle', idle),
    },
    first.slice(),
    new Float64Array(first.length),
    { onTime_s: 0, peak_A: 0, onCharge_C: 0, conduction_s: 0, ending: 0 },
  );
  return stretches;
}

function threshold({ settings }: Switching, slope: number, time: number): number {
  const { control_A, limit } = settings;
  const ramped = control_A - slope * time;
  if (limit === null) return ramped;
  return Math.min(ramped, limit.level_A - (limit.seesRamp ? slope * time : 0));
}

function outputOf({ output }: LinearInterval, state: Float64Array): number {
  return output.row.reduce((sum, share, place) => sum + share * state[place]!, output.constant);
}

function columnsOf(rows: readonly Row[], run: CycleRun): CycleWaveforms {
  return {
    time_s: Float64Array.from(rows, ({ time_s }) => time_s),
    states: run.initial.map((_, place) => Float64Array.from(rows, ({ state }) => state[place]!)),
    threshold_A: Float64Array.from(rows, ({ threshold_A }) => threshold_A),
    output_V:
      run.stage.kind === 'ideal-output'
        ? null
        : Float64Array.from(rows, ({ output_V }) => output_V ?? Number.NaN),
    on: Uint8Array.from(rows, ({ on }) => Number(on)),
  };
}
