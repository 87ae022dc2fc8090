import type { Problem } from '../../base/Problem.ts';
import type { Result } from '../../emit/resultSchema.ts';
import type { FileSystem } from '../../emit/write/FileSystem.ts';
import type { StoredSet } from '../../emit/write/readFileSet.ts';
import type { ReadSpecification } from '../../spec/readSpecification.ts';
import { exitCodes } from '../exitCodes.ts';
import type { Session } from '../Session.ts';
import { ending, folderStep, going, type Step, stepOf } from '../Step.ts';

/** A folder's design, sized again from what its result says was asked for. */
export interface StoredDesign {
  readonly result: Result;
  readonly design: unknown;
  /** The decks as they are on disk now. */
  readonly decks: ReadonlyMap<string, string>;
  /** Files that are not as they were written. */
  readonly edited: readonly string[];
}

const resultFile = 'result.json';

/**
 * Reads a design folder, and sizes its design again.
 *
 * The predictions are worth something only if nobody touched what they follow from, so an edited
 * `result.json` is refused; edited decks are what the command is for.
 */
export async function readStoredDesign(directory: string, session: Session): Promise<Step<StoredDesign>> {
  const { cwd, fs, signal } = session.surroundings;
  if (directory.trim() === '' || directory.includes('\0')) {
    return ending(
      exitCodes.refused,
      unusable(directory, 'a folder that design wrote', 'an empty or broken name'),
    );
  }
  const { readFileSet } = await import('../../emit/write/readFileSet.ts');
  const request = { directory, cwd, fs: fs as FileSystem, ...(signal === undefined ? {} : { signal }) };
  const set = folderStep(await readFileSet(request), session);
  if (!set.ok) return set;
  const result = resultOf(set.value);
  if (result === null) {
    const path = `${directory}/${resultFile}`;
    return ending(
      exitCodes.refused,
      unusable(path, 'the result as design wrote it', 'an edited or foreign one'),
    );
  }
  const design = stepOf(await session.stages.design(requestOf(result)), session);
  const { decks, differing } = set.value;
  return design.ok ? going({ result, design: design.value, decks, edited: differing }) : design;
}

function resultOf({ result, differing }: StoredSet): Result | null {
  const isOurs = (result as Partial<Result> | null)?.schema === 'counterslope/result/1';
  return isOurs && !differing.includes(resultFile) ? (result as Result) : null;
}

/** The specification of a result is the normalised one; where its keys stood is no longer known. */
function requestOf({ specification, assumptions }: Result): ReadSpecification {
  return {
    specification: specification as unknown as ReadSpecification['specification'],
    assumptions,
    place: () => null,
  };
}

function unusable(path: string, expected: string, received: string): Problem {
  return {
    code: 'no-stored-design',
    severity: 'error',
    key: null,
    place: { path, line: null, column: null },
    expected,
    received,
    fix: 'write the design again with counterslope design',
  };
}
