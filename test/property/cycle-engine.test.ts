import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { cycleRatio, dampingIndex } from '../../generator/law/innerLoop.ts';
import { type CycleRun, endings, type IdealOutputStage } from '../../generator/loop/cycle/CycleRun.ts';
import { capacitorStage } from '../../generator/loop/cycle/capacitorStage.ts';
import { idealOutputStage } from '../../generator/loop/cycle/idealOutputStage.ts';
import { measuredCycleRatio } from '../../generator/loop/cycle/measuredCycleRatio.ts';
import { periodicOrbit } from '../../generator/loop/cycle/periodicOrbit.ts';
import { runCycles } from '../../generator/loop/cycle/runCycles.ts';
import { sampleCycles } from '../../generator/loop/cycle/sampleCycles.ts';
import { boost } from '../../generator/region/converters/boost.ts';
import { buck } from '../../generator/region/converters/buck.ts';
import { buckBoost, cuk, sepic } from '../../generator/region/converters/buckBoost.ts';
import { flyback } from '../../generator/region/converters/flyback.ts';
import { forward } from '../../generator/region/converters/forward.ts';
import type { PowerStage } from '../../generator/region/PowerStage.ts';

const stages: PowerStage[] = [buck, boost, buckBoost, sepic, cuk, flyback(2), forward(1.5, 'two-switch')];
const period_s = 2e-6;
const inductance_H = 10e-6;
const between = (min: number, max: number) => fc.double({ min, max, noNaN: true });

const baseRun: CycleRun = {
  stage: { kind: 'ideal-output', inductance_H, up_V: 7, down_V: 5, up_ohm: 0, down_ohm: 0 },
  rampSlope_A_per_s: 0,
  rampPerOutputVolt_A_per_Vs: 0,
  internalSlope_A_per_s: 0,
  control_A: 5,
  limit: null,
  timing: {
    period_s,
    maximumDuty: 1,
    minimumOnTime_s: 0,
    comparatorDelay_s: 0,
    skipsPulses: false,
    rectifies: false,
  },
  cycles: 1,
  initial: [4],
};

const drops = fc.record({
  rectifierDrop_V: between(0, 1),
  switch_ohm: between(0, 0.1),
  winding_ohm: between(0, 0.1),
  rectifier_ohm: between(0, 0.1),
});
const point = fc.record({
  inputVoltage_V: between(3, 60),
  outputVoltage_V: between(0.5, 60),
  loadCurrent_A: between(0, 3),
});

/** Both slopes in their direction, neither on-time nor off-time a mere sliver. */
const regulates = ({ up_V, down_V }: IdealOutputStage) =>
  up_V > 0.02 * (up_V + down_V) && down_V > 0.02 * (up_V + down_V) && up_V + down_V > 0;

describe.each(stages)('the cycle engine on the $kind', (stage) => {
  it('shows α = 1 − 1/x for every point, drop and ramp', () => {
    fc.assert(
      fc.property(point, drops, between(0.1, 3), (at, dropped, wantedIndex) => {
        const ideal = idealOutputStage(stage, at, dropped, inductance_H);
        fc.pre(regulates(ideal));
        const swing_V = ideal.up_V + ideal.down_V;
        const ramp_V = Math.max(0, wantedIndex * swing_V - ideal.up_V);
        const run = { ...baseRun, stage: ideal, rampSlope_A_per_s: ramp_V / inductance_H };
        const exact = cycleRatio(dampingIndex(ideal.up_V, swing_V, ramp_V));
        const ripple_A = (ideal.up_V * ideal.down_V * period_s) / swing_V / inductance_H;
        const shift_A = (0.01 * ripple_A) / Math.max(1, Math.abs(exact));
        const orbit = periodicOrbit(run)!;
        expect(orbit.cycle.onTime_s[0]! / period_s).toBeCloseTo(ideal.down_V / swing_V, 9);
        const error = measuredCycleRatio(run, orbit, shift_A) - exact;
        expect(Math.abs(error)).toBeLessThan(1e-9 * Math.max(1, Math.abs(exact)));
      }),
    );
  });
});

describe('the cycle engine', () => {
  const capacitive = fc.record({
    kind: fc.constantFrom('buck' as const, 'boost' as const, 'buck-boost' as const),
    inputVoltage_V: between(3, 40),
    rectifierDrop_V: between(0, 1),
    inductance_H: between(1e-6, 50e-6),
    capacitance_F: between(1e-7, 1e-4),
    seriesResistance_ohm: between(0, 0.1),
    switch_ohm: between(0, 0.2),
    winding_ohm: between(0, 0.2),
    rectifier_ohm: between(0, 0.2),
    loadConductance_S: between(0, 2),
    loadCurrent_A: between(0, 3),
  });

  it('trips where current and ramp first reach the level, and not before', () => {
    fc.assert(
      fc.property(
        capacitive,
        between(0, 30),
        between(-2, 8),
        between(0, 2e6),
        (elements, output_V, control_A, slope) => {
          const run = {
            ...baseRun,
            stage: capacitorStage(elements),
            initial: [1, output_V],
            control_A,
            rampSlope_A_per_s: slope,
          };
          const { ending, onTime_s, peak_A } = runCycles(run);
          const { states, threshold_A, on } = sampleCycles(run, 0, 300);
          const reach = 1e-9 * (1 + Math.abs(control_A) + slope * period_s);
          const last = on.lastIndexOf(1);
          for (let k = 0; k < last; k += 1) expect(states[0]![k]).toBeLessThan(threshold_A[k]! + reach);
          const atTrip = peak_A[0]! + slope * onTime_s[0]! - control_A;
          if (ending[0] === endings.comparator) expect(Math.abs(atTrip)).toBeLessThan(reach);
          if (ending[0] === endings.maximumDuty) expect(atTrip).toBeLessThan(reach);
          if (ending[0] === endings.minimumOnTime) expect(onTime_s[0]).toBe(0);
        },
      ),
    );
  });

  it('never lets a rectified current below zero, and finds when it stops', () => {
    fc.assert(
      fc.property(capacitive, between(0, 30), between(0, 3), (elements, output_V, control_A) => {
        const stage = capacitorStage(elements);
        const run = {
          ...baseRun,
          stage,
          initial: [0, output_V],
          control_A,
          cycles: 5,
          timing: { ...baseRun.timing, maximumDuty: 0.8, rectifies: true },
        };
        const { states, on } = sampleCycles(run, 0, 50);
        // A buck fed from less than its output cannot hold its current up while the switch is on.
        for (let k = 0; k < on.length; k += 1)
          if (on[k] === 0 && states[0]![Math.max(0, on.lastIndexOf(1, k))]! >= 0)
            expect(states[0]![k]).toBeGreaterThan(-1e-9 * (1 + control_A));
      }),
    );
  });

  it('has the same cycles by the closed form of an exponential as by the series of a linear stage', () => {
    const ohm = between(1e-4, 20);
    fc.assert(
      fc.property(
        between(1, 40),
        between(1, 40),
        ohm,
        ohm,
        between(0, 2e6),
        (up_V, down_V, up, down, slope) => {
          const lossy = { ...baseRun, rampSlope_A_per_s: slope, cycles: 20, control_A: 3, initial: [2] };
          const interval = (volts: number, resistance: number) => ({
            matrix: [[-resistance / inductance_H]],
            source: [volts / inductance_H],
            output: { row: [0], constant: 0 },
          });
          const [on, off] = [interval(up_V, up), interval(-down_V, down)];
          const idle = interval(0, 0);
          const timing = { ...baseRun.timing, maximumDuty: 0.9, rectifies: true };
          const exact = {
            kind: 'ideal-output',
            inductance_H,
            up_V,
            down_V,
            up_ohm: up,
            down_ohm: down,
          } as const;
          const closed = runCycles({ ...lossy, timing, stage: exact });
          const series = runCycles({ ...lossy, timing, stage: { kind: 'linear', on, off, idle, trip: [1] } });
          // Errors grow by |α| from cycle to cycle where the loop is not stable.
          const cycles = slope * inductance_H > down_V ? 20 : 4;
          for (let n = 0; n < cycles; n += 1) {
            expect(Math.abs(closed.peak_A[n]! - series.peak_A[n]!)).toBeLessThan(1e-8);
            expect(Math.abs(closed.means[0]![n]! - series.means[0]![n]!)).toBeLessThan(1e-8);
            expect(Math.abs(closed.conduction_s[n]! - series.conduction_s[n]!)).toBeLessThan(1e-8 * period_s);
          }
        },
      ),
    );
  });

  it('keeps the peak limit with the vin law, the output limit with half of the down slope, at every input', () => {
    fc.assert(
      fc.property(between(1, 20), between(1.05, 8), between(0.5, 1.5), (output_V, ratio, gain) => {
        const limited = (input_V: number, ramp_V: number) => {
          const stage = { ...baseRun.stage, up_V: input_V - output_V, down_V: output_V } as IdealOutputStage;
          const limit = { level_A: 9, seesRamp: true };
          const control_A = Number.POSITIVE_INFINITY;
          const run = { ...baseRun, stage, limit, control_A, rampSlope_A_per_s: ramp_V / inductance_H };
          return periodicOrbit(run)!.cycle;
        };
        const inputs = [1.02 * output_V, ratio * output_V];
        const [low, high] = inputs.map((input_V) => limited(input_V, gain * input_V).peak_A[0]!);
        expect(low! - high!).toBeCloseTo(0, 9);
        const [lowMean, highMean] = inputs.map((input_V) => limited(input_V, output_V / 2).means[0]![0]!);
        expect(lowMean! - highMean!).toBeCloseTo(0, 9);
      }),
    );
  });
});
