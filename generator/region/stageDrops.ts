import type { Quantity } from '../base/Quantity.ts';
import type { Specification } from '../spec/Specification.ts';
import type { StageDrops } from './PowerStage.ts';

type Corner = 'low' | 'high';

/** Drops of a nominal unit. */
export function nominalDrops(specification: Specification): StageDrops {
  return dropsAt(specification, 'nominal', 'nominal');
}

/**
 * The corners of rectifier drop and conduction losses.
 *
 * For a fixed point the damping index is linear-fractional in each of them, so that its extremes are
 * at these corners; the resistances move together, being heated together.
 */
export function dropCorners(specification: Specification): readonly StageDrops[] {
  const corners: Corner[] = ['low', 'high'];
  const all = corners.flatMap((drop) => corners.map((losses) => dropsAt(specification, drop, losses)));
  const keys = all.map((drops) => JSON.stringify(drops));
  return all.filter((_, index) => keys.indexOf(keys[index]!) === index);
}

function dropsAt(specification: Specification, drop: keyof Quantity, resistance: keyof Quantity): StageDrops {
  const { losses, rectifierDrop_V } = specification;
  return {
    rectifierDrop_V: rectifierDrop_V[drop],
    switch_ohm: losses?.switch_ohm[resistance] ?? 0,
    winding_ohm: losses?.winding_ohm[resistance] ?? 0,
    rectifier_ohm: losses?.rectifier_ohm[resistance] ?? 0,
  };
}
