import { join } from 'node:path';
import { entriesOf, entryIn, exists, fingerprint } from './entries.ts';
import type { EntryPath } from './FileSystem.ts';
import { type Fingerprints, readOwnership } from './manifest.ts';
import type { Place } from './Place.ts';

/** One rename; the exchange keeps them to be able to take them back. */
export type Rename = (from: EntryPath, to: EntryPath) => Promise<void>;

/** A file whose place the new set took, and the name under which it was kept. */
export interface KeptFile {
  readonly name: string;
  readonly keptAs: string;
}

/**
 * Moves from the old folder to the new one everything that is not ours to throw away.
 *
 * Moved, not copied: contents, times, rights, links and folders stay what they are, at any size.
 * Afterwards the old folder holds only files of ours exactly as we wrote them. Entries that keep their
 * name go first, so that no `.bak` is made under a name that one of them still needs; a second call goes
 * on where a first one stopped.
 */
export async function carryOver({ folder, old, fs }: Place, rename: Rename): Promise<KeptFile[]> {
  const owned = await readOwnership(old, fs);
  const entries = await entriesOf(old, fs);
  const displaced: string[] = [];
  for (const entry of entries) {
    const fate = await fateOf(entry, owned);
    if (fate === 'moves') await rename(entryIn(old, entry), entryIn(folder, entry));
    if (fate === 'is displaced') displaced.push(entry.toString('utf8'));
  }
  const kept: KeptFile[] = [];
  for (const name of displaced) {
    const keptAs = await freeName(name);
    await rename(join(old, name), join(folder, keptAs));
    kept.push({ name, keptAs });
  }
  return kept;

  async function fateOf(entry: Buffer, owned: Fingerprints): Promise<'moves' | 'is displaced' | 'stays'> {
    const hash = owned.get(entry.toString('utf8'));
    if (hash === undefined && !(await exists(entryIn(folder, entry), fs))) return 'moves';
    const found = await fingerprint(entryIn(old, entry), fs);
    if (hash !== undefined && found === hash) return 'stays';
    // Ours and edited, in a set that was added to: the new folder has the very same.
    const same = found !== null && found === (await fingerprint(entryIn(folder, entry), fs));
    return same ? 'stays' : 'is displaced';
  }

  async function freeName(name: string): Promise<string> {
    for (let number = 1; ; number++) {
      const candidate = number === 1 ? `${name}.bak` : `${name}.bak.${number}`;
      if (!(await exists(join(folder, candidate), fs))) return candidate;
    }
  }
}
