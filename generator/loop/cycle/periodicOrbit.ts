import type { CycleRecord, CycleRun } from './CycleRun.ts';
import { differences } from './differences.ts';
import { runCycles } from './runCycles.ts';
import { solveLinear } from './solveLinear.ts';
import { rampSlope, switching } from './switching.ts';

/** What the control level is to be found for. */
export type Wanted =
  | { readonly quantity: 'peak'; readonly value: number }
  /** Mean over a cycle of one state: 0 the inductor current [A], 1 a capacitor's voltage [V]. */
  | { readonly quantity: 'mean'; readonly state: number; readonly value: number };

/** A cycle that ends as it began, stable or not. */
export interface PeriodicOrbit {
  readonly state: readonly number[];
  readonly control_A: number;
  /** That one cycle. */
  readonly cycle: CycleRecord;
}

/** Of the unknown: what Newton's method makes of the error in its slopes is smaller still. */
const differenceStep = 1e-5;
const iterations = 60;
const halvings = 30;
/** Relative to the largest of state and control. */
const converged = 2e-14;
/** Duties at which the comparator is made to trip where the first attempt does not converge. */
const duties = [0.5, 0.25, 0.75, 0.1, 0.9];
/** Cycles run before a last attempt: a stable orbit draws them in. */
const warmUps = [50, 1000, 20_000];

/**
 * The periodic orbit that Newton's method finds from the run's initial state and control level.
 *
 * Solves x(T) − x(0) = 0, and with `wanted` the control level too. Events do not count.
 * @returns null where there is none to be found: no orbit of one cycle reaches what is wanted
 */
export function periodicOrbit(run: CycleRun, wanted?: Wanted): PeriodicOrbit | null {
  for (const state of startingStates(run)) {
    const start = wanted === undefined ? [...state] : [...state, run.control_A];
    const found = newton((unknowns) => residual(run, wanted, unknowns), start);
    if (found !== null) return orbitOf(run, wanted, found);
  }
  return null;
}

function* startingStates(run: CycleRun): Generator<readonly number[]> {
  yield run.initial;
  for (const duty of duties) yield run.initial.with(0, currentForDuty(run, duty));
  for (const cycles of warmUps) yield lastState(runCycles({ ...run, cycles, events: [] }));
}

/** The current at the clock edge from which the first on-time would have about this duty [A]. */
function currentForDuty(run: CycleRun, duty: number): number {
  const circuit = switching(run, run.timing);
  const onTime_s = duty * circuit.latest_s;
  const level_A = Math.min(run.control_A, run.limit?.level_A ?? Number.POSITIVE_INFINITY);
  const state = Float64Array.from(run.initial.with(0, level_A));
  const ramp_A = rampSlope(circuit, state) * onTime_s;
  circuit.on.advance(state, onTime_s, new Float64Array(state.length));
  return level_A - ramp_A - (state[0]! - level_A);
}

function lastState({ edges, onTime_s }: CycleRecord): number[] {
  return edges.map((column) => column[onTime_s.length]!);
}

function oneCycle(run: CycleRun, wanted: Wanted | undefined, unknowns: readonly number[]): CycleRecord {
  const initial = unknowns.slice(0, run.initial.length);
  const control_A = wanted === undefined ? run.control_A : unknowns.at(-1)!;
  return runCycles({ ...run, initial, control_A, cycles: 1, events: [] });
}

function orbitOf(run: CycleRun, wanted: Wanted | undefined, unknowns: readonly number[]): PeriodicOrbit {
  return {
    state: unknowns.slice(0, run.initial.length),
    control_A: wanted === undefined ? run.control_A : unknowns.at(-1)!,
    cycle: oneCycle(run, wanted, unknowns),
  };
}

function residual(run: CycleRun, wanted: Wanted | undefined, unknowns: readonly number[]): number[] {
  const cycle = oneCycle(run, wanted, unknowns);
  const moved = lastState(cycle).map((value, place) => value - unknowns[place]!);
  if (wanted === undefined) return moved;
  const reached = wanted.quantity === 'peak' ? cycle.peak_A[0]! : cycle.means[wanted.state]![0]!;
  return [...moved, reached - wanted.value];
}

/** Damped by halving wherever a full step does not bring the residual down. */
function newton(evaluate: (unknowns: readonly number[]) => number[], start: number[]): number[] | null {
  let unknowns = start;
  let missed = evaluate(unknowns);
  for (let iteration = 0; iteration < iterations; iteration += 1) {
    const scale = Math.max(...unknowns.map(Math.abs), Number.MIN_VALUE);
    const step = solveLinear(differences(evaluate, unknowns, scale, differenceStep), missed);
    if (step === null || !step.every(Number.isFinite)) return null;
    const better = downhill(evaluate, unknowns, step, missed);
    if (Math.max(...step.map(Math.abs)) <= converged * scale || better === null)
      return size(missed) <= 1e3 * converged * scale ? unknowns : null;
    unknowns = better.unknowns;
    missed = better.missed;
  }
  return null;
}

function downhill(
  evaluate: (unknowns: readonly number[]) => number[],
  from: readonly number[],
  step: readonly number[],
  missed: readonly number[],
) {
  for (let share = 1; share > 2 ** -halvings; share /= 2) {
    const unknowns = from.map((value, place) => value - share * step[place]!);
    const left = evaluate(unknowns);
    if (size(left) < size(missed)) return { unknowns, missed: left };
  }
  return null;
}

function size(values: readonly number[]): number {
  return Math.max(...values.map(Math.abs));
}
