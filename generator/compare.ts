import { failure, type Outcome, success } from './base/Problem.ts';
import { comparisonDocument } from './emit/comparisonDocument.ts';
import type { ComparisonDocument } from './emit/comparisonSchema.ts';
import { hasInductance, type LoopCorners, loopCorners } from './law/loopCorners.ts';
import { type ComparedLaw, compareLaws } from './loop/compareLaws.ts';
import { type LightLoad, lightLoad } from './loop/lightLoad.ts';
import { type NeededRamp, neededRamp } from './loop/neededRamp.ts';
import { type Verdict, verdict } from './loop/verdict.ts';
import { nominalPeriod_s } from './ramp/demandOf.ts';
import { buildRegion } from './region/buildRegion.ts';
import type { OperatingRegion } from './region/OperatingRegion.ts';
import { powerStageOf } from './region/powerStages.ts';
import type { ReadSpecification } from './spec/readSpecification.ts';

/** Every law over the region, and the verdict. */
export interface Comparison {
  readonly request: ReadSpecification;
  readonly region: OperatingRegion;
  readonly corners: LoopCorners;
  readonly laws: readonly ComparedLaw[];
  readonly verdict: Verdict;
  /** Null without an inductance. */
  readonly lightLoad: LightLoad | null;
  readonly neededRamp: readonly NeededRamp[];
}

/** Compares a fixed ramp with the adaptive laws: spec → region → law → loop. No circuit is chosen. */
export function compare(request: ReadSpecification): Outcome<Comparison> {
  const { specification } = request;
  const region = buildRegion(request, powerStageOf(specification));
  if (!region.ok) return failure(region.problems);
  const corners = loopCorners(specification, region.value);
  const period_s = nominalPeriod_s(specification);
  const laws = compareLaws(specification, region.value, corners, period_s);
  return success({
    request,
    region: region.value,
    corners,
    laws,
    verdict: verdict(specification, region.value, laws),
    lightLoad: hasInductance(corners) ? lightLoad(specification, region.value, corners, period_s) : null,
    neededRamp: neededRamp(region.value, specification.goal.dampingIndex),
  });
}

/** The comparison as `compare --json` prints it. */
export function comparisonOf(comparison: Comparison): ComparisonDocument {
  return comparisonDocument(comparison);
}
