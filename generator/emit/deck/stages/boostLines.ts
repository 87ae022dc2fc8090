import { fixedNumber } from '../../text/fixedNumber.ts';
import {
  inductorLines,
  type StageConditions,
  type StageLines,
  solvableDrops,
  stageEquations,
  switchModels,
} from './StageLines.ts';

/** Boost with its rectifier as the switch's complement; the sensed current is the inductor's. */
export function boostLines(conditions: StageConditions): StageLines {
  const { inputVoltage_V, outputVoltage_V, inductance_H } = conditions;
  const drops = solvableDrops(conditions);
  return {
    what: 'boost',
    lines: (initialCurrent_A) => [
      ...inductorLines('vin', inductance_H, drops.winding_ohm, initialCurrent_A),
      'Vsense shifted switch 0',
      'Sswitch switch 0 gate 0 sw_switch',
      'Srectifier switch above one gate sw_rectifier',
      `Vdrop above out ${fixedNumber(drops.rectifierDrop_V)}`,
      `Vout out 0 ${fixedNumber(outputVoltage_V, 9)}`,
    ],
    models: switchModels(drops),
    equations: stageEquations(conditions, drops, {
      up_V: inputVoltage_V,
      down_V: outputVoltage_V + drops.rectifierDrop_V - inputVoltage_V,
    }),
  };
}
