import type { Rule, RuleDeck } from '../../rules/RuleDeck.ts';
import type { Session } from '../Session.ts';
import { endingOf, going, type Step, stepOf } from '../Step.ts';
import { decodeText } from './decodeText.ts';
import { readInput, ruleDeckFile } from './readInput.ts';

/** The shipped rules, extended or overridden by the decks that the user names. */
export async function readRules(paths: readonly string[], session: Session): Promise<Step<readonly Rule[]>> {
  const { shippedDeck } = await import('../../rules/shippedDeck.ts');
  if (paths.length === 0) return going(shippedDeck.rules);
  const decks = [];
  for (const path of paths) decks.push(await readDeck(path, session));
  const end = endingOf(decks);
  if (end !== null) return end;
  const { mergeDecks } = await import('../../rules/loadUserDeck.ts');
  return going(mergeDecks([shippedDeck, ...decks.flatMap((deck) => (deck.ok ? [deck.value] : []))]));
}

async function readDeck(path: string, session: Session): Promise<Step<RuleDeck>> {
  const bytes = await readInput(path, ruleDeckFile, session);
  if (!bytes.ok) return bytes;
  const text = decodeText(bytes.value, path);
  if (!text.ok) return text;
  const { loadUserDeck } = await import('../../rules/loadUserDeck.ts');
  return stepOf(await loadUserDeck(text.value, path), session);
}
