/** What is known of an entry without following it. */
export interface EntryStatus {
  readonly mode: number;
  readonly uid: number;
  readonly gid: number;
  isFile(): boolean;
  isDirectory(): boolean;
  isSymbolicLink(): boolean;
}

/** An open file, for writing it through to the disk. */
export interface OpenFile {
  writeFile(data: string | Uint8Array): Promise<void>;
  sync(): Promise<void>;
  close(): Promise<void>;
}

/** Names that are no valid UTF-8 exist on real disks; only their bytes find them again. */
export type EntryPath = string | Buffer;

/**
 * The part of `node:fs/promises` that the writer and the reader of file sets use.
 *
 * `node:fs/promises` itself satisfies it; tests wrap it to fail or to stop after any step.
 */
export interface FileSystem {
  lstat(path: EntryPath): Promise<EntryStatus>;
  readdir(path: string, options: { readonly encoding: 'buffer' }): Promise<Buffer[]>;
  readFile(path: EntryPath): Promise<Buffer>;
  readlink(path: string): Promise<string>;
  realpath(path: string): Promise<string>;
  open(path: string, flags: string): Promise<OpenFile>;
  symlink(target: string, path: string): Promise<void>;
  /** Gives the first folder that it had to make, where parents are made too. */
  mkdir(path: string, options: { readonly recursive: boolean }): Promise<string | undefined>;
  rename(from: EntryPath, to: EntryPath): Promise<void>;
  unlink(path: EntryPath): Promise<void>;
  rmdir(path: string): Promise<void>;
  chmod(path: string, mode: number): Promise<void>;
  chown(path: string, uid: number, gid: number): Promise<void>;
}
