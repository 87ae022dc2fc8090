import { expect, test } from 'vitest';
import { cornersOf } from '../../support/corners.ts';
import type { Keys } from '../../support/request.ts';

async function of(keys: Keys) {
  const { region, corners } = await cornersOf({ input: '8 V to 36 V', frequency: '500 kHz', ...keys });
  return { ...corners, ...corners.at(region.vertices[0]!) };
}

test('a larger inductance and a smaller sense gain make the ramp a larger share', async () => {
  const { lambda } = await of({ inductance: '10 uH ± 20 %', senseGain: '50 mOhm ± 5 %' });
  expect(lambda.low).toBeCloseTo(0.8 / 1.05, 12);
  expect(lambda.high).toBeCloseTo(1.2 / 0.95, 12);
});

test('of a range the gain refers to the least, nominal, and the whole range counts', async () => {
  const corners = await of({ inductance: '4.7 uH to 22 uH ± 10 %' });
  expect(corners.referenceInductance_H).toBeCloseTo(4.7e-6, 18);
  expect(corners.lambda.low).toBeCloseTo(0.9, 12);
  expect(corners.lambda.high).toBeCloseTo((22 * 1.1) / 4.7, 12);
});

test('what saturation leaves at the peak limit is the least inductance, and leaves the most alone', async () => {
  const corners = await of({ 'inductance.value': '10 uH ± 20 %', 'inductance.atPeakLimit': '7 uH' });
  expect(corners.inductance_H.low).toBeCloseTo(7e-6, 18);
  expect(corners.inductance_H.high).toBeCloseTo(12e-6, 18);
});

test('saturation that leaves more than the tolerance does changes nothing', async () => {
  const corners = await of({ 'inductance.value': '10 uH ± 40 %', 'inductance.atPeakLimit': '7 uH' });
  expect(corners.inductance_H.low).toBeCloseTo(6e-6, 18);
});
