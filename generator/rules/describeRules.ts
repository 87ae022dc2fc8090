import { nearest } from '../base/nearest.ts';
import type { Severity } from '../base/Problem.ts';
import { failure, type Outcome, success } from '../base/Problem.ts';
import { isQuantityName, type QuantityMeaning, quantities } from './quantities.ts';
import type { Rule } from './RuleDeck.ts';

/** One line of `rules list`. */
export interface RuleSummary {
  readonly id: string;
  readonly severity: Severity;
  readonly requirement: string;
  readonly source: string;
}

/** What `rules explain ID` shows. */
export interface RuleExplanation extends RuleSummary {
  readonly when: string | null;
  readonly whatToDo: string;
  readonly reason: string;
  /** Unit of measured value and limit. */
  readonly unit: string;
  readonly quantities: readonly (QuantityMeaning & { readonly name: string })[];
}

/** The rules in the order in which they are applied. */
export function listRules(rules: readonly Rule[]): readonly RuleSummary[] {
  return rules.map(({ id, severity, requirement, source }) => ({ id, severity, requirement, source }));
}

/** Everything a person needs to act on one rule; an unknown id names the nearest. */
export function explainRule(rules: readonly Rule[], id: string): Outcome<RuleExplanation> {
  const rule = rules.find((candidate) => candidate.id === id);
  if (rule === undefined) return failure([unknownRule(rules, id)]);
  const { severity, requirement, source, when, whatToDo, reason, unit, uses } = rule;
  const spokenOf = uses.filter(isQuantityName).map((name) => ({ name, ...quantities[name] }));
  return success({
    id,
    severity,
    requirement,
    source,
    when,
    whatToDo,
    reason,
    unit,
    quantities: spokenOf,
  });
}

function unknownRule(rules: readonly Rule[], id: string) {
  const near = nearest(
    id,
    rules.map((rule) => rule.id),
  );
  return {
    code: 'unknown-rule',
    severity: 'error' as const,
    key: null,
    place: null,
    expected: 'the id of a rule',
    received: id,
    fix: near === null ? 'see counterslope rules list' : `did you mean ${near}?`,
  };
}
