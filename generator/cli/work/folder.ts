import type { FileSystem } from '../../emit/write/FileSystem.ts';
import { givenValue, type Invocation } from '../commandLine/Invocation.ts';
import type { Session } from '../Session.ts';
import { folderStep, going, type Step } from '../Step.ts';

/** Says before the long work what writing the set would refuse. */
export async function askFolder(invocation: Invocation, session: Session): Promise<Step<null>> {
  const directory = givenValue(invocation, 'out');
  if (directory === null) return going(null);
  const { checkFolder } = await import('../../emit/write/checkFolder.ts');
  return folderStep(await checkFolder(folderRequest(directory, invocation, session)), session);
}

/** Replaces the set in the folder of `--out`. */
export async function writeSet(
  files: ReadonlyMap<string, string>,
  invocation: Invocation,
  session: Session,
): Promise<Step<unknown>> {
  const directory = givenValue(invocation, 'out') ?? '';
  const { writeFileSet } = await import('../../emit/write/writeFileSet.ts');
  const request = { ...folderRequest(directory, invocation, session), files };
  return folderStep(await writeFileSet(request), session);
}

/** Adds to the set in the folder of `--out`, or begins one. */
export async function addToSet(
  files: ReadonlyMap<string, string>,
  invocation: Invocation,
  session: Session,
): Promise<Step<unknown>> {
  const directory = givenValue(invocation, 'out') ?? '';
  const { writeFileSet } = await import('../../emit/write/writeFileSet.ts');
  const request = { ...folderRequest(directory, invocation, session), files, keepsRest: true };
  return folderStep(await writeFileSet(request), session);
}

function folderRequest(directory: string, invocation: Invocation, { surroundings }: Session) {
  const { cwd, env, fs, signal } = surroundings;
  const [spec] = invocation.positionals;
  return {
    directory,
    specPath: spec === undefined || spec === '-' ? null : spec,
    cwd,
    home: env.HOME || env.USERPROFILE || null,
    force: invocation.switches.has('force'),
    fs: fs as FileSystem,
    ...(signal === undefined ? {} : { signal }),
  };
}
