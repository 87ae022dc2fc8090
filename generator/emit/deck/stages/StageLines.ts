import type { InductorVoltages, StageDrops } from '../../../region/PowerStage.ts';
import type { ConverterKind } from '../../../spec/Specification.ts';
import { fixedNumber } from '../../text/fixedNumber.ts';
import { boostLines } from './boostLines.ts';
import { buckBoostLines } from './buckBoostLines.ts';
import { buckLines } from './buckLines.ts';
import { equivalentLines } from './equivalentLines.ts';

/** What a power stage needs to be drawn up for a deck. */
export interface StageConditions extends InductorVoltages {
  readonly inputVoltage_V: number;
  readonly outputVoltage_V: number;
  readonly inductance_H: number;
  readonly initialCurrent_A: number;
  readonly drops: StageDrops;
  /** A transformer's magnetizing inductance with the voltages that its current rises and falls by; null: none. */
  readonly magnetizing: {
    readonly inductance_H: number;
    readonly rise_V: number;
    readonly reset_V: number;
  } | null;
}

/**
 * A power stage as netlist lines, in the portable subset.
 *
 * It carries `L1` from the switching node to `coil`, the pulse source between `wound` and `shifted`,
 * `Vsense` in the path of the inductor current, and switches driven by node `gate` (1 V on, 0 V off).
 */
export interface StageLines {
  /** In words, for the deck's head. */
  readonly what: string;
  readonly lines: readonly string[];
  readonly models: readonly string[];
}

const stages: Record<ConverterKind, (conditions: StageConditions) => StageLines> = {
  buck: buckLines,
  boost: boostLines,
  'buck-boost': buckBoostLines,
  sepic: equivalentLines,
  cuk: equivalentLines,
  flyback: equivalentLines,
  forward: equivalentLines,
};

export function stageLines(kind: ConverterKind, conditions: StageConditions): StageLines {
  return stages[kind](conditions);
}

/** Resistance of a switch that was given none [Ω]: small against every load, large enough for the solvers. */
const idealSwitch_ohm = 1e-3;
/** Resistance of a winding that was given none [Ω]. */
const idealWinding_ohm = 1e-6;

/** A pair of switches, one the complement of the other: both look at the same node at the same instant. */
export function switchModels({ switch_ohm, rectifier_ohm }: StageDrops): string[] {
  const model = (name: string, ohm: number) =>
    `.model ${name} SW(vt=0.5 vh=0 ron=${fixedNumber(Math.max(ohm, idealSwitch_ohm))} roff=1e6)`;
  return [model('sw_switch', switch_ohm), model('sw_rectifier', rectifier_ohm)];
}

/** The inductor with its initial current and its winding's resistance, from a node to `wound`. */
export function inductorLines(from: string, conditions: StageConditions): string[] {
  const { inductance_H, initialCurrent_A, drops } = conditions;
  return [
    `L1 ${from} coil ${fixedNumber(inductance_H)} IC=${fixedNumber(initialCurrent_A, 6)}`,
    `Rwinding coil wound ${fixedNumber(Math.max(drops.winding_ohm, idealWinding_ohm))}`,
  ];
}
