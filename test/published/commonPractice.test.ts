/**
 * Rules of thumb that no single source owns: common practice.
 *
 * Tolerances: none, the claims are inequalities; where a figure of the project's design text is compared,
 * half of its last digit.
 */
import { expect, test } from 'vitest';
import { cycleRatio, dampingIndex, dampingQ } from '../../generator/law/innerLoop.ts';

const duties = [0.1, 0.3, 0.5, 0.7, 0.9, 0.95];
const withShare = (duty: number, shareOfDown: number) => dampingIndex(1 - duty, 1, shareOfDown * duty);

test('a ramp of 50 % to 100 % of the reflected down slope never oscillates and never turns sluggish', () => {
  for (const duty of duties)
    for (const share of [0.5, 0.6, 0.75, 0.9, 1]) {
      const index = withShare(duty, share);
      expect(index).toBeGreaterThan(0.5);
      expect(cycleRatio(index)).toBeLessThanOrEqual(1e-12);
      expect(dampingQ(index)!).toBeGreaterThan(dampingQ(1)! * (1 - 1e-12));
    }
});

test('the usual goal, a Q of one, lies inside that span of ramps at every duty above one half', () => {
  for (const duty of duties.filter((value) => value > 0.5)) {
    const share = (0.5 + 1 / Math.PI - (1 - duty)) / duty;
    expect(share).toBeGreaterThan(0.5);
    expect(share).toBeLessThan(1);
  }
});

test('below Q = ½ the double pole has split: a damping index above 1.137', () => {
  const index = 0.5 + 2 / Math.PI;
  expect(dampingQ(index)).toBeCloseTo(0.5, 12);
  expect(Math.abs(index - 1.137)).toBeLessThan(0.0005);
});
