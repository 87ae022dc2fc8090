import { spawnSync } from 'node:child_process';
import { mkdirSync, mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { join } from 'node:path';
import { expect, onTestFinished, test } from 'vitest';

/** Runs vitest with the closing line over test files of their own, in a folder that finds vitest. */
function run(files: Record<string, string>) {
  mkdirSync('.tmp', { recursive: true });
  const root = mkdtempSync(join('.tmp', 'closing-'));
  onTestFinished(() => rmSync(root, { recursive: true }));
  const reporter = JSON.stringify(join(process.cwd(), 'build/closingLine.mjs'));
  writeFileSync(
    join(root, 'vitest.config.mjs'),
    `import { ClosingLine } from ${reporter};
     export default { test: { include: ['*.check.js'], reporters: ['default', new ClosingLine(7)] } };`,
  );
  for (const [name, text] of Object.entries(files)) writeFileSync(join(root, name), text);
  const vitest = join(process.cwd(), 'node_modules/vitest/vitest.mjs');
  const { NODE_OPTIONS, VITEST, ...env } = process.env;
  const { stdout, status } = spawnSync(process.execPath, [vitest, 'run', '--root', root], {
    encoding: 'utf8',
    env,
  });
  return { lines: stdout.trimEnd().split('\n').slice(-2), status };
}

const passing = `import { test } from 'vitest'; test('passes', () => {}); test.skip('is skipped', () => {}); test.todo('waits');`;
const failing = `import { test } from 'vitest'; test('passes', () => {}); test('fails', () => { throw new Error('no'); });`;

test('a run that passes ends with its seed and its counts, and with 0', () => {
  expect(run({ 'a.check.js': passing })).toEqual({
    lines: ['seed 7', '1 passed, 0 failed, 2 skipped'],
    status: 0,
  });
});

test('one failure in any file ends with 1', () => {
  expect(run({ 'a.check.js': passing, 'b.check.js': failing })).toEqual({
    lines: ['seed 7', '2 passed, 1 failed, 2 skipped'],
    status: 1,
  });
});

test('a file that does not load and an error outside any test count as failures', () => {
  const { lines, status } = run({
    'a.check.js': `import './not-there.js';`,
    'b.check.js': `import { test } from 'vitest'; test('passes', () => { setTimeout(() => { throw new Error('late'); }); return new Promise((done) => setTimeout(done, 50)); });`,
  });
  expect({ lines, status }).toEqual({ lines: ['seed 7', '1 passed, 2 failed, 0 skipped'], status: 1 });
});

test('a run without tests does not pass', () => {
  expect(run({}).status).toBe(1);
});
