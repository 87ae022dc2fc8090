import type { Alias, Document } from 'yaml';
import type { Place, Problem } from '../../base/Problem.ts';
import { problemAt } from '../entries/Entry.ts';
import { displayed, type ValueFault } from '../values/ValueFault.ts';

/** A specification repeats a value or two; more is an attempt to fill the memory. */
const mostAliases = 100;

/** An alias of nothing, or aliases that expand beyond the bound; else null. */
export function aliasProblem(
  document: Document.Parsed,
  yaml: typeof import('yaml'),
  at: (offset: number) => Place,
): Problem | null {
  const aliases: Alias[] = [];
  const anchors = new Set<string>();
  yaml.visit(document, {
    Node: (_, node) => {
      if (yaml.isAlias(node)) aliases.push(node);
      else if ('anchor' in node && typeof node.anchor === 'string') anchors.add(node.anchor);
    },
  });
  const place = (alias: Alias) => at(alias.range?.[0] ?? 0);
  const lost = aliases.find(({ source }) => !anchors.has(source));
  if (lost !== undefined) return problemAt(null, place(lost), unknownAlias(lost.source));
  if (aliases.length === 0 || (aliases.length <= mostAliases && staysSmall(document))) return null;
  return problemAt(null, place(aliases[0]!), tooManyAliases);
}

/** The parser counts what aliases of aliases stand for. */
function staysSmall(document: Document.Parsed): boolean {
  try {
    document.toJS({ mapAsMap: true, maxAliasCount: mostAliases });
    return true;
  } catch (error) {
    if (error instanceof ReferenceError) return false;
    throw error;
  }
}

const tooManyAliases: ValueFault = {
  code: 'alias-expansion',
  expected: `aliases that stand for at most ${mostAliases} values together`,
  received: 'aliases that expand beyond that',
  fix: 'write the values out',
};

function unknownAlias(name: string): ValueFault {
  return {
    code: 'alias-unknown',
    expected: 'an alias whose anchor stands before it',
    received: displayed(`*${name}`),
    fix: 'write the value out; put text that begins with * in quotes',
  };
}
