import { failure, type Outcome, success } from '../base/Problem.ts';
import { checkMarkup } from './checkMarkup.ts';
import { DeckFaults } from './DeckFaults.ts';
import { numberOf, truthOf } from './evaluateExpression.ts';
import { outcomeOf } from './evaluateRules.ts';
import type { Rule } from './RuleDeck.ts';
import { type CheckedRule, readRule } from './readRule.ts';
import { readXml } from './readXml.ts';

/** A deck that has passed every check: markup, texts, expressions, dimensions, and its own examples. */
export interface CheckedDeck {
  readonly name: string;
  readonly rules: readonly CheckedRule[];
}

/**
 * Reads and checks a rule deck.
 *
 * Pulls in the XML and expression parsers: reached at build, or by dynamic import for a user's deck only.
 * @param text the XML
 * @param name file name for messages
 */
export function readRuleDeck(text: string, name: string): Outcome<CheckedDeck> {
  const source = { path: name, text: text.replace(/^\ufeff/, '') };
  const xml = readXml(source);
  if (!xml.ok) return xml;
  const faults = new DeckFaults(source);
  checkMarkup(xml.value, faults);
  if (xml.value.name !== 'ruleDeck') return failure(faults.problems);
  const version = xml.value.attributes.get('version');
  if (version !== '1') {
    const complaint = { code: 'deck-version', expected: 'version="1"', received: version ?? 'none' };
    faults.add(xml.value.start, 'ruleDeck.version', { ...complaint, fix: 'write version="1"' });
  }
  const elements = xml.value.children.filter((child) => child.name === 'rule');
  if (elements.length === 0) {
    const complaint = { code: 'deck-empty', expected: 'at least one rule', received: 'none' };
    faults.add(xml.value.start, 'ruleDeck', { ...complaint, fix: 'add a rule' });
  }
  const rules = elements.map((element) => readRule(element, faults)).filter((rule) => rule !== null);
  refuseRepeatedIds(elements, faults);
  for (const rule of rules) checkExamples(rule, faults);
  return faults.problems.length === 0 ? success({ name, rules }) : failure(faults.problems);
}

type Elements = readonly Parameters<typeof readRule>[0][];

function refuseRepeatedIds(elements: Elements, faults: DeckFaults): void {
  const seen = new Set<string>();
  for (const element of elements) {
    const id = element.attributes.get('id');
    if (id !== undefined && seen.has(id)) {
      const complaint = { code: 'rule-id-repeated', expected: 'an id of its own', received: id };
      faults.add(faults.attributeAt(element, 'id'), id, { ...complaint, fix: 'rename or remove one' });
    }
    if (id !== undefined) seen.add(id);
  }
}

/** The author's own cases, worked out by hand, must come out as he says. */
function checkExamples(rule: CheckedRule, faults: DeckFaults): void {
  for (const example of rule.examples) {
    const outcome = outcomeOf(interpret(rule), example.quantities);
    if (outcome === example.outcome) continue;
    const complaint = { code: 'example-contradicts', expected: example.outcome, received: outcome };
    faults.add(rule.start, `${rule.id}.example`, { ...complaint, fix: 'mend the rule or the example' });
  }
}

/** The rule with functions that walk its expressions: no code is generated at run time. */
export function interpret(rule: CheckedRule): Rule {
  const { start: _start, comparison, condition, ...texts } = rule;
  return {
    ...texts,
    comparison: comparison.operator,
    measured: (scope) => numberOf(comparison.left, scope),
    limit: (scope) => numberOf(comparison.right, scope),
    applies: (scope) => condition === null || truthOf(condition, scope),
  };
}
