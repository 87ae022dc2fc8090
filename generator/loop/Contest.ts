import type { LoopCorners } from '../law/loopCorners.ts';
import type { OperatingRegion } from '../region/OperatingRegion.ts';
import type { Specification } from '../spec/Specification.ts';
import type { ComparedLaw } from './compareLaws.ts';

/** How much less over-compensation is worth a more elaborate law where all are above the ceiling. */
export const worthwhile = 1.1;

/** Laws at their least gains, and the ones that a verdict speaks of. */
export interface Contest {
  readonly specification: Specification;
  readonly region: OperatingRegion;
  readonly corners: LoopCorners;
  /** From the one that senses least to the one that senses most. */
  readonly compared: readonly ComparedLaw[];
  readonly fixed: ComparedLaw;
  readonly best: ComparedLaw;
  readonly preferred: ComparedLaw;
}

/**
 * The simplest law that stays below the ceiling; where none does, the simplest one that over-compensates
 * hardly more than the best.
 */
export function contestOf(
  specification: Specification,
  region: OperatingRegion,
  corners: LoopCorners,
  compared: readonly ComparedLaw[],
): Contest {
  const fixed = compared.find(({ law }) => law.kind === 'fixed')!;
  const best = compared.reduce((a, b) => (indexMax(b) < indexMax(a) ? b : a));
  const bound = Math.max(specification.goal.ceilingIndex, worthwhile * indexMax(best));
  const preferred = compared.find((law) => indexMax(law) <= bound)!;
  return { specification, region, corners, compared, fixed, best, preferred };
}

export function indexMax({ extremes }: ComparedLaw): number {
  return extremes.max.dampingIndex;
}
