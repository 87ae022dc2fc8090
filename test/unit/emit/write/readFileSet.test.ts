import * as disk from 'node:fs/promises';
import { join } from 'node:path';
import { expect, test } from 'vitest';
import { MANIFEST } from '../../../../generator/emit/write/manifest.ts';
import { placeAt } from '../../../../generator/emit/write/Place.ts';
import { readFileSet } from '../../../../generator/emit/write/readFileSet.ts';
import { anotherSet, newWorkshop, realDisk, someSet, write } from './workshop.ts';

const read = (cwd: string, directory = 'design') => readFileSet({ directory, cwd, fs: realDisk, wait_ms: 0 });

async function writtenSet(): Promise<string> {
  const cwd = await newWorkshop();
  await write(cwd);
  return cwd;
}

test('a set reads back with its result and its decks', async () => {
  expect(await read(await writtenSet())).toEqual({
    kind: 'done',
    notes: [],
    value: {
      result: { schema: 'counterslope/result/1' },
      decks: new Map([['ramp.cir', someSet.get('ramp.cir')]]),
      differing: [],
      missing: [],
    },
  });
});

test('an edited deck is given as edited, with a note that names it', async () => {
  const cwd = await writtenSet();
  await disk.writeFile(join(cwd, 'design/ramp.cir'), '* 20 % more\n');
  expect(await read(cwd)).toMatchObject({
    kind: 'done',
    value: { decks: new Map([['ramp.cir', '* 20 % more\n']]), differing: ['ramp.cir'] },
    notes: [{ code: 'edited-by-hand', severity: 'note', place: { path: 'design/ramp.cir' } }],
  });
});

test('an edited manifest is told as well', async () => {
  const cwd = await writtenSet();
  await disk.appendFile(join(cwd, 'design', MANIFEST), '\n');
  expect(await read(cwd)).toMatchObject({ kind: 'done', value: { differing: [MANIFEST] } });
});

test('a file that no deck run needs may be missing', async () => {
  const cwd = await writtenSet();
  await disk.unlink(join(cwd, 'design/bom.csv'));
  expect(await read(cwd)).toMatchObject({ kind: 'done', value: { missing: ['bom.csv'] } });
});

test.each(['ramp.cir', 'result.json'])('%s may not', async (name) => {
  const cwd = await writtenSet();
  await disk.unlink(join(cwd, 'design', name));
  expect(await read(cwd)).toMatchObject({
    kind: 'refused',
    problems: [{ code: 'file-missing', place: { path: `design/${name}` } }],
  });
});

test('a link in the place of a deck is not followed', async () => {
  const cwd = await writtenSet();
  await disk.unlink(join(cwd, 'design/ramp.cir'));
  await disk.writeFile(join(cwd, 'secret'), 'outside');
  await disk.symlink('../secret', join(cwd, 'design/ramp.cir'));
  expect(await read(cwd)).toMatchObject({ kind: 'refused', problems: [{ code: 'file-missing' }] });
});

test('a result that is no JSON is said to be none', async () => {
  const cwd = await writtenSet();
  await disk.writeFile(join(cwd, 'design/result.json'), '{ "schema": ');
  expect(await read(cwd)).toMatchObject({ kind: 'refused', problems: [{ code: 'result-unreadable' }] });
});

test.each([
  '{ "schema": "counterslope/manifest/1", "files": [{ "name": "../secret.cir", "sha256": "" }] }',
  '{ "schema": "counterslope/manifest/2", "files": [] }',
  'null',
  'not JSON',
])('a manifest like %s makes no design folder', async (text) => {
  const cwd = await writtenSet();
  await disk.writeFile(join(cwd, 'design', MANIFEST), text);
  expect(await read(cwd)).toMatchObject({ kind: 'refused', problems: [{ code: 'no-design-folder' }] });
});

test.each(['nowhere', 'a/b', 'file', 'file/x', 'empty'])('nor is %s one', async (directory) => {
  const cwd = await newWorkshop();
  await disk.writeFile(join(cwd, 'file'), 'x');
  await disk.mkdir(join(cwd, 'empty'));
  expect(await read(cwd, directory)).toMatchObject({
    kind: 'refused',
    problems: [{ code: 'no-design-folder' }],
  });
});

test('the current folder and a link to one can be read', async () => {
  const cwd = await writtenSet();
  await disk.symlink('design', join(cwd, 'link'));
  expect(await read(cwd, 'link')).toMatchObject({ kind: 'done' });
  expect(await read(join(cwd, 'design'), '.')).toMatchObject({ kind: 'done' });
});

test('what an interrupted run left is recovered first, also through a link', async () => {
  const cwd = await writtenSet();
  await disk.symlink('design', join(cwd, 'link'));
  const place = placeAt(join(cwd, 'design'), 'design', realDisk);
  await write(cwd, { directory: 'next', files: anotherSet });
  await disk.rename(join(cwd, 'next'), place.fresh);
  await disk.writeFile(place.journal, '{}');
  await disk.rename(place.folder, place.old);
  expect(await read(cwd)).toMatchObject({ kind: 'done', value: { result: { files: [] }, differing: [] } });
  await disk.rename(place.folder, place.old);
  expect(await read(cwd, 'link')).toMatchObject({ kind: 'done' });
});

test('a set that is replaced while it is read comes out as one of the two', async () => {
  const cwd = await writtenSet();
  let replaced = false;
  const fs = {
    ...realDisk,
    readFile: async (path: string | Buffer) => {
      const data = await realDisk.readFile(path);
      if (!replaced && String(path).endsWith(MANIFEST)) {
        replaced = true;
        await write(cwd, { files: anotherSet });
      }
      return data;
    },
  };
  expect(await readFileSet({ directory: 'design', cwd, fs })).toMatchObject({
    kind: 'done',
    value: { decks: new Map([['ramp.cir', anotherSet.get('ramp.cir')]]), differing: [], missing: [] },
  });
});
