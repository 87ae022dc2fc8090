import { expect, test } from 'vitest';
import { cycleRatio, dampingIndex, settlingCycles } from '../../../generator/law/innerLoop.ts';

test('a damping index of one is deadbeat, below it rings, above it is sluggish', () => {
  expect(cycleRatio(1)).toBe(0);
  expect(cycleRatio(0.8)).toBeLessThan(0);
  expect(cycleRatio(1.3)).toBeGreaterThan(0);
});

test('a swing that is not positive has no damping index', () => {
  expect(() => dampingIndex(1, 0, 1)).toThrow(RangeError);
  expect(() => dampingIndex(1, -1, 1)).toThrow(RangeError);
  expect(() => dampingIndex(1, Number.NaN, 1)).toThrow(RangeError);
});

test('settling counts whole cycles to one hundredth, and one at least', () => {
  expect(settlingCycles(1)).toBe(1);
  for (const index of [0.51, 0.6, 0.8183, 1.5, 4.798]) {
    const cycles = settlingCycles(index)!;
    const left = Math.abs(cycleRatio(index)) ** cycles;
    expect(left).toBeLessThanOrEqual(0.01 * (1 + 1e-9));
    if (cycles > 1) expect(Math.abs(cycleRatio(index)) ** (cycles - 1)).toBeGreaterThan(0.01);
  }
});
