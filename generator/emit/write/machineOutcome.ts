import { type FolderOutcome, folderProblem } from './FolderOutcome.ts';

/** An error of the operating system, as `node:fs` throws it. */
interface SystemError extends Error {
  readonly code: string;
}

export function isSystemError(error: unknown): error is SystemError {
  return error instanceof Error && /^E[A-Z0-9]+$/.test((error as Partial<SystemError>).code ?? '');
}

/** True where the entry, or a folder on the way to it, is not there. */
export function isAbsence(error: unknown): boolean {
  return isSystemError(error) && (error.code === 'ENOENT' || error.code === 'ENOTDIR');
}

const KNOWN: Readonly<Record<string, readonly [code: string, received: string, fix: string]>> = {
  ENOSPC: ['disk-full', 'the disk is full', 'free some space and run the command again'],
  EDQUOT: ['disk-full', 'the disk quota is used up', 'free some space and run the command again'],
  EACCES: [
    'permission-denied',
    'permission is denied',
    'choose a folder whose parent folder you may write to',
  ],
  EPERM: [
    'permission-denied',
    'the system does not permit it',
    'choose a folder whose parent you may write to',
  ],
  EROFS: ['read-only', 'the disk is read-only', 'choose a folder on a disk that can be written to'],
  EBUSY: ['folder-in-use', 'a folder is a mount point or in use', 'choose a new folder inside it'],
  EXDEV: ['folder-in-use', 'a folder lies on another disk than its parent', 'choose a new folder inside it'],
  EEXIST: [
    'leftover',
    'a leftover of an earlier run is in the way',
    'delete the hidden counterslope siblings of the folder',
  ],
  ENAMETOOLONG: ['name-too-long', 'the name is too long for this disk', 'choose a shorter name'],
};

/**
 * What the user is told when the machine failed; anything else is a bug and goes on as the exception it is.
 * @throws the error itself when it is none of the operating system's
 */
export function machineOutcome(path: string, error: unknown): FolderOutcome<never> {
  if (!isSystemError(error)) throw error;
  const [code, received, fix] = KNOWN[error.code] ?? [
    'disk-error',
    'the disk failed',
    'look at the disk and try again',
  ];
  const problem = folderProblem(path, code, {
    expected: 'a folder that can be read and replaced',
    received: `${received} (${error.code})`,
    fix,
  });
  return { kind: 'machine', problems: [problem] };
}
