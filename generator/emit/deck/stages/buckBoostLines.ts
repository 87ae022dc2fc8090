import { fixedNumber } from '../../text/fixedNumber.ts';
import {
  inductorLines,
  type StageConditions,
  type StageLines,
  solvableDrops,
  stageEquations,
  switchModels,
} from './StageLines.ts';

/** Inverting buck-boost, its output below ground, its rectifier the switch's complement. */
export function buckBoostLines(conditions: StageConditions): StageLines {
  const { inputVoltage_V, outputVoltage_V, inductance_H } = conditions;
  const drops = solvableDrops(conditions);
  return {
    what: 'inverting buck-boost',
    lines: (initialCurrent_A) => [
      'Sswitch vin switch gate 0 sw_switch',
      ...inductorLines('switch', inductance_H, drops.winding_ohm, initialCurrent_A),
      'Vsense shifted 0 0',
      'Srectifier below switch one gate sw_rectifier',
      `Vdrop out below ${fixedNumber(drops.rectifierDrop_V)}`,
      `Vout 0 out ${fixedNumber(outputVoltage_V, 9)}`,
    ],
    models: switchModels(drops),
    equations: stageEquations(conditions, drops, {
      up_V: inputVoltage_V,
      down_V: outputVoltage_V + drops.rectifierDrop_V,
    }),
  };
}
