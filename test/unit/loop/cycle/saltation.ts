import { eigs, expm, identity, type Matrix, matrix, multiply, subtract } from 'mathjs';
import type { LinearInterval, LinearStage } from '../../../../generator/loop/cycle/CycleRun.ts';

const exponential = (interval: LinearInterval, time: number) =>
  expm(matrix(interval.matrix.map((row) => row.map((value) => value * time)))) as Matrix;

/** x(t), by the exponential of the matrix with the source as one more column. */
export function exactState(interval: LinearInterval, state: readonly number[], time: number): number[] {
  const size = state.length;
  const augmented = [
    ...interval.matrix.map((row, place) => [...row, interval.source[place]!].map((value) => value * time)),
    new Array<number>(size + 1).fill(0),
  ];
  const moved = multiply(expm(matrix(augmented)) as Matrix, matrix([...state, 1])) as Matrix;
  return (moved.toArray() as number[]).slice(0, size);
}

/**
 * Derivative of the one-cycle map: Φ = e^(A2·D′T)·S·e^(A1·DT), S = I − (f1 − f2)·K/(K·f1 + Se), K = [1, 0].
 */
export function saltationMatrix(
  stage: LinearStage,
  state: readonly number[],
  onTime_s: number,
  period_s: number,
  slope_A_per_s: number,
): number[][] {
  const turnOff = exactState(stage.on, state, onTime_s);
  const rate = ({ matrix: A, source }: LinearInterval) =>
    A.map((row, place) => row.reduce((sum, value, other) => sum + value * turnOff[other]!, source[place]!));
  const [f1, f2] = [rate(stage.on), rate(stage.off)];
  const jump = f1.map((value, row) =>
    f1.map((_, column) => (column === 0 ? (value - f2[row]!) / (f1[0]! + slope_A_per_s) : 0)),
  );
  const salted = subtract(identity(f1.length) as Matrix, matrix(jump));
  const product = multiply(
    exponential(stage.off, period_s - onTime_s),
    multiply(salted, exponential(stage.on, onTime_s)),
  ) as Matrix;
  return product.toArray() as number[][];
}

/** Eigenvalues by rising real part; complex ones by their real part. */
export function eigenvalues(of: readonly (readonly number[])[]): { re: number; im: number }[] {
  const values = (
    eigs(matrix(of.map((row) => [...row])), { eigenvectors: false }).values as Matrix
  ).toArray();
  return values
    .map((value) =>
      typeof value === 'number' ? { re: value, im: 0 } : (value as unknown as { re: number; im: number }),
    )
    .sort((a, b) => a.re - b.re || a.im - b.im);
}
