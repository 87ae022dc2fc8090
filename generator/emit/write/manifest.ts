import { join } from 'node:path';
import { fingerprint, sha256 } from './entries.ts';
import type { FileSystem } from './FileSystem.ts';

export const MANIFEST = 'manifest.json';
const SCHEMA = 'counterslope/manifest/1';

/** Names of ours and the SHA-256 that each had when we wrote it. */
export type Fingerprints = ReadonlyMap<string, string>;

/** A name that stays in its folder on every system. */
const PLAIN_NAME = /^[A-Za-z0-9][A-Za-z0-9._-]*$/;

/**
 * The text of `manifest.json` for a set: SHA-256 of each file, sorted by name.
 * @param rest what stays in the set besides
 * @throws RangeError when a name could leave the folder, or two are one where case does not count
 */
export function manifestOf(files: ReadonlyMap<string, string>, rest: Fingerprints = new Map()): string {
  const hashes = new Map([...rest, ...[...files].map(([name, text]) => [name, sha256(text)] as const)]);
  const names = [...hashes.keys()].sort();
  const bad = names.find((name) => !PLAIN_NAME.test(name) || name.toLowerCase() === MANIFEST);
  if (bad !== undefined) throw new RangeError(`not a name for a file of the set: ${bad}`);
  if (new Set(names.map((name) => name.toLowerCase())).size < names.length) {
    throw new RangeError('two names of the set differ in case only');
  }
  return render(new Map(names.map((name) => [name, hashes.get(name)!])));
}

function render(fingerprints: Fingerprints): string {
  const files = [...fingerprints].map(([name, hash]) => ({ name, sha256: hash }));
  return `${JSON.stringify({ schema: SCHEMA, files }, null, 2)}\n`;
}

/**
 * What a manifest lists; null when it is none of this version.
 *
 * `asWritten` is false when the text is not to the letter what we write, so that someone edited it.
 */
export function parseManifest(text: string): { fingerprints: Fingerprints; asWritten: boolean } | null {
  const files = listedFiles(text);
  if (files === null) return null;
  const fingerprints = new Map(files.map(({ name, sha256 }) => [name, sha256]));
  const sorted = new Map([...fingerprints].sort(([a], [b]) => (a < b ? -1 : 1)));
  return { fingerprints, asWritten: render(sorted) === text };
}

interface ListedFile {
  readonly name: string;
  readonly sha256: string;
}

function listedFiles(text: string): readonly ListedFile[] | null {
  try {
    const { schema, files } = JSON.parse(text) ?? {};
    return schema === SCHEMA && Array.isArray(files) && files.every(isListedFile) ? files : null;
  } catch {
    return null;
  }
}

function isListedFile(file: Partial<ListedFile> | null): file is ListedFile {
  const { name, sha256 } = file ?? {};
  return PLAIN_NAME.test(String(name)) && name !== MANIFEST && /^[0-9a-f]{64}$/.test(String(sha256));
}

/**
 * What may be called ours in a folder: the files of a manifest exactly as we wrote it, itself included.
 *
 * Empty without such a manifest: then everything in the folder is the user's.
 */
export async function readOwnership(folder: string, fs: FileSystem): Promise<Fingerprints> {
  const path = join(folder, MANIFEST);
  const own = await fingerprint(path, fs);
  if (own === null) return new Map();
  const manifest = parseManifest((await fs.readFile(path)).toString('utf8'));
  return manifest?.asWritten ? new Map([...manifest.fingerprints, [MANIFEST, own]]) : new Map();
}

/** True when a folder holds a manifest of ours and every file as listed. */
export async function isWholeSet(folder: string, fs: FileSystem): Promise<boolean> {
  const owned = await readOwnership(folder, fs);
  for (const [name, hash] of owned) {
    if ((await fingerprint(join(folder, name), fs)) !== hash) return false;
  }
  return owned.size > 0;
}
