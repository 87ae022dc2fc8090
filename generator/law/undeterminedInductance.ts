import type { Problem } from '../base/Problem.ts';
import type { ReadSpecification } from '../spec/readSpecification.ts';
import { hasInductance, type LoopCorners } from './loopCorners.ts';

/** Why an inductance that follows the ripple is none: at a duty of nothing, or of one, there is no ripple. */
export function undeterminedInductance(
  { specification, place }: ReadSpecification,
  corners: LoopCorners,
): Problem[] {
  if (!hasInductance(corners) || corners.referenceInductance_H > 0) return [];
  const key = specification.output_V === null ? 'output' : 'inductance';
  return [
    {
      code: 'inductance-undetermined',
      severity: 'error',
      key,
      place: place(key) ?? place('inductance.ripple') ?? place('inductance'),
      expected: 'an inductance that the ripple determines at every duty of the region',
      received: 'duties of nothing or of one, at which the current has no ripple',
      fix: 'give the output, a minimumOnTime and a maximumDuty below 100 %, or an inductance instead of the ripple',
    },
  ];
}
