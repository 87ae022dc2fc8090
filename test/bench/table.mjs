export function median(values) {
  const sorted = [...values].sort((one, other) => one - other);
  const middle = sorted.length / 2;
  return sorted.length % 2 === 1 ? sorted[Math.floor(middle)] : (sorted[middle - 1] + sorted[middle]) / 2;
}

/** One line per task: medians in milliseconds, and the median ratio to a bare start of Node beside its limit. */
export function timeTable(results) {
  const rows = results.map(({ task, times, failure }) =>
    failure === null
      ? [
          task.name,
          ms(times.bare),
          ms(times.own),
          median(times.ratios).toFixed(2),
          `<= ${task.limit}`,
          times.own.length,
        ]
      : [task.name, '-', '-', 'failed', `<= ${task.limit}`, times.own.length],
  );
  const table = [['task', 'bare/ms', 'own/ms', 'ratio', 'limit', 'runs'], ...rows].map((row) =>
    row.map(String),
  );
  const widths = table[0].map((_, column) => Math.max(...table.map((row) => row[column].length)));
  return table
    .map((row) =>
      row
        .map((cell, column) => (column === 0 ? cell.padEnd(widths[0]) : cell.padStart(widths[column])))
        .join('  '),
    )
    .join('\n');
}

function ms(values) {
  return median(values).toFixed(1);
}
