import { describe, expect, test } from 'vitest';
import { cycleRatio, dampingIndex } from '../../generator/law/innerLoop.ts';
import { boost } from '../../generator/region/converters/boost.ts';
import { buck } from '../../generator/region/converters/buck.ts';
import { buckBoost } from '../../generator/region/converters/buckBoost.ts';
import { regionPoint } from '../../generator/region/OperatingRegion.ts';
import type { PowerStage } from '../../generator/region/PowerStage.ts';

// Erickson & Maksimović, Fundamentals of Power Electronics, chapter on current-programmed control (from
// memory): m1 and m2 of buck, boost and buck-boost; −D/D′ without a ramp; ma = ½·m2 the least that is stable
// for every duty; ma = m2 deadbeat. The tolerance is that of double arithmetic.

const noDrops = { rectifierDrop_V: 0, switch_ohm: 0, winding_ohm: 0, rectifier_ohm: 0 };

/** The book's slopes times L, with Vg the input and V the output's magnitude. */
const table: {
  stage: PowerStage;
  up: (vg: number, v: number) => number;
  down: (vg: number, v: number) => number;
  output: (vg: number, duty: number) => number;
}[] = [
  { stage: buck, up: (vg, v) => vg - v, down: (_, v) => v, output: (vg, d) => d * vg },
  { stage: boost, up: (vg) => vg, down: (vg, v) => v - vg, output: (vg, d) => vg / (1 - d) },
  { stage: buckBoost, up: (vg) => vg, down: (_, v) => v, output: (vg, d) => (vg * d) / (1 - d) },
];

const duties = [0.05, 1 / 3, 0.5, 0.6, 0.75, 0.9, 0.99];
const vg = 12;

describe.each(table.map((row) => [row.stage.kind, row] as const))('%s', (_, row) => {
  const at = (duty: number) =>
    regionPoint(
      row.stage,
      { inputVoltage_V: vg, outputVoltage_V: row.output(vg, duty), loadCurrent_A: 0 },
      noDrops,
      0,
    );
  const ratioAt = (duty: number, shareOfDown: number) => {
    const { up_V, down_V, swing_V } = at(duty);
    return cycleRatio(dampingIndex(up_V, swing_V, shareOfDown * down_V));
  };

  test.each(duties)('the slopes and the duty are the book’s at D = %f', (duty) => {
    const point = at(duty);
    expect(point.up_V).toBeCloseTo(row.up(vg, point.outputVoltage_V), 9);
    expect(point.down_V).toBeCloseTo(row.down(vg, point.outputVoltage_V), 9);
    expect(point.duty).toBeCloseTo(duty, 12);
  });

  test.each(duties)(
    'without a ramp a perturbation goes by −D/D′ at D = %f, and grows above one half',
    (duty) => {
      expect(ratioAt(duty, 0)).toBeCloseTo(-duty / (1 - duty), 9);
      expect(Math.abs(ratioAt(duty, 0)) > 1).toBe(duty > 0.5);
    },
  );

  test('D = 0.6 gives −1.5, D = 1/3 gives −0.5, and half the down slope at D = 0.6 gives −3/7', () => {
    expect(ratioAt(0.6, 0)).toBeCloseTo(-1.5, 12);
    expect(ratioAt(1 / 3, 0)).toBeCloseTo(-0.5, 12);
    expect(ratioAt(0.6, 0.5)).toBeCloseTo(-3 / 7, 12);
  });

  test('half the down slope holds for every duty below one, a little less does not', () => {
    for (const duty of duties) expect(Math.abs(ratioAt(duty, 0.5))).toBeLessThan(1);
    expect(Math.abs(ratioAt(0.999, 0.495))).toBeGreaterThan(1);
  });

  test.each(duties)('the whole down slope is deadbeat at D = %f', (duty) => {
    expect(ratioAt(duty, 1)).toBeCloseTo(0, 12);
  });
});
