import { expect, test } from 'vitest';
import { codedValue } from '../../../../generator/spec/values/iec60062.ts';
import { readSpan } from '../../../../generator/spec/values/readSpan.ts';

// IEC 60062, letter and digit code for values, and tolerance letters (from memory).
test.each([
  ['R47', 0.47],
  ['R050', 0.05],
  ['4R7', 4.7],
  ['470R', 470],
  ['4K7', 4.7e3],
  ['4k7', 4.7e3],
  ['47K', 47e3],
  ['4M7', 4.7e6],
] as const)('%s is %d Ω', (code, value) => {
  expect(codedValue(code, 'resistance')).toEqual({ value, toleranceRatio: null });
});

test.each([
  ['p33', 0.33e-12],
  ['3p3', 3.3e-12],
  ['33p', 33e-12],
  ['n33', 0.33e-9],
  ['3n3', 3.3e-9],
  ['4u7', 4.7e-6],
] as const)('%s is %d F', (code, value) => {
  expect(codedValue(code, 'capacitance')).toEqual({ value, toleranceRatio: null });
});

test('4µ7 is read with either micro sign', () => {
  for (const text of ['4\u00b57', '4\u03bc7']) {
    const reading = readSpan(text, { dimension: 'capacitance' });
    expect(reading.ok && reading.value.span.from.nominal).toBe(4.7e-6);
  }
});

test.each([
  ['B', 0.001],
  ['C', 0.0025],
  ['D', 0.005],
  ['F', 0.01],
  ['G', 0.02],
  ['J', 0.05],
  ['K', 0.1],
  ['M', 0.2],
] as const)('the last letter %s is a tolerance of ± %d', (letter, ratio) => {
  expect(codedValue(`4R7${letter}`, 'resistance')).toEqual({ value: 4.7, toleranceRatio: ratio });
});

test('4k7J spans 5 % either way', () => {
  const reading = readSpan('4k7J', { dimension: 'resistance', tolerance: true });
  expect(reading.ok && reading.value.span.from).toEqual({ nominal: 4700, low: 4465, high: 4935 });
});

test.each(['R', '', '4.7k', '4k7k7', 'k', '47', '4n7'])('%j is no code of a resistance', (text) => {
  expect(codedValue(text, 'resistance')).toBeNull();
});

test('a code with F at its end would be farads to one reader and 1 % to the other', () => {
  const reading = readSpan('4n7F', { dimension: 'capacitance', tolerance: true });
  expect(!reading.ok && reading.fault.code).toBe('code-ambiguous');
});

test('10nF is no code: its F is the unit', () => {
  const reading = readSpan('10nF', { dimension: 'capacitance', tolerance: true });
  expect(reading.ok && [reading.value.span.from.nominal, reading.value.hasTolerance]).toEqual([10e-9, false]);
});

test('codes stand in ranges, and with a tolerance of their own or in words, not both', () => {
  const form = { dimension: 'capacitance', range: true, tolerance: true } as const;
  const range = readSpan('4n7 to 10n', form);
  expect(range.ok && [range.value.span.from.nominal, range.value.span.to.nominal]).toEqual([4.7e-9, 10e-9]);
  const both = readSpan('4n7K ± 5 %', form);
  expect(!both.ok && both.fault.code).toBe('tolerance-form');
});

test('no code is taken where a voltage is meant', () => {
  const reading = readSpan('4R7', { dimension: 'voltage' });
  expect(!reading.ok && reading.fault.code).toBe('wrong-dimension');
});
