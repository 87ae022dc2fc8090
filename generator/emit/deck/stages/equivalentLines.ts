import { fixedNumber } from '../../text/fixedNumber.ts';
import {
  inductorLines,
  type StageConditions,
  type StageLines,
  solvableDrops,
  stageEquations,
  switchModels,
} from './StageLines.ts';

/**
 * The inductor of any stage between the two voltages that it sees, losses at the load in them.
 *
 * SEPIC and Ćuk with ideal coupling capacitors, flyback and forward through an ideal transformer come to
 * this for the inner current loop; the windings and capacitors themselves are not in the deck.
 */
export function equivalentLines(conditions: StageConditions): StageLines {
  const lossless = { ...conditions.drops, switch_ohm: 0, winding_ohm: 0, rectifier_ohm: 0 };
  const drops = solvableDrops({ ...conditions, drops: lossless });
  return {
    what: 'the inductor between the voltages that it sees, referred to itself',
    lines: (initialCurrent_A) => [
      `Vup up 0 ${fixedNumber(conditions.up_V, 9)}`,
      `Vdown 0 down ${fixedNumber(conditions.down_V, 9)}`,
      'Sswitch up switch gate 0 sw_switch',
      'Srectifier down switch one gate sw_rectifier',
      ...inductorLines('switch', conditions.inductance_H, drops.winding_ohm, initialCurrent_A),
      'Vsense shifted 0 0',
      ...magnetizingLines(conditions.magnetizing),
    ],
    models: [
      ...switchModels(drops),
      ...(conditions.magnetizing === null ? [] : ['.model dreset D(is=1e-14 n=1)']),
    ],
    equations: stageEquations(conditions, drops, conditions),
  };
}

/** The magnetizing current, referred to the inductor, sensed with it and reset while the switch is off. */
function magnetizingLines(magnetizing: StageConditions['magnetizing']): string[] {
  if (magnetizing === null) return [];
  return [
    `Vfree free 0 ${fixedNumber(magnetizing.rise_V, 9)}`,
    'Smag free mag gate 0 sw_switch',
    `Lmag mag shifted ${fixedNumber(magnetizing.inductance_H)} IC=0`,
    'Dmag back mag dreset',
    `Vback 0 back ${fixedNumber(magnetizing.reset_V, 9)}`,
  ];
}
