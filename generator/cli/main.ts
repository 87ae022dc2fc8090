import { type CommandLine, readCommandLine } from './commandLine/readCommandLine.ts';
import { type ExitCode, exitCodes } from './exitCodes.ts';
import { unforeseen } from './problems/unforeseen.ts';
import type { Session } from './Session.ts';
import type { Stages } from './Stages.ts';
import { conclude, ending } from './Step.ts';
import type { CommandFileSystem, Surroundings } from './Surroundings.ts';
import { shippedStages } from './shippedStages.ts';
import { openConsole } from './terminal/openConsole.ts';
import { versionText } from './version.ts';

/** What the caller lends of its process; `node:fs` serves as well as `node:fs/promises`. */
export interface MainSurroundings extends Omit<Surroundings, 'fs'> {
  readonly fs: CommandFileSystem | { readonly promises: CommandFileSystem };
}

/**
 * The whole command line as a function: what the process would print and do, and its exit code.
 *
 * Nothing in it ends the process.
 */
export async function main(
  argv: readonly string[],
  lent: MainSurroundings,
  stages: Stages = shippedStages as Stages,
): Promise<ExitCode> {
  const { fs } = lent;
  const surroundings: Surroundings = { ...lent, fs: 'promises' in fs ? fs.promises : fs };
  const { request, manners } = await readCommandLine(argv);
  const console = openConsole(surroundings, manners);
  const session = { surroundings, console, stages };
  try {
    return await answer(request, session);
  } catch (error) {
    if (surroundings.env.COUNTERSLOPE_DEBUG) surroundings.stderr.write(`${traceOf(error)}\n`);
    return conclude(ending(exitCodes.machine, unforeseen(error)), session);
  } finally {
    console.close();
  }
}

async function answer(request: CommandLine['request'], session: Session): Promise<ExitCode> {
  switch (request.kind) {
    case 'version':
      session.console.result(versionText);
      return exitCodes.good;
    case 'help': {
      const { helpText } = await import('./help/helpText.ts');
      session.console.result(helpText(request.command));
      return exitCodes.good;
    }
    case 'refused':
      return conclude(ending(exitCodes.refused, ...request.problems), session);
    case 'run':
      return request.command.run(request.invocation, session);
  }
}

function traceOf(error: unknown): string {
  return (error instanceof Error && error.stack) || String(error);
}
