import type { Outcome, Problem } from '../base/Problem.ts';
import type { FolderOutcome } from '../emit/write/FolderOutcome.ts';
import { type ExitCode, exitCodeOf, exitCodes } from './exitCodes.ts';
import type { Session } from './Session.ts';

/** A step of a command: what it gives, or how the command ends. */
export type Step<T> = { readonly ok: true; readonly value: T } | Ending;

export interface Ending {
  readonly ok: false;
  readonly exit: ExitCode;
  readonly problems: readonly Problem[];
}

export function going<T>(value: T): Step<T> {
  return { ok: true, value };
}

export function ending(exit: ExitCode, ...problems: readonly Problem[]): Ending {
  return { ok: false, exit, problems };
}

export function interrupted({ surroundings }: Session): Ending {
  return ending(exitCodeOf(surroundings.signal));
}

/** Bad input ends a command with 2; what is only worth a remark is said at once. */
export function stepOf<T>(outcome: Outcome<T>, session: Session): Step<T> {
  if (!outcome.ok) return ending(exitCodes.refused, ...outcome.problems);
  session.console.remarks(outcome.warnings);
  return going(outcome.value);
}

/** The same for work on a folder. */
export function folderStep<T>(outcome: FolderOutcome<T>, session: Session): Step<T> {
  switch (outcome.kind) {
    case 'done':
      session.console.remarks(outcome.notes);
      return going(outcome.value);
    case 'refused':
      return ending(exitCodes.refused, ...outcome.problems);
    case 'machine':
      return ending(exitCodes.machine, ...outcome.problems);
    case 'interrupted':
      return interrupted(session);
  }
}

/** Several ends at once: every problem is told, and the gravest code counts. */
export function endingOf(steps: readonly Step<unknown>[]): Ending | null {
  const ends = steps.filter((step): step is Ending => !step.ok);
  const gravest = ends.toSorted((a, b) => b.exit - a.exit)[0];
  if (gravest === undefined) return null;
  return { ...gravest, problems: ends.flatMap(({ problems }) => problems) };
}

/** Says why a command ends, if there is anything to say, and how. */
export function conclude(step: Step<ExitCode>, { console }: Session): ExitCode {
  if (step.ok) return step.value;
  if (step.problems.length > 0) console.problems(step.problems);
  return step.exit;
}
