import * as disk from 'node:fs/promises';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import { MANIFEST, manifestOf } from '../../../../generator/emit/write/manifest.ts';
import { placeAt } from '../../../../generator/emit/write/Place.ts';
import { recoverFileSet } from '../../../../generator/emit/write/recoverFileSet.ts';
import { anotherSet, newWorkshop, picture, realDisk, someSet, write } from './workshop.ts';

const recover = (cwd: string) => recoverFileSet({ directory: 'design', cwd, fs: realDisk, wait_ms: 0 });

async function put(folder: string, files: ReadonlyMap<string, string>): Promise<void> {
  await disk.mkdir(folder);
  for (const [name, text] of [...files, [MANIFEST, manifestOf(files)] as const]) {
    await disk.writeFile(join(folder, name), text);
  }
}

/** As a power cut leaves it between the two renames: old and new set beside the free name. */
async function cutBetweenRenames() {
  const cwd = await newWorkshop();
  const place = placeAt(join(cwd, 'design'), 'design', realDisk);
  await put(place.old, someSet);
  await disk.writeFile(join(place.old, 'mine.txt'), 'mine');
  await put(place.fresh, anotherSet);
  await disk.writeFile(place.journal, '{}');
  return { cwd, place };
}

const textOf = (cwd: string, name: string) => disk.readFile(join(cwd, 'design', name), 'utf8');

test('a folder without leftovers is left alone, and its disk not written to', async () => {
  const cwd = await newWorkshop();
  await write(cwd);
  const reading = ['lstat', 'realpath'];
  const readOnly = new Proxy(realDisk, {
    get(target, name) {
      if (!reading.includes(String(name))) throw new Error(`${String(name)} on a read-only disk`);
      return Reflect.get(target, name);
    },
  });
  expect(await recoverFileSet({ directory: 'design', cwd, fs: readOnly })).toMatchObject({
    kind: 'done',
    value: 'nothing to do',
  });
});

test('a folder that is nowhere needs no recovery', async () => {
  const cwd = await newWorkshop();
  expect(await recoverFileSet({ directory: 'a/b/c', cwd, fs: realDisk })).toMatchObject({ kind: 'done' });
  expect(await disk.readdir(cwd)).toEqual([]);
});

test('between the two renames, the new set is finished', async () => {
  const { cwd } = await cutBetweenRenames();
  expect(await recover(cwd)).toMatchObject({ kind: 'done', value: 'new set finished' });
  expect(await textOf(cwd, 'ramp.cir')).toBe(anotherSet.get('ramp.cir'));
  expect(await textOf(cwd, 'mine.txt')).toBe('mine');
  expect(await disk.readdir(cwd)).toEqual(['design']);
});

test.each(['ramp.cir', MANIFEST])('when the new set lost %s since, the old one is restored', async (name) => {
  const { cwd, place } = await cutBetweenRenames();
  await disk.unlink(join(place.fresh, name));
  expect(await recover(cwd)).toMatchObject({ kind: 'done', value: 'old set restored' });
  expect(await textOf(cwd, 'ramp.cir')).toBe(someSet.get('ramp.cir'));
  expect(await textOf(cwd, 'mine.txt')).toBe('mine');
  expect(await disk.readdir(cwd)).toEqual(['design']);
});

test('an empty folder made in the meantime is no obstacle', async () => {
  const { cwd } = await cutBetweenRenames();
  await disk.mkdir(join(cwd, 'design'));
  expect(await recover(cwd)).toMatchObject({ kind: 'done', value: 'new set finished' });
  expect(await textOf(cwd, 'mine.txt')).toBe('mine');
});

test('a folder with files made in the meantime blocks, and nothing of either is touched', async () => {
  const { cwd } = await cutBetweenRenames();
  await disk.mkdir(join(cwd, 'design'));
  await disk.writeFile(join(cwd, 'design/new.txt'), 'new');
  const before = await picture(cwd);
  expect(await recover(cwd)).toMatchObject({ kind: 'refused', problems: [{ code: 'folder-blocked' }] });
  expect(await write(cwd)).toMatchObject({ kind: 'refused', problems: [{ code: 'folder-blocked' }] });
  expect(await picture(cwd)).toEqual(before);
});

test('an edit made before the recovery is kept', async () => {
  const { cwd, place } = await cutBetweenRenames();
  await disk.writeFile(join(place.old, 'ramp.cir'), 'edited in the last moment');
  await recover(cwd);
  expect(await textOf(cwd, 'ramp.cir.bak')).toBe('edited in the last moment');
  expect(await textOf(cwd, 'ramp.cir')).toBe(anotherSet.get('ramp.cir'));
});

test('a set that was never whole is thrown away', async () => {
  const cwd = await newWorkshop();
  await write(cwd);
  const place = placeAt(join(cwd, 'design'), 'design', realDisk);
  await disk.mkdir(place.fresh);
  await disk.writeFile(join(place.fresh, 'ramp.cir'), 'ha');
  await recover(cwd);
  expect(await disk.readdir(cwd)).toEqual(['design']);
  expect(await textOf(cwd, 'ramp.cir')).toBe(someSet.get('ramp.cir'));
});

test.each(['fresh', 'old', 'discard'] as const)(
  'a link laid in place of the %s sibling leads nowhere',
  async (sibling) => {
    const cwd = await newWorkshop();
    await write(cwd);
    await disk.mkdir(join(cwd, 'precious'));
    await disk.writeFile(join(cwd, 'precious/kept.txt'), 'kept');
    const place = placeAt(join(cwd, 'design'), 'design', realDisk);
    await disk.symlink('precious', place[sibling]);
    await disk.writeFile(place.journal, '{}');
    await recover(cwd);
    await write(cwd);
    expect(await picture(join(cwd, 'precious'))).toEqual({ 'kept.txt': 'kept' });
  },
);
