import { nearest } from '../../base/nearest.ts';
import { failure, type Outcome, type Problem, success } from '../../base/Problem.ts';
import type { Command } from './Command.ts';
import { usageProblem } from './usageProblem.ts';

/** The command of that name, or why there is none. */
export function findCommand(
  name: string | undefined,
  commands: readonly Command[],
  later: readonly string[],
): Outcome<Command> {
  const command = commands.find((candidate) => candidate.name === name);
  if (command !== undefined) return success(command);
  const names = commands.map((candidate) => candidate.name);
  if (name === undefined) return failure([noCommand(names)]);
  return failure([
    later.includes(name) ? notYet(name, names) : unknownCommand(name, [...names, ...later, 'help']),
  ]);
}

function noCommand(names: readonly string[]): Problem {
  return usageProblem('counterslope', {
    code: 'command-missing',
    expected: `a command: ${names.join(', ')}`,
    received: 'none',
    fix: 'see counterslope --help',
  });
}

function notYet(name: string, names: readonly string[]): Problem {
  return usageProblem(name, {
    code: 'not-yet-available',
    expected: `a command of this version: ${names.join(', ')}`,
    received: `${name}, which is not yet available`,
    fix: 'leave it for a later version',
  });
}

function unknownCommand(name: string, names: readonly string[]): Problem {
  const near = nearest(name, names);
  return usageProblem(name, {
    code: 'unknown-command',
    expected: 'a known command',
    received: name === '' ? 'an empty word' : name,
    fix: near !== null ? `did you mean ${near}?` : fixWithoutNear(name),
  });
}

function fixWithoutNear(name: string): string {
  const looksLikeFile = name === '-' || /[./\\]/.test(name);
  return looksLikeFile ? `write counterslope design ${name}` : 'see counterslope --help';
}
