import { fixedNumber } from '../../text/fixedNumber.ts';
import {
  inductorLines,
  type StageConditions,
  type StageLines,
  solvableDrops,
  stageEquations,
  switchModels,
} from './StageLines.ts';

/** Buck with its rectifier as the switch's complement, so that conduction is continuous at any load. */
export function buckLines(conditions: StageConditions): StageLines {
  const { inputVoltage_V, outputVoltage_V, inductance_H } = conditions;
  const drops = solvableDrops(conditions);
  return {
    what: 'buck',
    lines: (initialCurrent_A) => [
      'Sswitch vin switch gate 0 sw_switch',
      'Srectifier below switch one gate sw_rectifier',
      `Vdrop 0 below ${fixedNumber(drops.rectifierDrop_V)}`,
      ...inductorLines('switch', inductance_H, drops.winding_ohm, initialCurrent_A),
      'Vsense shifted out 0',
      `Vout out 0 ${fixedNumber(outputVoltage_V, 9)}`,
    ],
    models: switchModels(drops),
    equations: stageEquations(conditions, drops, {
      up_V: inputVoltage_V - outputVoltage_V,
      down_V: outputVoltage_V + drops.rectifierDrop_V,
    }),
  };
}
