import { expect, test } from 'vitest';
import { laws } from '../../../generator/law/laws.ts';
import { buck } from '../../../generator/region/converters/buck.ts';
import { regionPoint } from '../../../generator/region/OperatingRegion.ts';

const noDrops = { rectifierDrop_V: 0, switch_ohm: 0, winding_ohm: 0, rectifier_ohm: 0 };
const at = (inputVoltage_V: number, outputVoltage_V: number) =>
  regionPoint(buck, { inputVoltage_V, outputVoltage_V, loadCurrent_A: 0 }, noDrops, 0);

test('every law stands under its own name, and gives back the gain of its ramp', () => {
  for (const [kind, law] of Object.entries(laws)) {
    expect(law.kind).toBe(kind);
    const point = at(12, 9);
    expect(law.gainFor(law.ramp_V(0.9, point), point)).toBeCloseTo(0.9, 12);
  }
});

test('a fixed ramp is the same everywhere; the others follow input, output, or what is left to a damping index', () => {
  expect([laws.fixed.ramp_V(4, at(8, 5)), laws.fixed.ramp_V(4, at(36, 5))]).toEqual([4, 4]);
  expect(laws.vin.ramp_V(0.5, at(36, 5))).toBe(18);
  expect(laws.vout.ramp_V(0.5, at(36, 5))).toBe(2.5);
  expect(laws['constant-q'].ramp_V(0.9, at(12, 9))).toBeCloseTo(0.9 * 12 - 3, 12);
});

test('constant Q needs no ramp from an off-duty of its index on', () => {
  expect(laws['constant-q'].ramp_V(0.8, at(36, 5))).toBe(0);
  expect(laws['constant-q'].clampOffDuty(0.8)).toBe(0.8);
  expect(laws.vin.clampOffDuty(0.8)).toBeNull();
});
