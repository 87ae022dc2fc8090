import { outerInterval, type Span } from '../base/Quantity.ts';
import { type Contest, indexMax, worthwhile } from './Contest.ts';
import type { ComparedLaw } from './compareLaws.ts';
import { cycles, index, indexSpan, placeOfMax, ratioSpan, senses, volts } from './verdictWords.ts';

/**
 * Largest damping index up to which a law counts as close to deadbeat: below it the double pole at half
 * the switching frequency does not split (Q ≥ ½), so that nothing slower than it appears.
 */
const unsplitIndex = 0.5 + 2 / Math.PI;

export function noRampReasons({ specification, fixed }: Contest): string[] {
  const { goal } = specification;
  const [least, most] = [fixed.extremes.min.dampingIndex, indexMax(fixed)];
  const present = alreadyThere(specification);
  const counted = present === '' ? '' : `, ${present} counted`;
  if (most <= goal.ceilingIndex)
    return [
      `No ramp needs to be added: without any${counted}, ${indexSpan(fixed)} over the whole region, the goal being ${index(goal.dampingIndex)}.`,
    ];
  return [
    `No ramp needs to be added, and what compensates already, ${present}, is too much: x runs from ${index(least)} to ${index(most)}, the ceiling being ${index(goal.ceilingIndex)}.`,
    'No added ramp can take that back. What would help: less inductance (window tells which fit), or less of what compensates already.',
  ];
}

/** What compensates without a ramp of ours. */
export function alreadyThere({ controller, magnetizingInductance_H }: Contest['specification']): string {
  const own = (controller?.internalRamp_V_per_s?.high ?? 0) > 0 ? ["the controller's own ramp"] : [];
  const free = magnetizingInductance_H === null ? [] : ['the magnetizing current'];
  return [...own, ...free].join(' and ');
}

export function fixedReasons(contest: Contest): string[] {
  const { fixed, best, compared } = contest;
  const reasons = [fixedVerdict(contest)];
  const vin = compared.find(({ law }) => law.kind === 'vin');
  if (vin && indexMax(vin) > worthwhile * indexMax(fixed))
    reasons.push(
      `A ramp that follows the input is no better: vin takes x up to ${index(indexMax(vin))} ${placeOfMax(vin)}.`,
    );
  if (isTighter(best, fixed))
    reasons.push(
      `Tighter would be ${best.law.kind}, x up to ${index(indexMax(best))}, but it has to sense ${senses[best.law.kind]}.`,
    );
  return [...reasons, fixedAdvice(contest)];
}

function fixedVerdict({ fixed, best, specification: { goal } }: Contest): string {
  const span = `${indexSpan(fixed)}, cycle ratio ${ratioSpan(fixed)}`;
  if (indexMax(fixed) > goal.ceilingIndex)
    return `Among them a fixed ramp does as well for damping as any: ${span}; adapting the ramp buys nothing here.`;
  if (indexMax(fixed) <= Math.max(unsplitIndex, worthwhile * indexMax(best)))
    return `A fixed ramp does as well for damping over the whole region: ${span}; adapting the ramp buys nothing for damping here.`;
  return `A fixed ramp will do: ${span}, below the ceiling of ${index(goal.ceilingIndex)} everywhere. An adaptive one damps more evenly (${best.law.kind}: x up to ${index(indexMax(best))}, ${cycles(best)} to settle against ${fixed.settlingCyclesMax}), which is worth its parts only where that matters.`;
}

function fixedAdvice({ specification, region }: Contest): string {
  const outputs = outputsOf(specification.output_V);
  const isStepDown = region.stage.kind === 'buck' || region.stage.kind === 'forward';
  const change =
    isStepDown && outputs.isOne
      ? ' An output that its user sets, up towards the input, would change that.'
      : '';
  return `For ${outputs.text}: build the fixed ramp.${change}`;
}

export function adaptiveReasons(contest: Contest): string[] {
  const { preferred, best, region } = contest;
  const { kind } = preferred.law;
  const reasons = [adaptiveVerdict(contest), ...inputAlone(contest)];
  if (best !== preferred && isTighter(best, preferred))
    reasons.push(
      `Tighter still is ${best.law.kind}, x up to ${index(indexMax(best))}; it has to sense ${senses[best.law.kind]}.`,
    );
  const isStepDown = region.stage.kind === 'buck' || region.stage.kind === 'forward';
  const outputs = outputsOf(contest.specification.output_V);
  const otherwise =
    isStepDown && !outputs.isOne ? ' Where the output is one known voltage, a fixed ramp does as well.' : '';
  return [...reasons, `For ${outputs.text}: build the adaptive ramp, ${kind}.${otherwise}`];
}

function adaptiveVerdict({ preferred, fixed, specification: { goal } }: Contest): string {
  const { kind } = preferred.law;
  const ceiling = goal.ceilingIndex;
  const own = `${kind} keeps ${indexSpan(preferred)} (cycle ratio ${ratioSpan(preferred)}, ${cycles(preferred)} to settle) by sensing ${senses[kind]}`;
  const reaches = `x = ${index(indexMax(fixed))} ${placeOfMax(fixed)} (cycle ratio up to ${fixed.cycleRatio.high.toFixed(3)}, ${cycles(fixed)} to settle)`;
  if (indexMax(preferred) > ceiling)
    return `Among them an adaptive ramp does less harm: ${own}; a fixed ramp, sized at its worst point, reaches ${reaches}.`;
  if (indexMax(fixed) < worthwhile * ceiling)
    return `A fixed ramp just misses the ceiling of ${index(ceiling)}: it reaches ${reaches}. An adaptive one keeps below: ${own}; a slightly higher ceiling would spare it.`;
  return `An adaptive ramp is worth it: ${own}; a fixed ramp, sized at its worst point, over-compensates to ${reaches}.`;
}

/** What following the input alone, the easiest to sense, would come to where it is not the choice. */
function inputAlone({ preferred, fixed, compared, specification: { goal } }: Contest): string[] {
  const vin = compared.find(({ law }) => law.kind === 'vin');
  if (!vin || vin === preferred) return [];
  const most = `vin takes x up to ${index(indexMax(vin))} ${placeOfMax(vin)}`;
  if (indexMax(vin) * worthwhile >= indexMax(fixed))
    return [`Following the input alone buys nothing here: ${most}.`];
  const ceiling =
    indexMax(vin) > goal.ceilingIndex ? `, still above the ceiling of ${index(goal.ceilingIndex)}` : '';
  const degree = 2 * indexMax(vin) < indexMax(fixed) ? 'far better' : 'better';
  return [
    `Where only the input can be sensed, vin is ${degree} than a fixed ramp: ${most}${ceiling}, ${cycles(vin)} to settle against ${fixed.settlingCyclesMax}.`,
  ];
}

function isTighter(a: ComparedLaw, b: ComparedLaw): boolean {
  return indexMax(a) < 0.98 * indexMax(b);
}

/** For whom: what is known of the outputs. */
function outputsOf(outputs: readonly Span[] | null): { readonly text: string; readonly isOne: boolean } {
  if (outputs === null)
    return { isOne: false, text: 'a converter whose output is not known, or set by its user' };
  const spans = outputs.map(outerInterval);
  const nominal = outputs.map(({ from, to }) => (from.nominal === to.nominal ? from.nominal : null));
  if (spans.length > 1)
    return {
      isOne: false,
      text: `one ramp for outputs of ${nominal.map((value, at) => (value === null ? spanText(spans[at]!) : volts(value))).join(', ')}`,
    };
  if (nominal[0] !== null)
    return { isOne: true, text: `a converter with this one output, ${volts(nominal[0]!)}` };
  return { isOne: false, text: `a converter whose output is set anywhere from ${spanText(spans[0]!)}` };
}

function spanText({ low, high }: { readonly low: number; readonly high: number }): string {
  return `${volts(low)} to ${volts(high)}`;
}
