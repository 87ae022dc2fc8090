import type { InductorVoltages, StageDrops } from '../../../region/PowerStage.ts';
import type { ConverterKind } from '../../../spec/Specification.ts';
import { fixedNumber } from '../../text/fixedNumber.ts';
import type { DeckStage } from '../deckOrbit.ts';
import { boostLines } from './boostLines.ts';
import { buckBoostLines } from './buckBoostLines.ts';
import { buckLines } from './buckLines.ts';
import { equivalentLines } from './equivalentLines.ts';

/** What a power stage needs to be drawn up for a deck. */
export interface StageConditions extends InductorVoltages {
  readonly inputVoltage_V: number;
  readonly outputVoltage_V: number;
  readonly inductance_H: number;
  readonly period_s: number;
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
  /** @param initialCurrent_A of the inductor */
  lines(initialCurrent_A: number): readonly string[];
  readonly models: readonly string[];
  /** What the lines amount to between two switching instants, every resistance of theirs included. */
  readonly equations: DeckStage;
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

/** Most that a switch or a winding without a resistance gets: small against every load [Ω]. */
const idealHigh_ohm = 1e-3;
/** Its share of L/T: a cycle's decay of the current by it is one part in ten thousand. */
const idealShare = 1e-4;

/** The drops with what the solvers need where a switch or a winding was given none. */
export function solvableDrops({ drops, inductance_H, period_s }: StageConditions): StageDrops {
  const ideal_ohm = Number(Math.min(idealHigh_ohm, (idealShare * inductance_H) / period_s).toPrecision(1));
  return {
    ...drops,
    switch_ohm: Math.max(drops.switch_ohm, ideal_ohm),
    rectifier_ohm: Math.max(drops.rectifier_ohm, ideal_ohm),
    winding_ohm: Math.max(drops.winding_ohm, ideal_ohm / 1000),
  };
}

/** The stage's equations from the voltage across the inductor without resistances, rising and falling. */
export function stageEquations(
  { inductance_H, period_s }: StageConditions,
  { switch_ohm, winding_ohm, rectifier_ohm }: StageDrops,
  { up_V, down_V }: InductorVoltages,
): DeckStage {
  return {
    on: { voltage_V: up_V, ohm: switch_ohm + winding_ohm },
    off: { voltage_V: -down_V, ohm: rectifier_ohm + winding_ohm },
    inductance_H,
    period_s,
  };
}

/** A pair of switches, one the complement of the other: both look at the same node at the same instant. */
export function switchModels({ switch_ohm, rectifier_ohm }: StageDrops): string[] {
  const model = (name: string, ohm: number) =>
    `.model ${name} SW(vt=0.5 vh=0 ron=${fixedNumber(ohm)} roff=1e6)`;
  return [model('sw_switch', switch_ohm), model('sw_rectifier', rectifier_ohm)];
}

/** The inductor with its initial current and its winding's resistance, from a node to `wound`. */
export function inductorLines(
  from: string,
  inductance_H: number,
  winding_ohm: number,
  initialCurrent_A: number,
): string[] {
  return [
    `L1 ${from} coil ${fixedNumber(inductance_H)} IC=${fixedNumber(initialCurrent_A, 6)}`,
    `Rwinding coil wound ${fixedNumber(winding_ohm)}`,
  ];
}
