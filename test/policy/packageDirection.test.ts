import { execFileSync, spawnSync } from 'node:child_process';
import { cpSync, mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { expect, onTestFinished, test } from 'vitest';
import { directionFaults } from '../../build/importDirection.mjs';

const messages = (file: string, text: string) => directionFaults(file, text).map(({ message }) => message);

test.each([
  ['a stage that imports a later one', 'law/leastGain.ts', `import { a } from '../circuit/a.ts';`],
  ['the same in types only', 'law/leastGain.ts', `import type { A } from '../circuit/A.ts';`],
  ['the same over several lines', 'law/leastGain.ts', `import {\n  a,\n  b,\n} from '../circuit/a.ts';`],
  ['the same as a re-export', 'law/leastGain.ts', `export { a } from '../circuit/a.ts';`],
  ['the same for its effect', 'law/leastGain.ts', `import '../circuit/a.ts';`],
  ['the same loaded late', 'law/leastGain.ts', `const { a } = await import('../circuit/a.ts');`],
  ['a stage that imports the table of contents', 'report/page.ts', `import { design } from '../design.ts';`],
  [
    'the table of contents that imports the command line',
    'design.ts',
    `import { main } from './cli/main.ts';`,
  ],
  ['the base that imports any stage', 'base/nearest.ts', `import { keys } from '../spec/keys.ts';`],
  [
    'the written form for more than its types',
    'spec/a.ts',
    `import { resultSchema } from '../emit/resultSchema.ts';`,
  ],
  ['a folder that no stage owns', 'utils/a.ts', `import { a } from '../base/a.ts';`],
  ['a module of Node in the core', 'law/leastGain.ts', `import { readFileSync } from 'node:fs';`],
  ['one loaded late', 'report/page.ts', `const fs = await import('node:fs');`],
  ['one in the command line beside its entry', 'cli/main.ts', `import { join } from 'node:path';`],
])('lint refuses %s', (_, file, text) => {
  expect(messages(file, text)).toHaveLength(1);
});

test.each([
  [
    'earlier stages, the base and its own',
    'circuit/a.ts',
    `import { a } from '../law/a.ts';\nimport { b } from '../base/b.ts';\nimport { c } from './c.ts';`,
  ],
  ['types of the written form', 'rules/a.ts', `import type { RuleOutcome } from '../emit/resultSchema.ts';`],
  [
    'templates and decks, which are data',
    'emit/deck/a.ts',
    `import t from '../../../templates/a.cir.hbs';\nimport r from '../../../rules/a.xml';`,
  ],
  ['Node in the file writer', 'emit/write/a.ts', `import { join } from 'node:path';`],
  ['Node in the engine', 'spice/engine/a.ts', `import { Worker } from 'node:worker_threads';`],
  ['Node at the entry', 'cli/entry.ts', `import * as fs from 'node:fs/promises';`],
])('lint allows %s', (_, file, text) => {
  expect(messages(file, text)).toEqual([]);
});

test('a fault is reported where it stands', () => {
  expect(directionFaults('law/a.ts', `// why\nimport {\n  a,\n} from '../circuit/a.ts';\n`)).toEqual([
    { line: 2, message: 'law imports the later stage circuit: circuit/a.ts' },
  ]);
});

test('the lint step of the checkout ends 1 as soon as one file goes against the direction', () => {
  const root = mkdtempSync(join(tmpdir(), 'direction-'));
  onTestFinished(() => rmSync(root, { recursive: true }));
  mkdirSync(join(root, 'build'));
  cpSync('build/importDirection.mjs', join(root, 'build/importDirection.mjs'));
  cpSync('generator', join(root, 'generator'), { recursive: true });
  const script = join(root, 'build/importDirection.mjs');
  execFileSync(process.execPath, [script]);
  writeFileSync(join(root, 'generator/law/wrong.ts'), `import '../circuit/Circuit.ts';\n`);
  const { status, stderr } = spawnSync(process.execPath, [script], { encoding: 'utf8' });
  expect(status).toBe(1);
  expect(stderr).toBe('generator/law/wrong.ts:1: law imports the later stage circuit: circuit/Circuit.ts\n');
});
