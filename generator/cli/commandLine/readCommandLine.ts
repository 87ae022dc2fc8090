import type { Problem } from '../../base/Problem.ts';
import { commands, laterCommands } from '../commands/commands.ts';
import type { Command } from './Command.ts';
import { checkFlags } from './checkFlags.ts';
import { findCommand } from './findCommand.ts';
import { flags } from './flags.ts';
import type { Invocation } from './Invocation.ts';
import { parseArguments } from './parseArguments.ts';
import { type Tokens, takeTokens } from './takeTokens.ts';

export type Request =
  | { readonly kind: 'help'; readonly command: string | null }
  | { readonly kind: 'version' }
  | { readonly kind: 'run'; readonly command: Command; readonly invocation: Invocation }
  | { readonly kind: 'refused'; readonly problems: readonly Problem[] };

export interface CommandLine {
  readonly request: Request;
  /** As far as they could be told, also from a line that is refused. */
  readonly manners: Manners;
}

/** How the user wants to be spoken to. */
export interface Manners {
  readonly json: boolean;
  readonly quiet: boolean;
  readonly color: 'auto' | 'always' | 'never';
}

/** What a command line asks for, or everything that is wrong with it. */
export async function readCommandLine(argv: readonly string[]): Promise<CommandLine> {
  const tokens = takeTokens(argv, flags);
  return { request: await requestOf(tokens), manners: mannersOf(tokens) };
}

async function requestOf(tokens: Tokens): Promise<Request> {
  const [name, ...words] = tokens.words;
  if (isGiven(tokens, 'help')) return helpRequest(name === 'help' ? words[0] : name);
  if (isGiven(tokens, 'version') && tokens.problems.length === 0) return { kind: 'version' };
  const found = findCommand(name, commands, laterCommands);
  if (name === 'help' && tokens.problems.length === 0) return helpFor(words);
  if (!found.ok) return { kind: 'refused', problems: [...found.problems, ...tokens.problems] };
  const command = found.value;
  const problems = [...tokens.problems, ...checkFlags(tokens.given, words, command)];
  if (problems.length > 0) return { kind: 'refused', problems };
  const { values, switches } = await parseArguments({ ...tokens, words });
  return {
    kind: 'run',
    command,
    invocation: { command: command.name, positionals: words, values, switches },
  };
}

/** `-h` helps whatever else is on the line; an unknown command gets the general help. */
function helpRequest(name: string | undefined): Request {
  const command = commands.find((candidate) => candidate.name === name);
  return { kind: 'help', command: command?.name ?? null };
}

/** `help COMMAND` */
function helpFor([name]: readonly string[]): Request {
  if (name === undefined) return { kind: 'help', command: null };
  const found = findCommand(name, commands, laterCommands);
  return found.ok ? { kind: 'help', command: name } : { kind: 'refused', problems: found.problems };
}

function isGiven({ given }: Tokens, name: string): boolean {
  return given.some(({ flag }) => flag.name === name);
}

function mannersOf(tokens: Tokens): Manners {
  const color = tokens.given.find(({ flag }) => flag.name === 'color')?.value;
  const chosen = color === 'always' || color === 'never' ? color : 'auto';
  return {
    json: isGiven(tokens, 'json'),
    quiet: isGiven(tokens, 'quiet'),
    color: isGiven(tokens, 'no-color') ? 'never' : chosen,
  };
}
