/**
 * The library: the pure functions of the pipeline, and the whole command line as one function.
 *
 * Nothing here imports a module of Node; what needs one is loaded by `main` when it runs.
 */
import type { main as commandLine } from './cli/main.ts';

export const main: typeof commandLine = async (...given) => (await import('./cli/main.ts')).main(...given);

export type { Assumption } from './base/Assumption.ts';
export type { Outcome, Place, Problem, Severity } from './base/Problem.ts';
export type { Interval, Quantity, Span } from './base/Quantity.ts';
export type { Circuit, Component } from './circuit/Circuit.ts';
export type { SizedDesign, SizedLaw } from './circuit/SizedDesign.ts';
export type { Surroundings } from './cli/Surroundings.ts';
export { compare, comparisonOf } from './compare.ts';
export { design, designResult, ruleQuantities } from './design.ts';
export { designFiles } from './designFiles.ts';
export type { Result, RuleOutcome, Simulation } from './emit/resultSchema.ts';
export { cycleRatio, dampingIndex, dampingQ, settlingCycles } from './law/innerLoop.ts';
export { evaluateRules } from './rules/evaluateRules.ts';
export { shippedDeck } from './rules/shippedDeck.ts';
export { simulateDesign } from './simulateDesign.ts';
export { type ReadSpecification, readSpecification } from './spec/readSpecification.ts';
export type { Specification } from './spec/Specification.ts';
export { specificationSchema } from './spec/specificationSchema.ts';
export { starterSpecification } from './spec/starterSpecification.ts';
export type { Deck, RunOutcome, SpiceEngine, Waveforms } from './spice/Deck.ts';
export { window } from './window.ts';
