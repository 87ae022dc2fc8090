import type { ErrorCode, YAMLError } from 'yaml';
import type { Place, Problem } from '../../base/Problem.ts';
import { problemAt } from '../entries/Entry.ts';
import { displayed } from '../values/ValueFault.ts';

/** Complaints beyond these are consequences of the first. */
const mostProblems = 10;

const remedies: Readonly<Partial<Record<ErrorCode, string>>> = {
  TAB_AS_INDENT: 'indent with spaces',
  BAD_INDENT: 'indent the keys of a group alike, with spaces',
  BLOCK_AS_IMPLICIT_KEY: 'put text that holds a colon in quotes',
  BAD_SCALAR_START: 'put text that begins with this sign in quotes',
  MISSING_CHAR: 'close the bracket, brace or quote; put a space behind a colon',
  BAD_DQ_ESCAPE: 'double the backslash, or use single quotes',
  BAD_ALIAS: 'put text that begins with * or & in quotes',
  TAG_RESOLVE_FAILED: 'remove the tag: values need none; put text that begins with ! in quotes',
};

/** What the parser complains of, once for each place; a second document by its own name. */
export function yamlProblems(
  errors: readonly YAMLError[],
  at: (offset: number) => Place,
): readonly Problem[] {
  const first = errors.filter(
    (error, index) => errors.findIndex(({ pos }) => pos[0] === error.pos[0]) === index,
  );
  return first.slice(0, mostProblems).map(({ code, message, pos }) => {
    if (code === 'MULTIPLE_DOCS') return problemAt(null, at(pos[0]), severalDocuments);
    return problemAt(null, at(pos[0]), {
      code: 'yaml-syntax',
      expected: 'YAML 1.2',
      received: displayed(message.split('\n')[0]!),
      fix: remedies[code] ?? 'correct the YAML at this place; put unusual text in quotes',
    });
  });
}

const severalDocuments = {
  code: 'several-documents',
  expected: 'one document',
  received: 'a second one, after ---',
  fix: 'keep one specification in a file',
};
