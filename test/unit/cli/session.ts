import * as fs from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { onTestFinished } from 'vitest';
import { main } from '../../../generator/cli/main.ts';
import type { Stages } from '../../../generator/cli/Stages.ts';
import type { Surroundings } from '../../../generator/cli/Surroundings.ts';
import { shippedStages } from '../../../generator/cli/shippedStages.ts';

/** A folder of its own for a test, gone afterwards. */
export async function newFolder(): Promise<string> {
  const folder = await fs.realpath(await fs.mkdtemp(join(tmpdir(), 'command-line-')));
  onTestFinished(() => fs.rm(folder, { recursive: true, force: true }));
  return folder;
}

export interface Circumstances {
  readonly stdin?: string;
  readonly cwd?: string;
  readonly env?: Surroundings['env'];
  /** Whether stdout and stderr are terminals. */
  readonly isTTY?: boolean;
  readonly signal?: AbortSignal;
  readonly fs?: Surroundings['fs'];
  /** Stages in the place of the shipped ones. */
  readonly stages?: Partial<Stages>;
}

export interface Ended {
  readonly code: number;
  readonly stdout: string;
  readonly stderr: string;
}

/** The command line in this process, with streams that only collect. */
export async function run(argv: readonly string[], circumstances: Circumstances = {}): Promise<Ended> {
  const { stdin = '', isTTY = false, env = {}, signal, stages = {} } = circumstances;
  const written = { stdout: '', stderr: '' };
  const collector = (name: 'stdout' | 'stderr') => ({
    isTTY,
    write: (text: string) => {
      written[name] += text;
    },
  });
  const surroundings: Surroundings = {
    stdin: streamOf(stdin),
    stdout: collector('stdout'),
    stderr: collector('stderr'),
    fs: circumstances.fs ?? fs,
    env,
    cwd: circumstances.cwd ?? tmpdir(),
    ...(signal === undefined ? {} : { signal }),
  };
  const code = await main(argv, surroundings, { ...(shippedStages as Stages), ...stages });
  return { code, ...written };
}

async function* streamOf(text: string): AsyncGenerator<Uint8Array> {
  yield new TextEncoder().encode(text);
}
