import type { Document } from 'yaml';
import type { Place, Problem } from '../../base/Problem.ts';
import { problemAt } from '../entries/Entry.ts';

/** A specification repeats a value or two; more is an attempt to fill the memory. */
const mostAliases = 100;

/** Aliases that expand beyond the bound, or null. */
export function aliasProblem(
  document: Document.Parsed,
  yaml: typeof import('yaml'),
  at: (offset: number) => Place,
): Problem | null {
  let first: number | null = null;
  let count = 0;
  yaml.visit(document, {
    Alias: (_, alias) => {
      first ??= alias.range?.[0] ?? 0;
      count += 1;
    },
  });
  if (first === null || (count <= mostAliases && expands(document))) return null;
  return problemAt(null, at(first), {
    code: 'alias-expansion',
    expected: `aliases that stand for at most ${mostAliases} values together`,
    received: 'aliases that expand beyond that, or into themselves',
    fix: 'write the values out',
  });
}

/** The parser counts what aliases of aliases stand for. */
function expands(document: Document.Parsed): boolean {
  try {
    document.toJS({ mapAsMap: true, maxAliasCount: mostAliases });
    return true;
  } catch (error) {
    if (error instanceof ReferenceError) return false;
    throw error;
  }
}
