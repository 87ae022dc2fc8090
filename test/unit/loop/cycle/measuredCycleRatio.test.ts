import { describe, expect, it } from 'vitest';
import { settlingCycles } from '../../../../generator/law/innerLoop.ts';
import type { LinearStage } from '../../../../generator/loop/cycle/CycleRun.ts';
import {
  type CapacitorStageElements,
  capacitorStage,
} from '../../../../generator/loop/cycle/capacitorStage.ts';
import {
  cycleJacobian,
  measuredCycleRatio,
  measuredSettlingCycles,
  perturbationDecay,
} from '../../../../generator/loop/cycle/measuredCycleRatio.ts';
import { orbitAtDuty } from '../../../../generator/loop/cycle/orbitAtDuty.ts';
import { periodicOrbit } from '../../../../generator/loop/cycle/periodicOrbit.ts';
import { buckRun, capacitorElements, plainTiming, straightStage } from './runs.ts';
import { eigenvalues, saltationMatrix } from './saltation.ts';

/** α of a run with constant slopes, from its own orbit. */
function ratio(up_V: number, down_V: number, ramp_V: number): number {
  const run = buckRun({ stage: straightStage(up_V, down_V), rampSlope_A_per_s: ramp_V / 10e-6 });
  return measuredCycleRatio(run, periodicOrbit(run)!, 1e-4);
}

/** Erickson & Maksimović, Fundamentals of Power Electronics, current-programmed control (from memory). */
describe('the measured cycle ratio', () => {
  it('is −D/D′ without a ramp', () => {
    expect(ratio(4, 6, 0)).toBeCloseTo(-1.5, 9);
    expect(ratio(10, 5, 0)).toBeCloseTo(-0.5, 9);
  });

  it('is −3/7 at D = 0.6 with a ramp of half the down slope', () => {
    expect(ratio(4, 6, 3)).toBeCloseTo(-3 / 7, 9);
  });

  it('is 0 with a ramp of the down slope, and settled after one cycle', () => {
    const run = buckRun({ stage: straightStage(4, 6), rampSlope_A_per_s: 6e5 });
    const orbit = periodicOrbit(run)!;
    expect(measuredCycleRatio(run, orbit, 0.05)).toBeCloseTo(0, 9);
    expect(measuredSettlingCycles(run, orbit, 0.05)).toBe(1);
  });

  it('is −1 at the edge of stability, where a perturbation goes on for ever', () => {
    const run = buckRun({ stage: straightStage(3, 9), rampSlope_A_per_s: 3e5 });
    const decay = perturbationDecay(run, periodicOrbit(run)!, 1e-3, 1000);
    expect(decay[1000]).toBeCloseTo(1e-3, 12);
    expect(decay[999]).toBeCloseTo(-1e-3, 12);
  });

  it('settles after as many cycles as the closed form says', () => {
    for (const ramp_V of [1, 2, 3.5, 9, 14]) {
      const run = buckRun({ stage: straightStage(6, 6), rampSlope_A_per_s: ramp_V / 10e-6 });
      const index = (6 + ramp_V) / 12;
      expect(measuredSettlingCycles(run, periodicOrbit(run)!, 1e-3)).toBe(settlingCycles(index));
    }
  });
});

/** A stage with its capacitor at a duty, its ramp a share of the down slope. */
function capacitorRun(elements: CapacitorStageElements, duty: number, slope_A_per_s: number) {
  const stage = capacitorStage(elements);
  const run = { ...buckRun({ rampSlope_A_per_s: slope_A_per_s, initial: [0, 0] }), stage };
  const { state, control_A } = orbitAtDuty(run, duty)!;
  const started = { ...run, initial: state, control_A };
  return { run: started, orbit: periodicOrbit(started)!, stage: stage as LinearStage };
}

describe('the measured cycle map with a real output capacitor', () => {
  const losses = { switch_ohm: 0.05, winding_ohm: 0.03, rectifier_ohm: 0.02, rectifierDrop_V: 0.4 };
  const cases = (['buck', 'boost', 'buck-boost'] as const).flatMap((kind) =>
    [
      capacitorElements(kind),
      capacitorElements(kind, losses),
      capacitorElements(kind, { capacitance_F: 4.7e-6, loadConductance_S: 0, loadCurrent_A: 1.3, ...losses }),
      capacitorElements(kind, { loadConductance_S: 0.2, loadCurrent_A: 0.8, seriesResistance_ohm: 0 }),
    ].map((elements): [string, CapacitorStageElements] => [kind, elements]),
  );

  it.each(cases)('has the eigenvalues of the saltation matrix: %s', (_, elements) => {
    for (const duty of [0.2, 0.5, 0.7])
      for (const slope of [1e5, 6e5, 2e6]) {
        const { run, orbit, stage } = capacitorRun(elements, duty, slope);
        const exact = saltationMatrix(stage, orbit.state, duty * 2e-6, 2e-6, slope);
        const measured = cycleJacobian(run, orbit);
        for (const [place, { re, im }] of eigenvalues(exact).entries()) {
          const own = eigenvalues(measured)[place]!;
          expect(Math.hypot(own.re - re, own.im - im)).toBeLessThan(1e-7);
        }
      }
  });

  it('of the published buck has the eigenvalues −0.224 and 0.944 at mc 1.5', () => {
    // Ridley, IEEE Trans. Power Electronics 6(2), 1991: the example's values, from memory; Q is 1 there.
    const elements = capacitorElements('buck', {
      inputVoltage_V: 11,
      inductance_H: 37.5e-6,
      capacitance_F: 400e-6,
      seriesResistance_ohm: 14e-3,
      loadConductance_S: 1,
    });
    const stage = capacitorStage(elements);
    const base = buckRun({
      rampSlope_A_per_s: (0.5 * 6) / 37.5e-6,
      initial: [5, 5],
      timing: { ...plainTiming, period_s: 20e-6 },
    });
    const run = { ...base, stage };
    const at = orbitAtDuty(run, 5 / 11)!;
    const started = { ...run, initial: at.state, control_A: at.control_A };
    const [slow, fast] = eigenvalues(cycleJacobian(started, periodicOrbit(started)!));
    expect(slow!.re).toBeCloseTo(-0.224, 3);
    expect(fast!.re).toBeCloseTo(0.944, 3);
  });
});
