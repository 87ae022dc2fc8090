import { describe, expect, it } from 'vitest';
import { endings } from '../../../../generator/loop/cycle/CycleRun.ts';
import { runCycles } from '../../../../generator/loop/cycle/runCycles.ts';
import { buckRun, plainTiming, straightStage } from './runs.ts';

describe('a run of cycles', () => {
  it('turns off where current and ramp reach the control level, the ramp starting anew at each edge', () => {
    const { onTime_s, peak_A } = runCycles(buckRun({ rampSlope_A_per_s: 2.5e5, cycles: 30 }));
    for (let cycle = 0; cycle < 30; cycle += 1)
      expect(peak_A[cycle]! + 2.5e5 * onTime_s[cycle]!).toBeCloseTo(3, 12);
  });

  it('closes a perturbation in one cycle when the ramp has the down slope', () => {
    const { edges } = runCycles(buckRun({ rampSlope_A_per_s: 5e5, cycles: 3, initial: [2.3] }));
    expect(edges[0]![1]).toBeCloseTo(3 - 5 * 0.2, 12);
    expect(edges[0]![2]).toBeCloseTo(edges[0]![1]!, 12);
  });

  it('turns off at maximum duty whatever the comparator says', () => {
    const run = buckRun({ control_A: 100, timing: { ...plainTiming, maximumDuty: 0.9 }, cycles: 2 });
    const { onTime_s, ending } = runCycles(run);
    expect(onTime_s[0]).toBeCloseTo(1.8e-6, 18);
    expect(ending[0]).toBe(endings.maximumDuty);
  });

  it('turns off later than the trip by the comparator delay, so that the current overshoots by m1·delay', () => {
    const timing = { ...plainTiming, comparatorDelay_s: 30e-9 };
    const { peak_A } = runCycles(buckRun({ timing, cycles: 1 }));
    expect(peak_A[0]).toBeCloseTo(3 + 7e5 * 30e-9, 12);
  });

  it('is deaf to the comparator until the minimum on-time, the delay being part of it', () => {
    const timing = { ...plainTiming, minimumOnTime_s: 100e-9, comparatorDelay_s: 30e-9 };
    const early = runCycles(buckRun({ timing, control_A: 2.01, cycles: 1 }));
    expect(early.onTime_s[0]).toBeCloseTo(100e-9, 18);
    expect(early.ending[0]).toBe(endings.minimumOnTime);
    const late = runCycles(buckRun({ timing, control_A: 2.07, cycles: 1 }));
    expect(late.onTime_s[0]).toBeCloseTo(130e-9, 18);
    expect(late.ending[0]).toBe(endings.comparator);
  });

  it('leaves out pulses that would end before the minimum on-time, where it may', () => {
    const timing = { ...plainTiming, minimumOnTime_s: 100e-9, skipsPulses: true, rectifies: true };
    const { ending, onTime_s, edges } = runCycles(
      buckRun({ timing, stage: straightStage(31, 5), control_A: 0.2, initial: [1.5], cycles: 40 }),
    );
    expect(ending[0]).toBe(endings.skipped);
    expect(onTime_s[0]).toBe(0);
    expect(edges[0]![1]).toBeCloseTo(0.5, 12);
    expect([...ending].every((kind) => kind === endings.skipped)).toBe(true);
  });

  it('holds the peak at the limit less the ramp where the limit sees it, at the limit where it does not', () => {
    const limited = (seesRamp: boolean) =>
      runCycles(
        buckRun({ rampSlope_A_per_s: 4e5, control_A: 100, limit: { level_A: 3, seesRamp }, cycles: 200 }),
      );
    const drowned = limited(true);
    expect(drowned.ending[199]).toBe(endings.limit);
    expect(drowned.peak_A[199]! + 4e5 * drowned.onTime_s[199]!).toBeCloseTo(3, 10);
    expect(limited(false).peak_A[199]).toBeCloseTo(3, 10);
  });

  it('stops the current at zero behind a rectifier', () => {
    const timing = { ...plainTiming, rectifies: true };
    const { edges, conduction_s, onTime_s, means } = runCycles(
      buckRun({ control_A: 0.35, timing, initial: [0], cycles: 3 }),
    );
    expect(edges[0]![2]).toBe(0);
    expect(onTime_s[1]).toBeCloseTo(0.5e-6, 15);
    expect(conduction_s[1]).toBeCloseTo(0.5e-6 + 0.7e-6, 15);
    expect(means[0]![1]).toBeCloseTo((0.35 / 2) * (1.2 / 2), 12);
  });

  it('takes steps of stage, ramp and control at the edges where they are due', () => {
    const events = [
      { cycle: 2, stage: straightStage(19, 5), rampSlope_A_per_s: 5e5 },
      { cycle: 4, control_A: 2.5 },
      { cycle: 5, shift_A: 0.1 },
    ];
    const { edges, peak_A, onTime_s } = runCycles(
      buckRun({ rampSlope_A_per_s: 5e5, initial: [2], cycles: 6, events }),
    );
    expect(edges[0]![2]).toBeCloseTo(2, 12);
    expect(peak_A[2]! - edges[0]![2]!).toBeCloseTo(19e5 * onTime_s[2]!, 12);
    expect(edges[0]![5]).toBeCloseTo(1.5, 12);
    expect(peak_A[5]! - 19e5 * onTime_s[5]!).toBeCloseTo(1.6, 12);
  });

  it('refuses a period of nothing and a ramp that falls', () => {
    expect(() => runCycles(buckRun({ timing: { ...plainTiming, period_s: 0 } }))).toThrow(RangeError);
    expect(() => runCycles(buckRun({ rampSlope_A_per_s: -1 }))).toThrow(/ramp slope/);
  });
});
