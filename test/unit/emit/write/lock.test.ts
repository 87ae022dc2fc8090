import { spawn } from 'node:child_process';
import { once } from 'node:events';
import * as disk from 'node:fs/promises';
import { join } from 'node:path';
import { expect, onTestFinished, test } from 'vitest';
import { placeAt } from '../../../../generator/emit/write/Place.ts';
import { anotherSet, newWorkshop, picture, realDisk, write } from './workshop.ts';

const lockIn = (cwd: string) => placeAt(join(cwd, 'design'), 'design', realDisk).lock;

async function someProcess() {
  const child = spawn(process.execPath, ['-e', 'setInterval(() => {}, 1000)']);
  onTestFinished(() => void child.kill('SIGKILL'));
  await once(child, 'spawn');
  const line = await disk.readFile(`/proc/${child.pid}/stat`, 'utf8').catch(() => '');
  return { pid: child.pid!, birth: line.slice(line.lastIndexOf(')') + 2).split(' ')[19] ?? '', child };
}

test('a living run on the same folder is named, and nothing is written', async () => {
  const cwd = await newWorkshop();
  const { pid, birth } = await someProcess();
  await disk.symlink(`${pid}@${birth}`, lockIn(cwd));
  expect(await write(cwd)).toMatchObject({
    kind: 'machine',
    problems: [{ code: 'folder-busy', received: expect.stringContaining(String(pid)) }],
  });
  expect(Object.keys(await picture(cwd))).toEqual(['.design.counterslope-lock']);
});

test('the lock of a dead run holds nobody up', async () => {
  const cwd = await newWorkshop();
  const { pid, birth, child } = await someProcess();
  child.kill('SIGKILL');
  await once(child, 'exit');
  await disk.symlink(`${pid}@${birth}`, lockIn(cwd));
  expect(await write(cwd)).toMatchObject({ kind: 'done' });
  expect(await disk.readdir(cwd)).toEqual(['design']);
});

test.runIf(process.platform === 'linux')('nor does it when its number came round again', async () => {
  const cwd = await newWorkshop();
  const { pid } = await someProcess();
  await disk.symlink(`${pid}@12`, lockIn(cwd));
  expect(await write(cwd)).toMatchObject({ kind: 'done' });
});

test('nor does it when the number is now our own', async () => {
  const cwd = await newWorkshop();
  await disk.symlink(`${process.pid}@12`, lockIn(cwd));
  expect(await write(cwd)).toMatchObject({ kind: 'done' });
});

test('a lock that says nothing we know is respected', async () => {
  const cwd = await newWorkshop();
  await disk.writeFile(lockIn(cwd), 'whose is this?');
  expect(await write(cwd)).toMatchObject({ kind: 'machine', problems: [{ code: 'folder-busy' }] });
});

test('runs at the same time come one after the other, and the folder holds one whole set', async () => {
  const cwd = await newWorkshop();
  const runs = Array.from({ length: 6 }, (_, k) =>
    write(cwd, { wait_ms: 5000, ...(k % 2 === 0 ? { files: anotherSet } : {}) }),
  );
  for (const outcome of await Promise.all(runs)) expect(outcome.kind).toBe('done');
  expect(await disk.readdir(cwd)).toEqual(['design']);
  expect(await write(cwd)).toMatchObject({ kind: 'done', value: { kept: [] } });
});

test('a signal ends the waiting too', async () => {
  const cwd = await newWorkshop();
  await disk.writeFile(lockIn(cwd), 'whose is this?');
  const controller = new AbortController();
  const outcome = write(cwd, { wait_ms: 60_000, signal: controller.signal });
  controller.abort();
  expect(await outcome).toEqual({ kind: 'interrupted' });
});

test('a disk without links is locked by a file', async () => {
  const cwd = await newWorkshop();
  const refusing = () => Promise.reject(Object.assign(new Error('no links'), { code: 'EPERM' }));
  const fs = { ...realDisk, symlink: refusing };
  expect(await write(cwd, { fs })).toMatchObject({ kind: 'done' });
  expect(await disk.readdir(cwd)).toEqual(['design']);
  const { pid, birth } = await someProcess();
  await disk.writeFile(lockIn(cwd), `${pid}@${birth}`);
  expect(await write(cwd, { fs })).toMatchObject({ kind: 'machine', problems: [{ code: 'folder-busy' }] });
});
