import { describe, expect, it } from 'vitest';
import { capacitorStage } from '../../../../generator/loop/cycle/capacitorStage.ts';
import { idealOutputStage } from '../../../../generator/loop/cycle/idealOutputStage.ts';
import { periodicOrbit } from '../../../../generator/loop/cycle/periodicOrbit.ts';
import { runCycles } from '../../../../generator/loop/cycle/runCycles.ts';
import { buck } from '../../../../generator/region/converters/buck.ts';
import { buckRun, capacitorElements } from './runs.ts';

const point = { inputVoltage_V: 6, outputVoltage_V: 5, loadCurrent_A: 3 };
const drops = { rectifierDrop_V: 0.4, switch_ohm: 0.06, winding_ohm: 0.04, rectifier_ohm: 0 };

describe('a stage with an ideal output', () => {
  it('carries the losses of the load current in constant slopes', () => {
    expect(idealOutputStage(buck, point, drops, 10e-6)).toEqual({
      kind: 'ideal-output',
      inductance_H: 10e-6,
      up_V: 6 - 5 - 0.3,
      down_V: 5 + 0.4 + 0.12,
      up_ohm: 0,
      down_ohm: 0,
    });
  });

  it('lets the losses follow the current where a path is given, with the same duty near the load', () => {
    const path = { up_ohm: 0.1, down_ohm: 0.04 };
    const followed = idealOutputStage(buck, point, drops, 10e-6, path);
    expect(followed).toMatchObject({ up_V: 1, down_V: 5.4, ...path });
    const duty = (stage: typeof followed) =>
      periodicOrbit(buckRun({ stage, rampSlope_A_per_s: 5e5 }), { quantity: 'mean', state: 0, value: 3 })!
        .cycle.onTime_s[0]! / 2e-6;
    expect(duty(followed)).toBeCloseTo(5.52 / (0.7 + 5.52), 3);
    expect(duty(idealOutputStage(buck, point, drops, 10e-6))).toBeCloseTo(5.52 / (0.7 + 5.52), 12);
  });

  it('is what a stage with a very large capacitor becomes', () => {
    const elements = { capacitance_F: 10, seriesResistance_ohm: 0, loadConductance_S: 0 };
    for (const [kind, up_V, down_V] of [
      ['buck', 7, 5],
      ['boost', 12, 8],
      ['buck-boost', 12, 5],
    ] as const) {
      const output_V = kind === 'boost' ? 20 : 5;
      const stage = capacitorStage(capacitorElements(kind, elements));
      const run = buckRun({ rampSlope_A_per_s: 4e5, cycles: 10 });
      const real = runCycles({ ...run, stage, initial: [2, output_V] });
      const ideal = runCycles({
        ...run,
        stage: { kind: 'ideal-output', inductance_H: 10e-6, up_V, down_V, up_ohm: 0, down_ohm: 0 },
      });
      for (let n = 0; n < 10; n += 1) expect(real.peak_A[n]).toBeCloseTo(ideal.peak_A[n]!, 5);
    }
  });
});

describe('a ramp that follows the output', () => {
  it('takes its slope from the output at each clock edge', () => {
    const elements = capacitorElements('buck', { seriesResistance_ohm: 0 });
    const run = {
      ...buckRun({ rampSlope_A_per_s: 1e5, rampPerOutputVolt_A_per_Vs: 8e4, cycles: 12, initial: [2, 4] }),
      stage: capacitorStage(elements),
    };
    const { edges, peak_A, onTime_s } = runCycles(run);
    for (let n = 0; n < 12; n += 1) {
      const slope = 1e5 + 8e4 * edges[1]![n]!;
      expect(peak_A[n]! + slope * onTime_s[n]!).toBeCloseTo(3, 10);
    }
  });
});
