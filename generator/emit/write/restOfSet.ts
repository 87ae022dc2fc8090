import { join } from 'node:path';
import { statusOf } from './entries.ts';
import { type Fingerprints, MANIFEST, readOwnership } from './manifest.ts';
import type { Place } from './Place.ts';

/** The files of a set that files to be added leave as they are. */
export interface RestOfSet {
  /** As they are on disk now, edited or not. */
  readonly files: ReadonlyMap<string, Buffer>;
  /** As the manifest has them, so that an edited file is still known for one. */
  readonly fingerprints: Fingerprints;
}

export const nothingElse: RestOfSet = { files: new Map(), fingerprints: new Map() };

/** What a folder's set holds besides the names of the files to be added. */
export async function restOfSet({ folder, fs }: Place, added: Iterable<string>): Promise<RestOfSet> {
  const taken = new Set([...added, MANIFEST]);
  const owned = await readOwnership(folder, fs);
  const fingerprints = new Map([...owned].filter(([name]) => !taken.has(name)));
  const files = new Map<string, Buffer>();
  for (const name of fingerprints.keys()) {
    const path = join(folder, name);
    if ((await statusOf(path, fs))?.isFile()) files.set(name, await fs.readFile(path));
  }
  return { files, fingerprints };
}
