import { expect, test } from 'vitest';
import { demandOf, rampReference } from '../../../generator/ramp/demandOf.ts';
import { cornersOf } from '../../support/corners.ts';
import type { Keys } from '../../support/request.ts';

async function demand(keys: Keys, gain: number) {
  const { specification, corners } = await cornersOf({
    input: '8 V to 36 V',
    inductance: '10 uH',
    senseGain: '50 mOhm',
    frequency: '500 kHz ± 10 %',
    maximumDuty: '85 %',
    ...keys,
  });
  return demandOf(specification, corners, gain);
}

test('the vin law owes k·Ri/L for each volt of input', async () => {
  const { requiredSlope_per_s, gainPerSlope, track_V, tracks } = await demand({}, 0.668);
  expect(requiredSlope_per_s).toBeCloseTo((0.668 * 0.05) / 10e-6, 6);
  expect(requiredSlope_per_s * gainPerSlope).toBeCloseTo(0.668, 12);
  expect([tracks, track_V]).toEqual(['input', { low: 8, high: 36 }]);
});

test('the fixed law owes S·L·Ri/L in all, from a reference', async () => {
  const { requiredSlope_per_s, track_V, trackToleranceRatio } = await demand({ 'ramp.law': 'fixed' }, 23.59);
  expect(requiredSlope_per_s * rampReference.voltage_V).toBeCloseTo((23.59 * 0.05) / 10e-6, 6);
  expect(track_V).toEqual({ low: 2.5, high: 2.5 });
  expect(trackToleranceRatio).toBe(0.01);
});

test('the longest rise is at the lowest frequency, the shortest reset at the highest', async () => {
  const { riseTime_s, resetTime_s, period_s } = await demand({}, 0.5);
  expect(riseTime_s).toBeCloseTo(0.85 / 450e3, 15);
  expect(resetTime_s).toBeCloseTo(0.15 / 550e3, 15);
  expect(period_s).toBeCloseTo(2e-6, 15);
});
