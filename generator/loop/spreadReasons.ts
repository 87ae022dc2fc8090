import { bisect } from '../base/bisect.ts';
import { indexExtremes, leastGain } from '../law/leastGain.ts';
import { hasInductance, nominalCorners } from '../law/loopCorners.ts';
import { type Contest, indexMax } from './Contest.ts';
import { alreadyThere } from './preferenceReasons.ts';
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
  const { best, specification, corners } = contest;
  const { goal, inductance } = specification;
  if (goal.dampingIndex >= goal.ceilingIndex)
    return [
      `The goal of ${index(goal.dampingIndex)} is itself not below the ceiling. What would help: a lower goal, or a higher ceiling.`,
    ];
  if (inductance?.kind === 'ripple' && hasInductance(corners)) {
    const { low, high } = corners.inductance_H;
    return [
      `The inductance that the ripple asks for, ${henries(low)} to ${henries(high)} over the region, is the cause, one ramp serving all of it. What would help: a ramp set for the inductor at hand, by one resistor, or a narrower range of inputs and outputs.`,
    ];
  }
  if (best.nominalMax > goal.ceilingIndex) return [nominalCause(contest)];
  return [
    `The spread of inductance and sense gain is the cause: with both at one value x would stay below ${index(best.nominalMax)}.`,
    ...(inductance?.kind === 'value' ? remedies(contest, inductance) : []),
  ];
}

/** Too much with every unit nominal: by what is there without us, or because the region asks for it. */
function nominalCause({ best, specification }: Contest): string {
  const present = alreadyThere(specification);
  const still = `with every unit nominal x would still reach ${index(best.nominalMax)}`;
  return present === ''
    ? `The region itself is the cause: ${still}. What would help: a higher ceiling, a lower goal, or a narrower range of inputs and outputs.`
    : `What compensates already, ${present}, is the cause: ${still}. What would help: less of it, or less inductance.`;
}

type ValueInductance = Extract<Contest['specification']['inductance'], { kind: 'value' }>;

/** What would help, with the spread that the ceiling allows. */
function remedies(contest: Contest, { value_H, atPeakLimit_H }: ValueInductance): string[] {
  const { senseGain_V_per_A: gain } = contest.specification;
  const { from, to } = value_H;
  const least = Math.min(from.low, atPeakLimit_H?.low ?? from.low);
  const allowed = widestSpread(contest) / (gain.high / gain.low);
  const measured = `Below the ceiling the largest inductance may be ${allowed.toPrecision(3)} times the least; ${henries(least)} to ${henries(to.high)} is ${(to.high / least).toPrecision(3)} times`;
  // What is left of it for the choice of inductor, its own tolerance and saturation taken off.
  const perSetting = allowed / ((to.high / to.nominal) * (from.nominal / least));
  if (from.nominal < to.nominal && perSetting > 1.05) {
    const settings = Math.ceil(Math.log(to.nominal / from.nominal) / Math.log(perSetting) - 1e-9);
    return [
      `What would help: a ramp set for the inductor at hand, by one resistor. ${measured}, so that ${settings} settings would cover it. A narrower range would help as well.`,
    ];
  }
  const inductor =
    to.high > least ? 'an inductor of less tolerance, or one that saturates less' : 'a tighter sense gain';
  const either = gain.high > gain.low && to.high > least ? `${inductor}, or a tighter sense gain` : inductor;
  return [`What would help: ${either}, or a higher ceiling. ${allowed > 1 ? `${measured}.` : ''}`.trimEnd()];
}

/**
 * Largest ratio of λ between units at which a law, sized for the least, stays at the ceiling or below.
 *
 * x = D′ + λ·(ramp)/U rises with λ at every point.
 */
function widestSpread({ specification, region, corners, best: { law } }: Contest): number {
  const nominal = nominalCorners(specification, corners);
  const { gain } = leastGain(law, region, nominal, specification.goal.dampingIndex);
  const excess = (high: number) =>
    indexExtremes(law, gain, region, nominal, { low: 1, high }).max.dampingIndex -
    specification.goal.ceilingIndex;
  return bisect(excess, 1, 1e6);
}
