import { spawn } from 'node:child_process';
import {
  chmodSync,
  copyFileSync,
  existsSync,
  mkdirSync,
  mkdtempSync,
  readdirSync,
  readFileSync,
  rmSync,
  symlinkSync,
  writeFileSync,
} from 'node:fs';
import { tmpdir } from 'node:os';
import { join, resolve } from 'node:path';
import { build } from 'esbuild';
import { afterEach, beforeEach, describe, expect, it, vi } from 'vitest';
import { rcDeck } from './support/decks.ts';

const ENGINES = resolve(import.meta.dirname, '../../generator/spice/engine');

let folder: string;
beforeEach(() => {
  folder = mkdtempSync(join(tmpdir(), 'engines-process-'));
  symlinkSync(resolve(import.meta.dirname, '../../node_modules'), join(folder, 'node_modules'));
});
afterEach(() => rmSync(folder, { recursive: true, force: true }));

/** Bundles a program as the build does, with the worker's file beside it. */
async function bundle(program: string, format: 'esm' | 'cjs'): Promise<string> {
  const outfile = join(folder, format === 'esm' ? 'program.mjs' : 'program.cjs');
  await build({
    stdin: { contents: program, resolveDir: ENGINES, loader: 'ts' },
    outfile,
    format,
    bundle: true,
    platform: 'node',
    target: 'node20',
    external: ['eecircuit-engine'],
    logOverride: { 'empty-import-meta': 'silent' },
  });
  copyFileSync(join(ENGINES, 'embedded-worker.mjs'), join(folder, 'embedded-worker.mjs'));
  return outfile;
}

interface Ended {
  readonly code: number | null;
  readonly signal: NodeJS.Signals | null;
  readonly output: string;
}

function start(file: string, env: NodeJS.ProcessEnv = process.env) {
  const child = spawn(process.execPath, [file], { env, stdio: ['ignore', 'pipe', 'pipe'] });
  let output = '';
  child.stdout.on('data', (piece: Buffer) => (output += piece));
  child.stderr.on('data', (piece: Buffer) => (output += piece));
  const ended = new Promise<Ended>((done) => {
    child.on('close', (code, signal) => done({ code, signal, output }));
  });
  return { child, ended };
}

describe('a program with the embedded engine', () => {
  it.each(['esm', 'cjs'] as const)(
    'bundled as %s runs a deck and ends by itself',
    async (format) => {
      const program = `
      import { openEmbeddedEngine } from './embedded.ts';
      openEmbeddedEngine().then(async (opening) => {
        if (!opening.ok) throw new Error(opening.reason);
        const outcome = await opening.engine.run(${JSON.stringify(rcDeck)}, { timeout_s: 20 });
        await opening.engine.end();
        console.log(outcome.ok);
      });`;
      const { ended } = start(await bundle(program, format));
      expect(await ended).toEqual({ code: 0, signal: null, output: 'true\n' });
    },
    20_000,
  );
});

describe('a program with the installed engine', () => {
  /** Stands for an engine that never ends; notes its process. */
  const STANDSTILL = `#!/bin/sh
if [ "$1" = --version ]; then echo '** ngspice-39 : '; exit 0; fi
echo $$ > "$PID_FILE"
exec sleep 1000
`;
  const program = (watching: boolean) => `
    import { openInstalledEngine } from './installed.ts';
    ${watching ? "process.on('SIGTERM', () => process.exit(143));" : ''}
    openInstalledEngine({ env: process.env }).then((opening) =>
      opening.ok && opening.engine.run(${JSON.stringify(rcDeck)}, { timeout_s: 60 }));`;

  it.each([
    ['dies of a signal', false, { code: null, signal: 'SIGTERM' }],
    ['ends itself on a signal', true, { code: 143, signal: null }],
  ] as const)(
    'that %s leaves neither folder nor process',
    async (_title, watching, end) => {
      const temporary = join(folder, 'tmp');
      const programs = join(folder, 'bin');
      const pidFile = join(folder, 'pid');
      for (const path of [temporary, programs]) mkdirSync(path);
      writeFileSync(join(programs, 'ngspice'), STANDSTILL);
      chmodSync(join(programs, 'ngspice'), 0o755);
      const { child, ended } = start(await bundle(program(watching), 'esm'), {
        PATH: `${programs}:/usr/bin:/bin`,
        TMPDIR: temporary,
        PID_FILE: pidFile,
      });
      await vi.waitUntil(() => existsSync(pidFile) && readFileSync(pidFile, 'utf8').endsWith('\n'), 10_000);
      expect(readdirSync(temporary)).toHaveLength(1);
      child.kill('SIGTERM');
      expect(await ended).toMatchObject(end);
      expect(readdirSync(temporary)).toEqual([]);
      const pid = Number(readFileSync(pidFile, 'utf8'));
      await vi.waitUntil(() => !isAlive(pid), 5000);
    },
    20_000,
  );
});

function isAlive(pid: number): boolean {
  try {
    process.kill(pid, 0);
    return true;
  } catch {
    return false;
  }
}
