import * as disk from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { onTestFinished } from 'vitest';
import type { FileSystem } from '../../../../generator/emit/write/FileSystem.ts';
import { type WriteRequest, writeFileSet } from '../../../../generator/emit/write/writeFileSet.ts';

/** A folder of its own for a test, gone afterwards. */
export async function newWorkshop(): Promise<string> {
  const folder = await disk.realpath(await disk.mkdtemp(join(tmpdir(), 'file-set-')));
  onTestFinished(() => disk.rm(folder, { recursive: true, force: true }));
  return folder;
}

export const someSet: ReadonlyMap<string, string> = new Map([
  ['ramp.cir', '* ramp\n'],
  ['bom.csv', 'reference,value\r\n'],
  ['result.json', '{ "schema": "counterslope/result/1" }\n'],
]);

export const anotherSet: ReadonlyMap<string, string> = new Map([
  ['ramp.cir', '* another ramp\n'],
  ['report.html', '<p>Ω</p>\n'],
  ['result.json', '{ "schema": "counterslope/result/1", "files": [] }\n'],
]);

export const realDisk: FileSystem = disk;

/** A request with nothing special about it. */
export function requestIn(cwd: string, changes: Partial<WriteRequest> = {}): WriteRequest {
  return {
    directory: 'design',
    files: someSet,
    specPath: null,
    cwd,
    home: null,
    force: false,
    fs: realDisk,
    wait_ms: 0,
    ...changes,
  };
}

export const write = (cwd: string, changes: Partial<WriteRequest> = {}) =>
  writeFileSet(requestIn(cwd, changes));

/** Everything below a folder, as text: contents, link targets, folders. */
export async function picture(folder: string): Promise<Record<string, string>> {
  const entries = await disk.readdir(folder, { recursive: true, withFileTypes: true });
  const pairs = entries.map(async (entry) => {
    const path = join(entry.parentPath, entry.name);
    const name = path.slice(folder.length + 1);
    if (entry.isSymbolicLink()) return [name, `-> ${await disk.readlink(path)}`];
    return [name, entry.isDirectory() ? '/' : await disk.readFile(path, 'utf8')];
  });
  return Object.fromEntries((await Promise.all(pairs)).sort());
}
