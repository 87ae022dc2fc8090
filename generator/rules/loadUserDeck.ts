import { type Outcome, success } from '../base/Problem.ts';
import type { Rule, RuleDeck } from './RuleDeck.ts';

/**
 * Reads, checks and readies a user's own rule deck. The parsers load here, and only then.
 * @param text the XML, at most 256 Ki characters
 * @param name file name as the user gave it, for messages
 */
export async function loadUserDeck(text: string, name: string): Promise<Outcome<RuleDeck>> {
  const { readRuleDeck, interpret } = await import('./readRuleDeck.ts');
  const deck = readRuleDeck(text, name);
  return deck.ok ? success({ name, rules: deck.value.rules.map(interpret) }) : deck;
}

/** The rules of several decks: a later one replaces by id in place, and adds at the end what is new. */
export function mergeDecks(decks: readonly RuleDeck[]): readonly Rule[] {
  const rules = new Map<string, Rule>();
  for (const deck of decks) for (const rule of deck.rules) rules.set(rule.id, rule);
  return [...rules.values()];
}
