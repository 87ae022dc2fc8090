import * as disk from 'node:fs/promises';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import type { FileSystem } from '../../../../generator/emit/write/FileSystem.ts';
import { recoverFileSet } from '../../../../generator/emit/write/recoverFileSet.ts';
import { anotherSet, newWorkshop, picture, realDisk, write } from './workshop.ts';

const failing = (code: string) => () => Promise.reject(Object.assign(new Error(code), { code }));

test.each([
  ['ENOSPC', 'disk-full'],
  ['EDQUOT', 'disk-full'],
  ['EACCES', 'permission-denied'],
  ['EPERM', 'permission-denied'],
  ['EROFS', 'read-only'],
  ['EIO', 'disk-error'],
])(
  '%s while files are opened: told as %s, the old set stands, parents made for it are gone',
  async (code, told) => {
    const cwd = await newWorkshop();
    await write(cwd);
    const before = await picture(cwd);
    const fs: FileSystem = { ...realDisk, open: failing(code) };
    for (const directory of ['design', 'a/b/design']) {
      expect(await write(cwd, { directory, files: anotherSet, fs })).toMatchObject({
        kind: 'machine',
        problems: [
          {
            code: told,
            severity: 'error',
            place: { path: directory },
            received: expect.stringContaining(code),
          },
        ],
      });
    }
    expect(await picture(cwd)).toEqual(before);
  },
);

test('a mount point cannot be renamed: nothing changes, and a folder inside it is advised', async () => {
  const cwd = await newWorkshop();
  await disk.mkdir(join(cwd, 'design'));
  await disk.writeFile(join(cwd, 'design/mine.txt'), 'mine');
  const before = await picture(cwd);
  const rename: FileSystem['rename'] = (from, to) =>
    String(from).endsWith('/design') ? failing('EBUSY')() : disk.rename(from, to);
  expect(await write(cwd, { fs: { ...realDisk, rename } })).toMatchObject({
    kind: 'machine',
    problems: [{ code: 'folder-in-use', fix: expect.stringContaining('inside it') }],
  });
  expect(await picture(cwd)).toEqual(before);
});

test('an entry of the user that cannot be moved keeps the old set in place, under its names', async () => {
  const cwd = await newWorkshop();
  await write(cwd);
  await disk.mkdir(join(cwd, 'design/mounted'));
  await disk.writeFile(join(cwd, 'design/a.txt'), 'mine');
  await disk.writeFile(join(cwd, 'design/ramp.cir'), 'edited');
  const before = await picture(cwd);
  const rename: FileSystem['rename'] = (from, to) =>
    String(from).endsWith('/mounted') ? failing('EBUSY')() : disk.rename(from, to);
  expect(await write(cwd, { files: anotherSet, force: true, fs: { ...realDisk, rename } })).toMatchObject({
    kind: 'machine',
  });
  expect(await picture(cwd)).toEqual(before);
});

test('when the way back fails too, the journal keeps both sets for the next command', async () => {
  const cwd = await newWorkshop();
  await write(cwd);
  let renames = 0;
  const rename: FileSystem['rename'] = (from, to) =>
    ++renames > 1 ? failing('EIO')() : disk.rename(from, to);
  expect(await write(cwd, { files: anotherSet, fs: { ...realDisk, rename } })).toMatchObject({
    kind: 'machine',
  });
  expect((await disk.readdir(cwd)).sort()).toEqual(
    ['journal', 'new', 'old'].map((purpose) => `.design.counterslope-${purpose}`),
  );
  expect(await recoverFileSet({ directory: 'design', cwd, fs: realDisk })).toMatchObject({
    kind: 'done',
    value: 'new set finished',
  });
});

test('replaced files that cannot be deleted are a warning: the new set stands', async () => {
  const cwd = await newWorkshop();
  await write(cwd);
  const unlink: FileSystem['unlink'] = (path) =>
    String(path).includes('-discard') ? failing('EIO')() : disk.unlink(path);
  expect(await write(cwd, { files: anotherSet, fs: { ...realDisk, unlink } })).toMatchObject({
    kind: 'done',
    notes: [{ code: 'leftover', severity: 'warning' }],
  });
  expect(await write(cwd, { files: anotherSet })).toMatchObject({ kind: 'done', notes: [] });
  expect(await disk.readdir(cwd)).toEqual(['design']);
});

test('a folder that cannot be synchronised on its own is no failure', async () => {
  const cwd = await newWorkshop();
  const open: FileSystem['open'] = (path, flags) =>
    flags === 'r' ? failing('EISDIR')() : disk.open(path, flags);
  expect(await write(cwd, { fs: { ...realDisk, open } })).toMatchObject({ kind: 'done' });
});

test('a bug is no failure of the machine: it stays an exception, and the folder stays as it was', async () => {
  const cwd = await newWorkshop();
  await write(cwd);
  const before = await picture(cwd);
  const open = () => Promise.reject(new TypeError('a bug'));
  await expect(write(cwd, { files: anotherSet, fs: { ...realDisk, open } })).rejects.toThrow('a bug');
  expect(await picture(cwd)).toEqual(before);
});
