import type { Problem } from '../../base/Problem.ts';
import { isSystemError } from '../../emit/write/machineOutcome.ts';
import { exitCodes } from '../exitCodes.ts';
import { unlessInterrupted } from '../interruption.ts';
import type { Session } from '../Session.ts';
import { ending, going, interrupted, type Step } from '../Step.ts';
import { absolutePath } from './absolutePath.ts';
import { readFileBytes, readStreamBytes } from './readBytes.ts';

/** What the user got wrong about a path, by the system's code; other codes are the machine's fault. */
const usersFaults: Readonly<Record<string, string>> = {
  ENOENT: 'no such file',
  ENOTDIR: 'a path that leads through a file',
  EISDIR: 'a folder',
  ENAMETOOLONG: 'a name that is too long',
  ELOOP: 'a link that leads round in a circle',
};

/**
 * The bytes of a file that the user named, `-` for standard input.
 * @param noun what it should be, for messages: `a specification file`
 */
export async function readInput(path: string, noun: string, session: Session): Promise<Step<Uint8Array>> {
  const { fs, stdin, cwd, signal } = session.surroundings;
  if (path === '' || path.includes('\0')) {
    return ending(exitCodes.refused, unreadable(path, noun, 'an empty or broken name'));
  }
  try {
    const reading = path === '-' ? readStreamBytes(stdin) : readFileBytes(absolutePath(path, cwd), fs);
    const bytes = await unlessInterrupted(reading, signal);
    return bytes === 'interrupted' ? interrupted(session) : going(bytes);
  } catch (error) {
    if (!isSystemError(error)) throw error;
    const fault = usersFaults[error.code];
    if (fault !== undefined) return ending(exitCodes.refused, unreadable(path, noun, fault));
    return ending(exitCodes.machine, unreadable(path, noun, systemFault(error.code)));
  }
}

function systemFault(code: string): string {
  return code === 'EACCES' || code === 'EPERM'
    ? `a file that may not be read (${code})`
    : `a disk error (${code})`;
}

function unreadable(path: string, noun: string, received: string): Problem {
  return {
    code: 'file-unreadable',
    severity: 'error',
    key: null,
    place: { path, line: null, column: null },
    expected: noun,
    received,
    fix: received === 'no such file' ? 'check the name and the folder you are in' : 'name another file',
  };
}
