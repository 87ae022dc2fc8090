import { expect, test } from 'vitest';
import { exactly } from '../../../../generator/base/Quantity.ts';
import { valueText } from '../../../../generator/spec/values/valueText.ts';
import { writeQuantity, writeSpan } from '../../../../generator/spec/values/writeSpan.ts';

test.each([
  [4.7e-6, 'inductance', '4.7 µH'],
  [500e3, 'frequency', '500 kHz'],
  [0.05, 'gain', '50 mV/A'],
  [45e3, 'slope', '45 mV/µs'],
  [0.9, 'ratio', '90 %'],
  [4, 'number', '4'],
  [0, 'voltage', '0 V'],
  [1.2345678, 'voltage', '1.2345678 V'],
] as const)('%d as %s is written %s', (value, dimension, text) => {
  expect(valueText(value, dimension)).toBe(text);
});

test('a tolerance is written in per cent where that gives the very bounds', () => {
  expect(writeQuantity({ nominal: 10e-6, low: 8e-6, high: 12e-6 }, 'inductance')).toBe('10 µH ± 20 %');
  expect(writeQuantity({ nominal: 5, low: 4, high: 5.5 }, 'voltage')).toBe('5 V +10 % -20 %');
  expect(writeQuantity({ nominal: 3, low: 2.9, high: 3.1 }, 'voltage')).toBe('3 V ± 0.1 V');
});

test('a tolerance shared by the ends is written once, one of a single end at that end', () => {
  const [eight, thirty] = [
    { nominal: 8, low: 7.6, high: 8.4 },
    { nominal: 36, low: 34.2, high: 37.8 },
  ];
  expect(writeSpan({ from: eight, to: thirty }, 'voltage')).toBe('8 V to 36 V ± 5 %');
  expect(writeSpan({ from: exactly(8), to: thirty }, 'voltage')).toBe('8 V ± 0 % to 36 V ± 5 %');
  expect(writeSpan({ from: eight, to: exactly(36) }, 'voltage')).toBe('8 V ± 5 % to 36 V');
});
