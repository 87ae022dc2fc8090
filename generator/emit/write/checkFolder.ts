import { refusalsOf } from './conflicts.ts';
import { done, type FolderOutcome, refused } from './FolderOutcome.ts';
import { type Waiting, withoutExceptions } from './holdFolder.ts';
import { type FolderRequest, locate } from './locate.ts';
import { MANIFEST } from './manifest.ts';
import { recoverFileSet } from './recoverFileSet.ts';

export interface CheckRequest extends FolderRequest, Waiting {
  readonly force: boolean;
}

/**
 * Says beforehand what `writeFileSet` would refuse: a folder not to be replaced, a file edited by hand.
 *
 * For asking before long work is done for nothing. Recovers what an interrupted run left, and writes
 * nothing else; files in the way of a name of the set are found only when the set is written.
 */
export function checkFolder(request: CheckRequest): Promise<FolderOutcome<null>> {
  return withoutExceptions(request.directory, async () => {
    const located = await locate(request);
    if (!located.ok) return refused(...located.problems);
    const recovered = await recoverFileSet(request);
    if (recovered.kind !== 'done') return recovered;
    const problems = await refusalsOf(located.value, new Map([[MANIFEST, '']]), request.force);
    return problems.length > 0 ? refused(...problems) : done(null, recovered.notes);
  });
}
