import { execFileSync, spawnSync } from 'node:child_process';
import { cpSync, mkdirSync, mkdtempSync, readFileSync, rmSync, symlinkSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import { afterAll, beforeAll, expect, test } from 'vitest';

/** The package as its user has it: packed, unpacked into an empty project, its dependencies beside it. */
const project = mkdtempSync(join(tmpdir(), 'user-of-the-package-'));
const installed = join(project, 'node_modules/counterslope');
const { dependencies } = JSON.parse(readFileSync('package.json', 'utf8'));
let packed: readonly string[] = [];

beforeAll(() => {
  const report = execFileSync('npm', ['pack', '--ignore-scripts', '--json', '--pack-destination', project], {
    encoding: 'utf8',
    stdio: ['ignore', 'pipe', 'ignore'],
  });
  const [{ filename, files }] = JSON.parse(report);
  packed = files.map(({ path }: { path: string }) => path);
  mkdirSync(installed, { recursive: true });
  execFileSync('tar', ['xzf', join(project, filename), '-C', installed, '--strip-components=1']);
  for (const name of Object.keys(dependencies)) link(name);
  writeFileSync(join(project, 'package.json'), '{ "type": "module" }');
});

afterAll(() => rmSync(project, { recursive: true }));

/** Linked by real path: what a dependency needs lies beside it there. */
function link(name: string): void {
  symlinkSync(resolve('node_modules', name), join(project, 'node_modules', name), 'dir');
}

function node(...words: string[]) {
  return spawnSync(process.execPath, words, {
    cwd: project,
    encoding: 'utf8',
    env: { PATH: process.env.PATH },
  });
}

const flags = ['--vin', '8 V to 36 V', '--l', '10 uH', '--fs', '500 kHz', '--json'];

test('the package holds the built program, its notices and its licence, and none of the sources', () => {
  expect(packed).toEqual(
    expect.arrayContaining([
      'LICENSE',
      'NOTICES.md',
      'package.json',
      'dist/counterslope.cjs',
      'dist/cli.cjs',
      'dist/cli.cache',
      'dist/answers.json',
      'dist/embedded-worker.mjs',
      'dist/library/embedded-worker.mjs',
      'dist/index.js',
      'dist/types/index.d.ts',
    ]),
  );
  expect(
    packed.filter((path) => /^(generator|test|build|templates|out-samples|node_modules)\//.test(path)),
  ).toEqual([]);
});

test('the installed command designs without the packages that only the build needs', () => {
  const { status, stdout } = node(
    join(installed, 'dist/counterslope.cjs'),
    'design',
    ...flags,
    '--engine',
    'none',
  );
  expect(status).toBe(0);
  expect(JSON.parse(stdout).schema).toBe('counterslope/result/1');
});

test('the installed command finds its SPICE engine', () => {
  const { status, stdout } = node(join(installed, 'dist/counterslope.cjs'), 'design', ...flags);
  expect(status).toBe(0);
  expect(JSON.parse(stdout).simulation).toMatchObject({ engine: 'embedded', passed: true });
});

test('main of the imported library is the command line, its SPICE engine included', () => {
  writeFileSync(
    join(project, 'use.js'),
    `import * as fs from 'node:fs/promises';
     import { main } from 'counterslope';
     const { stdin, stdout, stderr, env } = process;
     const argv = ${JSON.stringify(['design', ...flags])};
     process.exitCode = await main(argv, { stdin, stdout, stderr, fs, env, cwd: process.cwd() });`,
  );
  const { status, stdout, stderr } = node('use.js');
  expect(stderr).toBe('');
  expect(status).toBe(0);
  expect(JSON.parse(stdout).simulation.passed).toBe(true);
});

test('its types are whole for a strict user who has neither the schema library nor Node types', () => {
  writeFileSync(
    join(project, 'use.ts'),
    `import { main } from 'counterslope';
     const code: Promise<0 | 1 | 2 | 3 | 130 | 143> = main([], null!);
     // @ts-expect-error a number is no list of arguments
     main(1, null!);
     export default code;`,
  );
  const tsc = resolve('node_modules/typescript/bin/tsc');
  const options = [
    '--noEmit',
    '--strict',
    '--target',
    'es2023',
    '--module',
    'nodenext',
    '--types',
    '',
    '--lib',
    'es2023,dom,dom.asynciterable',
  ];
  const { stdout, status } = node(tsc, ...options, 'use.ts');
  expect(stdout).toBe('');
  expect(status).toBe(0);
});

test('a code cache of another Node or of another build is passed over without a word', () => {
  const other = join(project, 'other');
  cpSync(join(installed, 'dist'), other, { recursive: true });
  const cache = readFileSync(join(other, 'cli.cache'));
  for (const spoilt of [Buffer.alloc(0), Buffer.from('no cache'), spoiltVersion(cache)]) {
    writeFileSync(join(other, 'cli.cache'), spoilt);
    expect(node(join(other, 'counterslope.cjs'), 'rules', 'list')).toEqual(
      expect.objectContaining({
        status: 0,
        stderr: '',
        stdout: node(join(installed, 'dist/counterslope.cjs'), 'rules', 'list').stdout,
      }),
    );
  }
});

/** The header holds a magic number, then a hash of V8's version. */
function spoiltVersion(cache: Buffer): Buffer {
  const spoilt = Buffer.from(cache);
  spoilt.writeUInt32LE(spoilt.readUInt32LE(4) ^ 0xffff, 4);
  return spoilt;
}
