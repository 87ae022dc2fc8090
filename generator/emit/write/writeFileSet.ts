import { dirname } from 'node:path';
import type { KeptFile } from './carryOver.ts';
import { refusalsOf } from './conflicts.ts';
import { exchange } from './exchange.ts';
import { done, type FolderOutcome, refused } from './FolderOutcome.ts';
import { holdFolder, type Waiting, withoutExceptions } from './holdFolder.ts';
import { type FolderRequest, locate } from './locate.ts';
import { isSystemError } from './machineOutcome.ts';
import { MANIFEST, manifestOf, readOwnership } from './manifest.ts';
import type { Place } from './Place.ts';
import { settled } from './recoverFileSet.ts';
import { nothingElse, restOfSet } from './restOfSet.ts';
import { stage, unstage } from './stage.ts';

export interface WriteRequest extends FolderRequest, Waiting {
  /** Name to text; `manifest.json` is added here. */
  readonly files: ReadonlyMap<string, string>;
  /** Keep what was edited by hand as NAME.bak instead of refusing. */
  readonly force: boolean;
  /** Whether the files join what the set holds already, edited or not, instead of replacing it. */
  readonly keepsRest?: boolean;
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
  manifestOf(request.files);
  return withoutExceptions(request.directory, async () => {
    const located = await locate(request);
    if (!located.ok) return refused(...located.problems);
    const place = located.value;
    const made = await place.fs.mkdir(place.parent, { recursive: true });
    let outcome: FolderOutcome<WrittenSet> | null = null;
    try {
      outcome = await holdFolder(place, request, () => replace(place, request));
      return outcome;
    } finally {
      if (made && outcome?.kind !== 'done') await removeParents(place, made);
    }
  });
}

async function replace(
  place: Place,
  { files: added, force, keepsRest = false, signal }: WriteRequest,
): Promise<FolderOutcome<WrittenSet>> {
  const recovered = await settled(place);
  if (recovered.kind !== 'done') return recovered;
  const rest = keepsRest ? await restOfSet(place, added.keys()) : nothingElse;
  const texts = new Map([...added, [MANIFEST, manifestOf(added, rest.fingerprints)]]);
  const problems = await refusalsOf(place, texts, force, rest);
  if (problems.length > 0) return refused(...problems);
  const files = new Map<string, string | Uint8Array>([...rest.files, ...texts]);
  const before = await readOwnership(place.folder, place.fs);
  const { kept, notes } = await stageAndExchange(place, files, signal);
  const removed = [...before.keys()]
    .filter((name) => !files.has(name) && !rest.fingerprints.has(name))
    .sort();
  return done({ directory: place.shown, files: [...files.keys()].sort(), kept, removed }, [
    ...recovered.notes,
    ...notes,
  ]);
}

async function stageAndExchange(
  place: Place,
  files: ReadonlyMap<string, string | Uint8Array>,
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
