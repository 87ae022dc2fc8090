import type { ExitCode } from '../exitCodes.ts';
import type { Session } from '../Session.ts';
import type { Invocation } from './Invocation.ts';

export interface Example {
  /** The task, as a user would put it. */
  readonly task: string;
  readonly line: string;
}

/** One command: what the help says of it, what the parser lets through, and what it does. */
export interface Command {
  readonly name: string;
  /** What follows the name: `[SPEC|-]`. */
  readonly synopsis: string;
  /** One line in the list of commands. */
  readonly summary: string;
  /** Sentences for its own help. */
  readonly details: string;
  /** How many words it takes besides its name. */
  readonly words: { readonly least: number; readonly most: number };
  /** Names of the own flags that belong to it, besides those that belong to every command. */
  readonly flags: readonly string[];
  /** Whether the keys of the specification may be given as flags. */
  readonly readsSpecification: boolean;
  readonly examples: readonly Example[];
  run(invocation: Invocation, session: Session): Promise<ExitCode>;
}

/** Flags that every command takes. */
export const commonFlags: readonly string[] = ['quiet', 'color', 'no-color', 'help', 'version'];
