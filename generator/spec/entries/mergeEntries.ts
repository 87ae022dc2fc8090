import { specKey } from '../keys/specKeys.ts';
import type { Entry } from './Entry.ts';

/** Entries by path. Flags win over the document, and put out of force what they replace there. */
export function mergeEntries(
  document: readonly Entry[],
  flags: readonly Entry[],
): ReadonlyMap<string, Entry> {
  const merged = new Map(document.map((entry) => [entry.path, entry]));
  for (const { path } of flags) {
    for (const replaced of specKey(path)?.replaces ?? []) merged.delete(replaced);
  }
  for (const entry of flags) merged.set(entry.path, entry);
  return merged;
}
