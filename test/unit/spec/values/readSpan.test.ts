import { describe, expect, test } from 'vitest';
import type { DimensionName } from '../../../../generator/spec/values/dimensions.ts';
import { readSpan } from '../../../../generator/spec/values/readSpan.ts';
import type { ValueForm } from '../../../../generator/spec/values/ValueForm.ts';

const anything = { range: true, tolerance: true } as const;

/** from and to as [nominal, low, high]; one triple for what is no range. */
function figures(text: string, dimension: DimensionName, form: Partial<ValueForm> = {}) {
  const reading = readSpan(text, { ...anything, dimension, ...form });
  if (!reading.ok) throw new Error(JSON.stringify(reading.fault));
  const { from, to } = reading.value.span;
  const ends = reading.value.isRange ? [from, to] : [from];
  return ends.map(({ nominal, low, high }) => [nominal, low, high]);
}

function fault(text: string, dimension: DimensionName, form: Partial<ValueForm> = {}) {
  const reading = readSpan(text, { ...anything, dimension, ...form });
  return reading.ok ? null : reading.fault;
}

describe('one value', () => {
  test.each<[string, DimensionName, number]>([
    ['8 V', 'voltage', 8],
    ['+8 V', 'voltage', 8],
    ['8V', 'voltage', 8],
    ['.5 V', 'voltage', 0.5],
    ['1.2e1 V', 'voltage', 12],
    ['500 kHz', 'frequency', 500e3],
    ['2.2MHz', 'frequency', 2.2e6],
    ['4.7uH', 'inductance', 4.7e-6],
    ['4.7 \u00b5H', 'inductance', 4.7e-6],
    ['4.7 \u03bcH', 'inductance', 4.7e-6],
    ['330 nH', 'inductance', 330e-9],
    ['50 mOhm', 'resistance', 0.05],
    ['50 mohm', 'resistance', 0.05],
    ['50 m\u2126', 'resistance', 0.05],
    ['50 m\u03a9', 'resistance', 0.05],
    ['4.7 k\u03a9', 'resistance', 4700],
    ['20 fF', 'capacitance', 20e-15],
    ['470 pF', 'capacitance', 470e-12],
    ['60 ns', 'time', 60e-9],
    ['45 mV/us', 'slope', 45e3],
    ['45 mV / \u00b5s', 'slope', 45e3],
    ['45 V/ms', 'slope', 45e3],
    ['100 mV/A', 'gain', 0.1],
    ['0.1 V/A', 'gain', 0.1],
    ['100 uV/mA', 'gain', 0.1],
    ['50 mOhm', 'gain', 0.05],
    ['90 %', 'ratio', 0.9],
    ['0.9', 'ratio', 0.9],
    ['4', 'number', 4],
    ['8\u00a0V', 'voltage', 8],
    ['8\u2009V', 'voltage', 8],
    ['8\u202fV', 'voltage', 8],
    ['  8   V ', 'voltage', 8],
  ])('%s as %s is %d', (text, dimension, value) => {
    expect(figures(text, dimension)).toEqual([[value, value, value]]);
  });

  test('what is read is the number nearest to the decimal typed, not a product', () => {
    expect(figures('4.35 mV', 'voltage')[0]![0]).toBe(4.35e-3);
    expect(figures('1.1 uH', 'inductance')[0]![0]).toBe(1.1e-6);
  });
});

describe('a range', () => {
  test.each([
    '8 V to 36 V',
    '8 to 36 V',
    '8 V – 36 V',
    '8 V — 36 V',
    '8–36 V',
    '8 V - 36 V',
    '8 V \u2212 36 V',
    '8\u00a0V\u00a0to\u00a036\u00a0V',
  ])('%s', (text) => {
    expect(figures(text, 'voltage')).toEqual([
      [8, 8, 8],
      [36, 36, 36],
    ]);
  });

  test('a bare first end takes the prefix of the last with its unit', () => {
    expect(figures('100 to 500 kHz', 'frequency').map(([nominal]) => nominal)).toEqual([100e3, 500e3]);
    expect(figures('20 to 40 %', 'ratio').map(([nominal]) => nominal)).toEqual([0.2, 0.4]);
  });

  test('a tolerance behind it applies to each end', () => {
    expect(figures('10 V to 20 V ± 10 %', 'voltage')).toEqual([
      [10, 9, 11],
      [20, 18, 22],
    ]);
    expect(figures('10 V to 20 V ± 0.5 V', 'voltage')).toEqual([
      [10, 9.5, 10.5],
      [20, 19.5, 20.5],
    ]);
    expect(figures('10 V – 20 V +10 % -20 %', 'voltage')).toEqual([
      [10, 8, 11],
      [20, 16, 22],
    ]);
  });

  test('each end may carry its own', () => {
    expect(figures('10 V ± 1 % to 20 V ± 10 %', 'voltage')).toEqual([
      [10, 9.9, 10.1],
      [20, 18, 22],
    ]);
    expect(figures('10 V ± 1 % to 20 V', 'voltage')[1]).toEqual([20, 20, 20]);
  });
});

describe('a tolerance', () => {
  test.each(['10 uH ± 20 %', '10 uH ±20%', '10 uH +/- 20 %', '10 uH +/-20 %', '10uH+-20%', '10 uH ± 2 uH'])(
    '%s is 8 µH to 12 µH',
    (text) => {
      expect(figures(text, 'inductance')).toEqual([[10e-6, 8e-6, 12e-6]]);
    },
  );

  test.each(['5 V +10 % -20 %', '5 V +10/-20 %', '5 V -20 % +10 %', '5 V +10 % - 20 %', '5 V + 0.5 V - 1 V'])(
    '%s is lopsided',
    (text) => {
      expect(figures(text, 'voltage')).toEqual([[5, 4, 5.5]]);
    },
  );

  test('of a bare number may be a bare number', () => {
    expect(figures('4 ± 0.1', 'number')).toEqual([[4, 3.9, 4.1]]);
  });

  test('± 0 % is written, and no less a tolerance', () => {
    const reading = readSpan('5 V ± 0 %', { ...anything, dimension: 'voltage' });
    expect(reading.ok && reading.value.hasTolerance).toBe(true);
  });
});

describe('an inverting output', () => {
  test('gives its magnitude, a range in either order', () => {
    expect(figures('-5 V ± 10 %', 'voltage', { negative: true })).toEqual([[5, 4.5, 5.5]]);
    for (const text of ['-12 V to -5 V', '-5 V to -12 V', '\u22125 V – \u221212 V']) {
      expect(figures(text, 'voltage', { negative: true }).map(([nominal]) => nominal)).toEqual([5, 12]);
    }
  });

  test('cannot change its sign within a range', () => {
    expect(fault('-5 V to 5 V', 'voltage', { negative: true })?.code).toBe('range-sign');
  });
});

describe('refused with what to write instead', () => {
  test.each<[string, DimensionName, string, string]>([
    ['8', 'voltage', 'unit-missing', '8 V'],
    ['8 to 36', 'voltage', 'unit-missing', '8 V to 36 V'],
    ['8 V to 36', 'voltage', 'unit-missing', '8 V to 36 V'],
    ['10', 'inductance', 'unit-missing', '10 uH'],
    ['500000', 'frequency', 'unit-missing', '500000 Hz'],
    ['500', 'frequency', 'unit-missing', '500 kHz'],
    ['8..36', 'voltage', 'range-form', '8 V to 36 V'],
    ['8 V...36 V', 'voltage', 'range-form', '8 V to 36 V'],
    ['8 V … 36 V', 'voltage', 'range-form', '8 V to 36 V'],
    ['8~36 V', 'voltage', 'range-form', '8 to 36 V'],
    ['8-36 V', 'voltage', 'range-form', '8 to 36 V'],
    ['8 V to 12 V to 36 V', 'voltage', 'range-form', '8 V to 36 V'],
    ['4,7 uH', 'inductance', 'decimal-comma', '4.7 uH'],
    ['1,25 V', 'voltage', 'decimal-comma', '1.25 V'],
    ['1,000 V', 'voltage', 'thousands-separator', '1000 V'],
    ['1 000 V', 'voltage', 'thousands-separator', '1000 V'],
    ["1'000 V", 'voltage', 'thousands-separator', '1000 V'],
    ['500_000 Hz', 'frequency', 'thousands-separator', '500000 Hz'],
    ['500\u202f000 Hz', 'frequency', 'thousands-separator', '500000 Hz'],
    ['1.000,5 V', 'voltage', 'thousands-separator', 'one decimal point'],
    ['10 MH', 'inductance', 'unit-case', '10 mH'],
    ['10 UH', 'inductance', 'unit-case', '10 uH'],
    ['10 uh', 'inductance', 'unit-case', '10 uH'],
    ['500 KHZ', 'frequency', 'unit-case', '500 kHz'],
    ['500 KHz', 'frequency', 'unit-case', '500 kHz'],
    ['2 mHz', 'frequency', 'unit-case', '2 MHz'],
    ['8 v', 'voltage', 'unit-case', '8 V'],
    ['50 MOhm', 'gain', 'unit-case', '50 mOhm'],
    ['50 MV/A', 'gain', 'unit-case', '50 mV/A'],
    ['45 MV/us', 'slope', 'unit-case', '45 mV/us'],
    ['4N7', 'capacitance', 'unit-case', '4n7'],
    ['4r7', 'resistance', 'unit-case', '4R7'],
    ['NaN', 'voltage', 'not-finite', 'number'],
    ['nan V', 'voltage', 'not-finite', 'number'],
    ['.inf', 'voltage', 'not-finite', 'number'],
    ['-Infinity V', 'voltage', 'not-finite', 'number'],
    ['∞ V', 'voltage', 'not-finite', 'number'],
    ['1e999 V', 'voltage', 'not-finite', 'finite'],
    ['10 kH', 'inductance', 'magnitude', 'prefix'],
    ['1e9 V', 'voltage', 'magnitude', 'prefix'],
    ['500 mHz', 'frequency', 'magnitude', 'prefix'],
    ['0 V', 'voltage', 'zero', 'above zero'],
    ['0 V to 5 V', 'voltage', 'zero', 'above zero'],
    ['-5 V', 'voltage', 'negative', '5 V'],
    ['36 V to 8 V', 'voltage', 'range-reversed', '8 V to 36 V'],
    ['36 to 8 V ± 5 %', 'voltage', 'range-reversed', '8 V to 36 V ± 5 %'],
    ['5 V ± 100 %', 'voltage', 'tolerance-too-wide', 'smaller'],
    ['5 V ± 5 V', 'voltage', 'tolerance-too-wide', 'smaller'],
    ['5 V +10 % -150 %', 'voltage', 'tolerance-too-wide', 'smaller'],
    ['1 V to 10 V ± 2 V', 'voltage', 'tolerance-too-wide', 'smaller'],
    ['5 V ± 5', 'voltage', 'unit-missing', '± 5 %'],
    ['5 V ± 5 A', 'voltage', 'tolerance-form', '± 5 %'],
    ['5 V ± -5 %', 'voltage', 'tolerance-form', '± 5 %'],
    ['5 V ±', 'voltage', 'tolerance-form', '± 5 %'],
    ['5 V +10 %', 'voltage', 'tolerance-form', '+10 % -0 %'],
    ['5 V -20%', 'voltage', 'tolerance-form', '+0 % -20%'],
    ['8 uH', 'voltage', 'wrong-dimension', 'this is an inductance'],
    ['8 W', 'voltage', 'wrong-dimension', 'this is a power'],
    ['4 V', 'number', 'wrong-dimension', 'this is a voltage'],
    ['4n7', 'resistance', 'wrong-dimension', 'code of a capacitance'],
    ['8 volts', 'voltage', 'unit-unknown', '8 V'],
    ['4.7k', 'resistance', 'unit-unknown', '4.7 kOhm'],
    ['47 K', 'resistance', 'unit-unknown', '47 kOhm'],
    ['4k7 Ohm', 'resistance', 'unit-unknown', '4k7'],
    ['eight', 'voltage', 'number-form', '12 V'],
    ['8 36 V', 'voltage', 'number-form', '12 V'],
    ['', 'voltage', 'value-missing', '12 V'],
  ])('%s as %s: %s, %s', (text, dimension, code, fix) => {
    const found = fault(text, dimension);
    expect(found?.code).toBe(code);
    expect(found?.fix).toContain(fix);
    expect(found?.received).toBe(text === '' ? 'nothing' : text);
  });

  test('a range where one value is meant, a tolerance where none is', () => {
    expect(fault('1 V to 2 V', 'voltage', { range: false })?.code).toBe('range-not-allowed');
    expect(fault('90 % ± 1 %', 'ratio', { tolerance: false })?.code).toBe('tolerance-not-allowed');
  });

  test('a share of more than the whole lacks its per cent sign', () => {
    expect(fault('90', 'ratio', { bounds: [0.01, 1] })).toMatchObject({
      code: 'magnitude',
      fix: 'write 90 %',
    });
  });

  test('a long text is not taken apart, and not shown whole', () => {
    const found = fault('1'.repeat(100_000), 'voltage');
    expect(found?.code).toBe('value-too-long');
    expect(found?.received.length).toBeLessThan(100);
  });

  test('control characters are shown as codes', () => {
    expect(fault('8 V\u001b[2J', 'voltage')?.received).toBe('8 V\\u001b[2J');
  });
});

test('zero is a value where it means something', () => {
  expect(figures('0 V', 'voltage', { zero: true })).toEqual([[0, 0, 0]]);
  expect(fault('0 V ± 1 V', 'voltage', { zero: true })?.code).toBe('tolerance-too-wide');
});
