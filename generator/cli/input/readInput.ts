import type { Problem } from '../../base/Problem.ts';
import { isSystemError } from '../../emit/write/machineOutcome.ts';
import { exitCodes } from '../exitCodes.ts';
import { unlessInterrupted } from '../interruption.ts';
import type { Session } from '../Session.ts';
import { ending, going, interrupted, type Step } from '../Step.ts';
import { absolutePath } from './absolutePath.ts';
import { mostBytes, readFileBytes, readStreamBytes } from './readBytes.ts';

/** What a file should be, for messages, and how large its reader lets it be. */
export interface InputKind {
  readonly noun: string;
  readonly most: string;
}

export const specificationFile: InputKind = { noun: 'a specification file', most: '1 MB' };
export const ruleDeckFile: InputKind = { noun: 'a rule deck', most: '256 kB' };

/** What the user got wrong about a path, by the system's code; other codes are the machine's fault. */
const usersFaults: Readonly<Record<string, string>> = {
  ENOENT: 'no such file',
  ENOTDIR: 'a path that leads through a file',
  EISDIR: 'a folder',
  ENAMETOOLONG: 'a name that is too long',
  ELOOP: 'a link that leads round in a circle',
};

/** The bytes of a file that the user named, `-` for standard input. */
export async function readInput(
  path: string,
  { noun, most }: InputKind,
  session: Session,
): Promise<Step<Uint8Array>> {
  const { fs, stdin, cwd, signal } = session.surroundings;
  if (path === '' || path.includes('\0')) {
    return ending(exitCodes.refused, unreadable(path, noun, 'an empty or broken name'));
  }
  try {
    const reading = path === '-' ? readStreamBytes(stdin) : readFileBytes(absolutePath(path, cwd), fs);
    const bytes = await unlessInterrupted(reading, signal);
    if (bytes === 'interrupted') return interrupted(session);
    return bytes.length < mostBytes ? going(bytes) : ending(exitCodes.refused, tooLarge(path, noun, most));
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

function tooLarge(path: string, noun: string, most: string): Problem {
  const words = { expected: `${noun} of at most ${most}`, received: 'far more', fix: 'name another file' };
  return { ...unreadable(path, noun, ''), code: 'file-too-large', ...words };
}
