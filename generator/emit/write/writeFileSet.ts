import { dirname } from 'node:path';
import type { Problem } from '../../base/Problem.ts';
import type { KeptFile } from './carryOver.ts';
import { conflictsIn } from './conflicts.ts';
import { exchange } from './exchange.ts';
import { done, type FolderOutcome, refused } from './FolderOutcome.ts';
import { holdFolder, type Waiting, withoutExceptions } from './holdFolder.ts';
import { type FolderRequest, folderRefusal, locate, whyNoFolder } from './locate.ts';
import { isSystemError } from './machineOutcome.ts';
import { MANIFEST, manifestOf, readOwnership } from './manifest.ts';
import type { Place } from './Place.ts';
import { recoverFileSet, settled } from './recoverFileSet.ts';
import { stage, unstage } from './stage.ts';

export interface WriteRequest extends FolderRequest, Waiting {
  /** Name to text; `manifest.json` is added here. */
  readonly files: ReadonlyMap<string, string>;
  /** Keep what was edited by hand as NAME.bak instead of refusing. */
  readonly force: boolean;
}

export interface WrittenSet {
  /** As the user gave it. */
  readonly directory: string;
  readonly files: readonly string[];
  /** Files whose name the set took, and the name under which each was kept. */
  readonly kept: readonly KeptFile[];
  /** Files of an earlier set that this one does not have. */
  readonly removed: readonly string[];
}

/**
 * Replaces the set in a folder, all of it or nothing.
 *
 * At every instant one whole set is on disk, under its name or as a sibling that the journal tells of.
 * Entries of the user's own are carried over as they are.
 * @throws RangeError when a name of the set is none that stays in the folder
 */
export async function writeFileSet(request: WriteRequest): Promise<FolderOutcome<WrittenSet>> {
  const files = new Map([...request.files, [MANIFEST, manifestOf(request.files)]]);
  return withoutExceptions(request.directory, async () => {
    const located = await locate(request);
    if (!located.ok) return refused(...located.problems);
    const place = located.value;
    const made = await place.fs.mkdir(place.parent, { recursive: true });
    let outcome: FolderOutcome<WrittenSet> | null = null;
    try {
      outcome = await holdFolder(place, request, () => replace(place, files, request));
      return outcome;
    } finally {
      if (made && outcome?.kind !== 'done') await removeParents(place, made);
    }
  });
}

/**
 * Says beforehand, without writing, what `writeFileSet` would refuse: a folder that must not be replaced, a file that was
 * edited by hand. For asking before long work is done for nothing; also recovers what an interrupted run left.
 */
export function checkFolder(request: FolderRequest & Waiting & { readonly force: boolean }) {
  return withoutExceptions(request.directory, async (): Promise<FolderOutcome<null>> => {
    const located = await locate(request);
    if (!located.ok) return refused(...located.problems);
    const recovered = await recoverFileSet(request);
    if (recovered.kind !== 'done') return recovered;
    const problems = await refusalsOf(located.value, new Map([[MANIFEST, '']]), request.force);
    return problems.length > 0 ? refused(...problems) : done(null, recovered.notes);
  });
}

async function replace(
  place: Place,
  files: ReadonlyMap<string, string>,
  { force, signal }: WriteRequest,
): Promise<FolderOutcome<WrittenSet>> {
  const recovered = await settled(place);
  if (recovered.kind !== 'done') return recovered;
  const problems = await refusalsOf(place, files, force);
  if (problems.length > 0) return refused(...problems);
  const before = await readOwnership(place.folder, place.fs);
  const { kept, notes } = await stageAndExchange(place, files, signal);
  const removed = [...before.keys()].filter((name) => !files.has(name)).sort();
  return done({ directory: place.shown, files: [...files.keys()].sort(), kept, removed }, [
    ...recovered.notes,
    ...notes,
  ]);
}

async function refusalsOf(
  place: Place,
  files: ReadonlyMap<string, string>,
  force: boolean,
): Promise<readonly Problem[]> {
  const reason = await whyNoFolder(place.folder, place.fs);
  if (reason !== null) return [folderRefusal(place.shown, reason)];
  return force ? [] : conflictsIn(place, files);
}

async function stageAndExchange(
  place: Place,
  files: ReadonlyMap<string, string>,
  signal: AbortSignal | undefined,
) {
  try {
    await stage(place, files, signal);
    return await exchange(place);
  } catch (error) {
    await unless(isSystemError, unstage(place));
    throw error;
  }
}

/** Folders that were made for the set and are empty, the deepest first. */
async function removeParents({ fs, parent }: Place, topmost: string): Promise<void> {
  for (let folder = parent; folder.startsWith(topmost); folder = dirname(folder)) {
    await unless(isSystemError, fs.rmdir(folder));
  }
}

/** Cleaning up after a failure must not hide the failure; the next command cleans up again. */
async function unless(expected: (error: unknown) => boolean, work: Promise<void>): Promise<void> {
  await work.catch((error) => {
    if (!expected(error)) throw error;
  });
}
