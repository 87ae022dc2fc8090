import { fixedNumber } from '../../text/fixedNumber.ts';
import { inductorLines, type StageConditions, type StageLines, switchModels } from './StageLines.ts';

/** Boost with its rectifier as the switch's complement; the sensed current is the inductor's. */
export function boostLines(conditions: StageConditions): StageLines {
  const { drops } = conditions;
  return {
    what: 'boost',
    lines: [
      ...inductorLines('vin', conditions),
      'Vsense shifted switch 0',
      'Sswitch switch 0 gate 0 sw_switch',
      'Srectifier switch above one gate sw_rectifier',
      `Vdrop above out ${fixedNumber(drops.rectifierDrop_V)}`,
      `Vout out 0 ${fixedNumber(conditions.outputVoltage_V, 9)}`,
    ],
    models: switchModels(drops),
  };
}
