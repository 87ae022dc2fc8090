import type { Problem } from '../../base/Problem.ts';
import { isSystemError } from '../../emit/write/machineOutcome.ts';
import type { Command } from '../commandLine/Command.ts';
import { exitCodes } from '../exitCodes.ts';
import { absolutePath } from '../input/absolutePath.ts';
import type { Session } from '../Session.ts';
import { conclude, ending, going, type Step } from '../Step.ts';
import type { CommandFileSystem } from '../Surroundings.ts';

export const initCommand: Command = {
  name: 'init',
  synopsis: '[FILE]',
  summary: 'Print a commented specification to start from, or write it.',
  details:
    'Prints a commented specification to start from, or writes it to FILE, never over an existing one.',
  words: { least: 0, most: 1 },
  flags: [],
  readsSpecification: false,
  examples: [{ task: 'Start a specification of your own', line: 'counterslope init rail.yaml' }],
  async run({ positionals: [path = '-'] }, session) {
    const text = await session.stages.starterSpecification();
    if (path === '-') {
      session.console.result(text);
      return exitCodes.good;
    }
    const written = await writeNew(path, text, session);
    if (!written.ok) return conclude(written, session);
    session.console.message(`wrote ${path}; next: counterslope design ${path} --out DIR`);
    return exitCodes.good;
  },
};

/** What is in the way of a new file, by the system's code; other codes are the machine's fault. */
const usersFaults: Readonly<Record<string, readonly [received: string, fix: string]>> = {
  EEXIST: ['a file that exists', 'name a new file, or delete the old one first'],
  EISDIR: ['a folder', 'name a file'],
  ENOENT: ['a folder that does not exist', 'make the folder first'],
  ENOTDIR: ['a path that leads through a file', 'name a file in a folder'],
  ENAMETOOLONG: ['a name that is too long', 'choose a shorter name'],
};

async function writeNew(path: string, text: string, { surroundings }: Session): Promise<Step<null>> {
  const { fs, cwd } = surroundings;
  if (path === '' || path.includes('\0')) {
    return ending(exitCodes.refused, refusal(path, 'an empty or broken name', 'name a file'));
  }
  try {
    await createWhole(absolutePath(path, cwd), text, fs);
    return going(null);
  } catch (error) {
    if (!isSystemError(error)) throw error;
    const fault = usersFaults[error.code];
    if (fault !== undefined) return ending(exitCodes.refused, refusal(path, ...fault));
    const problem = refusal(
      path,
      `an error of the disk (${error.code})`,
      'look at the disk, or name another file',
    );
    return ending(exitCodes.machine, problem);
  }
}

/** The whole text or no file: a part of it would pass for a specification. */
async function createWhole(path: string, text: string, fs: CommandFileSystem): Promise<void> {
  const file = await fs.open(path, 'wx');
  try {
    await file.writeFile(text);
    await file.sync();
  } catch (error) {
    await fs.unlink(path);
    throw error;
  } finally {
    await file.close();
  }
}

function refusal(path: string, received: string, fix: string): Problem {
  const place = { path, line: null, column: null };
  return {
    code: 'file-not-written',
    severity: 'error',
    key: null,
    place,
    expected: 'a new file',
    received,
    fix,
  };
}
