import { spawnSync } from 'node:child_process';
import { cpSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, expect, test } from 'vitest';

/** The built command without its prepared answers: it has to load the program for each. */
const bare = mkdtempSync(join(tmpdir(), 'without-answers-'));
cpSync('dist', bare, { recursive: true });
writeFileSync(join(bare, 'answers.json'), '{}');
afterAll(() => rmSync(bare, { recursive: true }));

const prepared: Record<string, unknown> = JSON.parse(readFileSync('dist/answers.json', 'utf8'));

function run(folder: string, argv: readonly string[]) {
  const { stdout, stderr, status } = spawnSync(
    process.execPath,
    [join(folder, 'counterslope.cjs'), ...argv],
    {
      encoding: 'utf8',
      env: { PATH: process.env.PATH },
    },
  );
  return { stdout, stderr, status };
}

const lines = Object.keys(prepared).map((key) => (key === '' ? [] : key.split('\n')));

test.each(lines.map((argv) => ({ argv, line: `counterslope ${argv.join(' ')}` })))(
  'the prepared answer to $line is what the program says',
  ({ argv }) => {
    const answer = run('dist', argv);
    expect(answer).toEqual(run(bare, argv));
    expect(answer.stdout + answer.stderr).not.toBe('');
  },
);

test('help of every kind, the version and an empty line are prepared', () => {
  const commands = ['design', 'simulate', 'rules', 'init', 'schema'];
  expect(Object.keys(prepared)).toEqual(
    expect.arrayContaining([
      '',
      '--help',
      '-h',
      'help',
      '--version',
      ...commands.map((name) => `${name}\n--help`),
    ]),
  );
});

test('a reader that stops early sees no complaint', () => {
  const { stderr, status } = spawnSync(
    'bash',
    ['-c', `set -o pipefail; "${process.execPath}" dist/counterslope.cjs --help | true`],
    { encoding: 'utf8' },
  );
  expect({ stderr, status }).toEqual({ stderr: '', status: 0 });
});
