import { comparisonDocument } from './emit/comparisonDocument.ts';
import { jsonDocument } from './emit/text/jsonDocument.ts';
import type { Comparison } from './loop/Comparison.ts';
import { comparisonPage } from './report/comparison/comparisonPage.ts';

/** What `compare` adds to a set of files. */
export async function comparisonFiles(comparison: Comparison): Promise<ReadonlyMap<string, string>> {
  return new Map([
    ['comparison.html', await comparisonPage(comparison)],
    ['comparison.json', jsonDocument(comparisonDocument(comparison))],
  ]);
}
