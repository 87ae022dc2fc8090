import type { CycleRun, IdealOutputStage } from '../../../../generator/loop/cycle/CycleRun.ts';
import type { CapacitorStageElements } from '../../../../generator/loop/cycle/capacitorStage.ts';

/** 2 µs, no delay, no blanking, current in both directions. */
export const plainTiming = {
  period_s: 2e-6,
  maximumDuty: 1,
  minimumOnTime_s: 0,
  comparatorDelay_s: 0,
  skipsPulses: false,
  rectifies: false,
} as const;

/** 10 µH between the two voltages, no resistance. */
export function straightStage(up_V: number, down_V: number): IdealOutputStage {
  return { kind: 'ideal-output', inductance_H: 10e-6, up_V, down_V, up_ohm: 0, down_ohm: 0 };
}

/** A 12 V to 5 V buck at 3 A, started anywhere; ramp, limit and events to be given where they matter. */
export function buckRun(overrides: Partial<CycleRun> = {}): CycleRun {
  return {
    stage: straightStage(7, 5),
    rampSlope_A_per_s: 0,
    rampPerOutputVolt_A_per_Vs: 0,
    internalSlope_A_per_s: 0,
    control_A: 3,
    limit: null,
    timing: plainTiming,
    cycles: 50,
    initial: [2],
    ...overrides,
  };
}

/** 12 V in, 10 µH, 22 µF, 4 mΩ, load of 1.7 Ω; losses only where given. */
export function capacitorElements(
  kind: CapacitorStageElements['kind'],
  overrides: Partial<CapacitorStageElements> = {},
): CapacitorStageElements {
  return {
    kind,
    inputVoltage_V: 12,
    rectifierDrop_V: 0,
    inductance_H: 10e-6,
    capacitance_F: 22e-6,
    seriesResistance_ohm: 4e-3,
    switch_ohm: 0,
    winding_ohm: 0,
    rectifier_ohm: 0,
    loadConductance_S: 1 / 1.7,
    loadCurrent_A: 0,
    ...overrides,
  };
}
