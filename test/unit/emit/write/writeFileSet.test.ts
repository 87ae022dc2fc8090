import { createHash } from 'node:crypto';
import * as disk from 'node:fs/promises';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import { MANIFEST, manifestOf } from '../../../../generator/emit/write/manifest.ts';
import { anotherSet, newWorkshop, picture, someSet, write } from './workshop.ts';

const withManifest = (files: ReadonlyMap<string, string>) =>
  Object.fromEntries([...files, [MANIFEST, manifestOf(files)]]);

test('a new folder holds exactly the set and its manifest, and nothing stands beside it', async () => {
  const cwd = await newWorkshop();
  const outcome = await write(cwd, { directory: 'a/b/design' });
  expect(outcome).toMatchObject({
    kind: 'done',
    notes: [],
    value: { files: ['bom.csv', 'manifest.json', 'ramp.cir', 'result.json'], kept: [], removed: [] },
  });
  expect(await picture(join(cwd, 'a/b/design'))).toEqual(withManifest(someSet));
  expect(await disk.readdir(join(cwd, 'a/b'))).toEqual(['design']);
});

test('the manifest lists the SHA-256 of each file, sorted', async () => {
  const { schema, files } = JSON.parse(manifestOf(someSet));
  expect(schema).toBe('counterslope/manifest/1');
  expect(files).toEqual(
    ['bom.csv', 'ramp.cir', 'result.json'].map((name) => ({
      name,
      sha256: createHash('sha256').update(someSet.get(name)!).digest('hex'),
    })),
  );
});

test.each(['../x', 'a/b', '.hidden', '', 'manifest.json', 'Manifest.JSON', 'a b', 'a\\b', '/etc/passwd'])(
  'no file of a set can be named %j',
  async (name) => {
    await expect(write(await newWorkshop(), { files: new Map([[name, 'x']]) })).rejects.toThrow(RangeError);
  },
);

test('two names that differ in case only are none for every disk', () => {
  expect(() =>
    manifestOf(
      new Map([
        ['a.cir', ''],
        ['A.cir', ''],
      ]),
    ),
  ).toThrow(RangeError);
});

test('a set takes the place of an earlier one whole; what it no longer has is gone', async () => {
  const cwd = await newWorkshop();
  await write(cwd);
  const outcome = await write(cwd, { files: anotherSet });
  expect(outcome).toMatchObject({ kind: 'done', value: { removed: ['bom.csv'] } });
  expect(await picture(join(cwd, 'design'))).toEqual(withManifest(anotherSet));
  expect(await disk.readdir(cwd)).toEqual(['design']);
});

test('entries of the user are carried over as they are: times, rights, links, folders, odd names', async () => {
  const cwd = await newWorkshop();
  await write(cwd);
  const folder = join(cwd, 'design');
  await disk.mkdir(join(folder, 'notes/deep'), { recursive: true });
  await disk.writeFile(join(folder, 'notes/deep/a.txt'), 'mine');
  await disk.writeFile(join(folder, '温室 plan.txt'), 'mine too', { mode: 0o640 });
  await disk.utimes(join(folder, '温室 plan.txt'), 1000, 2000);
  await disk.symlink('../elsewhere', join(folder, 'dangling'));
  const latin1 = Buffer.concat([Buffer.from(`${folder}/`), Buffer.from([0x67, 0xe4, 0x2e, 0x74])]);
  await disk.writeFile(latin1, 'bytes');
  const before = await disk.lstat(join(folder, '温室 plan.txt'));

  expect(await write(cwd, { files: anotherSet })).toMatchObject({ kind: 'done', value: { kept: [] } });

  const after = await disk.lstat(join(folder, '温室 plan.txt'));
  expect([after.ino, after.mode, after.mtimeMs]).toEqual([before.ino, before.mode, before.mtimeMs]);
  expect(await disk.readFile(join(folder, 'notes/deep/a.txt'), 'utf8')).toBe('mine');
  expect(await disk.readlink(join(folder, 'dangling'))).toBe('../elsewhere');
  expect(await disk.readFile(latin1, 'utf8')).toBe('bytes');
});

test('the folder keeps its rights', async () => {
  const cwd = await newWorkshop();
  await write(cwd);
  await disk.chmod(join(cwd, 'design'), 0o750);
  await write(cwd, { files: anotherSet });
  expect((await disk.stat(join(cwd, 'design'))).mode & 0o7777).toBe(0o750);
});

test('files of ours edited by hand are refused, all of them by name, and stay', async () => {
  const cwd = await newWorkshop();
  await write(cwd);
  await disk.appendFile(join(cwd, 'design/ramp.cir'), 'mine\n');
  await disk.appendFile(join(cwd, 'design/bom.csv'), 'mine\n');
  const before = await picture(cwd);
  const outcome = await write(cwd, { files: anotherSet });
  expect(outcome).toMatchObject({
    kind: 'refused',
    problems: [
      { code: 'edited-by-hand', place: { path: 'design/bom.csv' } },
      { code: 'edited-by-hand', place: { path: 'design/ramp.cir' } },
    ],
  });
  expect(await picture(cwd)).toEqual(before);
});

test('with force an edited file is kept as .bak, also one that the new set does not have', async () => {
  const cwd = await newWorkshop();
  await write(cwd);
  await disk.writeFile(join(cwd, 'design/ramp.cir'), 'mine\n');
  await disk.writeFile(join(cwd, 'design/bom.csv'), 'mine too\n');
  expect(await write(cwd, { files: anotherSet, force: true })).toMatchObject({
    kind: 'done',
    value: {
      kept: [
        { name: 'bom.csv', keptAs: 'bom.csv.bak' },
        { name: 'ramp.cir', keptAs: 'ramp.cir.bak' },
      ],
    },
  });
  expect(await picture(join(cwd, 'design'))).toEqual({
    ...withManifest(anotherSet),
    'ramp.cir.bak': 'mine\n',
    'bom.csv.bak': 'mine too\n',
  });
});

test('no earlier .bak is lost, however often an edit is forced away', async () => {
  const cwd = await newWorkshop();
  await write(cwd);
  for (const edit of ['first', 'second', 'third']) {
    await disk.writeFile(join(cwd, 'design/ramp.cir'), edit);
    await write(cwd, { force: true });
  }
  expect(await picture(join(cwd, 'design'))).toMatchObject({
    'ramp.cir': someSet.get('ramp.cir'),
    'ramp.cir.bak': 'first',
    'ramp.cir.bak.2': 'second',
    'ramp.cir.bak.3': 'third',
  });
});

test('a file that the user deleted is written again without a question', async () => {
  const cwd = await newWorkshop();
  await write(cwd);
  await disk.unlink(join(cwd, 'design/ramp.cir'));
  expect(await write(cwd)).toMatchObject({ kind: 'done' });
  expect(await picture(join(cwd, 'design'))).toEqual(withManifest(someSet));
});

test('a file of the user under a name of the set is refused, and kept with force', async () => {
  const cwd = await newWorkshop();
  await disk.mkdir(join(cwd, 'design'));
  await disk.writeFile(join(cwd, 'design/ramp.cir'), 'my own');
  await disk.writeFile(join(cwd, 'design/other.txt'), 'other');
  expect(await write(cwd)).toMatchObject({ kind: 'refused', problems: [{ code: 'file-in-the-way' }] });
  expect(await write(cwd, { force: true })).toMatchObject({ kind: 'done' });
  expect(await picture(join(cwd, 'design'))).toEqual({
    ...withManifest(someSet),
    'ramp.cir.bak': 'my own',
    'other.txt': 'other',
  });
});

test('a lost manifest loses nobody a file: what equals the set is taken for it', async () => {
  const cwd = await newWorkshop();
  await write(cwd);
  await disk.unlink(join(cwd, 'design', MANIFEST));
  expect(await write(cwd)).toMatchObject({ kind: 'done', value: { kept: [] } });
  expect(await picture(join(cwd, 'design'))).toEqual(withManifest(someSet));
});

test('an edited manifest makes no file of the user ours', async () => {
  const cwd = await newWorkshop();
  await write(cwd);
  const path = join(cwd, 'design', MANIFEST);
  await disk.writeFile(join(cwd, 'design/my.txt'), 'mine');
  const manifest = JSON.parse(await disk.readFile(path, 'utf8'));
  manifest.files.push({ name: 'my.txt', sha256: createHash('sha256').update('mine').digest('hex') });
  await disk.writeFile(path, `${JSON.stringify(manifest)}\n`);
  expect(await write(cwd)).toMatchObject({
    kind: 'refused',
    problems: [{ code: 'edited-by-hand', place: { path: 'design/manifest.json' } }],
  });
  await write(cwd, { force: true });
  expect(await disk.readFile(join(cwd, 'design/my.txt'), 'utf8')).toBe('mine');
});

test('a link in the place of a file of ours is never written through', async () => {
  const cwd = await newWorkshop();
  await write(cwd);
  await disk.writeFile(join(cwd, 'outside.txt'), someSet.get('ramp.cir')!);
  await disk.unlink(join(cwd, 'design/ramp.cir'));
  await disk.symlink('../outside.txt', join(cwd, 'design/ramp.cir'));
  expect(await write(cwd, { files: anotherSet })).toMatchObject({ kind: 'refused' });
  expect(await write(cwd, { files: anotherSet, force: true })).toMatchObject({ kind: 'done' });
  expect(await disk.readFile(join(cwd, 'outside.txt'), 'utf8')).toBe(someSet.get('ramp.cir'));
  expect(await disk.readlink(join(cwd, 'design/ramp.cir.bak'))).toBe('../outside.txt');
});

test('a folder in the place of a file of ours is kept with force', async () => {
  const cwd = await newWorkshop();
  await disk.mkdir(join(cwd, 'design/ramp.cir'), { recursive: true });
  await disk.writeFile(join(cwd, 'design/ramp.cir/inside'), 'x');
  expect(await write(cwd)).toMatchObject({ kind: 'refused' });
  await write(cwd, { force: true });
  expect(await disk.readFile(join(cwd, 'design/ramp.cir.bak/inside'), 'utf8')).toBe('x');
});

test('a name too long for our siblings works all the same', async () => {
  const cwd = await newWorkshop();
  const directory = 'd'.repeat(255);
  await write(cwd, { directory });
  expect(await write(cwd, { directory, files: anotherSet })).toMatchObject({ kind: 'done' });
  expect(await disk.readdir(cwd)).toEqual([directory]);
});

test('the same set written twice, elsewhere, is the same to the byte', async () => {
  const [one, two] = [await newWorkshop(), await newWorkshop()];
  await write(one);
  await write(two, { directory: 'other/place' });
  expect(await picture(join(one, 'design'))).toEqual(await picture(join(two, 'other/place')));
});
