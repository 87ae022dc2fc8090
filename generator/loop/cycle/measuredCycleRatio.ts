import type { CycleRun } from './CycleRun.ts';
import { differences } from './differences.ts';
import type { PeriodicOrbit } from './periodicOrbit.ts';
import { runCycles } from './runCycles.ts';

/** A perturbation after which nothing is left of this share counts as settled (one hundredth: common practice). */
const settledShare = 0.01;

/**
 * How a small perturbation of the current at a clock edge goes on: its size at the following edges [A].
 *
 * Half of the difference between two runs, one with it added and one with it taken away: what is even in
 * it drops out.
 * @returns as many values as cycles, and the perturbation itself in front
 */
export function perturbationDecay(
  run: CycleRun,
  orbit: PeriodicOrbit,
  shift_A: number,
  cycles: number,
): Float64Array {
  const shifted = (sign: number) =>
    runCycles({
      ...run,
      cycles,
      control_A: orbit.control_A,
      initial: orbit.state.map((value, place) => (place === 0 ? value + sign * shift_A : value)),
      events: [],
    }).edges[0]!;
  const above = shifted(1);
  const below = shifted(-1);
  return above.map((value, edge) => (value - below[edge]!) / 2);
}

/**
 * α as the engine shows it: the perturbation after one cycle over the perturbation.
 *
 * The independent check of α = 1 − 1/x; exact for any size of it where the slopes are constant and nothing
 * but the comparator ends the on-time.
 */
export function measuredCycleRatio(run: CycleRun, orbit: PeriodicOrbit, shift_A: number): number {
  const [before, after] = perturbationDecay(run, orbit, shift_A, 1);
  return after! / before!;
}

/**
 * Cycles until a perturbation stays below one hundredth of itself.
 *
 * @returns null where it does not within the cycles given
 */
export function measuredSettlingCycles(
  run: CycleRun,
  orbit: PeriodicOrbit,
  shift_A: number,
  cycles = 1000,
): number | null {
  const decay = perturbationDecay(run, orbit, shift_A, cycles);
  const last = decay.findLastIndex((value) => Math.abs(value) > settledShare * Math.abs(shift_A));
  return last === cycles ? null : last + 1;
}

/**
 * Derivative of the state at the next clock edge by the state at this one, at a periodic orbit.
 *
 * Its eigenvalues say whether the orbit is stable. By central differences of two sizes, extrapolated:
 * good to about 1e-10 of the largest element.
 */
export function cycleJacobian(run: CycleRun, orbit: PeriodicOrbit): number[][] {
  const map = (initial: readonly number[]) =>
    runCycles({ ...run, initial, control_A: orbit.control_A, cycles: 1, events: [] }).edges.map(
      (column) => column[1]!,
    );
  const scale = Math.max(...orbit.state.map(Math.abs), orbit.cycle.peak_A[0]!);
  const [coarse, fine] = [2e-4, 1e-4].map((share) => differences(map, orbit.state, scale, share));
  return fine!.map((row, i) => row.map((value, j) => (4 * value - coarse![i]![j]!) / 3));
}
