import { comparisonDocument } from './emit/comparisonDocument.ts';
import { jsonDocument } from './emit/text/jsonDocument.ts';
import type { Comparison } from './loop/Comparison.ts';

/** What `compare` adds to a set of files. */
export async function comparisonFiles(comparison: Comparison): Promise<ReadonlyMap<string, string>> {
  return new Map([['comparison.json', jsonDocument(comparisonDocument(comparison))]]);
}
