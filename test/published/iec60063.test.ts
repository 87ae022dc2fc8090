/**
 * IEC 60063, preferred number series for resistors and capacitors. Series from memory; the rule (rounded
 * n-th roots of ten) derived here, with the exceptions that the standard carries.
 *
 * No tolerance: the values are decimal and exact.
 */
import { describe, expect, test } from 'vitest';
import { decadeOf, preferredValues } from '../../generator/parts/eSeries.ts';

const counts = { E6: 6, E12: 12, E24: 24, E48: 48, E96: 96, E192: 192 } as const;
type Name = keyof typeof counts;
const names = Object.keys(counts) as Name[];

/** Two significant digits up to E24, three above, as hundredths. */
function byRule(name: Name): number[] {
  const count = counts[name];
  const unit = count <= 24 ? 10 : 1;
  return Array.from({ length: count }, (_, n) => Math.round((100 * 10 ** (n / count)) / unit) * unit);
}

test.each(names)('%s has its number of values in a decade, ascending from 100', (name) => {
  const values = decadeOf(name);
  expect(values).toHaveLength(counts[name]);
  expect(values[0]).toBe(100);
  expect([...values].sort((a, b) => a - b)).toEqual(values);
  expect(values.at(-1)!).toBeLessThan(1000);
});

describe('exceptions from the rule', () => {
  test('E24 differs from rounding at 2.7 3.0 3.3 3.6 3.9 4.3 4.7 8.2 and nowhere else', () => {
    const rule = byRule('E24');
    const differing = decadeOf('E24').filter((value, n) => value !== rule[n]);
    expect(differing).toEqual([270, 300, 330, 360, 390, 430, 470, 820]);
  });

  test('E192 has 9.20 and not 9.19, and differs nowhere else', () => {
    const rule = byRule('E192');
    expect(decadeOf('E192').filter((value, n) => value !== rule[n])).toEqual([920]);
    expect(rule).toContain(919);
    expect(decadeOf('E192')).not.toContain(919);
  });

  test.each(['E48', 'E96'] as const)('%s follows the rule without exception', (name) => {
    expect(decadeOf(name)).toEqual(byRule(name));
  });
});

describe('subsets', () => {
  test.each([
    ['E6', 'E12'],
    ['E12', 'E24'],
    ['E48', 'E96'],
    ['E96', 'E192'],
  ] as const)('%s is every second value of %s', (coarse, fine) => {
    expect(decadeOf(fine).filter((_, n) => n % 2 === 0)).toEqual(decadeOf(coarse));
  });

  test('E24 is no subset of E48: two digits there, three here', () => {
    expect(decadeOf('E24').filter((value) => !decadeOf('E192').includes(value))).not.toEqual([]);
  });
});

test('the series as remembered', () => {
  expect(decadeOf('E6')).toEqual([100, 150, 220, 330, 470, 680]);
  expect(decadeOf('E12')).toEqual([100, 120, 150, 180, 220, 270, 330, 390, 470, 560, 680, 820]);
  expect(decadeOf('E48').slice(0, 6)).toEqual([100, 105, 110, 115, 121, 127]);
  expect(decadeOf('E96').slice(-4)).toEqual([909, 931, 953, 976]);
});

test('values are exact decimals in every decade', () => {
  expect(preferredValues('E12', 100e-12, 1e-9)).toEqual([
    100e-12, 120e-12, 150e-12, 180e-12, 220e-12, 270e-12, 330e-12, 390e-12, 470e-12, 560e-12, 680e-12,
    820e-12, 1e-9,
  ]);
});
