import * as fs from 'node:fs/promises';
import { exitCodes } from './exitCodes.ts';
import { main } from './main.ts';

const interruption = new AbortController();

/** Once asks, twice insists: the second signal does not wait for anything to be cleared away. */
function onSignal(signal: 'SIGINT' | 'SIGTERM'): void {
  if (interruption.signal.aborted) process.exit(exitCodes[signal]);
  interruption.abort(signal);
}

/** A reader that has seen enough is no error; a disk that is full under a redirection is. */
function onOutputError(error: NodeJS.ErrnoException): void {
  if (error.code === 'EPIPE') return;
  process.stderr.write(`error: stdout: expected to be written, received ${error.code}\n`);
  process.exitCode = exitCodes.machine;
  outputFailed = true;
}

let outputFailed = false;

async function run(): Promise<number> {
  const { stdin, stdout, stderr, env } = process;
  const surroundings = { stdin, stdout, stderr, fs, env, cwd: process.cwd(), signal: interruption.signal };
  return main(process.argv.slice(2), surroundings);
}

process.on('SIGINT', () => onSignal('SIGINT'));
process.on('SIGTERM', () => onSignal('SIGTERM'));
process.stdout.on('error', onOutputError);
process.stderr.on('error', () => {});
run().then(
  (code) => {
    if (!outputFailed) process.exitCode = code;
    // A read that never ends would hold the process although nobody waits for it any more.
    if (interruption.signal.aborted) process.exit();
  },
  (error) => {
    process.stderr.write(`error: a fault of counterslope: ${error}\n`);
    process.exitCode = exitCodes.machine;
  },
);
