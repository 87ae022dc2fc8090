/**
 * C. W. Deisch, Simple switching control method changes power converter into a current source, IEEE PESC
 * 1978, and R. D. Middlebrook's later treatment: constant frequency and peak sensing without a ramp are
 * unstable above a duty of one half. From memory.
 *
 * No tolerance: the claim is an inequality, tried down to one part in a million of the edge.
 */
import { expect, test } from 'vitest';
import { cycleRatio, dampingIndex, dampingQ, settlingCycles } from '../../generator/law/innerLoop.ts';
import { walkedRatio } from '../support/slopes.ts';

const bare = (duty: number) => dampingIndex(1 - duty, 1, 0);

test.each([0.500001, 0.51, 0.6, 0.9])('without a ramp a duty of %f is unstable', (duty) => {
  expect(Math.abs(cycleRatio(bare(duty)))).toBeGreaterThan(1);
  expect(Math.abs(walkedRatio(1 - duty, duty, 0))).toBeGreaterThan(1);
  expect(dampingQ(bare(duty))).toBeNull();
  expect(settlingCycles(bare(duty))).toBeNull();
});

test.each([0.499999, 0.49, 0.3, 0.05])('without a ramp a duty of %f is stable', (duty) => {
  expect(Math.abs(cycleRatio(bare(duty)))).toBeLessThan(1);
  expect(Math.abs(walkedRatio(1 - duty, duty, 0))).toBeLessThan(1);
  expect(dampingQ(bare(duty))).not.toBeNull();
});
