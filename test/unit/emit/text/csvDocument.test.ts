import fc from 'fast-check';
import { expect, test } from 'vitest';
import { csvDocument } from '../../../../generator/emit/text/csvDocument.ts';
import { hostileTitles } from './hostileTitles.ts';

/** A reader after RFC 4180, written without a look at the writer. */
function cellsOf(csv: string): string[][] {
  const rows: string[][] = [];
  let rest = csv;
  let row: string[] = [];
  while (rest !== '') {
    const match = /^(?:"((?:[^"]|"")*)"|([^",\r\n]*))(,|\r\n)/.exec(rest);
    if (match === null) throw new Error(`not RFC 4180 from here: ${JSON.stringify(rest)}`);
    row.push(match[1]?.replaceAll('""', '"') ?? match[2] ?? '');
    if (match[3] === '\r\n') {
      rows.push(row);
      row = [];
    }
    rest = rest.slice(match[0].length);
  }
  return rows;
}

test('rows end in CRLF and only cells that need quotes have them', () => {
  const csv = csvDocument([
    [{ text: 'reference' }, { text: 'value' }],
    [{ text: 'R1, R2' }, { number: 4.7e-10 }],
    [{ text: 'say "so"' }, { number: -0.5 }],
  ]);
  expect(csv).toBe('reference,value\r\n"R1, R2",4.7e-10\r\n"say ""so""",-0.5\r\n');
});

test.each(hostileTitles)('no text cell begins like a formula: %j', (title) => {
  const [cell] = cellsOf(csvDocument([[{ text: title }]]))[0]!;
  expect(cell).not.toMatch(/^[=+\-@\t\r\n]/);
  expect(cell!.endsWith(title)).toBe(true);
});

test('what is read back is what was written, but for the apostrophe', () => {
  fc.assert(
    fc.property(fc.array(fc.string({ unit: 'binary' }), { minLength: 2, maxLength: 4 }), (texts) => {
      const read = cellsOf(csvDocument([texts.map((text) => ({ text }))]))[0]!;
      expect(read.map((cell, k) => (cell === texts[k] ? cell : cell.slice(1)))).toEqual(texts);
    }),
    { seed: 2002 },
  );
});

test('a ragged table is a bug and is said to be', () => {
  expect(() => csvDocument([[{ text: 'a' }], []])).toThrow(RangeError);
});

test('a number that does not exist is a bug and is said to be', () => {
  expect(() => csvDocument([[{ number: Number.NaN }]])).toThrow(RangeError);
});
