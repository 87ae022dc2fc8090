import { bisect } from '../base/bisect.ts';
import { outerInterval } from '../base/Quantity.ts';
import { indexExtremes, leastGain } from '../law/leastGain.ts';
import { loopCorners, nominalCorners } from '../law/loopCorners.ts';
import { type Contest, indexMax } from './Contest.ts';
import type { ComparedLaw } from './compareLaws.ts';
import { cycles, henries, index, placeOfMax } from './verdictWords.ts';

/** Where even the best law is above the ceiling: by how much, why, and what would help. */
export function overCompensationReasons(contest: Contest): string[] {
  const { best, specification } = contest;
  const ceiling = specification.goal.ceilingIndex;
  if (indexMax(best) <= ceiling) return [];
  return [
    `Every law over-compensates: even with the best, ${best.law.kind}, x reaches ${index(indexMax(best))} ${placeOfMax(best)}, ${excess(indexMax(best) / ceiling)} the ceiling of ${index(ceiling)}, and a perturbation takes ${cycles(best)} to settle.`,
    ...cause(contest),
  ];
}

function excess(ratio: number): string {
  return ratio < 2 ? `${Math.ceil(100 * (ratio - 1))} % above` : `${ratio.toPrecision(2)} times`;
}

function cause(contest: Contest): string[] {
  const { best, specification } = contest;
  const { goal } = specification;
  if (goal.dampingIndex >= goal.ceilingIndex)
    return [
      `The goal of ${index(goal.dampingIndex)} is itself not below the ceiling. What would help: a lower goal, or a higher ceiling.`,
    ];
  if (best.nominalMax > goal.ceilingIndex)
    return [
      `What compensates already is the cause, the controller's own ramp or the magnetizing current: with every unit nominal x would still reach ${index(best.nominalMax)}. What would help: less of it, or less inductance.`,
    ];
  return [
    `The spread of inductance and sense gain is the cause: with both at one value x would stay below ${index(best.nominalMax)}.`,
    ...remedies(contest),
  ];
}

/** What would help, with the spread that the ceiling allows. */
function remedies(contest: Contest): string[] {
  const { specification, best } = contest;
  const { inductance, senseGain_V_per_A: gain } = specification;
  if (inductance?.kind !== 'value')
    return [
      'What would help: a narrower ripple or frequency range, a tighter sense gain, or a higher ceiling.',
    ];
  const { low, high } = outerInterval(inductance.value_H);
  const least = Math.min(low, inductance.atPeakLimit_H?.low ?? low);
  const allowed = widestSpread(contest, best) / (gain.high / gain.low);
  if (!(allowed > 1.05))
    return ['What would help: a tighter sense gain, a narrower inductance range, or a higher ceiling.'];
  const ranges = Math.ceil(Math.log(high / least) / Math.log(allowed) - 1e-9);
  return [
    `What would help: a ramp set for the inductor at hand, by one resistor. Below the ceiling the largest inductance may be ${allowed.toPrecision(3)} times the least; ${henries(least)} to ${henries(high)} is ${(high / least).toPrecision(3)} times, so ${ranges} settings would cover it. An inductance tied to the ripple, or a narrower range, would help as well.`,
  ];
}

/**
 * Largest ratio of λ between units at which a law, sized for the least, stays at the ceiling or below.
 *
 * x = D′ + λ·(ramp)/U rises with λ at every point.
 */
function widestSpread({ specification, region }: Contest, { law }: ComparedLaw): number {
  const nominal = nominalCorners(specification, loopCorners(specification, region));
  const { gain } = leastGain(law, region, nominal, specification.goal.dampingIndex);
  const excess = (high: number) =>
    indexExtremes(law, gain, region, nominal, { low: 1, high }).max.dampingIndex -
    specification.goal.ceilingIndex;
  return bisect(excess, 1, 1e6);
}
