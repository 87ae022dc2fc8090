import type { StageDrops } from '../../../region/PowerStage.ts';
import { fixedNumber } from '../../text/fixedNumber.ts';

/** What a power stage needs to be drawn up for a deck. */
export interface StageConditions {
  readonly inputVoltage_V: number;
  readonly outputVoltage_V: number;
  readonly inductance_H: number;
  readonly initialCurrent_A: number;
  readonly drops: StageDrops;
}

/**
 * A power stage as netlist lines, in the portable subset.
 *
 * It carries `L1` from the switching node, the pulse source between `wound` and `shifted`, `Vsense` in
 * the path of the sensed current, and switches driven by node `gate` (1 V on, 0 V off).
 */
export interface StageLines {
  readonly lines: readonly string[];
  readonly models: readonly string[];
}

/** Resistance of a switch that was given none [Ω]: small against every load, large enough for the solvers. */
const idealSwitch_ohm = 1e-3;

/** A pair of switches, one the complement of the other: both look at the same node at the same instant. */
export function switchModels({ switch_ohm, rectifier_ohm }: StageDrops): string[] {
  const model = (name: string, ohm: number) =>
    `.model ${name} SW(vt=0.5 vh=0 ron=${fixedNumber(Math.max(ohm, idealSwitch_ohm))} roff=1e6)`;
  return [model('sw_switch', switch_ohm), model('sw_rectifier', rectifier_ohm)];
}
