import { failure, type Outcome, success } from '../base/Problem.ts';
import type { Law } from '../law/Law.ts';
import { laws } from '../law/laws.ts';
import {
  type GainSpread,
  type IndexExtremes,
  indexExtremes,
  type LeastGain,
  leastGain,
} from '../law/leastGain.ts';
import { hasInductance, type KnownCorners, type LoopCorners, loopCorners } from '../law/loopCorners.ts';
import { undeterminedInductance } from '../law/undeterminedInductance.ts';
import { demandOf } from '../ramp/demandOf.ts';
import { buildRegion } from '../region/buildRegion.ts';
import type { OperatingRegion } from '../region/OperatingRegion.ts';
import { powerStageOf } from '../region/powerStages.ts';
import { refuseGaps } from '../spec/notYet.ts';
import type { ReadSpecification } from '../spec/readSpecification.ts';
import { buildBoardOpamp } from './boardOpamp/buildBoardOpamp.ts';
import { sizeBoardOpamp } from './boardOpamp/sizeBoardOpamp.ts';
import { senseAttenuation } from './rampFigures.ts';
import type { SizedDesign, SizedLaw } from './SizedDesign.ts';

/** Sizing from the specification to the circuit: region → law → ramp → parts → circuit. */
export function sizeDesign(request: ReadSpecification): Outcome<SizedDesign> {
  const { specification } = request;
  const ready = refuseGaps(request);
  if (!ready.ok) return ready;

  const region = buildRegion(request, powerStageOf(specification));
  if (!region.ok) return region;
  const corners = loopCorners(specification, region.value);
  if (!hasInductance(corners)) return failure([inductanceMissing(request)]);
  const undetermined = undeterminedInductance(request, corners);
  if (undetermined.length > 0) return failure(undetermined);
  const goal = specification.goal.dampingIndex;
  const law = laws[specification.ramp.law];
  const required = leastGain(law, region.value, corners, goal);

  if (required.gain === 0 && specification.ramp.gain === null)
    return failure([rampNotNeeded(request, indexExtremes(law, 0, region.value, corners, exact))]);
  const demand = demandOf(specification, corners, required.gain);
  const sizing = sizeBoardOpamp(demand, request);
  if (!sizing.ok) return sizing;
  const { spread, senseSlope_per_s, wantedSlope_per_s } = sizing.value;
  const built = loopCorners(
    specification,
    region.value,
    senseAttenuation({ sizing: sizing.value }),
  ) as KnownCorners;
  const sized = (of: Law, least: LeastGain, gain: number, realisedGain: number) =>
    sizedLaw(of, least, gain, realisedGain, region.value, built, spread);
  const other = law.kind === 'fixed' ? laws.vin : laws.fixed;
  const otherLeast = leastGain(other, region.value, corners, goal);
  const otherGain = otherLeast.gain / spread.low;
  return success({
    request,
    region: region.value,
    corners: built,
    chosen: sized(
      law,
      required,
      wantedSlope_per_s * demand.gainPerSlope,
      senseSlope_per_s * demand.gainPerSlope,
    ),
    alternative: sized(other, otherLeast, otherGain, otherGain),
    demand,
    sizing: sizing.value,
    circuit: buildBoardOpamp(sizing.value, demand),
  });
}

function sizedLaw(
  law: Law,
  required: LeastGain,
  gain: number,
  realisedGain: number,
  region: OperatingRegion,
  corners: LoopCorners,
  spread: GainSpread,
): SizedLaw {
  const extremes = indexExtremes(law, realisedGain, region, corners, spread);
  return { law, required, gain, realisedGain, extremes };
}

function inductanceMissing({ place }: ReadSpecification) {
  return {
    code: 'missing-key',
    severity: 'error' as const,
    key: 'inductance',
    place: place('inductance'),
    expected: 'an inductance: a circuit is sized for one',
    received: 'nothing',
    fix: "add inductance, for example 'inductance: 10 uH ± 20 %', or --l 10uH",
  };
}

/** Nothing that the ramp adds to. */
const exact: GainSpread = { low: 1, high: 1 };

/** Every duty is so low, or so much compensates already, that the loop meets its goal by itself. */
function rampNotNeeded({ specification, place }: ReadSpecification, { min }: IndexExtremes) {
  return {
    code: 'no-circuit',
    severity: 'error' as const,
    key: 'ramp.gain',
    place: place('ramp.gain'),
    expected: `goal of the damping index > least damping index without any ramp: above ${min.dampingIndex.toPrecision(4)}`,
    received: specification.goal.dampingIndex.toPrecision(4),
    fix: 'no ramp is needed over this region; to build one all the same, give ramp.gain',
  };
}
