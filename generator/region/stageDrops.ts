import { exactly, type Quantity } from '../base/Quantity.ts';
import type { Specification } from '../spec/Specification.ts';
import type { StageDrops } from './PowerStage.ts';

/** Drops of a nominal unit. */
export function nominalDrops({ losses, rectifierDrop_V }: Specification): StageDrops {
  return {
    rectifierDrop_V: rectifierDrop_V.nominal,
    switch_ohm: losses?.switch_ohm.nominal ?? 0,
    winding_ohm: losses?.winding_ohm.nominal ?? 0,
    rectifier_ohm: losses?.rectifier_ohm.nominal ?? 0,
  };
}

/**
 * A unit's drops: the rectifier's as it is, the resistances at a share of the way from low to high.
 *
 * The resistances move together, being heated together.
 */
export function dropsAt({ losses }: Specification, rectifierDrop_V: number, share: number): StageDrops {
  const between = (quantity?: Quantity) =>
    quantity === undefined ? 0 : quantity.low + share * (quantity.high - quantity.low);
  return {
    rectifierDrop_V,
    switch_ohm: between(losses?.switch_ohm),
    winding_ohm: between(losses?.winding_ohm),
    rectifier_ohm: between(losses?.rectifier_ohm),
  };
}

/** Whether any resistance has a tolerance: only then is there a way to go from low to high. */
export function lossesVary({ losses }: Specification): boolean {
  return losses !== null && Object.values(losses).some(({ low, high }) => low !== high);
}

/** The same specification with drops and losses as they are nominally. */
export function withNominalDrops(specification: Specification): Specification {
  const { losses, rectifierDrop_V } = specification;
  return {
    ...specification,
    rectifierDrop_V: exactly(rectifierDrop_V.nominal),
    losses: losses && {
      switch_ohm: exactly(losses.switch_ohm.nominal),
      winding_ohm: exactly(losses.winding_ohm.nominal),
      rectifier_ohm: exactly(losses.rectifier_ohm.nominal),
    },
  };
}
