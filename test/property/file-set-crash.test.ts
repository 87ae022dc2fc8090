import * as disk from 'node:fs/promises';
import { join } from 'node:path';
import fc from 'fast-check';
import { expect, test } from 'vitest';
import type { FileSystem } from '../../generator/emit/write/FileSystem.ts';
import { recoverFileSet } from '../../generator/emit/write/recoverFileSet.ts';
import { writeFileSet } from '../../generator/emit/write/writeFileSet.ts';
import {
  build,
  diskThatStops,
  inWorld,
  listing,
  PowerCut,
  type Scene,
  scenes,
  withManifest,
} from './fileSetWorld.ts';

const attempt = (cwd: string, { newSet }: Scene, fs: FileSystem, signal?: AbortSignal) =>
  writeFileSet({
    directory: 'design',
    files: newSet,
    specPath: null,
    cwd,
    home: null,
    force: true,
    fs,
    wait_ms: 0,
    ...(signal ? { signal } : {}),
  });

const asEntries = (files: ReadonlyMap<string, string>) =>
  new Map([...files].map(([name, text]) => [name, `file ${text}`]));

/** What the user must find again, whatever happens: own entries and edited files, under which name ever. */
async function preciousIn(cwd: string, { edited, belongings, newSet }: Scene) {
  const before = await listing(join(cwd, 'design'));
  const clashes = (name: string) => withManifest(newSet).has(name);
  return {
    untouched: [...before].filter(([name]) => belongings.has(name) && !clashes(name)),
    somewhere: [...before].filter(
      ([name]) => edited.includes(name) || (belongings.has(name) && clashes(name)),
    ),
    before,
  };
}

type Precious = Awaited<ReturnType<typeof preciousIn>>;

/** Exactly one whole set, old or new, under its name; nothing beside it; nothing of the user's lost. */
async function expectWhole(cwd: string, scene: Scene, precious: Precious): Promise<'old' | 'new'> {
  expect((await disk.readdir(cwd)).filter((name) => name !== 'design')).toEqual(['outside.txt']);
  expect(await disk.readFile(join(cwd, 'outside.txt'), 'utf8')).toBe('outside');
  const now = await listing(join(cwd, 'design'));
  const same = JSON.stringify([...now].sort()) === JSON.stringify([...precious.before].sort());
  if (same) return 'old';
  expect([...now]).toEqual(expect.arrayContaining([...asEntries(withManifest(scene.newSet))]));
  expect([...now]).toEqual(expect.arrayContaining(precious.untouched));
  for (const [name, entry] of precious.somewhere) {
    const places = [...now].filter(([place, found]) => place.startsWith(name) && found === entry);
    expect(places, `${name} is kept`).not.toHaveLength(0);
  }
  const ours = new Set([...withManifest(scene.newSet).keys(), ...precious.untouched.map(([name]) => name)]);
  const rest = [...now.keys()].filter((name) => !ours.has(name));
  expect(rest.every((name) => /\.bak(\.\d+)?$/.test(name))).toBe(true);
  return 'new';
}

/** Number of steps that an undisturbed run takes. */
async function stepsOf(scene: Scene): Promise<number> {
  return inWorld(async (cwd) => {
    await build(cwd, scene);
    const counting = diskThatStops(Number.POSITIVE_INFINITY, () => new PowerCut(), true);
    await attempt(cwd, scene, counting.fs);
    return counting.steps();
  });
}

const aTrickyScene: Scene = {
  oldSet: new Map([
    ['bom.csv', 'old bom'],
    ['ramp.cir', 'old ramp'],
    ['result.json', 'old result'],
  ]),
  newSet: new Map([
    ['ramp.cir', 'new ramp'],
    ['report.html', 'new report'],
    ['result.json', 'new result'],
  ]),
  edited: ['ramp.cir', 'bom.csv'],
  belongings: new Map([
    ['ramp.cir.bak', { kind: 'file', text: 'an earlier edit' }],
    ['report.html', { kind: 'folder', text: 'not a page' }],
    ['zzz', { kind: 'link', target: '../outside.txt' }],
  ]),
};
const aFirstWrite: Scene = { ...aTrickyScene, oldSet: null, edited: [], belongings: new Map() };

test.each([
  ['over an edited set', aTrickyScene],
  ['into a new folder', aFirstWrite],
])('a power cut at any step, %s, leaves one whole set after recovery', async (_, scene) => {
  const steps = Array.from({ length: await stepsOf(scene) }, (_, step) => step + 1);
  const ends = await Promise.all(
    steps.map((last) =>
      inWorld(async (cwd) => {
        await build(cwd, scene);
        const precious = await preciousIn(cwd, scene);
        await attempt(cwd, scene, diskThatStops(last, () => new PowerCut(), true).fs).catch(expectPowerCut);
        await expectWholeSomewhere(cwd, scene);
        expect(await recoverFileSet({ directory: 'design', cwd, fs: disk })).toMatchObject({ kind: 'done' });
        return expectWhole(cwd, scene, precious);
      }),
    ),
  );
  expect(new Set(ends)).toEqual(new Set(['old', 'new']));
});

/** Before any recovery: a whole set, old (but for the user's edits) or new, under the name or as one sibling. */
async function expectWholeSomewhere(cwd: string, { oldSet, newSet, edited }: Scene): Promise<void> {
  const folders = (await disk.readdir(cwd)).filter((name) =>
    /^(design|\.design\.counterslope-(new|old))$/.test(name),
  );
  const found = await Promise.all(folders.map((name) => listing(join(cwd, name))));
  const old = [...asEntries(withManifest(oldSet ?? new Map()))].filter(([name]) => !edited.includes(name));
  const isThere = (wanted: (readonly [string, string])[]) =>
    found.some((folder) => wanted.every(([name, entry]) => folder.get(name) === entry));
  expect(isThere([...asEntries(withManifest(newSet))]) || oldSet === null || isThere(old)).toBe(true);
}

function expectPowerCut(error: unknown): void {
  expect(error).toBeInstanceOf(PowerCut);
}

test('over any scene, with further power cuts while it is recovered', async () => {
  await fc.assert(
    fc.asyncProperty(scenes, fc.nat(), fc.array(fc.nat(8), { maxLength: 3 }), async (scene, where, again) => {
      const last = 1 + (where % (await stepsOf(scene)));
      await inWorld(async (cwd) => {
        await build(cwd, scene);
        const precious = await preciousIn(cwd, scene);
        await attempt(cwd, scene, diskThatStops(last, () => new PowerCut(), true).fs).catch(expectPowerCut);
        await expectWholeSomewhere(cwd, scene);
        for (const more of again) {
          const { fs } = diskThatStops(1 + more, () => new PowerCut(), true);
          await recoverFileSet({ directory: 'design', cwd, fs }).catch(expectPowerCut);
        }
        expect(await recoverFileSet({ directory: 'design', cwd, fs: disk })).toMatchObject({ kind: 'done' });
        await expectWhole(cwd, scene, precious);
      });
    }),
    { seed: 3001, numRuns: 50 },
  );
}, 60_000);

test('the next write recovers by itself and ends with its own set', async () => {
  await fc.assert(
    fc.asyncProperty(scenes, fc.nat(), async (scene, where) => {
      const last = 1 + (where % (await stepsOf(scene)));
      await inWorld(async (cwd) => {
        await build(cwd, scene);
        const precious = await preciousIn(cwd, scene);
        await attempt(cwd, scene, diskThatStops(last, () => new PowerCut(), true).fs).catch(expectPowerCut);
        expect(await attempt(cwd, scene, disk)).toMatchObject({ kind: 'done' });
        expect(await expectWhole(cwd, scene, precious)).toBeTypeOf('string');
        expect([...(await listing(join(cwd, 'design')))]).toEqual(
          expect.arrayContaining([...asEntries(withManifest(scene.newSet))]),
        );
      });
    }),
    { seed: 3002, numRuns: 30 },
  );
}, 60_000);

const diskFull = () => Object.assign(new Error('no space left'), { code: 'ENOSPC' });

test('a disk that fails, once or from then on, leaves the old set or the new one, and says which', async () => {
  await fc.assert(
    fc.asyncProperty(scenes, fc.nat(), fc.boolean(), async (scene, where, forEver) => {
      const last = 1 + (where % (await stepsOf(scene)));
      await inWorld(async (cwd) => {
        await build(cwd, scene);
        const precious = await preciousIn(cwd, scene);
        const outcome = await attempt(cwd, scene, diskThatStops(last, diskFull, forEver).fs);
        await expectWholeSomewhere(cwd, scene);
        if (outcome.kind === 'machine') expect(outcome.problems).toMatchObject([{ code: 'disk-full' }]);
        else expect(outcome.kind).toBe('done');
        if (outcome.kind === 'machine' && !forEver) {
          expect(await listing(join(cwd, 'design'))).toEqual(precious.before);
          expect(
            (await disk.readdir(cwd)).filter((name) => /-(new|old|journal|discard)$/.test(name)),
          ).toEqual([]);
        }
        await recoverFileSet({ directory: 'design', cwd, fs: disk });
        const found = await expectWhole(cwd, scene, precious);
        if (outcome.kind === 'done') expect(found === 'new' || precious.before.size > 0).toBe(true);
      });
    }),
    { seed: 3003, numRuns: 120 },
  );
}, 60_000);

test('a signal at any step leaves no temporary file: all of the new set or none of it', async () => {
  await fc.assert(
    fc.asyncProperty(scenes, fc.nat(), async (scene, where) => {
      const last = 1 + (where % (await stepsOf(scene)));
      await inWorld(async (cwd) => {
        await build(cwd, scene);
        const precious = await preciousIn(cwd, scene);
        const controller = new AbortController();
        const { fs, steps } = diskThatStops(Number.POSITIVE_INFINITY, diskFull, false);
        const watched = new Proxy(fs, {
          get(target, name: keyof FileSystem) {
            if (steps() >= last) controller.abort();
            return target[name];
          },
        });
        const outcome = await attempt(cwd, scene, watched, controller.signal);
        expect(['done', 'interrupted']).toContain(outcome.kind);
        await expectWhole(cwd, scene, precious);
        if (outcome.kind === 'interrupted') {
          expect(await listing(join(cwd, 'design'))).toEqual(precious.before);
        }
      });
    }),
    { seed: 3004, numRuns: 40 },
  );
}, 60_000);
