/**
 * R. W. Erickson and D. Maksimović, Fundamentals of Power Electronics, current-programmed control in the
 * discontinuous conduction mode. From memory, edition and page not at hand: a buck without a ramp is unstable
 * at low frequency where Vout/Vin exceeds 2/3, and a ramp of 0.086·m2 is enough at every ratio.
 *
 * Derived again here by finite differences of the averaged discontinuous buck, which share no formula with
 * the generator. Tolerances: two printed digits for 0.086; 1e-6 for the border at 2/3, which is found by
 * halving.
 */
import { describe, expect, test } from 'vitest';
import { hasInductance } from '../../generator/law/loopCorners.ts';
import { lightLoadRampForAll } from '../../generator/loop/cycle/lightLoadRamp.ts';
import { lightLoad } from '../../generator/loop/lightLoad.ts';
import { comparisonOf } from '../support/comparison.ts';

/**
 * Mean output current of a discontinuous buck at a control level, L = T = Vin = 1: the on-time ends where
 * current and ramp reach the level, and the current falls back to zero within the cycle.
 */
function outputCurrent(ratio: number, rampSlope: number, control: number): number {
  const rise = 1 - ratio;
  const onTime = control / (rise + rampSlope);
  const peak = rise * onTime;
  return (peak * (onTime + peak / ratio)) / 2;
}

/**
 * Whether the output of a resistive load returns after a small shift at constant control: dI/dV < I/V. The
 * ramp is a share of the down slope at the operating point, and stays what it is when the output moves.
 */
function isStable(ratio: number, share: number): boolean {
  const [control, step] = [1e-3, 1e-6];
  const ramp = share * ratio;
  const above = outputCurrent(ratio + step, ramp, control);
  const below = outputCurrent(ratio - step, ramp, control);
  return (above - below) / (2 * step) < outputCurrent(ratio, ramp, control) / ratio;
}

function border(holds: (at: number) => boolean, low: number, high: number): number {
  let [inside, outside] = [low, high];
  for (let halving = 0; halving < 50; halving += 1) {
    const middle = (inside + outside) / 2;
    if (holds(middle)) inside = middle;
    else outside = middle;
  }
  return inside;
}

const ratios = Array.from({ length: 990 }, (_, index) => 0.005 + index / 1000);

test('without a ramp a discontinuous buck is stable up to a ratio of 2/3', () => {
  expect(border((ratio) => isStable(ratio, 0), 0.1, 0.9)).toBeCloseTo(2 / 3, 6);
});

test('a ramp of 0.086 of the down slope is enough at every ratio, and no less is', () => {
  const least = border((share) => ratios.some((ratio) => !isStable(ratio, share)), 0, 1);
  expect(least).toBeCloseTo(0.086, 3);
  expect(least).toBeCloseTo(lightLoadRampForAll.share, 5);
});

describe('the note on light load', () => {
  async function notesAt(output: string) {
    const { request, region, corners } = await comparisonOf({
      input: '10 V',
      output,
      inductance: '10 uH',
      frequency: '500 kHz',
      load: '0.01 A to 1 A',
    });
    if (!hasInductance(corners)) throw new Error('no inductance');
    return lightLoad(request.specification, region, corners).notes.join(' ');
  }

  test('speaks of the instability above 2/3, and not below', async () => {
    expect(await notesAt('6.7 V')).toContain('unstable at low frequency above Vout/Vin = 2/3');
    expect(await notesAt('6.6 V')).not.toContain('unstable at low frequency');
  });
});
