import { expect, test } from 'vitest';
import { decodeDocument } from '../../../generator/spec/decodeDocument.ts';

const bytes = (text: string) => new TextEncoder().encode(text);

test('UTF-8 is decoded, without its byte-order mark', () => {
  expect(decodeDocument(bytes('\ufeffinput: 8 V ± 5 %'), '-')).toMatchObject({
    ok: true,
    value: 'input: 8 V ± 5 %',
  });
});

test('what is not UTF-8 is refused with its place', () => {
  const outcome = decodeDocument(new Uint8Array([...bytes('a: 1\nb: 10 '), 0xb5, 0x48]), 'rail.yaml');
  expect(outcome).toMatchObject({
    ok: false,
    problems: [{ code: 'not-utf8', place: { path: 'rail.yaml', line: 2, column: 7 } }],
  });
});

test('a document saved as UTF-16 is refused', () => {
  const outcome = decodeDocument(new Uint8Array([0xff, 0xfe, 0x69, 0x00]), 'rail.yaml');
  expect(!outcome.ok && outcome.problems[0]?.code).toBe('not-utf8');
});

test('1 MB is accepted, a byte more is not', () => {
  expect(decodeDocument(new Uint8Array(1_048_576).fill(0x23), '-').ok).toBe(true);
  const outcome = decodeDocument(new Uint8Array(1_048_577).fill(0x23), '-');
  expect(!outcome.ok && outcome.problems[0]?.code).toBe('document-too-large');
});
