import * as disk from 'node:fs/promises';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import type { FileSystem } from '../../../../generator/emit/write/FileSystem.ts';
import { isWholeSet } from '../../../../generator/emit/write/manifest.ts';
import { readFileSet } from '../../../../generator/emit/write/readFileSet.ts';
import { recoverFileSet } from '../../../../generator/emit/write/recoverFileSet.ts';
import { newWorkshop, picture, realDisk, someSet, write } from './workshop.ts';

const comparison: ReadonlyMap<string, string> = new Map([
  ['comparison.html', '<p>x</p>\n'],
  ['comparison.json', '{}\n'],
]);

const add = (cwd: string, changes = {}) => write(cwd, { files: comparison, keepsRest: true, ...changes });
const inDesign = (cwd: string, name: string) => join(cwd, 'design', name);

describe('files that join a set', () => {
  it('begin one where there is none', async () => {
    const cwd = await newWorkshop();
    expect(await add(cwd)).toMatchObject({ kind: 'done', value: { removed: [] } });
    expect(await isWholeSet(join(cwd, 'design'), realDisk)).toBe(true);
  });

  it('leave the rest as it was, in the manifest too', async () => {
    const cwd = await newWorkshop();
    await write(cwd);
    await disk.writeFile(inDesign(cwd, 'mine.txt'), 'mine');
    const before = await picture(join(cwd, 'design'));
    const added = await add(cwd);
    expect(added).toMatchObject({ kind: 'done', value: { kept: [], removed: [] } });
    const after = await picture(join(cwd, 'design'));
    const { 'manifest.json': manifest, ...others } = after;
    const { 'manifest.json': _, ...rest } = before;
    expect(others).toEqual({ ...rest, ...Object.fromEntries(comparison) });
    expect(JSON.parse(manifest!).files.map(({ name }: { name: string }) => name)).toEqual(
      [...someSet.keys(), ...comparison.keys()].sort(),
    );
    expect(await isWholeSet(join(cwd, 'design'), realDisk)).toBe(true);
  });

  it('replace their own earlier selves, and refuse when these were edited', async () => {
    const cwd = await newWorkshop();
    await write(cwd);
    await add(cwd);
    const again = new Map([...comparison, ['comparison.json', '{ "again": true }\n']]);
    expect((await add(cwd, { files: again })).kind).toBe('done');
    await disk.writeFile(inDesign(cwd, 'comparison.html'), 'edited');
    const refused = await add(cwd);
    expect(refused).toMatchObject({ kind: 'refused', problems: [{ code: 'edited-by-hand' }] });
    expect(await add(cwd, { force: true })).toMatchObject({
      kind: 'done',
      value: { kept: [{ name: 'comparison.html', keptAs: 'comparison.html.bak' }] },
    });
  });

  it('leave an edited file of the rest edited, under its name, and known for edited', async () => {
    const cwd = await newWorkshop();
    await write(cwd);
    await disk.writeFile(inDesign(cwd, 'ramp.cir'), '* by hand \xff\n');
    expect(await add(cwd)).toMatchObject({ kind: 'done', value: { kept: [] } });
    expect(await disk.readFile(inDesign(cwd, 'ramp.cir'), 'utf8')).toBe('* by hand \xff\n');
    expect(await disk.readdir(join(cwd, 'design'))).not.toContain('ramp.cir.bak');
    const read = await readFileSet({ directory: 'design', cwd, fs: realDisk });
    expect(read).toMatchObject({ kind: 'done', value: { differing: ['ramp.cir'] } });
    expect(await write(cwd)).toMatchObject({ kind: 'refused', problems: [{ code: 'edited-by-hand' }] });
  });

  it('do not hide that a file of the rest is gone', async () => {
    const cwd = await newWorkshop();
    await write(cwd);
    await disk.unlink(inDesign(cwd, 'bom.csv'));
    expect((await add(cwd)).kind).toBe('done');
    const read = await readFileSet({ directory: 'design', cwd, fs: realDisk });
    expect(read).toMatchObject({ kind: 'done', value: { missing: ['bom.csv'] } });
  });

  it('refuse where a file of the rest has become a link, and touch nothing it leads to', async () => {
    const cwd = await newWorkshop();
    await write(cwd);
    await disk.writeFile(join(cwd, 'elsewhere'), 'elsewhere');
    await disk.unlink(inDesign(cwd, 'bom.csv'));
    await disk.symlink(join(cwd, 'elsewhere'), inDesign(cwd, 'bom.csv'));
    expect(await add(cwd)).toMatchObject({ kind: 'refused', problems: [{ code: 'edited-by-hand' }] });
    expect(await disk.readFile(join(cwd, 'elsewhere'), 'utf8')).toBe('elsewhere');
  });

  it('go with the set when a design replaces it: they spoke of the earlier one', async () => {
    const cwd = await newWorkshop();
    await write(cwd);
    await add(cwd);
    expect(await write(cwd)).toMatchObject({
      kind: 'done',
      value: { removed: ['comparison.html', 'comparison.json'] },
    });
  });

  it('leave one whole set, old or new, wherever the disk gives out', async () => {
    for (let step = 1; ; step += 1) {
      const cwd = await newWorkshop();
      await write(cwd);
      await disk.writeFile(inDesign(cwd, 'ramp.cir'), '* by hand\n');
      const before = await picture(join(cwd, 'design'));
      const outcome = await add(cwd, { fs: failingAt(step) }).catch(() => null);
      await recoverFileSet({ directory: 'design', cwd, fs: realDisk, wait_ms: 0 });
      const after = await picture(join(cwd, 'design'));
      const isNew = 'comparison.html' in after;
      if (!isNew) expect(after).toEqual(before);
      else
        expect(Object.keys(after).sort()).toEqual(
          [...someSet.keys(), ...comparison.keys(), 'manifest.json'].sort(),
        );
      expect(after['ramp.cir']).toBe('* by hand\n');
      if (outcome?.kind === 'done') {
        expect(step).toBeGreaterThan(10);
        break;
      }
    }
  });
});

/** A disk whose nth change fails for ever after. */
function failingAt(step: number): FileSystem {
  let changes = 0;
  const fails = (name: string) => {
    const work = realDisk[name as 'rename'] as (...given: unknown[]) => Promise<unknown>;
    return async (...given: unknown[]) => {
      changes += 1;
      if (changes >= step)
        throw Object.assign(new Error('full'), { code: 'ENOSPC', errno: -28, syscall: name });
      return work.apply(realDisk, given);
    };
  };
  const changing = ['mkdir', 'rename', 'unlink', 'rmdir', 'open'];
  return { ...realDisk, ...Object.fromEntries(changing.map((name) => [name, fails(name)])) } as FileSystem;
}
