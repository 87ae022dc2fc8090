/** Rounds of balancing; each halves what is left, roughly. */
const rounds = 12;

/**
 * Units in which the states of a matrix are comparable, and its norm in these.
 *
 * Scales each state until its row and its column weigh the same, then ‖S⁻¹·A·S‖∞ with S the weights:
 * every element of e^(A·t)·x is below e^(norm·t) times the largest of |x|/weight, times its weight.
 * @source Osborne, On pre-conditioning of matrices, Journal of the ACM, 1960 (from memory)
 */
export function balance(matrix: readonly (readonly number[])[]): {
  readonly norm_per_s: number;
  readonly weights: Float64Array;
} {
  const size = matrix.length;
  const weights = new Float64Array(size).fill(1);
  const scaled = (row: number, column: number) =>
    (Math.abs(matrix[row]![column]!) * weights[column]!) / weights[row]!;
  for (let round = 0; round < rounds; round += 1) {
    for (let state = 0; state < size; state += 1) {
      let across = 0;
      let down = 0;
      for (let other = 0; other < size; other += 1) {
        if (other === state) continue;
        across += scaled(state, other);
        down += scaled(other, state);
      }
      if (across > 0 && down > 0) weights[state]! *= Math.sqrt(across / down);
    }
  }
  let norm_per_s = Number.MIN_VALUE;
  for (let row = 0; row < size; row += 1) {
    let sum = 0;
    for (let column = 0; column < size; column += 1) sum += scaled(row, column);
    norm_per_s = Math.max(norm_per_s, sum);
  }
  return { norm_per_s, weights };
}
