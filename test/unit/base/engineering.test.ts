import { expect, test } from 'vitest';
import { engineering } from '../../../generator/base/engineering.ts';

test.each([
  [4.7e-6, 'F', 3, '4.70 µF'],
  [10e-6, 'H', 3, '10.0 µH'],
  [500e3, 'Hz', 3, '500 kHz'],
  [999.96, 'Hz', 3, '1.00 kHz'],
  [-0.0123, 'V', 2, '-12 mV'],
  [470, 'Ω', 2, '470 Ω'],
  [0.045, 'V/µs', 2, '45 mV/µs'],
  [0, 'V', 3, '0 V'],
  [0.8183, '', 3, '0.818'],
  [12.5, '%', 3, '12.5 %'],
  [2e-18, 'F', 2, '0.0020 fF'],
  [3e16, 'Hz', 2, '30000 THz'],
])('%d %s to %i digits is %s', (value, unit, digits, text) => {
  expect(engineering(value, unit, digits)).toBe(text);
});

test.each([Number.NaN, Number.NEGATIVE_INFINITY])('%s has no notation', (value) => {
  expect(() => engineering(value, 'V')).toThrow(RangeError);
});
