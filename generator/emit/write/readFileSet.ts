import { join } from 'node:path';
import type { Problem } from '../../base/Problem.ts';
import { sha256, statusOf } from './entries.ts';
import { done, type FolderOutcome, folderProblem, refused } from './FolderOutcome.ts';
import { withoutExceptions } from './holdFolder.ts';
import { locateForReading } from './locate.ts';
import { type Fingerprints, MANIFEST, parseManifest } from './manifest.ts';
import type { Place } from './Place.ts';
import { type RecoverRequest, recoverFileSet } from './recoverFileSet.ts';

/** A set as it is on disk now, edited or not. */
export interface StoredSet {
  /** Content of `result.json`, its shape not checked. */
  readonly result: unknown;
  /** The decks that the manifest lists, name to text. */
  readonly decks: ReadonlyMap<string, string>;
  /** Files that are not as they were written. */
  readonly differing: readonly string[];
  /** Files that are listed and not there. */
  readonly missing: readonly string[];
}

const RESULT = 'result.json';
/** A run that replaces the set while it is read takes milliseconds. */
const MOST_ATTEMPTS = 20;

/**
 * Reads a set for `simulate`: recovers it first, tells edited files in notes and gives their edited text.
 *
 * `refused` when there is no set, or a file that is needed is gone, unreadable as JSON, or no plain file.
 */
export function readFileSet(request: RecoverRequest): Promise<FolderOutcome<StoredSet>> {
  return withoutExceptions(request.directory, async () => {
    const recovered = await recoverFileSet(request);
    if (recovered.kind !== 'done') return recovered;
    const place = await locateForReading(request.directory, request.cwd, request.fs);
    const set = await readUnchanging(place);
    return set.kind === 'done' ? done(set.value, [...recovered.notes, ...set.notes]) : set;
  });
}

/** Another run may replace the set between two reads; then its manifest differs, and reading begins anew. */
async function readUnchanging(place: Place): Promise<FolderOutcome<StoredSet>> {
  for (let attempt = 1; ; attempt++) {
    const before = await readText(place, MANIFEST);
    const set = await readSet(place, before);
    if (attempt === MOST_ATTEMPTS || before === (await readText(place, MANIFEST))) return set;
  }
}

async function readSet(place: Place, manifestText: string | null): Promise<FolderOutcome<StoredSet>> {
  const manifest = manifestText === null ? null : parseManifest(manifestText);
  if (manifest === null) return refused(noSet(place, manifestText !== null));
  const texts = new Map<string, string | null>();
  for (const name of manifest.fingerprints.keys()) texts.set(name, await readText(place, name));
  const missing = [...texts.keys()].filter((name) => texts.get(name) === null);
  const differing = differingIn(texts, manifest.fingerprints);
  if (!manifest.asWritten) differing.push(MANIFEST);
  const gone = missing.filter((name) => name === RESULT || name.endsWith('.cir'));
  if (gone.length > 0 || !texts.has(RESULT)) {
    return refused(...(gone.length > 0 ? gone : [RESULT]).map((name) => fileGone(place, name)));
  }
  const result = parsed(texts.get(RESULT)!);
  if (result === undefined) return refused(brokenResult(place));
  const decks = new Map([...texts].filter((entry): entry is [string, string] => entry[0].endsWith('.cir')));
  return done(
    { result, decks, differing, missing },
    differing.map((name) => edited(place, name)),
  );
}

/** Null for what is not a plain file: links are not followed out of the folder. */
async function readText({ fs, folder }: Place, name: string): Promise<string | null> {
  const path = join(folder, name);
  return (await statusOf(path, fs))?.isFile() ? (await fs.readFile(path)).toString('utf8') : null;
}

function differingIn(texts: ReadonlyMap<string, string | null>, fingerprints: Fingerprints): string[] {
  return [...texts.keys()].filter((name) => {
    const text = texts.get(name)!;
    return text !== null && sha256(text) !== fingerprints.get(name);
  });
}

function parsed(text: string): unknown {
  try {
    return JSON.parse(text);
  } catch {
    return undefined;
  }
}

function noSet(place: Place, hasManifest: boolean): Problem {
  return folderProblem(place.shown, 'no-design-folder', {
    expected: 'a folder that `counterslope design --out` wrote',
    received: hasManifest
      ? `a folder whose ${MANIFEST} cannot be read as ours`
      : `no folder with a ${MANIFEST}`,
    fix: 'give the folder of a design, or write one: counterslope design SPEC --out DIR',
  });
}

function fileGone(place: Place, name: string): Problem {
  return folderProblem(join(place.shown, name), 'file-missing', {
    expected: `${name} as a plain file in the folder`,
    received: 'none',
    fix: 'write the design again',
  });
}

function brokenResult(place: Place): Problem {
  return folderProblem(join(place.shown, RESULT), 'result-unreadable', {
    expected: 'JSON',
    received: 'text that is no JSON',
    fix: 'write the design again, with --force if you want to keep the edited file',
  });
}

function edited(place: Place, name: string): Problem {
  return folderProblem(
    join(place.shown, name),
    'edited-by-hand',
    {
      expected: 'the file as it was written',
      received: `${name} differs from what the manifest lists`,
      fix: 'nothing to do if you meant it: the file is used as it is now',
    },
    'note',
  );
}
