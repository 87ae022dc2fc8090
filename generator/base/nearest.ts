/** Longer words are nobody's slip of the pen, and comparing them costs time. */
const longestWord = 64;

/**
 * The known word that a mistyped one most likely meant, or null where none is near.
 *
 * Edits are insertions, deletions, replacements and swaps of neighbours, letters of either case alike; near is a
 * third of the word's length, and at least two edits for words of four letters and more.
 */
export function nearest(word: string, known: readonly string[]): string | null {
  if (word.length > longestWord) return null;
  const wanted = word.toLowerCase();
  const limit = wanted.length < 4 ? 1 : Math.max(2, Math.floor(wanted.length / 3));
  let best: string | null = null;
  let least = limit + 1;
  for (const candidate of known) {
    if (Math.abs(candidate.length - wanted.length) >= least) continue;
    const distance = editDistance(wanted, candidate.toLowerCase());
    if (distance < least) [best, least] = [candidate, distance];
  }
  return best;
}

/** Optimal string alignment distance. */
export function editDistance(a: string, b: string): number {
  const rows: number[][] = [Array.from({ length: b.length + 1 }, (_, column) => column)];
  for (let i = 1; i <= a.length; i++) {
    const row = [i];
    for (let j = 1; j <= b.length; j++) {
      const replaced = rows[i - 1]![j - 1]! + (a[i - 1] === b[j - 1] ? 0 : 1);
      const plain = Math.min(rows[i - 1]![j]! + 1, row[j - 1]! + 1, replaced);
      const swapped = i > 1 && j > 1 && a[i - 1] === b[j - 2] && a[i - 2] === b[j - 1];
      row.push(swapped ? Math.min(plain, rows[i - 2]![j - 2]! + 1) : plain);
    }
    rows.push(row);
  }
  return rows[a.length]![b.length]!;
}
