import { createHash } from 'node:crypto';
import { join, sep } from 'node:path';
import type { EntryPath, EntryStatus, FileSystem } from './FileSystem.ts';
import { isAbsence, isSystemError } from './machineOutcome.ts';

export function sha256(data: string | Uint8Array): string {
  return createHash('sha256').update(data).digest('hex');
}

/** The entry itself, a link not followed; null where there is none. */
export async function statusOf(path: EntryPath, fs: FileSystem): Promise<EntryStatus | null> {
  try {
    return await fs.lstat(path);
  } catch (error) {
    if (isAbsence(error)) return null;
    throw error;
  }
}

export async function exists(path: EntryPath, fs: FileSystem): Promise<boolean> {
  return (await statusOf(path, fs)) !== null;
}

/** A folder itself, not a link to one. */
export async function isFolder(path: string, fs: FileSystem): Promise<boolean> {
  return (await statusOf(path, fs))?.isDirectory() ?? false;
}

/** SHA-256 of a plain file; null for anything else, so that no link is followed and no pipe waited for. */
export async function fingerprint(path: EntryPath, fs: FileSystem): Promise<string | null> {
  const status = await statusOf(path, fs);
  return status?.isFile() ? sha256(await fs.readFile(path)) : null;
}

/** Names in a folder, as bytes and in a fixed order. */
export async function entriesOf(folder: string, fs: FileSystem): Promise<Buffer[]> {
  return (await fs.readdir(folder, { encoding: 'buffer' })).sort(Buffer.compare);
}

export function entryIn(folder: string, name: string | Buffer): EntryPath {
  return typeof name === 'string' ? join(folder, name) : Buffer.concat([Buffer.from(folder + sep), name]);
}

/**
 * Removes a folder of ours that holds files only; never descends.
 *
 * A link of its name, which in a shared parent anybody may have laid, goes itself; what it leads to stays.
 */
export async function removeFlatFolder(folder: string, fs: FileSystem): Promise<void> {
  if (!(await isFolder(folder, fs))) return removeFile(folder, fs);
  for (const name of await entriesOf(folder, fs)) await fs.unlink(entryIn(folder, name));
  await fs.rmdir(folder);
}

export async function removeFile(path: string, fs: FileSystem): Promise<void> {
  if (await exists(path, fs)) await fs.unlink(path);
}

/** A new file, on the disk when this returns; never over an existing one, never through a link. */
export async function createFile(path: string, text: string | Uint8Array, fs: FileSystem): Promise<void> {
  const file = await fs.open(path, 'wx');
  try {
    await file.writeFile(text);
    await file.sync();
  } finally {
    await file.close();
  }
}

/** Codes by which systems say that a folder cannot be synchronised on its own. */
const CANNOT_SYNC = new Set(['EISDIR', 'EPERM', 'EINVAL', 'EACCES', 'ENOTSUP', 'EBADF']);

/** Brings the names in a folder to the disk, where the system can. */
export async function syncFolder(folder: string, fs: FileSystem): Promise<void> {
  try {
    const file = await fs.open(folder, 'r');
    try {
      await file.sync();
    } finally {
      await file.close();
    }
  } catch (error) {
    if (!isSystemError(error) || !CANNOT_SYNC.has(error.code)) throw error;
  }
}
