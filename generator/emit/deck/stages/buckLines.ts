import { fixedNumber } from '../../text/fixedNumber.ts';
import { inductorLines, type StageConditions, type StageLines, switchModels } from './StageLines.ts';

/** Buck with its rectifier as the switch's complement, so that conduction is continuous at any load. */
export function buckLines(conditions: StageConditions): StageLines {
  const { drops } = conditions;
  return {
    what: 'buck',
    lines: [
      'Sswitch vin switch gate 0 sw_switch',
      'Srectifier below switch one gate sw_rectifier',
      `Vdrop 0 below ${fixedNumber(drops.rectifierDrop_V)}`,
      ...inductorLines('switch', conditions),
      'Vsense shifted out 0',
      `Vout out 0 ${fixedNumber(conditions.outputVoltage_V, 9)}`,
    ],
    models: switchModels(drops),
  };
}
