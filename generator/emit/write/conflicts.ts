import { join } from 'node:path';
import type { Problem } from '../../base/Problem.ts';
import { exists, fingerprint, sha256 } from './entries.ts';
import { folderProblem } from './FolderOutcome.ts';
import { folderRefusal, whyNoFolder } from './locate.ts';
import { MANIFEST, readOwnership } from './manifest.ts';
import type { Place } from './Place.ts';
import { nothingElse, type RestOfSet } from './restOfSet.ts';

/** Why a set must not take a folder's place: what the folder is or, unless forced, what is in it. */
export async function refusalsOf(
  place: Place,
  files: ReadonlyMap<string, string>,
  force: boolean,
  rest: RestOfSet = nothingElse,
): Promise<readonly Problem[]> {
  const reason = await whyNoFolder(place.folder, place.fs);
  if (reason !== null) return [folderRefusal(place.shown, reason)];
  return force ? [] : conflictsIn(place, files, rest);
}

/**
 * Every file whose words a new set would take the place of: ours but edited by hand, or the user's own
 * under a name of the new set. The rest of a set that is added to keeps its words.
 */
async function conflictsIn(
  place: Place,
  files: ReadonlyMap<string, string>,
  rest: RestOfSet,
): Promise<Problem[]> {
  const { folder, fs } = place;
  const owned = await readOwnership(folder, fs);
  const problems: Problem[] = [];
  for (const name of [...new Set([...owned.keys(), ...files.keys()])].sort()) {
    const path = join(folder, name);
    if (rest.files.has(name) || !(await exists(path, fs))) continue;
    const found = await fingerprint(path, fs);
    if (owned.has(name) && found !== owned.get(name)) problems.push(edited(place, name, found === null));
    if (!owned.has(name) && (found === null || found !== sha256(files.get(name)!))) {
      problems.push(inTheWay(place, name));
    }
  }
  return problems;
}

function edited(place: Place, name: string, isOther: boolean): Problem {
  return folderProblem(join(place.shown, name), 'edited-by-hand', {
    expected: 'the file as an earlier run wrote it',
    received: isOther ? `${name} is no longer a plain file` : `${name} was edited by hand`,
    fix: fixFor(name),
  });
}

function inTheWay(place: Place, name: string): Problem {
  const isManifest = name === MANIFEST;
  return folderProblem(join(place.shown, name), isManifest ? 'edited-by-hand' : 'file-in-the-way', {
    expected: isManifest ? 'a manifest as an earlier run wrote it' : `no file of your own named ${name}`,
    received: isManifest ? `${name} was edited by hand` : `${name} is there and is in no manifest`,
    fix: fixFor(name),
  });
}

function fixFor(name: string): string {
  return `name another folder, or give --force, which keeps the file as ${name}.bak`;
}
