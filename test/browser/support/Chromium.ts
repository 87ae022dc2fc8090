import { type ChildProcess, spawn } from 'node:child_process';
import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import type { Readable, Writable } from 'node:stream';

type Message = {
  readonly id?: number;
  readonly method?: string;
  readonly params?: Record<string, unknown>;
  readonly result?: unknown;
  readonly error?: { readonly message: string };
};

const quiet = [
  '--headless',
  '--no-sandbox',
  '--disable-gpu',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
  '--hide-scrollbars',
  '--remote-debugging-pipe',
];

/**
 * A headless browser of the machine's own, spoken to through a pipe: messages of the DevTools protocol,
 * each ended by a zero byte, on the file descriptors 3 and 4.
 */
export class Chromium {
  readonly #process: ChildProcess;
  readonly #profile: string;
  readonly #waiting = new Map<number, (message: Message) => void>();
  readonly #listeners: ((method: string, params: Record<string, unknown>) => void)[] = [];
  #session: string | undefined;
  #count = 0;

  private constructor() {
    this.#profile = mkdtempSync(join(tmpdir(), 'counterslope-chromium-'));
    this.#process = spawn('chromium', [...quiet, `--user-data-dir=${this.#profile}`, 'about:blank'], {
      stdio: ['ignore', 'ignore', 'ignore', 'pipe', 'pipe'],
      detached: true,
    });
    let rest = '';
    (this.#process.stdio[4] as Readable).setEncoding('utf8').on('data', (text: string) => {
      const messages = (rest + text).split('\0');
      rest = messages.pop() ?? '';
      for (const message of messages) this.#take(JSON.parse(message) as Message);
    });
  }

  /** A browser with one blank page; what happens in the page is reported to `onEvent`. */
  static async open(): Promise<Chromium> {
    const browser = new Chromium();
    const { targetInfos } = (await browser.send('Target.getTargets')) as {
      targetInfos: { targetId: string; type: string }[];
    };
    const targetId = targetInfos.find(({ type }) => type === 'page')!.targetId;
    const attached = await browser.send('Target.attachToTarget', { targetId, flatten: true });
    browser.#session = (attached as { sessionId: string }).sessionId;
    for (const domain of ['Page', 'Runtime', 'Log', 'Network']) await browser.send(`${domain}.enable`);
    return browser;
  }

  onEvent(listener: (method: string, params: Record<string, unknown>) => void): void {
    this.#listeners.push(listener);
  }

  send(method: string, params: object = {}): Promise<unknown> {
    const id = ++this.#count;
    const message = { id, method, params, ...(this.#session && { sessionId: this.#session }) };
    (this.#process.stdio[3] as Writable).write(`${JSON.stringify(message)}\0`);
    return new Promise((resolve, reject) => {
      this.#waiting.set(id, ({ result, error }) =>
        error ? reject(new Error(`${method}: ${error.message}`)) : resolve(result),
      );
    });
  }

  /** Opens a page and waits until it has loaded. */
  async visit(url: string): Promise<void> {
    const loaded = new Promise<void>((resolve) =>
      this.onEvent((method) => method === 'Page.loadEventFired' && resolve()),
    );
    await this.send('Page.navigate', { url });
    await loaded;
  }

  /** Value of an expression in the page. */
  async evaluate<T>(expression: string): Promise<T> {
    const answer = await this.send('Runtime.evaluate', {
      expression,
      returnByValue: true,
      awaitPromise: true,
    });
    const { result, exceptionDetails } = answer as { result: { value: T }; exceptionDetails?: unknown };
    if (exceptionDetails) throw new Error(`${expression}: ${JSON.stringify(exceptionDetails)}`);
    return result.value;
  }

  async end(): Promise<void> {
    const ended = new Promise((resolve) => this.#process.once('exit', resolve));
    process.kill(-this.#process.pid!, 'SIGKILL');
    await ended;
    rmSync(this.#profile, { recursive: true, force: true, maxRetries: 10 });
  }

  #take(message: Message): void {
    if (message.id !== undefined) {
      this.#waiting.get(message.id)?.(message);
      this.#waiting.delete(message.id);
    } else if (message.method !== undefined) {
      for (const listener of this.#listeners) listener(message.method, message.params ?? {});
    }
  }
}
