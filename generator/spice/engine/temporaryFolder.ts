import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';

/** A folder that is removed by `remove`, and also when the process ends or is told to end before that. */
export interface TemporaryFolder {
  readonly path: string;
  remove(): void;
}

const SIGNALS = ['SIGINT', 'SIGTERM', 'SIGHUP'] as const;

/**
 * Makes a fresh folder for one run.
 *
 * @param beforeRemoval runs first when the process ends early: stops who still writes there
 * @throws Error of the file system where no folder can be made
 */
export function makeTemporaryFolder(beforeRemoval: () => void): TemporaryFolder {
  const path = mkdtempSync(join(tmpdir(), 'counterslope-'));
  const removeFolder = () => rmSync(path, { recursive: true, force: true, maxRetries: 3 });
  const onExit = () => {
    beforeRemoval();
    removeFolder();
  };
  const onSignal = (signal: NodeJS.Signals) => {
    onExit();
    release();
    // A listener takes a signal's usual effect away. Who else listens decides; nobody: the process ends.
    if (process.listenerCount(signal) === 0) process.kill(process.pid, signal);
  };
  const release = () => {
    process.off('exit', onExit);
    for (const signal of SIGNALS) process.off(signal, onSignal);
  };
  process.on('exit', onExit);
  for (const signal of SIGNALS) process.on(signal, onSignal);
  return {
    path,
    remove: () => {
      release();
      removeFolder();
    },
  };
}
