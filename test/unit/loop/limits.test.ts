import { describe, expect, it } from 'vitest';
import { laws } from '../../../generator/law/laws.ts';
import { runCycles } from '../../../generator/loop/cycle/runCycles.ts';
import { lineResponse_A_per_V } from '../../../generator/loop/lineResponse.ts';
import { lineStep } from '../../../generator/loop/lineStep.ts';
import { type LoopUnit, outputLimit_A, peakLimit_A } from '../../../generator/loop/peakLimits.ts';
import { regionPoint } from '../../../generator/region/OperatingRegion.ts';
import type { LawKind } from '../../../generator/spec/Specification.ts';
import { comparisonOf, exactBuck, lawOf } from '../../support/comparison.ts';

const buck = {
  ...exactBuck,
  input: '6 V to 36 V',
  output: '5 V',
  'controller.senseLimit': '250 mV',
  'controller.limitSeesRamp': 'yes',
};

/** The unit of a law at a gain of our own. */
async function unitOf(kind: LawKind, gain: number, keys = {}): Promise<LoopUnit> {
  const { unit } = lawOf(await comparisonOf({ ...buck, ...keys }), 'fixed');
  return { ...unit!, law: laws[kind], gain };
}

function pointAt({ region }: LoopUnit, inputVoltage_V: number) {
  const { drops } = region.vertices[0]!;
  const point = { inputVoltage_V, outputVoltage_V: 5, loadCurrent_A: 0 };
  return regionPoint(region.stage, point, drops, 0);
}

const inputs = [6, 7.3, 10, 15, 22, 36];
/** ½·m2·L of 5 V out. */
const halfDown_V = 2.5;

describe('limits of a synchronous buck of one output', () => {
  it('the peak limit does not move with the input under the vin law', async () => {
    const unit = await unitOf('vin', 0.65);
    // limit/Ri − k·Vout·T/L
    for (const input of inputs)
      expect(peakLimit_A(unit, pointAt(unit, input))).toBeCloseTo(5 - (0.65 * 5 * 2e-6) / 10e-6, 12);
    expect(lawOf(await comparisonOf(buck), 'vin').peakLimit_A).toEqual({
      low: expect.closeTo(5 - 0.6516386 * 1, 5),
      high: expect.closeTo(5 - 0.6516386 * 1, 5),
    });
  });

  it('the peak limit falls with the duty by S·D·T under a fixed ramp, and rises with the delay', async () => {
    const unit = await unitOf('fixed', 4);
    expect(peakLimit_A(unit, pointAt(unit, 10))).toBeCloseTo(5 - (4 / 10e-6) * 0.5 * 2e-6, 12);
    const late = await unitOf('fixed', 4, { 'controller.comparatorDelay': '100 ns' });
    for (const input of inputs) {
      const rise_A = ((input - 5) / 10e-6) * 100e-9;
      expect(peakLimit_A(late, pointAt(late, input))! - peakLimit_A(unit, pointAt(unit, input))!).toBeCloseTo(
        rise_A,
        12,
      );
    }
  });

  it('the output limit does not move with the input under a fixed ramp of half the down slope', async () => {
    const unit = await unitOf('fixed', halfDown_V);
    for (const input of inputs)
      expect(outputLimit_A(unit, pointAt(unit, input))).toBeCloseTo(5 - (halfDown_V * 2e-6) / 10e-6, 12);
    const more = await unitOf('fixed', 1.2 * halfDown_V);
    expect(outputLimit_A(more, pointAt(more, 36))! - outputLimit_A(more, pointAt(more, 6))!).toBeGreaterThan(
      0.05,
    );
  });

  it('a limit that does not see the ramp stands still', async () => {
    const unit = await unitOf('fixed', 4, { 'controller.limitSeesRamp': 'no' });
    for (const input of inputs) expect(peakLimit_A(unit, pointAt(unit, input))).toBe(5);
  });

  it('without a limit there is no figure', async () => {
    const { unit } = lawOf(
      await comparisonOf({ ...exactBuck, input: '6 V to 36 V', output: '5 V' }),
      'fixed',
    );
    expect(peakLimit_A(unit!, pointAt(unit!, 10))).toBeNull();
    expect(outputLimit_A(unit!, pointAt(unit!, 10))).toBeNull();
  });
});

describe('line response of a buck', () => {
  /** (S_eff − ½·m2)·T·Vout/Vin², in the test's own words. */
  const closedForm = (effective_V: number, input: number) =>
    (((effective_V - halfDown_V) / 10e-6) * 2e-6 * 5) / input ** 2;

  it.each([
    ['fixed', 3.7, 3.7],
    ['vin', 0.7, 0],
    ['vout', 0.8, 4],
  ] as const)(
    'of the %s law is that of its slope as it does not follow the input',
    async (kind, gain, effective) => {
      const unit = await unitOf(kind, gain);
      for (const input of inputs)
        expect(lineResponse_A_per_V(unit, pointAt(unit, input))).toBeCloseTo(closedForm(effective, input), 9);
    },
  );

  it('is nulled by a fixed ramp of half the down slope', async () => {
    const unit = await unitOf('fixed', halfDown_V);
    for (const input of inputs)
      expect(Math.abs(lineResponse_A_per_V(unit, pointAt(unit, input)))).toBeLessThan(1e-9);
  });
});

describe('a line step, cycle by cycle', () => {
  it('moves the mean current by what the line response comes to over the step', async () => {
    const comparison = await comparisonOf({ ...exactBuck, input: '9 V to 20 V', output: '5 V' });
    const step = lineStep(comparison.request.specification, comparison.region, comparison.laws)!;
    for (const { kind, deviation_A } of step.responses) {
      const { unit } = lawOf(comparison, kind);
      const count = 4000;
      const width = (20 - 9) / count;
      // The midpoint rule, over the slow response at constant control.
      const moved = Array.from({ length: count }, (_, at) =>
        lineResponse_A_per_V(unit!, pointAt(unit!, 9 + (at + 0.5) * width)),
      ).reduce((sum, value) => sum + value * width, 0);
      expect(deviation_A[step.down - 1]).toBeCloseTo(moved, 4);
      expect(deviation_A[0]).toBe(0);
      expect(deviation_A.at(-1)).toBeCloseTo(0, 3);
    }
  });

  it('settles within the cycles that the law is said to need', async () => {
    const comparison = await comparisonOf({
      ...exactBuck,
      input: '6 V to 36 V',
      output: '0.8 V to 4 V',
      maximumDuty: '95 %',
    });
    const step = lineStep(comparison.request.specification, comparison.region, comparison.laws)!;
    for (const { kind, deviation_A } of step.responses) {
      const settled = deviation_A[step.down - 1]!;
      const first = deviation_A[step.up]! - settled;
      const count = lawOf(comparison, kind).settlingCyclesMax!;
      const left = deviation_A[step.up + count]! - settled;
      expect(Math.abs(left)).toBeLessThanOrEqual(0.011 * Math.abs(first) + 1e-9);
    }
  });

  it('is left out where there is no inductance, or one input', async () => {
    const unknown = await comparisonOf({ input: '6 V to 36 V', output: '5 V', frequency: '500 kHz' });
    expect(lineStep(unknown.request.specification, unknown.region, unknown.laws)).toBeNull();
    const still = await comparisonOf({ ...exactBuck, input: '12 V', output: '5 V' });
    expect(lineStep(still.request.specification, still.region, still.laws)).toBeNull();
  });
});

describe('the same limits in the cycle engine', () => {
  it('are reached when the limit alone ends each on-time', async () => {
    const unit = await unitOf('vin', 0.65);
    for (const input of inputs) {
      const at = pointAt(unit, input);
      const record = runCycles({
        stage: {
          kind: 'ideal-output',
          inductance_H: 10e-6,
          up_V: at.up_V,
          down_V: at.down_V,
          up_ohm: 0,
          down_ohm: 0,
        },
        rampSlope_A_per_s: (0.65 * input) / 10e-6,
        rampPerOutputVolt_A_per_Vs: 0,
        internalSlope_A_per_s: 0,
        control_A: Number.POSITIVE_INFINITY,
        limit: { level_A: 5, seesRamp: true },
        timing: {
          period_s: 2e-6,
          maximumDuty: 0.99,
          minimumOnTime_s: 0,
          comparatorDelay_s: 0,
          skipsPulses: false,
          rectifies: true,
        },
        cycles: 300,
        initial: [3],
      });
      expect(record.peak_A.at(-1)).toBeCloseTo(peakLimit_A(unit, at)!, 9);
      expect(record.means[0]!.at(-1)).toBeCloseTo(outputLimit_A(unit, at)!, 9);
    }
  });
});
