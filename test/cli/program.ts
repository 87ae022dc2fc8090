import { type ChildProcess, spawn } from 'node:child_process';
import { existsSync } from 'node:fs';
import { mkdtemp, readFile, realpath, rm } from 'node:fs/promises';
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

const sigint = 1n << 1n;

/** Waits until the program has taken over SIGINT, as the kernel knows it; elsewhere a second must do. */
export async function listensToSignals({ pid }: ChildProcess): Promise<void> {
  if (process.platform !== 'linux') return setTimeout(1000);
  for (;;) {
    const caught = /^SigCgt:\s*(\w+)$/m.exec(await readFile(`/proc/${pid}/status`, 'utf8'))?.[1] ?? '0';
    if ((BigInt(`0x${caught}`) & sigint) !== 0n) return;
    await setTimeout(10);
  }
}
