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
 * `inductorVoltages` has to be linear in each voltage, current, drop and resistance: the extremes of the
 * damping index are then at the vertices of the region, which is how they are found.
 */
export interface PowerStage {
  readonly kind: ConverterKind;
  inductorVoltages(point: OperatingPoint, drops: StageDrops): InductorVoltages;
}
