import { describe, expect, it } from 'vitest';
import { explainRule, listRules } from '../../../generator/rules/describeRules.ts';
import { loadUserDeck, mergeDecks } from '../../../generator/rules/loadUserDeck.ts';
import type { RuleDeck } from '../../../generator/rules/RuleDeck.ts';
import { shippedDeck } from '../../../generator/rules/shippedDeck.ts';
import { testDeck, testRuleDeck } from '../../../generator/rules/testRuleDeck.ts';
import { deckOf, ruleText } from './deckText.ts';

async function load(text: string): Promise<RuleDeck> {
  const deck = await loadUserDeck(text, 'own.xml');
  if (!deck.ok) throw new Error(JSON.stringify(deck.problems));
  return deck.value;
}

describe("a user's deck", () => {
  it('replaces a shipped rule in its place and adds others at the end', async () => {
    const own = await load(
      deckOf(
        ruleText({ id: 'house-rule' }),
        ruleText({ id: 'high-input', requirement: 'inputVoltageMax &lt;= 48 V' }),
      ),
    );
    const merged = mergeDecks([shippedDeck, own]);
    const ids = merged.map((rule) => rule.id);
    expect(ids).toEqual([...shippedDeck.rules.map((rule) => rule.id), 'house-rule']);
    expect(merged.find((rule) => rule.id === 'high-input')?.requirement).toBe('inputVoltageMax <= 48 V');
  });

  it('reads < from an entity and from a CDATA section alike', async () => {
    const written = [
      'supplyVoltage &lt;= 5 V',
      '<![CDATA[ supplyVoltage <= 5 V ]]>',
      'supplyVoltage <!-- or less -->&lt;= 5 V',
    ];
    const decks = await Promise.all(written.map((requirement) => load(deckOf(ruleText({ requirement })))));
    expect(decks.map((deck) => deck.rules[0]?.requirement)).toEqual(Array(3).fill('supplyVoltage <= 5 V'));
  });

  it('may begin with a byte-order mark and use CR LF', async () => {
    const deck = await load(`\ufeff<?xml version="1.0"?>\r\n${deckOf(ruleText()).replaceAll('\n', '\r\n')}`);
    expect(deck.rules).toHaveLength(1);
  });
});

describe('the test of a deck', () => {
  it('says what each rule does to the rules below it', async () => {
    const examples =
      '<example outcome="passes">dampingIndexMin = 0.6</example><example outcome="fails">dampingIndexMin = 0.4</example>';
    const text = deckOf(
      ruleText({ id: 'house-rule', more: examples }),
      ruleText({ id: 'stability', more: examples }),
    );
    const tested = await testRuleDeck(text, 'own.xml', shippedDeck.rules);
    expect(tested).toEqual({
      ok: true,
      warnings: [],
      value: {
        name: 'own.xml',
        examples: 4,
        rules: [
          { id: 'house-rule', relation: 'adds', examples: 2 },
          { id: 'stability', relation: 'overrides', examples: 2 },
        ],
      },
    });
  });

  it('warns of a rule that was never seen to fail', async () => {
    const more = '<example outcome="passes">dampingIndexMin = 0.6</example>';
    const tested = await testRuleDeck(deckOf(ruleText({ more })), 'own.xml', []);
    expect(tested.ok && tested.warnings.map(({ code, expected }) => [code, expected])).toEqual([
      ['example-missing', 'an example that fails'],
    ]);
  });

  it.each([
    ['passes', 'dampingIndexMin = 0.4', 'fails'],
    ['fails', 'dampingIndexMin = 0.6', 'passes'],
    ['passes', 'dampingIndexMin = none', 'not-applicable'],
  ])('refuses an example that says %s for %s', async (says, quantities, truth) => {
    const more = `<example outcome="${says}">${quantities}</example>`;
    const tested = await testRuleDeck(deckOf(ruleText({ more })), 'own.xml', []);
    expect(!tested.ok && tested.problems).toEqual([
      expect.objectContaining({ code: 'example-contradicts', expected: says, received: truth }),
    ]);
  });

  it('catches a loaded rule that stopped agreeing with its examples', () => {
    const [rule] = shippedDeck.rules;
    const broken = { name: 'broken', rules: [{ ...rule!, limit: () => 0.9 }] };
    expect(testDeck(broken, []).ok).toBe(false);
  });
});

describe('a rule explained', () => {
  it('comes with the quantities it speaks of', () => {
    const explained = explainRule(shippedDeck.rules, 'sense-filter');
    expect(explained.ok && explained.value.quantities.map(({ name, unit }) => [name, unit])).toEqual([
      ['senseFilterTime', 's'],
      ['minimumOnTime', 's'],
    ]);
    expect(explained.ok && explained.value.when).toBe('minimumOnTime > 0 s');
  });

  it('that does not exist names the nearest', () => {
    const explained = explainRule(shippedDeck.rules, 'signal-flor');
    expect(!explained.ok && explained.problems[0]).toMatchObject({
      code: 'unknown-rule',
      received: 'signal-flor',
      fix: 'did you mean signal-floor?',
    });
  });

  it('is in the list, in the same order', () => {
    expect(listRules(shippedDeck.rules).map((rule) => rule.id)).toEqual(
      shippedDeck.rules.map((rule) => rule.id),
    );
  });
});
