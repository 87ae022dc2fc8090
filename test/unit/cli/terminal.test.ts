import { describe, expect, it } from 'vitest';
import type { Problem } from '../../../generator/base/Problem.ts';
import { printable } from '../../../generator/cli/problems/printable.ts';
import { problemText } from '../../../generator/cli/problems/problemText.ts';
import { openConsole } from '../../../generator/cli/terminal/openConsole.ts';
import { paintFor, plainPaint } from '../../../generator/cli/terminal/paint.ts';

const problem: Problem = {
  code: 'unit-missing',
  severity: 'error',
  key: 'input',
  place: { path: 'rail.yaml', line: 3, column: 8 },
  expected: 'a voltage',
  received: '12',
  fix: 'write 12 V',
};

function consoleOn(isTTY: boolean, manners: { quiet?: boolean; json?: boolean } = {}) {
  const written = { stdout: '', stderr: '' };
  const stream = (name: 'stdout' | 'stderr') => ({
    isTTY,
    write: (text: string) => {
      written[name] += text;
    },
  });
  const streams = { stdout: stream('stdout'), stderr: stream('stderr'), env: {} };
  const console = openConsole(streams, { json: false, quiet: false, color: 'never', ...manners });
  return { console, written };
}

describe('colour', () => {
  const terminal = { isTTY: true, write: () => {} };
  const pipe = { write: () => {} };
  const isColoured = (...given: Parameters<typeof paintFor>) => paintFor(...given).bad('x') !== 'x';

  it('is for terminals only, unless asked for', () => {
    expect(isColoured(terminal, 'auto', {})).toBe(true);
    expect(isColoured(pipe, 'auto', {})).toBe(false);
    expect(isColoured(pipe, 'always', {})).toBe(true);
    expect(isColoured(terminal, 'never', {})).toBe(false);
    expect(isColoured(terminal, 'auto', { TERM: 'dumb' })).toBe(false);
  });

  it('heeds NO_COLOR before FORCE_COLOR, and a flag before both; an empty NO_COLOR means nothing', () => {
    expect(isColoured(terminal, 'auto', { NO_COLOR: '1', FORCE_COLOR: '1' })).toBe(false);
    expect(isColoured(terminal, 'auto', { NO_COLOR: '' })).toBe(true);
    expect(isColoured(pipe, 'auto', { FORCE_COLOR: '1' })).toBe(true);
    expect(isColoured(terminal, 'auto', { FORCE_COLOR: '0' })).toBe(false);
    expect(isColoured(pipe, 'always', { NO_COLOR: '1' })).toBe(true);
  });
});

describe('progress', () => {
  it('is one line on a terminal, replaced each time and gone at the end', () => {
    const { console, written } = consoleOn(true);
    console.progress('one');
    console.progress('two');
    console.close();
    expect(written.stderr).toBe('\r\u001b[2Kone\r\u001b[2Ktwo\r\u001b[2K');
    expect(written.stderr).not.toContain('\n');
  });

  it('never wraps', () => {
    const { console, written } = consoleOn(true);
    console.progress('x'.repeat(200));
    expect(written.stderr.length).toBeLessThan(90);
  });

  it('is not seen without a terminal, or when quiet is asked for', () => {
    for (const { console, written } of [consoleOn(false), consoleOn(true, { quiet: true })]) {
      console.progress('one');
      console.close();
      expect(written.stderr).toBe('');
    }
  });
});

describe('a problem', () => {
  it('names file, line, column and key, what was wanted, what was found, and how to mend it', () => {
    const text = 'error: rail.yaml:3:8 input: expected a voltage, received 12\n       write 12 V\n';
    expect(problemText(problem, plainPaint)).toBe(text);
  });

  it('is said even when quiet is asked for, while a warning is not', () => {
    const { console, written } = consoleOn(false, { quiet: true });
    console.remarks([{ ...problem, severity: 'warning' }]);
    expect(written.stderr).toBe('');
    console.problems([problem]);
    expect(written.stderr).toMatch(/^error: /);
  });

  it('cannot move the cursor of a terminal', () => {
    const text = problemText({ ...problem, received: '\u001b]0;x\u0007\r\u202e\u009b' }, plainPaint);
    expect(text).toContain('received \\u001b]0;x\\u0007\\u000d\\u202e\\u009b');
    expect(printable('Ω µ 斜 é')).toBe('Ω µ 斜 é');
  });
});
