import type { RuleOutcome } from '../emit/resultSchema.ts';
import type { DesignQuantities } from './quantities.ts';
import type { Comparison, ExampleOutcome, Rule, Scope } from './RuleDeck.ts';

/**
 * Applies rules to a design, in the order of the deck.
 *
 * A rule is left out where it does not apply: its condition is false, or a quantity it speaks of does not
 * exist for this design. A comparison that cannot be computed (a logarithm of nothing, 0/0) has not passed:
 * a rule never lets a design through for want of a number.
 * @param quantities SI values; null or absent: the figure does not exist
 */
export function evaluateRules(rules: readonly Rule[], quantities: DesignQuantities): RuleOutcome[] {
  return rules.filter((rule) => appliesTo(rule, quantities)).map((rule) => judge(rule, quantities));
}

/** Whether every quantity of the rule exists and its condition holds. */
export function appliesTo(rule: Rule, scope: Scope): boolean {
  return rule.uses.every((name) => typeof scope[name] === 'number') && rule.applies(scope);
}

/** The verdict of one rule that applies. */
export function judge(rule: Rule, scope: Scope): RuleOutcome {
  const measured = rule.measured(scope);
  const limit = rule.limit(scope);
  return {
    id: rule.id,
    severity: rule.severity,
    passed: compare(measured, rule.comparison, limit),
    measured: finiteOrNull(measured),
    limit: finiteOrNull(limit),
    unit: rule.unit,
    reason: rule.reason,
    source: rule.source,
  };
}

/** What a rule comes to over given quantities, as its examples put it. */
export function outcomeOf(rule: Rule, scope: Scope): ExampleOutcome {
  if (!appliesTo(rule, scope)) return 'not-applicable';
  return judge(rule, scope).passed ? 'passes' : 'fails';
}

function compare(left: number, comparison: Comparison, right: number): boolean {
  switch (comparison) {
    case '<=':
      return left <= right;
    case '>=':
      return left >= right;
    case '<':
      return left < right;
    case '>':
      return left > right;
  }
}

/** The result file carries finite numbers only. */
function finiteOrNull(value: number): number | null {
  return Number.isFinite(value) ? value : null;
}
