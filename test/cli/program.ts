import { type ChildProcess, spawn } from 'node:child_process';
import { existsSync } from 'node:fs';
import { mkdtemp, realpath, rm } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { setTimeout } from 'node:timers/promises';
import { onTestFinished } from 'vitest';

/** The program as users get it. */
export const program = join(import.meta.dirname, '../../dist/counterslope.cjs');
if (!existsSync(program)) throw new Error('no built program: npm run build makes it');

export const figures = ['--vin', '8 V to 36 V', '--l', '10uH', '--fs', '500kHz'] as const;

export interface Ended {
  readonly code: number | null;
  readonly stdout: string;
  readonly stderr: string;
}

export interface Circumstances {
  readonly cwd?: string;
  readonly stdin?: string | Uint8Array;
  readonly env?: Readonly<Record<string, string>>;
}

export async function newFolder(): Promise<string> {
  const folder = await realpath(await mkdtemp(join(tmpdir(), 'program-')));
  onTestFinished(() => rm(folder, { recursive: true, force: true }));
  return folder;
}

export function start(
  argv: readonly string[],
  { cwd = tmpdir(), env = {} }: Circumstances = {},
): ChildProcess {
  const clean = { PATH: process.env.PATH ?? '', HOME: '/nonexistent', ...env };
  return spawn(process.execPath, [program, ...argv], { cwd, env: clean, stdio: 'pipe' });
}

/** Runs the program to its end. */
export function run(argv: readonly string[], circumstances: Circumstances = {}): Promise<Ended> {
  const child = start(argv, circumstances);
  child.stdin!.on('error', () => {});
  child.stdin!.end(circumstances.stdin ?? '');
  return ended(child);
}

export function ended(child: ChildProcess): Promise<Ended> {
  const written = { stdout: '', stderr: '' };
  for (const name of ['stdout', 'stderr'] as const) {
    child[name]!.setEncoding('utf8').on('data', (text: string) => {
      written[name] += text;
    });
  }
  return new Promise((resolve, reject) => {
    child.on('error', reject);
    child.on('close', (code) => resolve({ code, ...written }));
  });
}

/**
 * Runs the program, its standard input left open, and sends it a signal while it is at work.
 *
 * On a busy machine the first moment may come before the program listens: then the signal ends it as it would
 * any process, without a code, and a later moment is tried.
 */
export async function runUntil(
  signal: 'SIGINT' | 'SIGTERM',
  argv: readonly string[],
  circumstances: Circumstances = {},
): Promise<Ended> {
  for (let moment_ms = 300; ; moment_ms *= 2) {
    const child = start(argv, circumstances);
    const end = ended(child);
    await setTimeout(moment_ms);
    child.kill(signal);
    const outcome = await end;
    if (outcome.code !== null || moment_ms > 5000) return outcome;
  }
}
