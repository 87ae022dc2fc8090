import { exists } from './entries.ts';
import { type Settlement, settle } from './exchange.ts';
import type { FileSystem } from './FileSystem.ts';
import { done, type FolderOutcome, folderProblem, refused } from './FolderOutcome.ts';
import { holdFolder, type Waiting, withoutExceptions } from './holdFolder.ts';
import { locateForReading } from './locate.ts';
import type { Place } from './Place.ts';

export interface RecoverRequest extends Waiting {
  /** As the user gave it. */
  readonly directory: string;
  readonly cwd: string;
  readonly fs: FileSystem;
}

/**
 * Finishes or takes back what an interrupted run left; to be called by every command that names a folder,
 * before it looks at it. Writes nothing where nothing was left, so read-only folders are fine.
 */
export function recoverFileSet(request: RecoverRequest): Promise<FolderOutcome<Settlement>> {
  return withoutExceptions(request.directory, async () => {
    const place = await locateForReading(request.directory, request.cwd, request.fs);
    if (!(await hasLeftovers(place))) return done('nothing to do');
    return holdFolder(place, request, () => settled(place));
  });
}

/** Settles a folder that is already held. */
export async function settled(place: Place): Promise<FolderOutcome<Settlement>> {
  const { settlement, notes } = await settle(place);
  if (settlement !== 'blocked') return done(settlement, notes);
  const problem = folderProblem(place.shown, 'folder-blocked', {
    expected: 'the folder to be absent or empty while its files wait beside it after an interrupted run',
    received: `a new folder of the same name; the earlier files are in ${place.old}`,
    fix: 'rename the new folder, run the command again, then merge the two',
  });
  return refused(problem);
}

async function hasLeftovers({ fs, fresh, journal, old, discard, lock }: Place): Promise<boolean> {
  for (const path of [fresh, journal, old, discard, lock]) {
    if (await exists(path, fs)) return true;
  }
  return false;
}
