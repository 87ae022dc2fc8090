/**
 * Solves A·x = b by elimination with partial pivoting.
 *
 * @returns null where the matrix is singular to rounding
 */
export function solveLinear(
  matrix: readonly (readonly number[])[],
  right: readonly number[],
): number[] | null {
  const rows = matrix.map((row, place) => [...row, right[place]!]);
  const size = rows.length;
  for (let column = 0; column < size; column += 1) {
    const candidates = rows.slice(column).map((row) => Math.abs(row[column]!));
    const largest = Math.max(...candidates);
    if (!(largest > 0)) return null;
    const pivot = column + candidates.indexOf(largest);
    [rows[column], rows[pivot]] = [rows[pivot]!, rows[column]!];
    for (let row = column + 1; row < size; row += 1) eliminate(rows[row]!, rows[column]!, column);
  }
  return backSubstitute(rows);
}

function eliminate(row: number[], by: readonly number[], column: number): void {
  const share = row[column]! / by[column]!;
  for (let place = column; place < row.length; place += 1) row[place]! -= share * by[place]!;
}

function backSubstitute(rows: readonly (readonly number[])[]): number[] {
  const size = rows.length;
  const solution = new Array<number>(size).fill(0);
  for (let place = size - 1; place >= 0; place -= 1) {
    const row = rows[place]!;
    const known = solution.reduce(
      (sum, value, other) => (other > place ? sum + row[other]! * value : sum),
      0,
    );
    solution[place] = (row[size]! - known) / row[place]!;
  }
  return solution;
}
