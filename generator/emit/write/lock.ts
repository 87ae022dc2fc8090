import process from 'node:process';
import { setTimeout as pause } from 'node:timers/promises';
import { createFile } from './entries.ts';
import type { FileSystem } from './FileSystem.ts';
import { isAbsence, isSystemError } from './machineOutcome.ts';

const POLL_ms = 50;
/** Far longer than a rival needs between its look at a dead owner's lock and its own lock. */
const RIVAL_ms = 20;

/** Locks of this very process: a lock with our own process number that is not here was left by a dead one. */
const held = new Set<string>();

export interface Patience {
  readonly wait_ms: number;
  readonly signal: AbortSignal | undefined;
}

/**
 * Takes the lock, from a dead owner too; waits a little while a living one holds it.
 *
 * The lock is a symbolic link to its owner's mark: made with its content in one step, so a lock
 * without an owner cannot be seen.
 * @returns the living owner's mark, or null when the lock is ours
 */
export async function takeLock(path: string, fs: FileSystem, patience: Patience): Promise<string | null> {
  const mine = await markOf(process.pid, fs);
  for (let waited_ms = 0; ; waited_ms += POLL_ms) {
    const owner = await ownerOf(path, fs);
    const stale = owner !== null && !(await isAlive(owner, path, mine, fs));
    if (stale) await evict(path, owner, fs);
    if ((owner === null || stale) && (await claim(path, mine, fs, stale))) return null;
    if (waited_ms >= patience.wait_ms || patience.signal?.aborted) return owner ?? 'unknown';
    await pause(POLL_ms);
  }
}

/** Gives the lock back. A disk that fails here does no harm: the mark of a dead process holds nobody up. */
export async function releaseLock(path: string, fs: FileSystem): Promise<void> {
  held.delete(path);
  try {
    await fs.unlink(path);
  } catch (error) {
    if (!isSystemError(error)) throw error;
  }
}

async function claim(path: string, mark: string, fs: FileSystem, evicted: boolean): Promise<boolean> {
  if (held.has(path)) return false;
  held.add(path);
  let ours = false;
  try {
    await createMarked(path, mark, fs);
    ours = !evicted || (await staysOurs(path, mark, fs));
  } catch (error) {
    if (!isSystemError(error) || error.code !== 'EEXIST') throw error;
  } finally {
    if (!ours) held.delete(path);
  }
  return ours;
}

/** Disks without links get a file; its content comes a moment after its name. */
async function createMarked(path: string, mark: string, fs: FileSystem): Promise<void> {
  try {
    await fs.symlink(mark, path);
  } catch (error) {
    if (!isSystemError(error) || !['EPERM', 'ENOSYS', 'ENOTSUP', 'EOPNOTSUPP'].includes(error.code))
      throw error;
    await createFile(path, mark, fs);
  }
}

async function ownerOf(path: string, fs: FileSystem): Promise<string | null> {
  try {
    return await fs.readlink(path);
  } catch (error) {
    if (isAbsence(error)) return null;
    if (!isSystemError(error) || !['EINVAL', 'UNKNOWN'].includes(error.code)) throw error;
    return (await fs.readFile(path)).toString('utf8');
  }
}

/** Unless it changed hands since it was looked at. */
async function evict(path: string, owner: string, fs: FileSystem): Promise<void> {
  try {
    if ((await ownerOf(path, fs)) === owner) await fs.unlink(path);
  } catch (error) {
    if (!isAbsence(error)) throw error;
  }
}

/** Two may evict the same dead owner, the slower taking the faster one's lock away; the last mark counts. */
async function staysOurs(path: string, mark: string, fs: FileSystem): Promise<boolean> {
  await pause(RIVAL_ms);
  return (await ownerOf(path, fs)) === mark;
}

async function isAlive(owner: string, path: string, mine: string, fs: FileSystem): Promise<boolean> {
  if (owner === mine) return held.has(path);
  const [number, birth] = owner.split('@');
  const pid = Number(number);
  if (!Number.isSafeInteger(pid) || pid <= 0) return true;
  const now = await birthOf(pid, fs);
  if (now !== '') return birth === '' || birth === now;
  try {
    return process.kill(pid, 0);
  } catch (error) {
    return isSystemError(error) && error.code === 'EPERM';
  }
}

async function markOf(pid: number, fs: FileSystem): Promise<string> {
  return `${pid}@${await birthOf(pid, fs)}`;
}

/** When a process began, in the kernel's ticks: process numbers come round again, in containers at once. */
async function birthOf(pid: number, fs: FileSystem): Promise<string> {
  try {
    const line = (await fs.readFile(`/proc/${pid}/stat`)).toString('utf8');
    return line.slice(line.lastIndexOf(')') + 2).split(' ')[19] ?? '';
  } catch (error) {
    if (isSystemError(error)) return '';
    throw error;
  }
}
