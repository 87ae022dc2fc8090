import { spawn } from 'node:child_process';
import { accessSync, constants, existsSync, readFileSync, statSync, writeFileSync } from 'node:fs';
import { delimiter, join } from 'node:path';
import type { Deck, EngineOpening, RunOutcome, SpiceEngine } from '../Deck.ts';
import { acceptRun } from './acceptRun.ts';
import { prepareDeck } from './prepareDeck.ts';
import { makeTemporaryFolder } from './temporaryFolder.ts';

type Environment = Readonly<Record<string, string | undefined>>;

const PROGRAMS = process.platform === 'win32' ? ['ngspice_con.exe', 'ngspice.exe'] : ['ngspice'];
const DECK_FILE = 'counterslope-run.cir';
const RAW_FILE = 'counterslope-run.raw';
const LOG_LIMIT_CHARS = 200_000;
const CUT_SHORT = '(and more, not kept)';
const VERSION_LIMIT_S = 20;

/**
 * Opens the ngspice that the user has installed.
 *
 * @param env where `PATH` is looked up; the program gets it without whatever steers ngspice
 */
export async function openInstalledEngine({ env }: { readonly env: Environment }): Promise<EngineOpening> {
  const program = findProgram(env);
  if (program === null) {
    return {
      ok: false,
      reason: 'ngspice is not on the PATH; install it, on Debian by `apt-get install ngspice`',
    };
  }
  const quiet = quietEnvironment(env);
  const asked = await execute(program, ['--version'], { env: quiet, limit_s: VERSION_LIMIT_S });
  const version = /ngspice-([\w.+-]+)/.exec(asked.standardOutput)?.[1];
  if (version === undefined) {
    return { ok: false, reason: `${program} does not say its version: ${asked.problem ?? 'no ngspice'}` };
  }
  return { ok: true, engine: new InstalledEngine(program, version, quiet) };
}

/** Each run is a process of its own, in a folder of its own. */
class InstalledEngine implements SpiceEngine {
  readonly kind = 'installed';
  readonly version: string;
  readonly #program: string;
  readonly #env: Environment;

  constructor(program: string, version: string, env: Environment) {
    this.#program = program;
    this.version = version;
    this.#env = env;
  }

  async run(deck: Deck, { timeout_s }: { readonly timeout_s: number }): Promise<RunOutcome> {
    const prepared = prepareDeck(deck);
    if (!prepared.ok) return { ok: false, reason: prepared.reason, log: '' };
    const stop = new AbortController();
    const folder = makeTemporaryFolder(() => stop.abort());
    try {
      for (const [name, text] of Object.entries(deck.includes)) writeFileSync(join(folder.path, name), text);
      writeFileSync(join(folder.path, DECK_FILE), prepared.text);
      const ran = await execute(this.#program, ['-n', '-b', '-r', RAW_FILE, DECK_FILE], {
        env: this.#env,
        folder: folder.path,
        limit_s: timeout_s,
        signal: stop.signal,
      });
      const log = `${ran.standardOutput}\n${ran.standardError}`;
      const rawPath = join(folder.path, RAW_FILE);
      const raw = existsSync(rawPath) ? readFileSync(rawPath) : null;
      return acceptRun(deck, {
        runTitle: prepared.runTitle,
        raw,
        standardError: ran.standardError,
        log,
        problem: ran.problem,
      });
    } finally {
      folder.remove();
    }
  }

  async end(): Promise<void> {}
}

function findProgram(env: Environment): string | null {
  const folders = (env.PATH ?? env.Path ?? '').split(delimiter).filter((folder) => folder !== '');
  const candidates = folders.flatMap((folder) => PROGRAMS.map((name) => join(folder, name)));
  return candidates.find(isProgram) ?? null;
}

function isProgram(path: string): boolean {
  try {
    accessSync(path, constants.X_OK);
    return statSync(path).isFile();
  } catch {
    return false;
  }
}

/** Numbers with a point whatever the locale; no script folders or ascii raw files by the user's variables. */
function quietEnvironment(env: Environment): Environment {
  const kept = Object.entries(env).filter(([name]) => !/^(SPICE|NGSPICE|LC_|LANG)/i.test(name));
  return { ...Object.fromEntries(kept), LC_ALL: 'C' };
}

interface Executed {
  readonly standardOutput: string;
  readonly standardError: string;
  /** Why the program did not end well, or null. */
  readonly problem: string | null;
}

function execute(
  program: string,
  words: readonly string[],
  options: { env: Environment; folder?: string; limit_s: number; signal?: AbortSignal },
): Promise<Executed> {
  return new Promise((resolve) => {
    const child = spawn(program, words, {
      env: { ...options.env },
      stdio: ['ignore', 'pipe', 'pipe'],
      killSignal: 'SIGKILL',
      ...(options.folder === undefined ? {} : { cwd: options.folder }),
      ...(options.signal === undefined ? {} : { signal: options.signal }),
    });
    let standardOutput = '';
    let standardError = '';
    child.stdout.setEncoding('utf8').on('data', (text: string) => {
      standardOutput = bounded(standardOutput + text);
    });
    child.stderr.setEncoding('utf8').on('data', (text: string) => {
      standardError = bounded(standardError + text);
    });
    let late = false;
    const limit = setTimeout(() => {
      late = true;
      child.kill('SIGKILL');
    }, 1000 * options.limit_s);
    const settle = (problem: string | null) => {
      clearTimeout(limit);
      resolve({ standardOutput, standardError, problem });
    };
    child.on('error', (error) => settle(`the engine could not be run: ${error.message}`));
    child.on('close', (code, signal) => {
      if (late) settle(`not finished within ${options.limit_s} s`);
      else if (code === 0) settle(null);
      else settle(`the engine ended with ${code === null ? `signal ${signal}` : `exit ${code}`}`);
    });
  });
}

/** The beginning of what was said, and that there was more: on standard error that is a complaint too. */
function bounded(text: string): string {
  return text.length > LOG_LIMIT_CHARS ? `${text.slice(0, LOG_LIMIT_CHARS)}\n${CUT_SHORT}` : text;
}
