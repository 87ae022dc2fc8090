import fc from 'fast-check';
import { expect, test } from 'vitest';
import { roundTo6Digits } from '../../../../generator/emit/text/roundTo6Digits.ts';

test('engines that differ in the eighth digit give the same figure', () => {
  expect(roundTo6Digits(100009.02341)).toBe(roundTo6Digits(100009.02349));
  expect(roundTo6Digits(-0.33333333)).toBe(-0.333333);
});

test('the error is at most half a unit of the sixth digit', () => {
  fc.assert(
    fc.property(fc.double({ min: 1e-15, max: 1e15, noNaN: true }), (value) => {
      expect(Math.abs(roundTo6Digits(value) - value)).toBeLessThanOrEqual(5.0001e-6 * value);
    }),
    { seed: 2005 },
  );
});

test('what rounds to zero has no sign', () => {
  expect(Object.is(roundTo6Digits(-0), 0)).toBe(true);
});

test('a figure that does not exist cannot be rounded', () => {
  expect(() => roundTo6Digits(Number.NaN)).toThrow(RangeError);
});
