import type { OperatingPoint, PowerStage, StageDrops } from '../../region/PowerStage.ts';
import type { IdealOutputStage } from './CycleRun.ts';

/** Resistance in the current's path while it rises and while it falls, in the inductor's frame [Ω]. */
export interface PathResistance {
  readonly up_ohm: number;
  readonly down_ohm: number;
}

/**
 * Any converter, its output held by an ideal source.
 *
 * Without `path` the slopes are constant, with the conduction losses of the load current in them, as the
 * closed forms have it. With it the losses follow the current: voltages at no load, and resistances.
 */
export function idealOutputStage(
  stage: PowerStage,
  point: OperatingPoint,
  drops: StageDrops,
  inductance_H: number,
  path?: PathResistance,
): IdealOutputStage {
  const at = path === undefined ? point : { ...point, loadCurrent_A: 0 };
  const { up_V, down_V } = stage.inductorVoltages(at, drops);
  return {
    kind: 'ideal-output',
    inductance_H,
    up_V,
    down_V,
    up_ohm: path?.up_ohm ?? 0,
    down_ohm: path?.down_ohm ?? 0,
  };
}
