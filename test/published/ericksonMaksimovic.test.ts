/**
 * R. W. Erickson and D. Maksimović, Fundamentals of Power Electronics, chapter on current-programmed
 * control. From memory, edition and page not at hand; every value is derived again here before use.
 *
 * Tolerances: 1e-11 relative where both sides are closed forms in doubles (1 − 1/x cancels up to four
 * digits at the highest duty); 1e-8 where the cycle is walked with a finite shift, which cancels up to seven.
 */
import { describe, expect, test } from 'vitest';
import { cycleRatio, dampingIndex } from '../../generator/law/innerLoop.ts';
import { buck as stage } from '../../generator/region/converters/buck.ts';
import { regionPoint } from '../../generator/region/OperatingRegion.ts';
import { buckSlopes, walkedRatio } from '../support/slopes.ts';

const noDrops = { rectifierDrop_V: 0, switch_ohm: 0, winding_ohm: 0, rectifier_ohm: 0 };

function pointAt(inputVoltage_V: number, outputVoltage_V: number) {
  return regionPoint(stage, { inputVoltage_V, outputVoltage_V, loadCurrent_A: 0 }, noDrops, 0);
}

/** α of the code for a ramp of a share of the down slope. */
function ratioAt(duty: number, shareOfDown: number): number {
  const point = pointAt(10, 10 * duty);
  return cycleRatio(dampingIndex(point.up_V, point.swing_V, shareOfDown * point.down_V));
}

const duties = [0.05, 0.1, 0.25, 1 / 3, 0.5, 0.6, 0.75, 0.9, 0.99, 0.9999];

test('buck slopes are (Vg − V)/L and V/L, and volt-seconds balance', () => {
  const point = pointAt(12, 5);
  expect(point.up_V).toBe(7);
  expect(point.down_V).toBe(5);
  expect(point.up_V * point.duty).toBeCloseTo(point.down_V * (1 - point.duty), 12);
  expect(point.duty).toBeCloseTo(buckSlopes(12, 5, 1).duty, 12);
});

describe('without a ramp', () => {
  test.each([
    [0.6, -1.5],
    [1 / 3, -0.5],
  ])('a duty of %f gives α = −D/D′ = %f', (duty, published) => {
    expect(-duty / (1 - duty)).toBeCloseTo(published, 12);
    expect(ratioAt(duty, 0)).toBeCloseTo(published, 12);
    const { up, down } = buckSlopes(1, duty, 1);
    expect(walkedRatio(up, down, 0)).toBeCloseTo(published, 9);
  });
});

describe('with a ramp', () => {
  test('D = 0.6 and half the down slope give α = −3/7', () => {
    const published = -(1 - 0.5) / (0.4 / 0.6 + 0.5);
    expect(published).toBeCloseTo(-3 / 7, 12);
    expect(ratioAt(0.6, 0.5)).toBeCloseTo(-3 / 7, 12);
  });

  test.each(duties)('α = −(1 − ma/m2)/(D′/D + ma/m2) at a duty of %f, as the walked cycle has it', (duty) => {
    const { up, down } = buckSlopes(1, duty, 1);
    for (const share of [0, 0.1, 0.5, 0.75, 1, 1.5, 3]) {
      const published = -(1 - share) / ((1 - duty) / duty + share);
      const scale = Math.max(1, Math.abs(published));
      expect(Math.abs(ratioAt(duty, share) - published)).toBeLessThanOrEqual(1e-11 * scale);
      expect(Math.abs(walkedRatio(up, down, share * down) - published)).toBeLessThanOrEqual(1e-8 * scale);
    }
  });
});

test('half the down slope is stable for every duty below one', () => {
  for (const duty of duties) expect(Math.abs(ratioAt(duty, 0.5))).toBeLessThan(1);
});

test('anything less than half the down slope is unstable at some duty below one', () => {
  for (const share of [0.49, 0.499, 0.4999]) {
    // |α| = 1 where D(1 − 2·share) = 1 − D, solved for the duty; a little above it the loop grows.
    const edge = 1 / (2 - 2 * share);
    expect(edge).toBeLessThan(1);
    expect(Math.abs(ratioAt((edge + 1) / 2, share))).toBeGreaterThan(1);
    expect(Math.abs(ratioAt(edge * 0.99, share))).toBeLessThan(1);
  }
});

test('a ramp of the whole down slope is deadbeat at every duty', () => {
  for (const duty of duties) {
    expect(Math.abs(ratioAt(duty, 1))).toBeLessThan(1e-12);
    const { up, down } = buckSlopes(1, duty, 1);
    expect(Math.abs(walkedRatio(up, down, down))).toBeLessThan(1e-9);
  }
});
