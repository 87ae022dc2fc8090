import fc from 'fast-check';
import { expect, test } from 'vitest';
import { embeddedJson, jsonDocument } from '../../../../generator/emit/text/jsonDocument.ts';
import { hostileTitles } from './hostileTitles.ts';

test('keys keep their order, two blanks, a line end at the end', () => {
  expect(jsonDocument({ b: 1, a: [true, null] })).toBe(
    '{\n  "b": 1,\n  "a": [\n    true,\n    null\n  ]\n}\n',
  );
});

test('minus zero is zero', () => {
  expect(jsonDocument([-0])).toBe('[\n  0\n]\n');
});

test.each([Number.NaN, Number.POSITIVE_INFINITY, Number.NEGATIVE_INFINITY])('%s is no figure', (value) => {
  expect(() => jsonDocument({ gain: value })).toThrow(/gain is not a finite number/);
});

test.each([undefined, () => 1, Symbol('s')])('nothing is dropped without a word', (value) => {
  expect(() => jsonDocument({ gain: value })).toThrow(TypeError);
  expect(() => jsonDocument([value])).toThrow(TypeError);
});

test('any plain data reads back the same, embedded or not', () => {
  fc.assert(
    fc.property(fc.jsonValue({ noUnicodeString: false }), (value) => {
      const plain = JSON.parse(JSON.stringify(value));
      expect(JSON.parse(jsonDocument(value))).toEqual(plain);
      expect(JSON.parse(embeddedJson(value))).toEqual(plain);
    }),
    { seed: 2003 },
  );
});

test.each(hostileTitles)('embedded, it neither ends its element nor opens another: %j', (title) => {
  expect(embeddedJson({ [title]: title })).not.toMatch(/[<>&\r\n\u2028\u2029]/);
});
