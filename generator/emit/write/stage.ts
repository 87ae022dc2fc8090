import { basename, join } from 'node:path';
import { createFile, exists, removeFile, removeFlatFolder, statusOf, syncFolder } from './entries.ts';
import { isSystemError } from './machineOutcome.ts';
import type { Place } from './Place.ts';

/** Thrown where a signal asked to stop and stopping leaves everything as it was. */
export class Interruption extends Error {}

/**
 * Writes the whole new set beside the folder, then the journal, which says that it is whole.
 * @throws Interruption when the signal came first
 */
export async function stage(
  place: Place,
  files: ReadonlyMap<string, string | Uint8Array>,
  signal: AbortSignal | undefined,
): Promise<void> {
  const { fs, fresh, journal, parent } = place;
  await fs.mkdir(fresh, { recursive: false });
  for (const [name, text] of files) {
    if (signal?.aborted) throw new Interruption();
    await createFile(join(fresh, name), text, fs);
  }
  await takeOverRights(place);
  await syncFolder(fresh, fs);
  if (signal?.aborted) throw new Interruption();
  await createFile(journal, journalText(place), fs);
  await syncFolder(parent, fs);
}

/** The new folder belongs to whom the old one did, as far as the system lets us say so. */
async function takeOverRights({ fs, folder, fresh }: Place): Promise<void> {
  const before = await statusOf(folder, fs);
  if (before === null) return;
  const now = await fs.lstat(fresh);
  if (before.uid !== now.uid || before.gid !== now.gid) {
    await fs.chown(fresh, before.uid, before.gid).catch((error) => {
      if (!isSystemError(error)) throw error;
    });
  }
  if (before.mode !== now.mode) await fs.chmod(fresh, before.mode & 0o7777);
}

/** Takes away what `stage` made, unless the exchange has begun: then only finishing it is safe. */
export async function unstage({ fs, fresh, journal, old }: Place): Promise<void> {
  if (await exists(old, fs)) return;
  await removeFlatFolder(fresh, fs);
  await removeFile(journal, fs);
}

/** For people who find it: the program itself looks only whether it is there. */
function journalText({ folder, fresh, old, discard }: Place): string {
  const record = {
    schema: 'counterslope/journal/1',
    note: 'A design folder was being replaced. The next counterslope command on it finishes or restores.',
    folder: basename(folder),
    new: basename(fresh),
    old: basename(old),
    discard: basename(discard),
  };
  return `${JSON.stringify(record, null, 2)}\n`;
}
