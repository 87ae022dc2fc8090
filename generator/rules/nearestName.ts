/**
 * The known name that a mistyped one most likely meant, or null where none is near.
 *
 * Optimal string alignment distance, letters of either case alike; near is a third of the length or less.
 */
export function nearestName(name: string, known: readonly string[]): string | null {
  if (name.length > 64) return null;
  const wanted = name.toLowerCase();
  const ranked = known
    .map((candidate) => ({ candidate, distance: editDistance(wanted, candidate.toLowerCase()) }))
    .sort((a, b) => a.distance - b.distance);
  const best = ranked[0];
  if (best === undefined) return null;
  return best.distance <= Math.max(2, Math.floor(wanted.length / 3)) ? best.candidate : null;
}

function editDistance(a: string, b: string): number {
  const rows: number[][] = [Array.from({ length: b.length + 1 }, (_, column) => column)];
  for (let i = 1; i <= a.length; i++) {
    const row = [i];
    for (let j = 1; j <= b.length; j++) {
      const substitution = rows[i - 1]![j - 1]! + (a[i - 1] === b[j - 1] ? 0 : 1);
      const plain = Math.min(rows[i - 1]![j]! + 1, row[j - 1]! + 1, substitution);
      const swapped = i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1];
      row.push(swapped ? Math.min(plain, rows[i - 2]![j - 2]! + 1) : plain);
    }
    rows.push(row);
  }
  return rows[a.length]![b.length]!;
}
