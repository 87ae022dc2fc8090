import * as disk from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import fc from 'fast-check';
import type { FileSystem } from '../../generator/emit/write/FileSystem.ts';
import { MANIFEST, manifestOf } from '../../generator/emit/write/manifest.ts';

/** What a user may have in a folder under one name. */
export type Belonging =
  | { readonly kind: 'file'; readonly text: string }
  | { readonly kind: 'link'; readonly target: string }
  | { readonly kind: 'folder'; readonly text: string };

export interface Scene {
  /** Null where no set was there before. */
  readonly oldSet: ReadonlyMap<string, string> | null;
  readonly newSet: ReadonlyMap<string, string>;
  /** Names of the old set that the user edited. */
  readonly edited: readonly string[];
  /** The user's own entries, none named like an entry of the old set. */
  readonly belongings: ReadonlyMap<string, Belonging>;
}

const setNames = ['bom.csv', 'converter-adaptive-2.cir', 'ramp.cir', 'report.html', 'result.json'];
/** Names that make trouble: backups, names of a set, names of siblings, names that sort before and after. */
const userNames = [
  '!first',
  'ramp.cir.bak',
  'ramp.cir.bak.2',
  'notes',
  '.hidden',
  'zzz',
  'BOM.CSV',
  '温室.txt',
];

const content = fc.stringMatching(/^[a-z]{0,8}$/);
const aSet = fc
  .tuple(fc.subarray(setNames, { minLength: 1 }), content)
  .map(([names, text]) => new Map(names.map((name) => [name, `${name} ${text}\n`])));
const belonging: fc.Arbitrary<Belonging> = fc.oneof(
  content.map((text) => ({ kind: 'file' as const, text: `user ${text}` })),
  fc.constantFrom('../outside.txt', 'nowhere', '/').map((target) => ({ kind: 'link' as const, target })),
  content.map((text) => ({ kind: 'folder' as const, text })),
);

export const scenes: fc.Arbitrary<Scene> = fc
  .record({
    oldSet: fc.option(aSet),
    newSet: aSet,
    edited: fc.subarray(setNames),
    belongings: fc.dictionary(fc.constantFrom(...userNames, ...setNames), belonging, { maxKeys: 5 }),
  })
  .map(({ oldSet, newSet, edited, belongings }) => ({
    oldSet,
    newSet,
    edited: edited.filter((name) => oldSet?.has(name)),
    belongings: new Map(Object.entries(belongings).filter(([name]) => !oldSet?.has(name))),
  }));

export const withManifest = (files: ReadonlyMap<string, string>) =>
  new Map([...files, [MANIFEST, manifestOf(files)]]);

/** Runs in a fresh folder that is gone afterwards. */
export async function inWorld<T>(work: (cwd: string) => Promise<T>): Promise<T> {
  const cwd = await disk.realpath(await disk.mkdtemp(join(tmpdir(), 'file-set-')));
  try {
    await disk.writeFile(join(cwd, 'outside.txt'), 'outside');
    return await work(cwd);
  } finally {
    await disk.rm(cwd, { recursive: true, force: true });
  }
}

/** Builds the scene as an earlier run and a user would have left it. */
export async function build(cwd: string, { oldSet, edited, belongings }: Scene): Promise<void> {
  const folder = join(cwd, 'design');
  if (oldSet === null && belongings.size === 0) return;
  await disk.mkdir(folder);
  for (const [name, text] of oldSet === null ? [] : withManifest(oldSet)) {
    await disk.writeFile(join(folder, name), edited.includes(name) ? `edited ${name}` : text);
  }
  for (const [name, { kind, ...what }] of belongings) {
    if (kind === 'link') await disk.symlink((what as { target: string }).target, join(folder, name));
    else await disk.mkdir(kind === 'folder' ? join(folder, name) : folder, { recursive: true });
    const text = (what as { text: string }).text;
    if (kind === 'file') await disk.writeFile(join(folder, name), text);
    if (kind === 'folder') await disk.writeFile(join(folder, name, 'inner'), text);
  }
}

/** An entry as one text, so that entries can be compared. */
export async function lookAt(path: string): Promise<string> {
  const status = await disk.lstat(path);
  if (status.isSymbolicLink()) return `link ${await disk.readlink(path)}`;
  if (status.isDirectory()) return `folder ${await disk.readFile(join(path, 'inner'), 'utf8')}`;
  return `file ${await disk.readFile(path, 'utf8')}`;
}

export async function listing(folder: string): Promise<ReadonlyMap<string, string>> {
  const names = await disk.readdir(folder).catch(() => []);
  return new Map(
    await Promise.all(names.map(async (name) => [name, await lookAt(join(folder, name))] as const)),
  );
}

/** The power went: nothing after this reaches the disk. No code of the system's, so nobody may catch it. */
export class PowerCut extends Error {}

const CHANGING = ['mkdir', 'rename', 'unlink', 'rmdir', 'symlink', 'chmod', 'chown', 'open'] as const;

/**
 * The real disk, until step number `last`: then `stop` decides (an error to throw), once or for ever.
 *
 * A file that is being written when the power goes has half its text.
 */
export function diskThatStops(
  last: number,
  stop: () => Error,
  forEver: boolean,
): { readonly fs: FileSystem; readonly steps: () => number } {
  let steps = 0;
  const step = async <T>(
    work: () => Promise<T>,
    half: () => Promise<unknown> = async () => {},
  ): Promise<T> => {
    steps++;
    if (steps === last) await half();
    if (steps === last || (forEver && steps > last)) throw stop();
    return work();
  };
  const real: FileSystem = disk;
  const fs: { [name: string]: unknown; open?: unknown } = { ...real };
  for (const name of Object.keys(disk) as (keyof FileSystem)[]) {
    const call = real[name] as (...given: unknown[]) => Promise<unknown>;
    if (typeof call !== 'function') continue;
    const counted = (CHANGING as readonly string[]).includes(name);
    fs[name] = (...given: unknown[]) => (counted ? step(() => call(...given)) : call(...given));
  }
  fs.open = (path: string, flags: string) =>
    step(async () => {
      const file = await disk.open(path, flags);
      return {
        writeFile: (text: string) =>
          step(
            () => file.writeFile(text),
            () => file.writeFile(text.slice(0, text.length / 2)),
          ),
        sync: () => step(() => file.sync()),
        close: () => file.close(),
      };
    });
  return { fs: fs as unknown as FileSystem, steps: () => steps };
}
