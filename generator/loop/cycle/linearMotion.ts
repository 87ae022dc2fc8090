import { balance } from './balance.ts';
import type { LinearInterval, LinearStage } from './CycleRun.ts';
import type { Motion, Watched } from './Motion.ts';

/** Times nearer than this share of the range are one. */
const resolution = 4e-16;
/** Relative size of the first term of the series that is left out. */
const truncation = 1e-17;

type Rows = Readonly<Record<Watched | 'negative', Float64Array>>;

/**
 * States that obey dx/dt = A·x + b, moved exactly.
 *
 *   x(t) = x0 + Σ A^(k−1)·(A·x0 + b)·t^k/k!
 *
 * summed to rounding over stretches of at most 1/‖A‖, so that it holds for any A: stiff, singular,
 * oscillating, or with eigenvalues that coincide. The norm is taken after balancing, because states of
 * different units cannot be compared.
 */
export function linearMotion(stage: LinearStage, interval: LinearInterval): Motion {
  const size = interval.source.length;
  const matrix = Float64Array.from(interval.matrix.flat());
  const source = Float64Array.from(interval.source);
  const { norm_per_s: norm, weights } = balance(interval.matrix);
  const rows = watchedRows(stage, size);
  const restartLevel_A_per_s = -(stage.off.source[0] ?? 0);
  const slopes = new Float64Array(size);
  const term = new Float64Array(size);
  const next = new Float64Array(size);
  const probe = new Float64Array(size);
  const unread = new Float64Array(size);

  /** A·x + b into `slopes`. */
  function differentiate(state: Float64Array): void {
    for (let row = 0; row < size; row += 1) {
      let sum = source[row]!;
      for (let column = 0; column < size; column += 1) sum += matrix[row * size + column]! * state[column]!;
      slopes[row] = sum;
    }
  }

  /** One stretch of the series; the integral is that of the same series. */
  function stretch(state: Float64Array, time: number, integral: Float64Array): void {
    differentiate(state);
    for (let row = 0; row < size; row += 1) {
      term[row] = slopes[row]! * time;
      integral[row]! += state[row]! * time + (term[row]! * time) / 2;
      state[row]! += term[row]!;
    }
    const reach = norm * time;
    let bound = 1;
    for (let order = 2; bound > truncation; order += 1) {
      bound *= reach / order;
      for (let row = 0; row < size; row += 1) {
        let sum = 0;
        for (let column = 0; column < size; column += 1) sum += matrix[row * size + column]! * term[column]!;
        next[row] = (sum * time) / order;
      }
      for (let row = 0; row < size; row += 1) {
        term[row] = next[row]!;
        state[row]! += term[row]!;
        integral[row]! += (term[row]! * time) / (order + 1);
      }
    }
  }

  function advance(state: Float64Array, time: number, integral: Float64Array): void {
    if (time === 0) return;
    const stretches = Math.max(1, Math.ceil(norm * Math.abs(time)));
    for (let count = 0; count < stretches; count += 1) stretch(state, time / stretches, integral);
  }

  /**
   * First time at which row·x + slope·t ≥ level.
   *
   * With M ≥ |f″| over the next 1/‖A‖, f cannot cross before f + f′τ + Mτ²/2 does. Steps of that length are
   * taken until f is sure to rise through its only root in the stretch ahead.
   */
  function reach(
    state: Float64Array,
    row: Float64Array,
    slope: number,
    level: number,
    from: number,
    to: number,
  ): number {
    probe.set(state);
    advance(probe, from, unread);
    const rowBend = dualNorm(row, weights) * norm * Math.E;
    for (let time = from; ; ) {
      const short = level - slope * time - dot(row, probe);
      const ahead = Math.min(1 / norm, to - time);
      if (short <= 0) return time;
      if (!(ahead > 0)) return Number.POSITIVE_INFINITY;
      differentiate(probe);
      const steepness = dot(row, slopes) + slope;
      const bend = rowBend * weightedNorm(slopes, weights);
      if (steepness > 3 * bend * ahead && steepness * ahead > 1.5 * short)
        return refine(row, slope, level, time);
      const safe = (2 * short) / (steepness + Math.sqrt(steepness * steepness + 2 * bend * short));
      if (safe >= to - time && ahead === to - time) return Number.POSITIVE_INFINITY;
      const step = Math.min(safe, ahead);
      if (step <= resolution * to) return time;
      advance(probe, step, unread);
      time += step;
    }
  }

  /**
   * Newton's method from `probe` at a time, where the slope changes by less than a third up to the root:
   * each step is then at most a quarter of the one before, until it is rounding.
   */
  function refine(row: Float64Array, slope: number, level: number, from: number): number {
    let time = from;
    for (let last = Number.POSITIVE_INFINITY; ; ) {
      differentiate(probe);
      const step = (level - slope * time - dot(row, probe)) / (dot(row, slopes) + slope);
      if (!(Math.abs(step) < last / 2) || Math.abs(step) <= resolution * time) return time;
      advance(probe, step, unread);
      time += step;
      last = Math.abs(step);
    }
  }

  return {
    advance,
    timeToReach(state, watched, slope, level, from, to) {
      const wanted = watched === 'restart' ? restartLevel_A_per_s : level;
      return reach(state, rows[watched], slope, wanted, from, to);
    },
    timeToZero(state, to) {
      if (state[0]! > 0) return reach(state, rows.negative, 0, 0, 0, to);
      probe.set(state);
      advance(probe, firstRise * to, unread);
      return probe[0]! > 0 ? reach(state, rows.negative, 0, 0, firstRise * to, to) : 0;
    },
  };
}

/** Whether a current leaves zero shows after this share of the time: its slope may begin at zero too. */
const firstRise = 1e-9;

function watchedRows(stage: LinearStage, size: number): Rows {
  const unit = (sign: number) => Float64Array.from({ length: size }, (_, state) => (state === 0 ? sign : 0));
  return {
    trip: Float64Array.from(stage.trip),
    current: unit(1),
    negative: unit(-1),
    restart: Float64Array.from(stage.off.matrix[0]!),
  };
}

function dot(row: Float64Array, column: Float64Array): number {
  let sum = 0;
  for (let place = 0; place < row.length; place += 1) sum += row[place]! * column[place]!;
  return sum;
}

/** Largest |x|/weight. */
function weightedNorm(column: Float64Array, weights: Float64Array): number {
  let largest = 0;
  for (let place = 0; place < column.length; place += 1)
    largest = Math.max(largest, Math.abs(column[place]!) / weights[place]!);
  return largest;
}

/** Σ |row|·weight: |row·x| ≤ this times the norm above. */
function dualNorm(row: Float64Array, weights: Float64Array): number {
  let sum = 0;
  for (let place = 0; place < row.length; place += 1) sum += Math.abs(row[place]!) * weights[place]!;
  return sum;
}
