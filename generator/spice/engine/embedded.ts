import { Worker } from 'node:worker_threads';
import type { Deck, EngineOpening, RunOutcome, SpiceEngine } from '../Deck.ts';
import { acceptRun } from './acceptRun.ts';
import { prepareDeck } from './prepareDeck.ts';
import { embeddedWorkerUrl } from './workerLocation.ts';
import type { RunRequest, WorkerMessage } from './workerMessages.ts';

export interface EmbeddedOptions {
  /** The worker's own entry file; left out: beside this module or beside the bundle. */
  readonly workerUrl?: URL;
}

/** Generous: seconds pass on a slow disk that reads the engine for the first time. */
const OPENING_LIMIT_S = 60;

/**
 * Opens the engine that comes with the package, in a thread of its own.
 *
 * The thread keeps the process alive until `end`.
 */
export async function openEmbeddedEngine(options: EmbeddedOptions = {}): Promise<EngineOpening> {
  const url = options.workerUrl ?? embeddedWorkerUrl();
  const opening = await openThread(url);
  if (!opening.ok) return opening;
  return { ok: true, engine: new EmbeddedEngine(url, opening.thread, opening.version) };
}

/** One engine, many decks one after the other; a thread that failed once is not used again. */
class EmbeddedEngine implements SpiceEngine {
  readonly kind = 'embedded';
  readonly version: string;
  readonly #url: URL;
  #thread: Worker | null;

  constructor(url: URL, thread: Worker, version: string) {
    this.#url = url;
    this.#thread = thread;
    this.version = version;
  }

  async run(deck: Deck, { timeout_s }: { readonly timeout_s: number }): Promise<RunOutcome> {
    const prepared = prepareDeck(deck);
    if (!prepared.ok) return { ok: false, reason: prepared.reason, log: '' };
    if (this.#thread === null) {
      const opening = await openThread(this.#url);
      if (!opening.ok) return { ok: false, reason: opening.reason, log: '' };
      this.#thread = opening.thread;
    }
    const outcome = await runInThread(this.#thread, deck, prepared, timeout_s);
    if (!outcome.ok) await this.end();
    return outcome;
  }

  async end(): Promise<void> {
    const thread = this.#thread;
    this.#thread = null;
    await thread?.terminate();
  }
}

type ThreadOpening =
  | { readonly ok: true; readonly thread: Worker; readonly version: string }
  | { readonly ok: false; readonly reason: string };

async function openThread(url: URL): Promise<ThreadOpening> {
  // Piped, so that nothing the engine prints reaches the user's terminal; read, so that no pipe fills.
  // Options of the user's own node (`--input-type`) are not the worker's.
  const thread = new Worker(url, { stdout: true, stderr: true, execArgv: [] });
  thread.stdout.resume();
  thread.stderr.resume();
  const banner = await listen<{ text: string } | { reason: string }>(thread, OPENING_LIMIT_S, {
    message: (message) => {
      if (message.kind === 'ready') return { text: message.banner };
      return message.kind === 'unavailable' ? { reason: message.reason } : null;
    },
    lost: (reason) => ({ reason }),
  });
  if ('text' in banner) {
    return { ok: true, thread, version: /ngspice-([\w.+-]+)/.exec(banner.text)?.[1] ?? 'unknown' };
  }
  await thread.terminate();
  return { ok: false, reason: `the embedded engine did not start: ${banner.reason}` };
}

function runInThread(
  thread: Worker,
  deck: Deck,
  { text, runTitle }: { text: string; runTitle: string },
  timeout_s: number,
): Promise<RunOutcome> {
  const lines: string[] = [];
  const outcome = listen<RunOutcome>(thread, timeout_s, {
    message: (message) => {
      if (message.kind === 'line') lines.push(message.text);
      if (message.kind === 'finished') return acceptRun(deck, { ...message, runTitle, problem: null });
      if (message.kind !== 'gone') return null;
      return acceptRun(deck, { ...message, runTitle, raw: null, problem: 'the engine gave up' });
    },
    lost: (problem) => {
      const standardError = lines.join('\n');
      return acceptRun(deck, { runTitle, raw: null, standardError, log: standardError, problem });
    },
  });
  const request: RunRequest = { text, includes: deck.includes };
  thread.postMessage(request);
  return outcome;
}

/** Waits for the message that `message` turns into a result, for the loss of the thread, or for the limit. */
function listen<T>(
  thread: Worker,
  limit_s: number,
  { message, lost }: { message: (received: WorkerMessage) => T | null; lost: (reason: string) => T },
): Promise<T> {
  return new Promise((resolve) => {
    const settle = (result: T) => {
      clearTimeout(limit);
      thread.off('message', onMessage).off('error', onError).off('exit', onExit);
      resolve(result);
    };
    const onMessage = (received: WorkerMessage) => {
      const result = message(received);
      if (result !== null) settle(result);
    };
    const onError = (error: Error) => settle(lost(`the engine's thread failed: ${error.message}`));
    const onExit = () => settle(lost("the engine's thread ended"));
    const limit = setTimeout(() => settle(lost(`not finished within ${limit_s} s`)), 1000 * limit_s);
    thread.on('message', onMessage).on('error', onError).on('exit', onExit);
  });
}
