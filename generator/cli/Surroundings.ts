import type { FileSystem, OpenFile } from '../emit/write/FileSystem.ts';

/** Where results or messages go: a stream of the process, or a collector in a test. */
export interface Output {
  write(text: string): unknown;
  readonly isTTY?: boolean | undefined;
}

/** Where a specification may come from besides a file. */
export interface Input extends AsyncIterable<Uint8Array | string> {
  readonly isTTY?: boolean | undefined;
}

/** An open file that can also be read, so that no more than a bound is ever taken from it. */
export interface ReadableFile extends OpenFile {
  read(
    buffer: Uint8Array,
    offset: number,
    length: number,
    position: number | null,
  ): Promise<{ readonly bytesRead: number }>;
}

/** `node:fs/promises` satisfies it. */
export interface CommandFileSystem extends FileSystem {
  open(path: string, flags: string): Promise<ReadableFile>;
}

/** Everything of the process that a command may touch. */
export interface Surroundings {
  readonly stdin: Input;
  readonly stdout: Output;
  readonly stderr: Output;
  readonly fs: CommandFileSystem;
  readonly env: Readonly<Record<string, string | undefined>>;
  /** Absolute. */
  readonly cwd: string;
  /** Aborted with `SIGINT` or `SIGTERM` as its reason. */
  readonly signal?: AbortSignal;
}
