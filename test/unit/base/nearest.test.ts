import { expect, test } from 'vitest';
import { editDistance, nearest } from '../../../generator/base/nearest.ts';

const keys = ['input', 'output', 'inductance', 'frequency', 'load'];

test.each([
  ['imput', 'input'],
  ['Frequency', 'frequency'],
  ['inductence', 'inductance'],
  ['laod', 'load'],
  ['inptu', 'input'],
])('%s means %s', (word, known) => {
  expect(nearest(word, keys)).toBe(known);
});

test.each(['colour', 'x', '', 'i'.repeat(100_000)])('nothing known is near %.12s', (word) => {
  expect(nearest(word, keys)).toBeNull();
});

test('a swap of neighbours is one edit, a replacement one, two letters missing two', () => {
  expect(editDistance('laod', 'load')).toBe(1);
  expect(editDistance('lord', 'load')).toBe(1);
  expect(editDistance('ld', 'load')).toBe(2);
});
