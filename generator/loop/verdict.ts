import { engineering } from '../base/engineering.ts';
import type { OperatingRegion } from '../region/OperatingRegion.ts';
import type { LawKind, Specification } from '../spec/Specification.ts';
import type { ComparedLaw } from './compareLaws.ts';

/** Which law to build, and why, in sentences that stand by themselves. */
export interface Verdict {
  /** Null where no ramp is needed at all. */
  readonly preferred: LawKind | null;
  readonly reasons: readonly string[];
}

/**
 * Largest damping index up to which a law counts as close to deadbeat: below it the double pole at half
 * the switching frequency does not split (Q ≥ ½), so that nothing slower than it appears.
 */
const unsplitIndex = 0.5 + 2 / Math.PI;
/** How much less over-compensation is worth a more elaborate law. */
const worthwhile = 1.1;

/** What each law has to sense, the reason to stay with the simpler one. */
const senses: Record<LawKind, string> = {
  fixed: 'nothing',
  vin: 'the input voltage',
  vout: 'the output voltage',
  'constant-q': 'the input and the output voltage',
};

/**
 * The simplest law that is close to deadbeat everywhere, or as good as the best; else the simplest adaptive
 * one below the ceiling, else the one that over-compensates least.
 */
export function verdict(
  specification: Specification,
  region: OperatingRegion,
  compared: readonly ComparedLaw[],
): Verdict {
  if (compared.every(({ required }) => required.gain === 0)) return noRampNeeded(specification, compared);
  const best = compared.reduce((a, b) => (indexMax(b) < indexMax(a) ? b : a));
  const bound = Math.max(unsplitIndex, worthwhile * indexMax(best));
  const fixed = compared.find(({ law }) => law.kind === 'fixed')!;
  if (indexMax(fixed) <= bound)
    return {
      preferred: 'fixed',
      reasons: [
        ...fixedReasons(fixed, compared, best),
        ...spanReasons(specification, best),
        ...otherReasons(compared, region),
      ],
    };
  const adaptive = compared.filter(({ law }) => law.kind !== 'fixed');
  const preferred =
    adaptive.find((law) => indexMax(law) <= Math.max(bound, specification.goal.ceilingIndex)) ?? best;
  return {
    preferred: preferred.law.kind,
    reasons: [
      ...adaptiveReasons(preferred, fixed, compared, best),
      ...spanReasons(specification, best),
      ...otherReasons(compared, region),
    ],
  };
}

function indexMax({ extremes }: ComparedLaw): number {
  return extremes.max.dampingIndex;
}

function noRampNeeded({ goal }: Specification, [first]: readonly ComparedLaw[]): Verdict {
  return {
    preferred: null,
    reasons: [
      `No ramp is needed: without any, the damping index is at least ${index(first!.extremes.min.dampingIndex)} over the whole region, above the goal of ${index(goal.dampingIndex)}.`,
    ],
  };
}

function fixedReasons(fixed: ComparedLaw, compared: readonly ComparedLaw[], best: ComparedLaw): string[] {
  const vin = compared.find(({ law }) => law.kind === 'vin');
  const reasons = [
    `A fixed ramp does as well for damping: x stays between ${index(fixed.extremes.min.dampingIndex)} and ${index(indexMax(fixed))}, cycle ratio ${ratioSpan(fixed)}; adapting the ramp buys nothing for damping here.`,
  ];
  if (vin && indexMax(vin) > worthwhile * indexMax(fixed))
    reasons.push(
      `A ramp that follows the input would over-compensate at high input: x up to ${index(indexMax(vin))}.`,
    );
  if (best.law.kind !== 'fixed' && indexMax(best) < indexMax(fixed) * 0.98)
    reasons.push(
      `The tightest law would be ${best.law.kind} (x up to ${index(indexMax(best))}); it has to sense ${senses[best.law.kind]}.`,
    );
  reasons.push('For a board or a chip with this one range of outputs: build the fixed ramp.');
  return reasons;
}

function adaptiveReasons(
  preferred: ComparedLaw,
  fixed: ComparedLaw,
  compared: readonly ComparedLaw[],
  best: ComparedLaw,
): string[] {
  const { kind } = preferred.law;
  const vin = compared.find(({ law }) => law.kind === 'vin');
  const reasons = [
    `A fixed ramp, sized at its worst point, over-compensates badly elsewhere: x up to ${index(indexMax(fixed))} at ${place(fixed)}, a perturbation takes ${fixed.settlingCyclesMax ?? 'endless'} cycles to settle.`,
    `An adaptive ramp does not: ${kind} keeps x between ${index(preferred.extremes.min.dampingIndex)} and ${index(indexMax(preferred))}, settled within ${preferred.settlingCyclesMax ?? 'endless'} cycles; it has to sense ${senses[kind]}.`,
  ];
  if (vin && kind !== 'vin' && indexMax(vin) * worthwhile < indexMax(fixed))
    reasons.push(
      `Where only the input can be sensed, vin still halves the harm or better: x up to ${index(indexMax(vin))} against ${index(indexMax(fixed))}.`,
    );
  if (best !== preferred && indexMax(best) < 0.98 * indexMax(preferred))
    reasons.push(`With more at hand ${best.law.kind} is tighter still: x up to ${index(indexMax(best))}.`);
  reasons.push(
    'For a chip or a board whose output is set by its user, up towards the input: build the adaptive ramp.',
  );
  return reasons;
}

/** A spread that no law can take out, told apart from what the region costs. */
function spanReasons({ goal }: Specification, best: ComparedLaw): string[] {
  if (indexMax(best) <= goal.ceilingIndex) return [];
  const reasons = [
    `Every law over-compensates: even ${best.law.kind} reaches x = ${index(indexMax(best))}, ${percent(indexMax(best) / goal.ceilingIndex - 1)} above the ceiling of ${index(goal.ceilingIndex)}.`,
  ];
  if (best.nominalMax <= goal.ceilingIndex)
    reasons.push(
      `The spread of inductance and sense gain is the cause: with both nominal it would be ${index(best.nominalMax)}. What would help: a narrower inductance range, a ramp set per inductor by one external resistor, an inductance tied to the ripple, a tighter sense gain.`,
    );
  else
    reasons.push(
      'The region itself is the cause, with inductance and sense gain nominal too. What would help: a narrower input or output range, a lower maximum duty, or a lower goal.',
    );
  return reasons;
}

/** Limits and line response speak for themselves, whichever law they favour. */
function otherReasons(compared: readonly ComparedLaw[], region: OperatingRegion): string[] {
  const limits = compared.filter(({ peakLimit_A }) => peakLimit_A !== null);
  const reasons: string[] = [];
  if (limits.length > 0) {
    const spread = ({ peakLimit_A }: ComparedLaw) => peakLimit_A!.high - peakLimit_A!.low;
    const steadiest = limits.reduce((a, b) => (spread(b) < spread(a) * (1 - 1e-9) ? b : a));
    reasons.push(
      `Peak limit over the region: ${limits.map((law) => `${law.law.kind} ${amperes(law.peakLimit_A!.low)} to ${amperes(law.peakLimit_A!.high)}`).join(', ')}; steadiest with ${steadiest.law.kind}.`,
    );
  }
  const lines = compared.filter(({ lineResponse_A_per_V }) => lineResponse_A_per_V !== null);
  if (lines.length > 0) {
    const largest = ({ lineResponse_A_per_V: line }: ComparedLaw) =>
      Math.max(Math.abs(line!.low), Math.abs(line!.high));
    const calmest = lines.reduce((a, b) => (largest(b) < largest(a) ? b : a));
    reasons.push(
      `Line response of the average current, largest: ${lines.map((law) => `${law.law.kind} ${engineering(largest(law), 'A', 3)} per volt`).join(', ')}; least with ${calmest.law.kind}${region.stage.kind === 'buck' ? ' (a fixed ramp of half the down slope would null it; one in proportion to the input leaves that of an uncompensated converter)' : ''}.`,
    );
  }
  return reasons;
}

function place({ extremes }: ComparedLaw): string {
  const { inputVoltage_V, outputVoltage_V } = extremes.max.at;
  return `${engineering(inputVoltage_V, 'V')} to ${engineering(Math.max(0, outputVoltage_V), 'V')}`;
}

function ratioSpan({ cycleRatio }: ComparedLaw): string {
  return `${cycleRatio.low.toFixed(3)} to ${cycleRatio.high.toFixed(3)}`;
}

function index(value: number): string {
  return value.toPrecision(4);
}

function percent(ratio: number): string {
  return `${Math.round(100 * ratio)} %`;
}

function amperes(value: number): string {
  return engineering(value, 'A', 3);
}
