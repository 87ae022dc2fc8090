import { nearest } from '../../base/nearest.ts';
import type { Problem } from '../../base/Problem.ts';
import type { Command } from './Command.ts';
import type { Flag } from './Flag.ts';
import { flagsOf } from './flags.ts';
import type { Tokens } from './takeTokens.ts';
import { usageProblem } from './usageProblem.ts';

/** Everything about flags and words that does not go with the command. */
export function checkFlags(
  given: Tokens['given'],
  words: readonly string[],
  command: Command,
): readonly Problem[] {
  const own = flagsOf(command);
  const problems = given.flatMap(({ flag, value }) => {
    if (flag.later) return [notYet(flag)];
    if (!own.includes(flag)) return [notOfCommand(flag, command)];
    return value !== null && flag.choices !== null && !flag.choices.includes(value)
      ? [notAChoice(flag, flag.choices, value)]
      : [];
  });
  return [
    ...new Map(problems.map((problem) => [JSON.stringify(problem), problem])).values(),
    ...contradictions(given),
    ...checkWords(words, command),
  ];
}

function notYet({ name }: Flag): Problem {
  return usageProblem(`--${name}`, {
    code: 'not-yet-available',
    expected: 'a flag of this version',
    received: `--${name}, which is not yet available`,
    fix: 'leave it out',
  });
}

function notOfCommand({ name }: Flag, command: Command): Problem {
  return usageProblem(`--${name}`, {
    code: 'flag-not-of-command',
    expected: `a flag of ${command.name}`,
    received: `--${name}, which ${command.name} does not take`,
    fix: `leave it out, or see counterslope ${command.name} --help`,
  });
}

function notAChoice({ name }: Flag, choices: readonly string[], value: string): Problem {
  const near = nearest(value, choices);
  return usageProblem(`--${name}`, {
    code: 'not-a-choice',
    expected: choices.join(', ').replace(/, (?=[^,]*$)/, ' or '),
    received: value === '' ? 'an empty value' : value,
    fix: near === null ? 'give one of these' : `did you mean ${near}?`,
  });
}

function contradictions(given: Tokens['given']): readonly Problem[] {
  const colour = given.find(({ flag }) => flag.name === 'color');
  const isPlain = given.some(({ flag }) => flag.name === 'no-color');
  if (!isPlain || colour === undefined || colour.value === 'never') return [];
  return [
    usageProblem('--no-color', {
      code: 'flags-contradict',
      expected: 'one of --color and --no-color',
      received: `both, with --color ${colour.value}`,
      fix: 'keep the one that you mean',
    }),
  ];
}

function checkWords(words: readonly string[], command: Command): readonly Problem[] {
  const { least, most } = command.words;
  const form = `counterslope ${command.name} ${command.synopsis}`;
  if (words.length < least) {
    return [
      usageProblem(command.name, {
        code: 'word-missing',
        expected: command.synopsis,
        received: 'nothing',
        fix: `write ${form}`,
      }),
    ];
  }
  const surplus = words.slice(most);
  if (surplus.length === 0) return [];
  return [
    usageProblem(command.name, {
      code: 'word-unexpected',
      expected: most === 0 ? 'no word' : `no more than ${command.synopsis}`,
      received: surplus.every((word) => word === '') ? 'an empty word' : `also ${surplus.join(' ')}`,
      fix: `write ${form}; a value with blanks in it goes in quotes`,
    }),
  ];
}
