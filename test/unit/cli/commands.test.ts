import * as callbackDisk from 'node:fs';
import * as disk from 'node:fs/promises';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import { newFolder, run } from './session.ts';

describe('help and version', () => {
  it('answer on stdout, in at most 80 columns, and end well', async () => {
    for (const argv of [
      ['--help'],
      ['-h'],
      ['help'],
      ['help', 'design'],
      ['design', '--help'],
      ['rules', '-h'],
      ['compare', '-h'],
      ['window', '-h'],
    ]) {
      const { code, stdout, stderr } = await run(argv);
      expect([code, stderr]).toEqual([0, '']);
      expect(Math.max(...stdout.split('\n').map((line) => [...line].length))).toBeLessThanOrEqual(80);
    }
    expect((await run(['--version'])).stdout).toMatch(/^counterslope \d+\.\d+\.\d+\n$/);
  });

  it('name every flag that the command takes, and none that is not yet there', async () => {
    const { stdout } = await run(['design', '--help']);
    for (const flag of ['--vin', '--set', '--out', '--engine', '--timeout', '--json', '--no-color']) {
      expect(stdout).toContain(flag);
    }
    expect(stdout).not.toMatch(/--samples|--watch|--sarif/);
    expect((await run(['simulate', '--help'])).stdout).not.toContain('--vin');
  });

  it('are given whatever else is on the line', async () => {
    const { code, stdout } = await run(['design', '--vim', '--help', '--out']);
    expect(code).toBe(0);
    expect(stdout).toMatch(/^counterslope design/);
  });
});

describe('init', () => {
  it('works with either face of the file system of Node', async () => {
    const cwd = await newFolder();
    const fs = callbackDisk as unknown as typeof disk;
    expect((await run(['init', 'rail.yaml'], { cwd, fs })).code).toBe(0);
    expect(await disk.readdir(cwd)).toEqual(['rail.yaml']);
  });

  it('prints a specification that design reads', async () => {
    const { code, stdout, stderr } = await run(['init']);
    expect([code, stderr]).toEqual([0, '']);
    const read = await run(['design', '-', '--engine', 'none'], { stdin: stdout, stages: refusingDesign });
    expect(read.stderr).toContain('reached the sizing');
  });

  it('writes a new file and never over an existing one', async () => {
    const cwd = await newFolder();
    expect((await run(['init', 'rail.yaml'], { cwd })).code).toBe(0);
    const written = await disk.readFile(join(cwd, 'rail.yaml'), 'utf8');
    expect(written).toBe((await run(['init'])).stdout);
    await disk.writeFile(join(cwd, 'rail.yaml'), 'mine');
    const again = await run(['init', 'rail.yaml'], { cwd });
    expect(again.code).toBe(2);
    expect(again.stderr).toMatch(/^error: rail\.yaml: expected a new file, received a file that exists/);
    expect(await disk.readFile(join(cwd, 'rail.yaml'), 'utf8')).toBe('mine');
  });

  it('does not write through a link that leads nowhere', async () => {
    const cwd = await newFolder();
    await disk.symlink(join(cwd, 'elsewhere'), join(cwd, 'rail.yaml'));
    expect((await run(['init', 'rail.yaml'], { cwd })).code).toBe(2);
    await expect(disk.lstat(join(cwd, 'elsewhere'))).rejects.toThrow('ENOENT');
  });

  it('refuses a folder that is not there, and leaves no part of a file on a full disk', async () => {
    const cwd = await newFolder();
    expect((await run(['init', 'no/rail.yaml'], { cwd })).code).toBe(2);
    const full = await run(['init', 'rail.yaml'], { cwd, fs: fullDisk });
    expect(full.code).toBe(3);
    expect(full.stderr).toContain('ENOSPC');
    expect(await disk.readdir(cwd)).toEqual([]);
  });
});

describe('schema', () => {
  it('prints a JSON Schema of 2020-12 for each document', async () => {
    for (const name of ['spec', 'result']) {
      const { code, stdout } = await run(['schema', name]);
      expect(code).toBe(0);
      expect(JSON.parse(stdout).$schema).toBe('https://json-schema.org/draft/2020-12/schema');
    }
  });
});

describe('rules', () => {
  it('lists the rules, as text and as JSON alike, and needs no word for it', async () => {
    const { stdout } = await run(['rules', 'list']);
    const { rules } = JSON.parse((await run(['rules', '--json'])).stdout);
    expect(rules.length).toBeGreaterThanOrEqual(10);
    for (const { id } of rules) expect(stdout).toContain(id);
  });

  it('explains a rule with reason and source, and names the nearest to an unknown one', async () => {
    const { code, stdout } = await run(['rules', 'explain', 'stability']);
    expect(code).toBe(0);
    expect(stdout).toMatch(/^reason .+\n(.+\n)*source /m);
    const mistyped = await run(['rules', 'explain', 'stabilty']);
    expect(mistyped.code).toBe(2);
    expect(mistyped.stderr).toContain('stability?');
  });

  it('tests a deck of the user, and refuses one that is not well formed with line and column', async () => {
    const cwd = await newFolder();
    await disk.writeFile(join(cwd, 'house.xml'), houseDeck);
    const sound = await run(['rules', 'test', 'house.xml'], { cwd });
    expect([sound.code, sound.stderr]).toEqual([0, '']);
    expect(sound.stdout).toMatch(/^adds +house-input/m);
    await disk.writeFile(join(cwd, 'house.xml'), houseDeck.replace('</rule>', '</ruel>'));
    const broken = await run(['rules', 'test', 'house.xml'], { cwd });
    expect(broken.code).toBe(2);
    expect(broken.stderr).toMatch(/^error: house\.xml:10:\d+: /m);
  });

  it('adds the rules of a deck of the user to the list', async () => {
    const cwd = await newFolder();
    await disk.writeFile(join(cwd, 'house.xml'), houseDeck);
    expect((await run(['rules', 'list', '--rules', 'house.xml'], { cwd })).stdout).toContain('house-input');
  });
});

const houseDeck = `<?xml version="1.0"?>
<ruleDeck version="1">
  <rule id="house-input" severity="warning">
    <requirement>inputVoltageMax &lt;= 40 V</requirement>
    <whatToDo>Ask.</whatToDo>
    <reason>House rule.</reason>
    <source>common practice</source>
    <example outcome="passes">inputVoltageMax = 36 V</example>
    <example outcome="fails">inputVoltageMax = 48 V</example>
  </rule>
</ruleDeck>
`;

const refusingDesign = {
  design: async () => ({
    ok: false as const,
    problems: [
      {
        code: 'no-circuit',
        severity: 'error' as const,
        key: null,
        place: null,
        expected: 'a stop',
        received: 'reached the sizing',
        fix: '',
      },
    ],
  }),
};

const fullDisk = {
  ...disk,
  open: async (path: string, flags: string) => {
    const file = await disk.open(path, flags);
    file.writeFile = async () => {
      throw Object.assign(new Error('no space'), { code: 'ENOSPC' });
    };
    return file;
  },
};
