import fc from 'fast-check';
import { expect, test } from 'vitest';
import { fixedNumber } from '../../../../generator/emit/text/fixedNumber.ts';

test.each([
  [4.7e-10, '4.7e-10'],
  [10000, '10000'],
  [0.05, '0.05'],
  [1e21, '1e21'],
  [-2.5e-7, '-2.5e-7'],
  [-0, '0'],
])('%d is written %s', (value, text) => {
  expect(fixedNumber(value)).toBe(text);
});

test('every finite number reads back, in a form all engines know', () => {
  fc.assert(
    fc.property(fc.double({ noNaN: true, noDefaultInfinity: true }), (value) => {
      expect(Number(fixedNumber(value))).toBe(value === 0 ? 0 : value);
      expect(fixedNumber(value)).toMatch(/^-?\d+(\.\d+)?(e-?\d+)?$/);
    }),
    { seed: 2004 },
  );
});

test('digits are significant ones, without trailing zeros', () => {
  expect(fixedNumber(0.1 + 0.2, 6)).toBe('0.3');
  expect(fixedNumber(1234567, 3)).toBe('1230000');
  expect(fixedNumber(4.712e-10, 2)).toBe('4.7e-10');
});

test.each([Number.NaN, Number.POSITIVE_INFINITY])('%s has no literal', (value) => {
  expect(() => fixedNumber(value)).toThrow(RangeError);
});
