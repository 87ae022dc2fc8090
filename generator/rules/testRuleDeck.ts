import type { Outcome, Problem } from '../base/Problem.ts';
import { success } from '../base/Problem.ts';
import { outcomeOf } from './evaluateRules.ts';
import { loadUserDeck } from './loadUserDeck.ts';
import type { ExampleOutcome, Rule, RuleDeck } from './RuleDeck.ts';

/** What the test of a deck found about one of its rules. */
export interface RuleTest {
  readonly id: string;
  /** Replaces a rule of the same id in the deck below it, or adds one. */
  readonly relation: 'overrides' | 'adds';
  readonly examples: number;
}

export interface DeckTest {
  readonly name: string;
  readonly rules: readonly RuleTest[];
  readonly examples: number;
}

/**
 * Tests a user's deck: reads it with every check, and holds it to its own examples.
 * @param base the rules it would extend or override
 * @returns what each rule is; a warning for each that has no example that passes, or none that fails
 */
export async function testRuleDeck(
  text: string,
  name: string,
  base: readonly Rule[],
): Promise<Outcome<DeckTest>> {
  const deck = await loadUserDeck(text, name);
  return deck.ok ? testDeck(deck.value, base) : deck;
}

/** The same for a deck that is loaded already, such as the shipped one. */
export function testDeck(deck: RuleDeck, base: readonly Rule[]): Outcome<DeckTest> {
  const known = new Set(base.map((rule) => rule.id));
  const contradictions = deck.rules.flatMap(contradictionsOf);
  if (contradictions.length > 0) return { ok: false, problems: contradictions };
  const rules = deck.rules.map(({ id, examples }) => ({
    id,
    relation: known.has(id) ? ('overrides' as const) : ('adds' as const),
    examples: examples.length,
  }));
  const examples = rules.reduce((sum, rule) => sum + rule.examples, 0);
  return success({ name: deck.name, rules, examples }, deck.rules.flatMap(untested));
}

/** Examples that come out otherwise than their author says. */
function contradictionsOf(rule: Rule): readonly Problem[] {
  return rule.examples
    .map(({ outcome, quantities }) => ({ expected: outcome, received: outcomeOf(rule, quantities) }))
    .filter(({ expected, received }) => expected !== received)
    .map(({ expected, received }) => ({
      code: 'example-contradicts',
      severity: 'error',
      key: `${rule.id}.example`,
      place: null,
      expected,
      received,
      fix: 'mend the rule or the example',
    }));
}

/** A rule that was never seen to fail may be one that cannot. */
function untested(rule: Rule): readonly Problem[] {
  const wanted: readonly ExampleOutcome[] = ['passes', 'fails'];
  return wanted
    .filter((outcome) => !rule.examples.some((example) => example.outcome === outcome))
    .map((outcome) => ({
      code: 'example-missing',
      severity: 'warning',
      key: `${rule.id}.example`,
      place: null,
      expected: `an example that ${outcome}`,
      received: 'none',
      fix: `add <example outcome="${outcome}">`,
    }));
}
