import rules from '../../rules/ramp.xml';
import type { RuleDeck } from './RuleDeck.ts';

/** The deck that every design is held to. */
export const shippedDeck: RuleDeck = { name: 'ramp', rules };
