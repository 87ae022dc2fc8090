import { appendFile, readdir, readFile, symlink, writeFile } from 'node:fs/promises';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { figures, newFolder, run, runUntil } from './program.ts';

const withoutEngine = ['--engine', 'none'];
const specification = 'input: 8 V to 36 V\ninductance: 10 uH\nfrequency: 500 kHz\n';

describe('exit 0', () => {
  it('for a design whose simulation agrees, written as a whole set', async () => {
    const cwd = await newFolder();
    const { code, stdout } = await run(['design', ...figures, '--out', 'set'], { cwd });
    expect(code).toBe(0);
    expect(stdout).toMatch(/^simulation +agrees in \d+ figures/m);
    const names = await readdir(join(cwd, 'set'));
    for (const name of [
      'ramp.cir',
      'ramp-test.cir',
      'bom.csv',
      'report.html',
      'result.json',
      'manifest.json',
    ]) {
      expect(names).toContain(name);
    }
    const again = await run(['simulate', 'set', '--json'], { cwd });
    expect(again.code).toBe(0);
    const written = JSON.parse(await readFile(join(cwd, 'set/result.json'), 'utf8'));
    expect(JSON.parse(again.stdout)).toEqual(written);
  });

  it('for simulate without an engine, which tells what was edited and writes nothing', async () => {
    const cwd = await newFolder();
    await run(['design', ...figures, '--out', 'set', ...withoutEngine], { cwd });
    await appendFile(join(cwd, 'set/ramp.cir'), '* mine\n');
    const { code, stdout, stderr } = await run(['simulate', 'set', ...withoutEngine], { cwd });
    expect(code).toBe(0);
    expect(stderr).toContain('note: set/ramp.cir');
    expect(stdout).toMatch(/^simulation +not run$/m);
    expect(await readFile(join(cwd, 'set/ramp.cir'), 'utf8')).toMatch(/\* mine\n$/);
  });
});

describe('exit 1', () => {
  it('when an edited deck does not do what the sizing says', async () => {
    const cwd = await newFolder();
    await run(['design', ...figures, '--out', 'set', ...withoutEngine], { cwd });
    const path = join(cwd, 'set/ramp.cir');
    const deck = await readFile(path, 'utf8');
    const broken = deck.replace(
      /^(C\S* ramp \S+ )(\S+)/m,
      (_, nodes, value) => `${nodes}${1.2 * Number.parseFloat(value)}${value.replace(/^[\d.e-]+/, '')}`,
    );
    expect(broken).not.toBe(deck);
    await writeFile(path, broken);
    const { code, stdout } = await run(['simulate', 'set'], { cwd });
    expect(code).toBe(1);
    expect(stdout).toMatch(/^failed +capacitor slope at /m);
  });

  it('when an edited deck does not even run', async () => {
    const cwd = await newFolder();
    await run(['design', ...figures, '--out', 'set', ...withoutEngine], { cwd });
    await writeFile(join(cwd, 'set/ramp.cir'), '* nothing left\n');
    const { code, stderr } = await run(['simulate', 'set'], { cwd });
    expect(code).toBe(1);
    expect(stderr).toMatch(/^warning: ramp-test\.cir: expected a run to the end/m);
  });

  it('for a sound specification without a circuit, with the inequality that fails and no file', async () => {
    const cwd = await newFolder();
    const argv = ['design', '--vin', '8 V to 36 V', '--l', '10uH', '--fs', '500kHz', '--supply', '1 V'];
    const { code, stdout, stderr } = await run([...argv, '--out', 'set', '--json', ...withoutEngine], {
      cwd,
    });
    expect(code).toBe(1);
    expect(JSON.parse(stdout).problems[0].code).toBe('no-circuit');
    expect(stderr).toMatch(/^error: .*\d/);
    expect(await readdir(cwd)).toEqual([]);
  });
});

describe('exit 2', () => {
  it('for a specification that is missing, a folder, no UTF-8, or too large; no file is written', async () => {
    const cwd = await newFolder();
    await writeFile(join(cwd, 'latin1.yaml'), Buffer.from('title: gr\xfcn\n', 'latin1'));
    await writeFile(join(cwd, 'huge.yaml'), `# ${'x'.repeat(1_100_000)}\n${specification}`);
    for (const name of ['missing.yaml', '.', 'latin1.yaml', 'huge.yaml']) {
      const { code, stdout, stderr } = await run(['design', name, '--out', 'set', '--json'], { cwd });
      expect([name, code]).toEqual([name, 2]);
      expect(JSON.parse(stdout).problems[0].path).toBe(name);
      expect(stderr).not.toMatch(/^ +at /m);
    }
    expect((await readdir(cwd)).sort()).toEqual(['huge.yaml', 'latin1.yaml']);
  });

  it('names file, line and column of each problem of a specification', async () => {
    const cwd = await newFolder();
    await writeFile(join(cwd, 'rail.yaml'), 'input: 8..36 V\ninductanse: 10 uH\nfrequency: 500\n');
    const { code, stderr } = await run(['design', 'rail.yaml'], { cwd });
    expect(code).toBe(2);
    for (const place of ['rail.yaml:1:8 input', 'rail.yaml:2:1', 'rail.yaml:3:12 frequency']) {
      expect(stderr).toContain(`error: ${place}`);
    }
  });

  it('for a folder that is not to be replaced', async () => {
    const cwd = await newFolder();
    await writeFile(join(cwd, 'rail.yaml'), specification);
    await symlink(tmpdir(), join(cwd, 'link'));
    for (const folder of ['.', '..', '/', cwd, 'rail.yaml', 'link', '']) {
      const { code } = await run(['design', 'rail.yaml', '--out', folder, ...withoutEngine], { cwd });
      expect([folder, code]).toEqual([folder, 2]);
    }
  });

  it('for simulate of a folder whose result was edited', async () => {
    const cwd = await newFolder();
    await run(['design', ...figures, '--out', 'set', ...withoutEngine], { cwd });
    const path = join(cwd, 'set/result.json');
    await writeFile(path, (await readFile(path, 'utf8')).replace('buck', 'boost'));
    const { code, stderr } = await run(['simulate', 'set', ...withoutEngine], { cwd });
    expect(code).toBe(2);
    expect(stderr).toContain('error: set/result.json');
  });
});

describe('exit 3', () => {
  it('when the engine asked for is not installed, and nothing is written', async () => {
    const cwd = await newFolder();
    const argv = ['design', ...figures, '--engine', 'installed', '--out', 'set', '--json'];
    const { code, stdout } = await run(argv, { cwd, env: { PATH: cwd } });
    expect(code).toBe(3);
    expect(JSON.parse(stdout).problems[0].code).toBe('engine-missing');
    expect(await readdir(cwd)).toEqual([]);
  });

  it('when the engine does not end within the time limit', async () => {
    const { code, stderr } = await run(['design', ...figures, '--timeout', '0.001']);
    expect(code).toBe(3);
    expect(stderr).toMatch(/^error: \S+\.cir: expected a run to the end/m);
  });
});

describe('a signal', () => {
  it.each([
    ['SIGINT', 130],
    ['SIGTERM', 143],
  ] as const)('%s during the simulation ends with %i and leaves no file', async (signal, code) => {
    const cwd = await newFolder();
    const argv = ['design', ...figures, '--out', 'set'];
    expect(await runUntil(signal, argv, { cwd, env: { TMPDIR: cwd } })).toEqual({
      code,
      stdout: '',
      stderr: '',
    });
    expect(await readdir(cwd)).toEqual([]);
  });

  it('ends a wait for standard input', async () => {
    expect(await runUntil('SIGINT', ['design', '-'])).toEqual({ code: 130, stdout: '', stderr: '' });
  });
});
