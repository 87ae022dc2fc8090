import type { ConverterKind } from '../spec/Specification.ts';

/** Where a converter stands: voltages as magnitudes, in continuous conduction. */
export interface OperatingPoint {
  readonly inputVoltage_V: number;
  readonly outputVoltage_V: number;
  /** 0 where the load is not known: losses then do not count. */
  readonly loadCurrent_A: number;
}

/** The drops of a stage: one corner of their tolerances. */
export interface StageDrops {
  readonly rectifierDrop_V: number;
  readonly switch_ohm: number;
  readonly winding_ohm: number;
  readonly rectifier_ohm: number;
}

/** Inductor voltage while the current rises and while it falls [V]; both count positive. */
export interface InductorVoltages {
  readonly up_V: number;
  readonly down_V: number;
}

/**
 * What a converter is to its inner current loop.
 *
 * Everything else follows: m1 = up/L, m2 = down/L, D = down/(up + down), and the swing U = up + down.
 */
export interface PowerStage {
  readonly kind: ConverterKind;
  /**
   * Linear in the voltages where losses do not count: the extremes of the damping index are then at the
   * vertices of the region. With losses the duty falls with the input, rises with the output and with
   * the load, which keeps them there.
   */
  inductorVoltages(point: OperatingPoint, drops: StageDrops): InductorVoltages;
  /** Mean inductor current over load current at a duty. */
  currentRatio(duty: number): number;
  /**
   * Inductor-referred voltage that makes the magnetizing current rise [V], 0 without a transformer in the
   * sensed path: the compensation that comes free is this over the magnetizing inductance.
   */
  freeRamp_V(point: OperatingPoint): number;
}
