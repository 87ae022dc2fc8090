import { describe, expect, it } from 'vitest';
import { capacitorStage } from '../../../../generator/loop/cycle/capacitorStage.ts';
import { runCycles } from '../../../../generator/loop/cycle/runCycles.ts';
import { sampleCycles } from '../../../../generator/loop/cycle/sampleCycles.ts';
import { buckRun, capacitorElements, plainTiming } from './runs.ts';

describe('waveforms of a run', () => {
  const run = buckRun({
    rampSlope_A_per_s: 3e5,
    cycles: 8,
    events: [{ cycle: 5, shift_A: 0.2 }],
    limit: { level_A: 2.95, seesRamp: true },
  });

  it('begin at the cycle asked for and pass through every edge and peak', () => {
    const { time_s, states } = sampleCycles(run, 4, 1);
    const { edges, peak_A } = runCycles(run);
    expect(time_s[0]).toBeCloseTo(8e-6, 15);
    expect(time_s.at(-1)).toBeCloseTo(16e-6, 15);
    const current = [...states[0]!];
    expect(current).toHaveLength(16);
    for (let cycle = 4; cycle < 8; cycle += 1) {
      const place = 4 * (cycle - 4);
      expect(current[place]).toBeCloseTo(edges[0]![cycle]! + (cycle === 5 ? 0.2 : 0), 12);
      expect(current[place + 1]).toBeCloseTo(peak_A[cycle]!, 12);
    }
  });

  it('meet the threshold where the switch turns off', () => {
    const { states, threshold_A, on } = sampleCycles(run, 0, 3);
    for (let k = 1; k < on.length; k += 1)
      if (on[k - 1] === 1 && on[k] === 0) expect(states[0]![k - 1]).toBeCloseTo(threshold_A[k - 1]!, 12);
  });

  it('show a rectifier that conducts again when the output sags below a boost’s input', () => {
    const stage = capacitorStage(capacitorElements('boost', { capacitance_F: 1e-6, loadConductance_S: 0.1 }));
    const sagging = buckRun({
      initial: [0, 13],
      control_A: 0.02,
      cycles: 1,
      timing: { ...plainTiming, rectifies: true },
    });
    const { time_s, states, output_V, on } = sampleCycles({ ...sagging, stage }, 0, 200);
    const { edges, conduction_s } = runCycles({ ...sagging, stage });
    expect(states[0]!.at(-1)).toBeCloseTo(edges[0]![1]!, 12);
    const still = time_s.filter((_, k) => k > 201 && states[0]![k] === 0 && on[k] === 0);
    const idle_s = still.at(-1)! - still[0]!;
    expect(idle_s).toBeGreaterThan(0);
    expect(2e-6 - conduction_s[0]!).toBeCloseTo(idle_s, 15);
    expect(edges[0]![1]).toBeGreaterThan(0);
    expect(Math.min(...output_V!)).toBeLessThan(12);
  });
});
