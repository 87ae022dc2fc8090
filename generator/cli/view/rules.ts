import type { RuleExplanation, RuleSummary } from '../../rules/describeRules.ts';
import type { DeckTest } from '../../rules/testRuleDeck.ts';
import { printable } from '../problems/printable.ts';
import { hanging, row, viewWidth, wrapped } from './table.ts';

/** One rule a line; a requirement too long for it continues below itself. */
export function ruleListView(rules: readonly RuleSummary[]): string {
  const widest = Math.max(...rules.map(({ id }) => id.length));
  const lines = rules.flatMap(({ id, severity, requirement }) => {
    const head = `${severity.padEnd('warning'.length)}  ${printable(id).padEnd(widest)}  `;
    return hanging(head, wrapped(printable(requirement), viewWidth - head.length));
  });
  return `${lines.join('\n')}\n`;
}

/** Everything that is known of one rule. */
export function ruleView(rule: RuleExplanation): string {
  const lines = [
    ...row('rule', `${rule.id} (${rule.severity})`),
    ...row('requires', rule.requirement),
    ...(rule.when === null ? [] : row('applies when', rule.when)),
    ...row('reason', rule.reason),
    ...row('what to do', rule.whatToDo),
    ...row('source', rule.source),
    ...rule.quantities.flatMap(({ name, unit, meaning }, index) =>
      row(index === 0 ? 'where' : '', `${name}${unit === '1' ? '' : ` [${unit}]`}: ${meaning}`),
    ),
  ];
  return `${lines.map(printable).join('\n')}\n`;
}

/** What the test of a deck came to. */
export function deckTestView({ name, rules, examples }: DeckTest): string {
  const lines = rules.flatMap(({ id, relation, examples: own }) =>
    row(relation, `${id}: ${own === 1 ? '1 example' : `${own} examples`} as stated`),
  );
  const sum = row(
    'deck',
    `${name}: ${rules.length === 1 ? '1 rule' : `${rules.length} rules`}, ${examples} examples, sound`,
  );
  return `${[...lines, ...sum].map(printable).join('\n')}\n`;
}
