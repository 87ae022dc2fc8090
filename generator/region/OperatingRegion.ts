import type { Interval } from '../base/Quantity.ts';
import type { InductorVoltages, OperatingPoint, PowerStage, StageDrops } from './PowerStage.ts';

/** An operating point with what the inner loop sees there. */
export interface RegionPoint extends OperatingPoint, InductorVoltages {
  /** U = up + down [V]. */
  readonly swing_V: number;
  readonly duty: number;
  readonly drops: StageDrops;
  /** Which of the spec's outputs it belongs to. */
  readonly outputIndex: number;
}

/** A part of the asked-for region in which the converter cannot regulate, and why. */
export interface RegionCut {
  readonly reason: string;
  readonly inputVoltage_V: readonly [number, number];
  readonly outputVoltage_V: readonly [number, number] | null;
  readonly limitDuty: number;
  /** Peak inductor current where pulses are skipped [A]; null elsewhere and without an inductance. */
  readonly peakCurrent_A: number | null;
}

/** Everything in which the converter can find itself. */
export interface OperatingRegion {
  readonly stage: PowerStage;
  readonly inputVoltage_V: Interval;
  /** Null: not known, every duty up to the maximum. */
  readonly outputVoltage_V: Interval | null;
  readonly duty: Interval;
  /** The vertices of the region: every figure that is linear-fractional in the point is extreme at one. */
  readonly vertices: readonly RegionPoint[];
  readonly cuts: readonly RegionCut[];
}

/** The point with its inductor voltages, swing and duty; written out, for extremes take millions of them. */
export function regionPoint(
  stage: PowerStage,
  point: OperatingPoint,
  drops: StageDrops,
  outputIndex: number,
): RegionPoint {
  const { up_V, down_V } = stage.inductorVoltages(point, drops);
  const swing_V = up_V + down_V;
  return {
    inputVoltage_V: point.inputVoltage_V,
    outputVoltage_V: point.outputVoltage_V,
    loadCurrent_A: point.loadCurrent_A,
    up_V,
    down_V,
    swing_V,
    duty: down_V / swing_V,
    drops,
    outputIndex,
  };
}
