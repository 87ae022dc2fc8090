import { fixedNumber } from '../../text/fixedNumber.ts';
import { inductorLines, type StageConditions, type StageLines, switchModels } from './StageLines.ts';

/** Inverting buck-boost, its output below ground, its rectifier the switch's complement. */
export function buckBoostLines(conditions: StageConditions): StageLines {
  const { drops } = conditions;
  return {
    what: 'inverting buck-boost',
    lines: [
      'Sswitch vin switch gate 0 sw_switch',
      ...inductorLines('switch', conditions),
      'Vsense shifted 0 0',
      'Srectifier below switch one gate sw_rectifier',
      `Vdrop out below ${fixedNumber(drops.rectifierDrop_V)}`,
      `Vout 0 out ${fixedNumber(conditions.outputVoltage_V, 9)}`,
    ],
    models: switchModels(drops),
  };
}
