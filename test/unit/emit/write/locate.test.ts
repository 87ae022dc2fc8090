import * as disk from 'node:fs/promises';
import { dirname, join } from 'node:path';
import { expect, test } from 'vitest';
import { checkFolder } from '../../../../generator/emit/write/checkFolder.ts';
import { newWorkshop, picture, requestIn, write } from './workshop.ts';

type Changes = Parameters<typeof write>[1];

/** Both the early question and the writer itself say no, and nothing on disk moves. */
async function expectRefusal(cwd: string, changes: Changes, received: string | RegExp, around = cwd) {
  const before = await picture(around);
  const problem = { code: 'folder-refused', received: expect.stringMatching(received) };
  const force = true;
  expect(await write(cwd, { ...changes, force })).toMatchObject({ kind: 'refused', problems: [problem] });
  expect(await checkFolder(requestIn(cwd, { ...changes, force }))).toMatchObject({
    kind: 'refused',
    problems: [problem],
  });
  expect(await picture(around)).toEqual(before);
}

test.each(['', '  ', 'a\0b'])('%j names no folder', async (directory) => {
  await expectRefusal(await newWorkshop(), { directory }, /name/);
});

test.each(['/', '../../../../../../../../../..'])('the root is never replaced: %s', async (directory) => {
  await expectRefusal(await newWorkshop(), { directory }, /root/);
});

test.each(['.', './', '..', '../..', './x/..'])(
  'nor the current folder or one above it: %s',
  async (directory) => {
    const top = await newWorkshop();
    const cwd = join(top, 'one/two/three');
    await disk.mkdir(cwd, { recursive: true });
    await expectRefusal(cwd, { directory }, /current folder/, top);
  },
);

test('nor the current folder by another name', async () => {
  const top = await newWorkshop();
  await disk.mkdir(join(top, 'real/inner'), { recursive: true });
  await disk.symlink('real', join(top, 'alias'));
  await expectRefusal(join(top, 'alias/inner'), { directory: join(top, 'real') }, /current folder/, top);
  await expectRefusal(
    join(top, 'real/inner'),
    { directory: join(top, 'alias/inner') },
    /current folder/,
    top,
  );
});

test('nor the home or one above it', async () => {
  const cwd = await newWorkshop();
  const home = join(cwd, 'people/someone');
  await disk.mkdir(home, { recursive: true });
  await expectRefusal(cwd, { directory: home, home }, /home/);
  await expectRefusal(cwd, { directory: dirname(home), home }, /home/);
  expect(await write(cwd, { directory: join(home, 'design'), home })).toMatchObject({ kind: 'done' });
});

test('nor a folder that holds the spec, at any depth, by link or not', async () => {
  const cwd = await newWorkshop();
  await disk.mkdir(join(cwd, 'work/..specs'), { recursive: true });
  await disk.writeFile(join(cwd, 'work/..specs/rail.yaml'), 'input: 12 V');
  await disk.symlink('work/..specs/rail.yaml', join(cwd, 'rail.yaml'));
  for (const specPath of ['work/..specs/rail.yaml', 'rail.yaml', join(cwd, 'work/..specs/rail.yaml')]) {
    await expectRefusal(cwd, { directory: 'work', specPath }, /spec/);
  }
  expect(await write(cwd, { directory: 'work2', specPath: 'rail.yaml' })).toMatchObject({ kind: 'done' });
});

test('nor one that holds .git, be it a folder or a file, nor one inside it', async () => {
  const cwd = await newWorkshop();
  await disk.mkdir(join(cwd, 'one/.git/hooks'), { recursive: true });
  await disk.mkdir(join(cwd, 'two'));
  await disk.writeFile(join(cwd, 'two/.git'), 'gitdir: elsewhere');
  await expectRefusal(cwd, { directory: 'one' }, /\.git/);
  await expectRefusal(cwd, { directory: 'two' }, /\.git/);
  await expectRefusal(cwd, { directory: 'one/.git/hooks' }, /\.git/);
  await expectRefusal(cwd, { directory: '.git' }, /\.git/);
});

test('a link to a folder is refused, with or without a slash, and so is a dangling one', async () => {
  const cwd = await newWorkshop();
  await disk.mkdir(join(cwd, 'real'));
  await disk.symlink('real', join(cwd, 'link'));
  await disk.symlink('nowhere', join(cwd, 'dangling'));
  for (const directory of ['link', 'link/', 'dangling']) {
    await expectRefusal(cwd, { directory }, /symbolic link/);
  }
});

test('a file is no folder, nor is anything below it', async () => {
  const cwd = await newWorkshop();
  await disk.writeFile(join(cwd, 'file'), 'x');
  await expectRefusal(cwd, { directory: 'file' }, /file/);
  await expectRefusal(cwd, { directory: 'file/design' }, /through a file/);
  await expectRefusal(cwd, { directory: 'file/a/design' }, /through a file/);
});

test('a link among the parents is followed: it is the way there, not the folder', async () => {
  const cwd = await newWorkshop();
  await disk.mkdir(join(cwd, 'real'));
  await disk.symlink('real', join(cwd, 'link'));
  expect(await write(cwd, { directory: 'link/design' })).toMatchObject({ kind: 'done' });
  expect(Object.keys(await picture(join(cwd, 'real')))).toContain('design/ramp.cir');
});

test('asked early, an edited file is named and nothing is made', async () => {
  const cwd = await newWorkshop();
  expect(await checkFolder(requestIn(cwd, { directory: 'new/design' }))).toMatchObject({ kind: 'done' });
  expect(await disk.readdir(cwd)).toEqual([]);
  await write(cwd);
  expect(await checkFolder(requestIn(cwd))).toMatchObject({ kind: 'done' });
  await disk.appendFile(join(cwd, 'design/ramp.cir'), 'mine');
  expect(await checkFolder(requestIn(cwd))).toMatchObject({
    kind: 'refused',
    problems: [{ code: 'edited-by-hand', received: 'ramp.cir was edited by hand' }],
  });
  expect(await checkFolder(requestIn(cwd, { force: true }))).toMatchObject({ kind: 'done' });
});
