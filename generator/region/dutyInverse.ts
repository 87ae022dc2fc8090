import { bisect } from '../base/bisect.ts';
import type { OperatingPoint, PowerStage, StageDrops } from './PowerStage.ts';

/** down − D·U [V]: positive where the point needs more duty. */
export function dutyExcess_V(
  stage: PowerStage,
  point: OperatingPoint,
  drops: StageDrops,
  duty: number,
): number {
  const { up_V, down_V } = stage.inductorVoltages(point, drops);
  return down_V - duty * (up_V + down_V);
}

/** Input at which an output needs a duty; the duty falls with the input. */
export function inputAtDuty(
  stage: PowerStage,
  point: OperatingPoint,
  drops: StageDrops,
  duty: number,
): number {
  const far = 1e4 * (point.inputVoltage_V + point.outputVoltage_V);
  return -bisect(
    (mirrored) => dutyExcess_V(stage, { ...point, inputVoltage_V: -mirrored }, drops, duty),
    -far,
    0,
  );
}

/** Output that a duty gives; the duty rises with the output. Negative where the drops alone ask for more. */
export function outputAtDuty(
  stage: PowerStage,
  point: OperatingPoint,
  drops: StageDrops,
  duty: number,
): number {
  const lost_V =
    drops.rectifierDrop_V +
    point.loadCurrent_A * (drops.switch_ohm + drops.winding_ohm + drops.rectifier_ohm);
  return bisect(
    (outputVoltage_V) => dutyExcess_V(stage, { ...point, outputVoltage_V }, drops, duty),
    -lost_V,
    1e4 * point.inputVoltage_V,
  );
}
