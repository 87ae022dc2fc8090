import { describe, expect, it } from 'vitest';
import { endings } from '../../../../generator/loop/cycle/CycleRun.ts';
import { capacitorStage } from '../../../../generator/loop/cycle/capacitorStage.ts';
import { orbitAtDuty } from '../../../../generator/loop/cycle/orbitAtDuty.ts';
import { periodicOrbit } from '../../../../generator/loop/cycle/periodicOrbit.ts';
import { sampleCycles } from '../../../../generator/loop/cycle/sampleCycles.ts';
import { buckRun, capacitorElements, plainTiming, straightStage } from './runs.ts';

describe('a periodic orbit', () => {
  it('has the duty of the slopes, stable or not', () => {
    for (const down_V of [1, 3, 6, 9]) {
      const run = buckRun({ stage: straightStage(10 - down_V, down_V) });
      expect(periodicOrbit(run)!.cycle.onTime_s[0]! / 2e-6).toBeCloseTo(down_V / 10, 12);
    }
  });

  it('is found from where the comparator never trips', () => {
    const run = buckRun({ rampSlope_A_per_s: 3e5, control_A: 9, initial: [-4] });
    const { state, cycle } = periodicOrbit(run)!;
    expect(cycle.ending[0]).toBe(endings.comparator);
    expect(cycle.edges[0]![1]).toBeCloseTo(state[0]!, 12);
  });

  it('comes with the control level for a wanted peak and for a wanted mean', () => {
    const run = buckRun({ rampSlope_A_per_s: 3e5 });
    const ripple_A = 7e5 * (5 / 12) * 2e-6;
    const ofPeak = periodicOrbit(run, { quantity: 'peak', value: 3.4 })!;
    expect(ofPeak.control_A).toBeCloseTo(3.4 + 3e5 * (5 / 12) * 2e-6, 11);
    const ofMean = periodicOrbit(run, { quantity: 'mean', state: 0, value: 3.4 })!;
    expect(ofMean.cycle.peak_A[0]).toBeCloseTo(3.4 + ripple_A / 2, 11);
  });

  it('with a real capacitor meets a wanted output, loss or none', () => {
    for (const kind of ['buck', 'boost', 'buck-boost'] as const) {
      const wanted_V = kind === 'boost' ? 20 : 5;
      const elements = capacitorElements(kind, { switch_ohm: 0.05, winding_ohm: 0.03, rectifierDrop_V: 0.3 });
      const run = {
        ...buckRun({ rampSlope_A_per_s: 6e5, initial: [3, wanted_V], control_A: 5 }),
        stage: capacitorStage(elements),
      };
      const guess = orbitAtDuty(run, kind === 'boost' ? 0.45 : 0.35)!;
      const orbit = periodicOrbit(
        { ...run, initial: guess.state, control_A: guess.control_A },
        { quantity: 'mean', state: 1, value: wanted_V },
      )!;
      expect(orbit.cycle.means[1]![0]).toBeCloseTo(wanted_V, 10);
      expect(orbit.cycle.edges[1]![1]).toBeCloseTo(orbit.state[1]!, 10);
    }
  });

  it('is none where the wanted peak is out of reach', () => {
    const timing = { ...plainTiming, rectifies: true };
    expect(periodicOrbit(buckRun({ timing }), { quantity: 'peak', value: -1 })).toBeNull();
  });

  it('balances charge and energy: what comes in is what the load takes', () => {
    const I = 1.3;
    for (const kind of ['buck', 'boost', 'buck-boost'] as const) {
      const elements = capacitorElements(kind, {
        loadConductance_S: 0,
        loadCurrent_A: I,
        seriesResistance_ohm: 0,
        winding_ohm: 1e-3,
      });
      const run = {
        ...buckRun({ rampSlope_A_per_s: 8e5, initial: [0, 0] }),
        stage: capacitorStage(elements),
      };
      const at = orbitAtDuty(run, 0.4)!;
      const { cycle } = periodicOrbit({ ...run, initial: at.state, control_A: at.control_A })!;
      const T = 2e-6;
      const all_C = cycle.means[0]![0]! * T;
      const on_C = cycle.onCharge_C[0]!;
      expect(kind === 'buck' ? all_C : all_C - on_C).toBeCloseTo(I * T, 15);

      const input_J = 12 * (kind === 'boost' ? all_C : on_C);
      const output_J = I * cycle.means[1]![0]! * T;
      const { time_s, states } = sampleCycles(
        { ...run, initial: at.state, control_A: at.control_A, cycles: 1 },
        0,
        400,
      );
      let squares = 0;
      for (let k = 1; k < time_s.length; k += 1) {
        const [a, b] = [states[0]![k - 1]!, states[0]![k]!];
        squares += ((a * a + a * b + b * b) / 3) * (time_s[k]! - time_s[k - 1]!);
      }
      expect((input_J - output_J - 1e-3 * squares) / input_J).toBeCloseTo(0, 7);
    }
  });

  it('at light load begins to be discontinuous where the load is half of the ripple', () => {
    const timing = { ...plainTiming, rectifies: true };
    const half_A = (7e5 * (5 / 12) * 2e-6) / 2;
    const conduction = (load_A: number) => {
      const run = buckRun({ timing, rampSlope_A_per_s: 2e5, control_A: 0.7, initial: [0.01] });
      return periodicOrbit(run, { quantity: 'mean', state: 0, value: load_A })!.cycle.conduction_s[0]!;
    };
    expect(conduction(half_A * 1.0001)).toBe(2e-6);
    expect(conduction(half_A * 0.99)).toBeCloseTo(2e-6 * Math.sqrt(0.99), 12);
  });
});
