import { execFile, spawn } from 'node:child_process';
import { closeSync, openSync } from 'node:fs';
import { promisify } from 'node:util';
import { describe, expect, it } from 'vitest';
import { ended, figures, program, run, start } from './program.ts';

const sizing = ['design', ...figures, '--engine', 'none'];
const text = 'input: 8 V to 36 V\ninductance: 10 µH\nfrequency: 500 kHz\n';

describe('the built program', () => {
  it('prints the result to stdout and nothing else there', async () => {
    const { code, stdout, stderr } = await run([...sizing, '--json']);
    expect([code, stderr]).toEqual([0, '']);
    expect(JSON.parse(stdout).schema).toBe('counterslope/result/1');
  });

  it('answers help and version alike by the command, its flag and its word', async () => {
    const [byFlag, byWord, short] = await Promise.all([
      run(['design', '--help']),
      run(['help', 'design']),
      run(['design', '-h']),
    ]);
    expect(byFlag).toEqual(byWord);
    expect(byFlag).toEqual(short);
    expect(byFlag).toMatchObject({ code: 0, stderr: '' });
    expect((await run(['--version'])).stdout).toMatch(/^counterslope \d+\.\d+\.\d+\n$/);
  });

  it('reads the specification from standard input, with a BOM and CRLF too', async () => {
    const fromFlags = await run([...sizing, '--json']);
    const argv = ['design', '-', '--engine', 'none', '--json'];
    for (const stdin of [text, `\ufeff${text.replaceAll('\n', '\r\n')}`]) {
      expect((await run(argv, { stdin })).stdout).toBe(fromFlags.stdout);
    }
    expect((await run(argv, { stdin: new Uint8Array([0xff, 0xfe, 0x20]) })).code).toBe(2);
    expect((await run(argv, { stdin: '' })).code).toBe(2);
  });

  it('takes a value that begins with a dash as a value', async () => {
    const { code, stderr } = await run(['design', ...figures, '--vout', '-12 V', '--engine', 'none']);
    expect(code).toBe(2);
    expect(stderr).toMatch(/^error: --vout: .*received -12 V/);
  });

  it('speaks English whatever the locale', async () => {
    const env = { LC_ALL: 'fr_FR.UTF-8', LANG: 'fr_FR.UTF-8', LANGUAGE: 'fr' };
    for (const argv of [['--help'], ['design', '--vim'], sizing]) {
      expect(await run(argv, { env })).toEqual(await run(argv));
    }
  });

  it('writes no colour into a pipe, unless asked to', async () => {
    const argv = ['design', '--vin', '8'];
    expect((await run(argv)).stderr).not.toContain('\u001b');
    expect((await run(argv, { env: { FORCE_COLOR: '1' } })).stderr).toContain('\u001b[31merror:');
    expect((await run([...argv, '--color', 'always'], { env: { NO_COLOR: '1' } })).stderr).toContain(
      '\u001b',
    );
    expect((await run([...argv, '--no-color'], { env: { FORCE_COLOR: '1' } })).stderr).not.toContain(
      '\u001b',
    );
  });
});

describe('a reader that has seen enough', () => {
  const head = promisify(execFile);

  it('ends the program quietly, be it help, a result or messages that it does not read', async () => {
    const lines = [
      `"${process.execPath}" "${program}" --help | true`,
      `"${process.execPath}" "${program}" schema result | true`,
      `"${process.execPath}" "${program}" design --vin "8 V to 36 V" --l 10uH --fs 500kHz --engine none --json | true`,
      `"${process.execPath}" "${program}" design --vin 8 2>&1 >/dev/null | true`,
    ];
    for (const line of lines) {
      const { stderr } = await head('sh', ['-c', line]);
      expect([line, stderr]).toEqual([line, '']);
    }
  });

  it('does not change how the program ends', async () => {
    const child = start([...sizing, '--json']);
    child.stdin!.end();
    child.stdout!.destroy();
    expect(await ended(child)).toMatchObject({ code: 0, stderr: '' });
  });
});

describe('a disk that is full', () => {
  it('under a redirected result ends with 3 and a message', async (context) => {
    if (process.platform !== 'linux') context.skip();
    const full = openSync('/dev/full', 'w');
    const child = spawn(process.execPath, [program, ...sizing, '--json'], {
      stdio: ['ignore', full, 'pipe'],
    });
    let stderr = '';
    child.stderr!.setEncoding('utf8').on('data', (part: string) => {
      stderr += part;
    });
    const code = await new Promise((resolve) => child.on('close', resolve));
    closeSync(full);
    expect([code, stderr]).toEqual([3, expect.stringContaining('ENOSPC')]);
  });
});
