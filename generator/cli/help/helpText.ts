import type { Command, Example } from '../commandLine/Command.ts';
import { type Flag, flagForm } from '../commandLine/Flag.ts';
import { flagsOf } from '../commandLine/flags.ts';
import { commands, laterCommands } from '../commands/commands.ts';
import { columns, helpWidth, section, wrap } from './columns.ts';

const purpose =
  'Sizes, builds and proves ramp generators for the slope compensation of peak-current-mode converters: ' +
  'from input range, inductance and frequency to standard parts, netlists, a report, and a SPICE run ' +
  'that checks them.';

const exits: readonly (readonly [string, string])[] = [
  ['0', 'all good'],
  ['1', 'no circuit for this specification, or a rule or the simulation says no'],
  ['2', 'bad input or usage; nothing written'],
  ['3', 'the machine failed: disk, engine, engine not installed'],
  ['130, 143', 'interrupted; temporary files removed'],
];

/**
 * The help of one command, or of the whole.
 *
 * Rendered from the tables that the parser reads, at build too, so that `--help` starts at once.
 * @throws RangeError when there is no such command
 */
export function helpText(name: string | null): string {
  if (name === null) return asText(generalHelp());
  const command = commands.find((candidate) => candidate.name === name);
  if (command === undefined) throw new RangeError(`no command ${name}`);
  return asText(commandHelp(command));
}

function asText(lines: readonly string[]): string {
  return `${lines.join('\n')}\n`;
}

function generalHelp(): readonly string[] {
  return [
    ...wrap(purpose, helpWidth),
    ...section('Usage', ['  counterslope COMMAND [SPEC|-] [FLAGS]']),
    ...section(
      'Commands',
      columns([
        ...commands.map(({ name, summary }) => [name, summary] as const),
        ['help', 'Show the help of a command.'],
      ]),
    ),
    ...section('Not yet available', [`  ${laterCommands.join(', ')}`]),
    ...section('Examples', examplesOf(commands.flatMap(({ examples }) => examples.slice(0, 1)))),
    ...section('Exit codes', columns(exits)),
    '',
    'counterslope COMMAND --help lists its flags. A value with blanks goes in quotes.',
  ];
}

function commandHelp(command: Command): readonly string[] {
  const flags = flagsOf(command).filter(({ later }) => !later);
  return [
    `counterslope ${command.name} ${command.synopsis} [FLAGS]`.replace('  ', ' '),
    '',
    ...wrap(command.details, helpWidth),
    ...section('Specification', flagRows(flags, 'specification')),
    ...section('Work', flagRows(flags, 'work')),
    ...section('Output', flagRows(flags, 'output')),
    ...section('Examples', examplesOf(command.examples)),
  ];
}

function flagRows(flags: readonly Flag[], group: Flag['group']): readonly string[] {
  const rows = flags.filter((flag) => flag.group === group);
  return rows.length === 0 ? [] : columns(rows.map((flag) => [flagForm(flag), flag.meaning]));
}

function examplesOf(examples: readonly Example[]): readonly string[] {
  return examples.flatMap(({ task, line }) => [`  ${task}`, `    ${line}`]);
}
