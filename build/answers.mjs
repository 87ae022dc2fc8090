import { spawnSync } from 'node:child_process';
import { join } from 'node:path';

/**
 * What the command answers to help, version and an empty line, as the program itself says it.
 *
 * @param {string} folder holds the built command, which answers by itself as long as `answers.json` is `{}`
 */
export function renderAnswers(folder) {
  const general = run(folder, ['--help']);
  const topics = commandNames(general.stdout);
  const lines = [
    [],
    ['--version'],
    ['--help'],
    ['-h'],
    ['help'],
    ...topics.flatMap((name) => [
      [name, '--help'],
      [name, '-h'],
      ['help', name],
    ]),
  ];
  return Object.fromEntries(lines.map((argv) => [argv.join('\n'), run(folder, argv)]));
}

function commandNames(help) {
  const commands = help.split('\nCommands\n')[1]?.split('\n\n')[0] ?? '';
  return [...commands.matchAll(/^ {2}([a-z]+)\b/gm)]
    .map((match) => match[1])
    .filter((name) => name !== 'help');
}

function run(folder, argv) {
  const { PATH } = process.env;
  const { stdout, stderr, status, error } = spawnSync(
    process.execPath,
    [join(folder, 'counterslope.cjs'), ...argv],
    { encoding: 'utf8', env: { PATH } },
  );
  if (error !== undefined || status === null || status > 2) {
    throw new Error(`counterslope ${argv.join(' ')} does not answer: ${error?.message ?? stderr}`);
  }
  return { stdout, stderr, exitCode: status };
}
