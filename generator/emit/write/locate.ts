import { basename, dirname, join, relative, resolve, sep } from 'node:path';
import { failure, type Outcome, type Problem, success } from '../../base/Problem.ts';
import { exists, statusOf } from './entries.ts';
import type { FileSystem } from './FileSystem.ts';
import { folderProblem } from './FolderOutcome.ts';
import { isAbsence } from './machineOutcome.ts';
import { type Place, placeAt } from './Place.ts';

/** Where a set is to be written, and what must not be replaced by it. */
export interface FolderRequest {
  /** As the user gave it. */
  readonly directory: string;
  /** Null when the spec came from standard input or flags. */
  readonly specPath: string | null;
  readonly cwd: string;
  /** Null where the environment names none. */
  readonly home: string | null;
  readonly fs: FileSystem;
}

/** Finds a folder, links in its parents resolved, and refuses those that a set must never replace. */
export async function locate(request: FolderRequest): Promise<Outcome<Place>> {
  const { directory, cwd, fs } = request;
  if (directory.trim() === '' || directory.includes('\0'))
    return refuse(directory, 'an empty or broken name');
  const absolute = resolve(cwd, directory);
  if (dirname(absolute) === absolute) return refuse(directory, 'the root of the disk');
  const { existing, missing } = await realAncestor(dirname(absolute), fs);
  if (!(await statusOf(existing, fs))?.isDirectory())
    return refuse(directory, 'a path that leads through a file');
  const folder = join(existing, missing, basename(absolute));
  const reason = (await whyProtected(folder, request)) ?? (await whyNoFolder(folder, fs));
  return reason === null ? success(placeAt(folder, directory, fs)) : refuse(directory, reason);
}

/** A folder to read from or to recover: a link to it is followed, nothing is refused. */
export async function locateForReading(directory: string, cwd: string, fs: FileSystem): Promise<Place> {
  return placeAt(await followed(resolve(cwd, directory), fs), directory, fs);
}

/** Also a link to where a folder was until a run was interrupted; only its siblings are there now. */
async function followed(path: string, fs: FileSystem): Promise<string> {
  const { existing, missing } = await realAncestor(path, fs);
  const real = join(existing, missing);
  if (!(await statusOf(real, fs))?.isSymbolicLink()) return real;
  return followed(resolve(dirname(real), await fs.readlink(real)), fs);
}

/** What stands in the folder itself; looked at again once an interrupted exchange is settled. */
export async function whyNoFolder(folder: string, fs: FileSystem): Promise<string | null> {
  const status = await statusOf(folder, fs);
  if (status === null) return null;
  if (status.isSymbolicLink()) return 'a symbolic link, and links are not followed out of their folder';
  if (!status.isDirectory()) return 'a file';
  return (await exists(join(folder, '.git'), fs)) ? 'a folder that holds .git' : null;
}

async function whyProtected(folder: string, request: FolderRequest): Promise<string | null> {
  const { cwd, home, specPath, fs } = request;
  if (folder.split(sep).includes('.git')) return 'a folder inside .git';
  if (await holds(folder, cwd, fs)) return 'the current folder or one above it';
  if (home && (await holds(folder, resolve(cwd, home), fs))) return 'the home folder or one above it';
  if (specPath !== null && (await holds(folder, resolve(cwd, specPath), fs)))
    return 'a folder that holds the spec';
  return null;
}

/** True when a path, or what it links to, is the folder or lies in it. */
async function holds(folder: string, path: string, fs: FileSystem): Promise<boolean> {
  const parent = await realAncestor(dirname(path), fs);
  const itself = await realAncestor(path, fs);
  return [join(parent.existing, parent.missing, basename(path)), join(itself.existing, itself.missing)].some(
    (real) => real === folder || real.startsWith(folder + sep),
  );
}

/** The nearest part of a path that exists, links resolved, and the rest. */
async function realAncestor(path: string, fs: FileSystem): Promise<{ existing: string; missing: string }> {
  let existing = path;
  while (dirname(existing) !== existing) {
    try {
      return { existing: await fs.realpath(existing), missing: relative(existing, path) };
    } catch (error) {
      if (!isAbsence(error)) throw error;
      existing = dirname(existing);
    }
  }
  return { existing, missing: relative(existing, path) };
}

export function folderRefusal(directory: string, received: string): Problem {
  return folderProblem(directory, 'folder-refused', {
    expected: 'a folder of its own for the set: new, empty, or written by an earlier run',
    received,
    fix: 'name another folder, for example --out design',
  });
}

function refuse(directory: string, received: string): Outcome<never> {
  return failure([folderRefusal(directory, received)]);
}
