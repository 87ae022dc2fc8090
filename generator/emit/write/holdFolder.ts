import { type FolderOutcome, folderProblem } from './FolderOutcome.ts';
import { releaseLock, takeLock } from './lock.ts';
import { machineOutcome } from './machineOutcome.ts';
import type { Place } from './Place.ts';
import { Interruption } from './stage.ts';

/** How long to wait for another run on the same folder, and the signal that ends everything early. */
export interface Waiting {
  /** An exchange takes milliseconds; left out: 3000. */
  readonly wait_ms?: number;
  /** Aborted by the command line on SIGINT or SIGTERM. */
  readonly signal?: AbortSignal;
}

const USUAL_WAIT_ms = 3000;

/** Does work on a folder that no other run may touch meanwhile. */
export async function holdFolder<T>(
  place: Place,
  { wait_ms = USUAL_WAIT_ms, signal }: Waiting,
  work: () => Promise<FolderOutcome<T>>,
): Promise<FolderOutcome<T>> {
  const owner = await takeLock(place.lock, place.fs, { wait_ms, signal });
  if (owner !== null) return signal?.aborted ? { kind: 'interrupted' } : busy(place, owner);
  try {
    return await work();
  } finally {
    await releaseLock(place.lock, place.fs);
  }
}

/** Errors of the machine, and an interruption, as outcomes; bugs stay exceptions. */
export async function withoutExceptions<T>(
  shown: string,
  work: () => Promise<FolderOutcome<T>>,
): Promise<FolderOutcome<T>> {
  try {
    return await work();
  } catch (error) {
    return error instanceof Interruption ? { kind: 'interrupted' } : machineOutcome(shown, error);
  }
}

function busy(place: Place, owner: string): FolderOutcome<never> {
  const problem = folderProblem(place.shown, 'folder-busy', {
    expected: 'a folder that no other run is writing',
    received: `another run of counterslope is at work on it (process ${owner.split('@')[0]})`,
    fix: `wait until it ends, or name another folder; if no such run exists, delete ${place.lock}`,
  });
  return { kind: 'machine', problems: [problem] };
}
