import type { CycleEvent, CycleRecord, CycleRun, CycleSettings } from './CycleRun.ts';
import { type CycleOutcome, runCycle, type Switching, switching } from './switching.ts';

/**
 * Runs a converter cycle by cycle, exactly between switching instants.
 *
 * Constant frequency, the switch on at each clock edge, off at the peak. Rectifier, switch and comparator
 * are ideal but for the drops, resistances and delay given; the ramp is straight and starts anew at each
 * clock edge.
 * @throws RangeError when a slope or time of the run cannot be
 */
export function runCycles(run: CycleRun): CycleRecord {
  const record = emptyRecord(run.initial.length, run.cycles);
  visitCycles(run, ({ cycle, state, integral, outcome }) => {
    const period = run.timing.period_s;
    for (let place = 0; place < state.length; place += 1) {
      record.edges[place]![cycle + 1] = state[place]!;
      record.means[place]![cycle] = integral[place]! / period;
    }
    record.onTime_s[cycle] = outcome.onTime_s;
    record.peak_A[cycle] = outcome.peak_A;
    record.onCharge_C[cycle] = outcome.onCharge_C;
    record.conduction_s[cycle] = outcome.conduction_s;
    record.ending[cycle] = outcome.ending;
  });
  for (const [place, value] of run.initial.entries()) record.edges[place]![0] = value;
  return record;
}

/** A cycle that has just been run; the arrays are written over by the next. */
export interface VisitedCycle {
  cycle: number;
  readonly state: Float64Array;
  readonly integral: Float64Array;
  readonly outcome: CycleOutcome;
}

/**
 * Runs without a record, calling back after each cycle.
 * @param before called at each clock edge, with what will govern the cycle
 */
export function visitCycles(
  run: CycleRun,
  after: (visited: VisitedCycle) => void,
  before?: (circuit: Switching, state: Float64Array, cycle: number) => void,
): void {
  const state = Float64Array.from(run.initial);
  const outcome = { onTime_s: 0, peak_A: 0, onCharge_C: 0, conduction_s: 0, ending: 0 };
  const visited = { cycle: 0, state, integral: new Float64Array(state.length), outcome };
  const events = [...(run.events ?? [])].sort((a, b) => a.cycle - b.cycle);
  let settings: CycleSettings = run;
  let circuit = switching(settings, run.timing);
  let coming = 0;
  for (let cycle = 0; cycle < run.cycles; cycle += 1) {
    for (let event = events[coming]; event !== undefined && event.cycle <= cycle; event = events[coming]) {
      settings = { ...settings, ...event };
      circuit = switching(settings, run.timing);
      if (event.cycle === cycle) shift(state, event);
      coming += 1;
    }
    visited.cycle = cycle;
    visited.integral.fill(0);
    before?.(circuit, state, cycle);
    runCycle(circuit, state, visited.integral, outcome);
    after(visited);
  }
}

function shift(state: Float64Array, { shift_A }: CycleEvent): void {
  state[0]! += shift_A ?? 0;
}

function emptyRecord(states: number, cycles: number): CycleRecord {
  const columns = (length: number) => Array.from({ length: states }, () => new Float64Array(length));
  return {
    edges: columns(cycles + 1),
    means: columns(cycles),
    onTime_s: new Float64Array(cycles),
    peak_A: new Float64Array(cycles),
    onCharge_C: new Float64Array(cycles),
    conduction_s: new Float64Array(cycles),
    ending: new Uint8Array(cycles),
  };
}
