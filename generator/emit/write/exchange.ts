import type { Problem } from '../../base/Problem.ts';
import { carryOver, type KeptFile, type Rename } from './carryOver.ts';
import {
  entriesOf,
  exists,
  isFolder,
  removeFile,
  removeFlatFolder,
  statusOf,
  syncFolder,
} from './entries.ts';
import type { EntryPath } from './FileSystem.ts';
import { folderProblem } from './FolderOutcome.ts';
import { isSystemError } from './machineOutcome.ts';
import { isWholeSet, readOwnership } from './manifest.ts';
import type { Place } from './Place.ts';

export interface Exchanged {
  readonly kept: readonly KeptFile[];
  readonly notes: readonly Problem[];
}

/**
 * Puts the staged set in the folder's place.
 *
 *   folder → old, fresh → folder, the user's entries old → folder, old → discard
 *
 * All steps are renames; when one fails, those before it are taken back. The last one is the point of
 * no return, after which files of ours are deleted.
 */
export async function exchange(place: Place): Promise<Exchanged> {
  const kept = await withWayBack(place, async (rename) => {
    if (await exists(place.folder, place.fs)) await rename(place.folder, place.old);
    return complete(place, rename);
  });
  return { kept, notes: await finishQuietly(place) };
}

/** What an interrupted exchange left, and what became of it. */
export type Settlement = 'nothing to do' | 'old set restored' | 'new set finished' | 'blocked';

/**
 * Brings a folder back to one whole set under its name, wherever an exchange stopped.
 *
 * The stage is read off the entries that exist; each step of this may be interrupted in turn.
 * `blocked`: somebody made another folder of that name in the meantime, and nothing was touched.
 */
export async function settle(place: Place): Promise<{ settlement: Settlement; notes: readonly Problem[] }> {
  const { fs, folder, fresh, old, discard, journal } = place;
  if (await exists(discard, fs)) return { settlement: 'new set finished', notes: await finishQuietly(place) };
  const begun = await exists(journal, fs);
  if (!(await isUsable(place))) await removeFlatFolder(fresh, fs);
  const [hasFresh, hasOld] = [await exists(fresh, fs), await exists(old, fs)];
  if (hasOld && (await isForeign(place, hasFresh))) return { settlement: 'blocked', notes: [] };
  if (hasFresh || (hasOld && (await exists(folder, fs)))) {
    await withWayBack(place, (rename) => complete(place, rename));
    return { settlement: 'new set finished', notes: await finishQuietly(place) };
  }
  if (hasOld) await fs.rename(old, folder);
  await removeFile(journal, fs);
  return { settlement: begun ? 'old set restored' : 'nothing to do', notes: [] };
}

/** A new set is finished only where the journal calls it whole, it is, and the old one has made room. */
async function isUsable({ fs, folder, fresh, old, journal }: Place): Promise<boolean> {
  if (!(await exists(journal, fs)) || !(await isFolder(fresh, fs))) return false;
  if (!(await isWholeSet(fresh, fs))) return false;
  return (await exists(old, fs)) || !(await exists(folder, fs));
}

/**
 * While the old folder waits as a sibling, its name is free or the new set's. A folder that somebody else
 * made there stands in the way, and so does a link laid in place of the sibling; an empty folder
 * (`mkdir -p` before each run) goes.
 */
async function isForeign({ fs, folder, old }: Place, hasFresh: boolean): Promise<boolean> {
  if (!(await isFolder(old, fs))) return true;
  const status = await statusOf(folder, fs);
  if (status === null) return false;
  if (!status.isDirectory()) return true;
  if ((await entriesOf(folder, fs)).length === 0) {
    await fs.rmdir(folder);
    return false;
  }
  return hasFresh || (await readOwnership(folder, fs)).size === 0;
}

async function complete(place: Place, rename: Rename): Promise<readonly KeptFile[]> {
  const { fs, folder, fresh, old, discard, parent } = place;
  if (await exists(fresh, fs)) await rename(fresh, folder);
  await syncFolder(parent, fs);
  if (!(await exists(old, fs))) return [];
  const kept = await carryOver(place, rename);
  await syncFolder(folder, fs);
  await rename(old, discard);
  return kept;
}

/** Deletes replaced files of ours; nothing else is left in `discard`. */
async function finish({ fs, discard, journal, parent }: Place): Promise<void> {
  await syncFolder(parent, fs);
  await removeFlatFolder(discard, fs);
  await removeFile(journal, fs);
}

/** The new set stands; that the old one could not be deleted is no failure, and is tried again next time. */
async function finishQuietly(place: Place): Promise<Problem[]> {
  try {
    await finish(place);
    return [];
  } catch (error) {
    if (!isSystemError(error)) throw error;
    const words = {
      expected: 'replaced files to be deleted',
      received: `the system refused (${error.code})`,
      fix: `delete ${place.discard} by hand`,
    };
    return [folderProblem(place.shown, 'leftover', words, 'warning')];
  }
}

/** Runs renames; when one fails, takes back those that were done, the last one first. */
async function withWayBack<T>(place: Place, work: (rename: Rename) => Promise<T>): Promise<T> {
  const made: { from: EntryPath; to: EntryPath }[] = [];
  try {
    return await work(async (from, to) => {
      await place.fs.rename(from, to);
      made.push({ from, to });
    });
  } catch (error) {
    for (const { from, to } of made.reverse()) await place.fs.rename(to, from);
    throw error;
  }
}
