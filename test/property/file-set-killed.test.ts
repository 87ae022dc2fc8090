import { spawn } from 'node:child_process';
import { once } from 'node:events';
import * as disk from 'node:fs/promises';
import { join } from 'node:path';
import { setTimeout as pause } from 'node:timers/promises';
import { build } from 'esbuild';
import fc from 'fast-check';
import { expect, test } from 'vitest';
import { isWholeSet } from '../../generator/emit/write/manifest.ts';
import { readFileSet } from '../../generator/emit/write/readFileSet.ts';
import { inWorld } from './fileSetWorld.ts';

/** A program that replaces one set by the next, and the next, until it is killed. */
const program = `
import * as fs from 'node:fs/promises';
import { writeFileSet } from './generator/emit/write/writeFileSet.ts';
for (let run = 1; ; run++) {
  const names = ['ramp.cir', 'result.json', 'part-' + (run % 3) + '.csv'];
  const files = new Map(names.map((name) => [name, JSON.stringify({ run })]));
  const outcome = await writeFileSet({
    directory: 'design', files, specPath: null, cwd: process.cwd(), home: null, force: false, fs,
  });
  if (outcome.kind !== 'done') throw new Error(JSON.stringify(outcome));
  console.log(run);
}`;

async function bundled(into: string): Promise<string> {
  const outfile = join(into, 'program.mjs');
  await build({
    stdin: { contents: program, resolveDir: process.cwd(), loader: 'ts' },
    bundle: true,
    platform: 'node',
    format: 'esm',
    outfile,
  });
  return outfile;
}

/** Number of the last run that said it was done, before the kill. */
async function killedAfter(script: string, cwd: string, delay_ms: number): Promise<number> {
  const child = spawn(process.execPath, [script], { cwd, stdio: ['ignore', 'pipe', 'inherit'] });
  let printed = '';
  child.stdout.setEncoding('utf8').on('data', (chunk: string) => {
    printed += chunk;
  });
  await once(child.stdout, 'data');
  await pause(delay_ms);
  child.kill('SIGKILL');
  await once(child, 'close');
  return Number(printed.trim().split('\n').at(-1));
}

test('a run killed at any moment leaves the set it had or the one it was writing', async () => {
  await inWorld(async (tools) => {
    const script = await bundled(tools);
    await fc.assert(
      fc.asyncProperty(fc.integer({ min: 0, max: 40 }), (delay_ms) =>
        inWorld(async (cwd) => {
          await disk.mkdir(join(cwd, 'design'));
          await disk.writeFile(join(cwd, 'design/mine.txt'), 'mine');
          const last = await killedAfter(script, cwd, delay_ms);
          const set = await readFileSet({ directory: 'design', cwd, fs: disk });
          expect(set).toMatchObject({ kind: 'done', value: { differing: [], missing: [] } });
          expect(await isWholeSet(join(cwd, 'design'), disk)).toBe(true);
          const { run } = JSON.parse(await disk.readFile(join(cwd, 'design/result.json'), 'utf8'));
          expect([last, last + 1]).toContain(run);
          expect(await disk.readFile(join(cwd, 'design/mine.txt'), 'utf8')).toBe('mine');
          expect((await disk.readdir(cwd)).sort()).toEqual(['design', 'outside.txt']);
        }),
      ),
      { seed: 3101, numRuns: 20 },
    );
  });
}, 60_000);
