import { execFileSync } from 'node:child_process';
import { mkdtempSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import fc from 'fast-check';
import { expect, test } from 'vitest';
import { netlistComment } from '../../../../generator/emit/text/netlistComment.ts';
import { hostileTitles } from './hostileTitles.ts';

test.each(hostileTitles)('is one bounded line of ASCII that ends in no backslash: %j', (title) => {
  expect(netlistComment(title)).toMatch(/^\*( [ -~]{0,120})?$/);
  expect(netlistComment(title)).not.toMatch(/\\$/);
});

test('any text at all is one such line', () => {
  fc.assert(
    fc.property(fc.string({ unit: 'binary', maxLength: 400 }), (text) => {
      expect(netlistComment(text)).toMatch(/^\*( [ -~]{0,119}[ -[\]-~])?$/);
    }),
    { seed: 2001 },
  );
});

test('plain words stay as they are', () => {
  expect(netlistComment('greenhouse valve controller, rail {A} "B"')).toBe(
    '* greenhouse valve controller, rail {A} "B"',
  );
});

test('accents are folded and technical signs spelled out', () => {
  expect(netlistComment('Gewächshaus 5 V ± 5 %, 10 µH, 4.7 \u2126, ½ – Straße')).toBe(
    '* Gewachshaus 5 V +/- 5 %, 10 uH, 4.7 Ohm, 1/2 - Strasse',
  );
});

test('other scripts keep their code points', () => {
  expect(netlistComment('温室')).toBe('* \\u{6e29}\\u{5ba4}');
});

test('a backslash is escaped too, so that the escape has one reading', () => {
  expect(netlistComment('a\\u{41}')).toBe('* a\\u{5c}u{41}');
});

test('line ends and control characters become blanks', () => {
  expect(netlistComment('a\r\nb\tc\u0000d\u2028e')).toBe('* a  b c d e');
});

test('a long text is cut between signs and says so', () => {
  const line = netlistComment('温'.repeat(100));
  expect(line).toMatch(/^\* (\\u\{6e29\})+\.\.\.$/);
  expect(line.length).toBeLessThanOrEqual(122);
});

const deckWith = (titles: readonly string[]) =>
  [
    'divider',
    ...titles.flatMap((title, k) => [netlistComment(title), `R${k + 1} a 0 1k`]),
    'V1 a 0 1',
    '.print op i(V1)',
    '.op',
    '.end',
    '',
  ].join('\n');

/** The current of one volt over all resistors, as the engine printed it; none may be lost to a comment. */
function currentOf(engine: readonly [string, ...string[]], found: RegExp): number {
  const folder = mkdtempSync(join(tmpdir(), 'comment-'));
  try {
    writeFileSync(join(folder, 'deck.cir'), deckWith(hostileTitles));
    const [program, ...flags] = engine;
    const printed = execFileSync(program, [...flags, 'deck.cir'], { cwd: folder, encoding: 'utf8' });
    expect(printed).not.toMatch(/no match|error/i);
    return Number(found.exec(printed)?.[1]);
  } finally {
    rmSync(folder, { recursive: true });
  }
}

function installed(program: string): boolean {
  if (process.env.COUNTERSLOPE_REQUIRE?.split(',').includes(program)) return true;
  try {
    execFileSync('which', [program], { stdio: 'ignore' });
    return true;
  } catch {
    return false;
  }
}

const expected_A = -hostileTitles.length / 1000;

test.skipIf(!installed('ngspice'))('ngspice reads every line after a comment', () => {
  expect(currentOf(['ngspice', '-b'], /v1#branch\s+(-[\d.e+-]+)/)).toBeCloseTo(expected_A, 9);
});

test.skipIf(!installed('gnucap'))('gnucap reads every line after a comment', () => {
  expect(currentOf(['gnucap', '-b'], /^ 27\.\s+(-[\d.e+-]+)/m)).toBeCloseTo(expected_A, 9);
});
