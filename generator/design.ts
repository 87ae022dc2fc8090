import type { Outcome } from './base/Problem.ts';
import type { SizedDesign } from './circuit/SizedDesign.ts';
import { sizeDesign } from './circuit/sizeDesign.ts';
import { fileNames } from './emit/deck/converterPlan.ts';
import { resultOf } from './emit/result.ts';
import type { Result, RuleOutcome, Simulation } from './emit/resultSchema.ts';
import type { ReadSpecification } from './spec/readSpecification.ts';

export type { SizedDesign } from './circuit/SizedDesign.ts';
export { ruleQuantities } from './rules/ruleQuantities.ts';

/** Sizes a ramp generator: spec → region → law → ramp → parts → circuit. */
export function design(request: ReadSpecification): Outcome<SizedDesign> {
  return sizeDesign(request);
}

/** The result document of a design: what it is, how it fares by the rules, what the simulation showed. */
export function designResult(
  sized: SizedDesign,
  rules: readonly RuleOutcome[],
  simulation: Simulation | null,
): Result {
  return resultOf(sized, rules, simulation, fileNames(sized));
}
