import { failure, type Outcome, success } from './base/Problem.ts';
import { comparisonDocument } from './emit/comparisonDocument.ts';
import type { ComparisonDocument } from './emit/comparisonSchema.ts';
import { hasInductance, loopCorners } from './law/loopCorners.ts';
import { undeterminedInductance } from './law/undeterminedInductance.ts';
import type { Comparison } from './loop/Comparison.ts';
import { compareLaws } from './loop/compareLaws.ts';
import { comparisonNotes } from './loop/comparisonNotes.ts';
import { lightLoad } from './loop/lightLoad.ts';
import { neededRamp } from './loop/neededRamp.ts';
import { verdict } from './loop/verdict.ts';
import { nominalPeriod_s } from './ramp/demandOf.ts';
import { buildRegion } from './region/buildRegion.ts';
import { powerStageOf } from './region/powerStages.ts';
import { withNominalDrops } from './region/stageDrops.ts';
import type { ReadSpecification } from './spec/readSpecification.ts';

/** Compares a fixed ramp with the adaptive laws: spec → region → law → loop. No circuit is chosen. */
export function compare(request: ReadSpecification): Outcome<Comparison> {
  const { specification } = request;
  const region = buildRegion(request, powerStageOf(specification));
  if (!region.ok) return failure(region.problems);
  const corners = loopCorners(specification, region.value);
  const undetermined = undeterminedInductance(request, corners);
  if (undetermined.length > 0) return failure(undetermined);
  const period_s = nominalPeriod_s(specification);
  const nominal = buildRegion(
    { ...request, specification: withNominalDrops(specification) },
    powerStageOf(specification),
  );
  const nominalRegion = nominal.ok ? nominal.value : region.value;
  const laws = compareLaws(specification, region.value, nominalRegion, corners, period_s);
  return success({
    request,
    region: region.value,
    corners,
    laws,
    verdict: verdict(specification, region.value, corners, laws),
    lightLoad: hasInductance(corners) ? lightLoad(specification, region.value, corners) : null,
    neededRamp: neededRamp(region.value, specification.goal.dampingIndex),
    notes: comparisonNotes(specification, region.value, corners, laws),
  });
}

/** The comparison as `compare --json` prints it. */
export function comparisonOf(comparison: Comparison): ComparisonDocument {
  return comparisonDocument(comparison);
}
