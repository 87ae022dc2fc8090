import * as disk from 'node:fs/promises';
import { join } from 'node:path';
import { expect, it } from 'vitest';
import { newFolder, run } from '../unit/cli/session.ts';

/** Every kind of command line that is refused. */
const refusedLines: readonly (readonly string[])[] = [
  [],
  ['--json'],
  ['dsign'],
  ['rail.yaml'],
  ['-'],
  [''],
  ['loop', 'rail.yaml'],
  ['compare', '--engine', 'none', 'rail.yaml'],
  ['window', '--vin', '8 V to 36 V', '--fs', '500 kHz'],
  ['window', '--vin', '8 V to 36 V', '--fs', '500 kHz', '--gain', '0.7'],
  ['sweep'],
  ['help', 'desing'],
  ['help', 'loop'],
  ['design'],
  ['design', '--vim', '8 V'],
  ['design', '--Vin', '8 V'],
  ['design', '--frobnicate'],
  ['design', '-x'],
  ['design', '-l', '10uH'],
  ['design', '-vin', '8 V'],
  ['design', '-12 V'],
  ['design', '--vin'],
  ['design', '--vin', '--l', '10uH'],
  ['design', '--out', '--json'],
  ['design', '--vin', '8 V', '--vin', '9 V', '--vin', '10 V'],
  ['design', '--quiet', '--quiet', '--vin', '8 V'],
  ['design', '--json=yes'],
  ['design', '--force=', 'rail.yaml'],
  ['design', 'rail.yaml', 'desk.yaml'],
  ['design', 'rail.yaml', '--vin', '8', 'V', 'to', '36', 'V'],
  ['design', 'rail.yaml', '--engine', 'ngspice'],
  ['design', 'rail.yaml', '--engine', 'instaled'],
  ['design', 'rail.yaml', '--color', 'yes'],
  ['design', 'rail.yaml', '--color', 'always', '--no-color'],
  ['design', '--vin', '8 V', '--timeout', '0'],
  ['design', '--vin', '8 V', '--timeout', 'soon'],
  ['design', '--vin', '8 V', '--timeout', '-5'],
  ['design', '--vin', '8 V', '--timeout', '1e99'],
  [
    'design',
    'rail.yaml',
    '--samples',
    '1000',
    '--seed',
    '1',
    '--samples-csv',
    'x.csv',
    '--watch',
    '--sarif',
    'x',
  ],
  ['design', 'missing.yaml'],
  ['design', 'folder'],
  ['design', 'file/rail.yaml'],
  ['design', ''],
  ['design', 'latin1.yaml'],
  ['design', 'huge.yaml'],
  ['design', '--vin', '8', '--l', '10', '--fs', '500', '--set', 'no-equals', '--set', 'nokey=1'],
  ['design', '--vin', '8 V to 36 V', '--l', '10uH', '--fs', '500kHz', '--rules', 'missing.xml'],
  ['design', '--vin', '8 V to 36 V', '--l', '10uH', '--fs', '500kHz', '--out', '.'],
  ['design', '--vin', '8 V to 36 V', '--l', '10uH', '--fs', '500kHz', '--out', 'file'],
  ['simulate'],
  ['simulate', 'a', 'b'],
  ['simulate', 'folder'],
  ['simulate', 'nowhere'],
  ['simulate', ''],
  ['simulate', 'folder', '--vin', '8 V', '--out', 'x', '--set', 'a=1', '--rules', 'x.xml'],
  ['init', 'file'],
  ['init', 'folder'],
  ['init', 'nowhere/rail.yaml'],
  ['init', '--json'],
  ['init', 'a.yaml', 'b.yaml'],
  ['schema'],
  ['schema', 'specification'],
  ['schema', 'results'],
  ['rules', 'lst'],
  ['rules', 'explain'],
  ['rules', 'explain', 'stabilty'],
  ['rules', 'list', 'all'],
  ['rules', 'test'],
  ['rules', 'test', 'missing.xml'],
  ['rules', 'test', 'latin1.yaml'],
];

it('every kind of bad command line is refused with 2, says what, where and how to mend it, and writes nothing', async () => {
  const cwd = await folderWithTraps();
  const before = (await disk.readdir(cwd)).sort();
  let transcript = '';
  for (const argv of refusedLines) {
    const { code, stdout, stderr } = await run(argv, { cwd });
    const line = ['counterslope', ...argv.map(quoted)].join(' ');
    expect([line, code]).toEqual([line, 2]);
    expect(stderr).not.toMatch(/^ +at .+:\d+:\d+/m);
    transcript += `$ ${line}\n${stderr}${stdout}\n`;
  }
  expect((await disk.readdir(cwd)).sort()).toEqual(before);
  await expect(transcript.replaceAll(cwd, 'CWD')).toMatchFileSnapshot('cli/bad-command-lines.txt');
});

it('with --json the same problems are on stdout as data', async () => {
  const cwd = await folderWithTraps();
  for (const argv of refusedLines.filter(
    (line) => !line.includes('--json') && !line.includes('--json=yes'),
  )) {
    const { code, stdout, stderr } = await run(['--json', ...argv], { cwd });
    const { schema, problems } = JSON.parse(stdout);
    expect([code, schema]).toEqual([2, 'counterslope/problems/1']);
    const errors = stderr.split('\n').filter((line) => line.startsWith('error: '));
    expect(errors.length).toBe(problems.length);
    const keys = ['code', 'severity', 'path', 'line', 'column', 'expected', 'received', 'fix'];
    for (const problem of problems) expect(Object.keys(problem)).toEqual(keys);
  }
});

function quoted(word: string): string {
  return /^[\w.=/-]+$/.test(word) ? word : `"${word}"`;
}

/** A folder in which every path of the lines above is what its name says. */
async function folderWithTraps(): Promise<string> {
  const cwd = await newFolder();
  await disk.mkdir(join(cwd, 'folder'));
  await disk.writeFile(join(cwd, 'file'), 'mine');
  await disk.writeFile(join(cwd, 'latin1.yaml'), Buffer.from('title: gr\xfcn\n', 'latin1'));
  await disk.writeFile(join(cwd, 'huge.yaml'), `# ${'x'.repeat(3_000_000)}\n`);
  return cwd;
}
