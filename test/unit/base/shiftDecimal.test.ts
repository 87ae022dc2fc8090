import fc from 'fast-check';
import { expect, test } from 'vitest';
import { shiftDecimal } from '../../../generator/base/shiftDecimal.ts';

test('4.7 shifted by −6 is the literal 4.7e-6, which the product is not bound to be', () => {
  expect(shiftDecimal(4.7, -6)).toBe(4.7e-6);
  expect(shiftDecimal(0, 3)).toBe(0);
});

test('a shift there and back loses nothing but the last bit', () => {
  fc.assert(
    fc.property(fc.double({ min: 1e-12, max: 1e12 }), fc.integer({ min: -15, max: 15 }), (value, places) => {
      const shifted = shiftDecimal(value, places);
      expect(Math.abs(shiftDecimal(shifted, -places) / value - 1)).toBeLessThan(1e-15);
    }),
    { seed: 4112 },
  );
});
