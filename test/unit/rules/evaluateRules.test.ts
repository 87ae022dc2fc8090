import { describe, expect, it } from 'vitest';
import { evaluateRules } from '../../../generator/rules/evaluateRules.ts';
import { loadUserDeck } from '../../../generator/rules/loadUserDeck.ts';
import type { Rule } from '../../../generator/rules/RuleDeck.ts';
import { shippedDeck } from '../../../generator/rules/shippedDeck.ts';
import { deckOf, type RuleParts, ruleText } from './deckText.ts';

async function rulesOf(...parts: readonly RuleParts[]): Promise<readonly Rule[]> {
  const deck = await loadUserDeck(deckOf(...parts.map(ruleText)), 'own.xml');
  if (!deck.ok) throw new Error(JSON.stringify(deck.problems));
  return deck.value.rules;
}

describe('a rule', () => {
  it('reports what was measured, against what, in which unit', async () => {
    const rules = await rulesOf({ id: 'signal', requirement: 'signalAtTripMin >= 2 * signalFloor' });
    expect(evaluateRules(rules, { signalAtTripMin: 0.03, signalFloor: 0.02 })).toEqual([
      {
        id: 'signal',
        severity: 'error',
        passed: false,
        measured: 0.03,
        limit: 0.04,
        unit: 'V',
        reason: 'It rings.',
        source: 'common practice',
      },
    ]);
  });

  it.each([
    ['<', false],
    ['<=', true],
    ['>', false],
    ['>=', true],
  ])('at its very limit passes by %s: %s', async (comparison, passed) => {
    const requirement = `dampingIndexMin ${comparison.replace('<', '&lt;')} 0.5`;
    const [outcome] = evaluateRules(await rulesOf({ requirement }), { dampingIndexMin: 0.5 });
    expect(outcome?.passed).toBe(passed);
  });

  it('is left out where a quantity it speaks of does not exist', async () => {
    const rules = await rulesOf({ requirement: 'signalAtTripMin >= signalFloor' });
    expect(evaluateRules(rules, { signalAtTripMin: null, signalFloor: 0.02 })).toEqual([]);
    expect(evaluateRules(rules, { signalFloor: 0.02 })).toEqual([]);
  });

  it('is left out where its condition does not hold', async () => {
    const rules = await rulesOf({ when: 'supplyVoltage > 3 V and not (maximumDuty >= 1)' });
    const judged = (supplyVoltage: number, maximumDuty: number) =>
      evaluateRules(rules, { dampingIndexMin: 1, supplyVoltage, maximumDuty }).length;
    expect([judged(5, 0.9), judged(2, 0.9), judged(5, 1)]).toEqual([1, 0, 0]);
  });

  it.each(['log(dampingIndexMin) &lt;= 1', 'sqrt(dampingIndexMin) > -1', '0 * dampingIndexMin / 0 > -1'])(
    'that cannot be computed has not passed: %s',
    async (requirement) => {
      const [outcome] = evaluateRules(await rulesOf({ requirement }), { dampingIndexMin: -1 });
      expect(outcome).toMatchObject({ passed: false, measured: null });
    },
  );
});

describe('the shipped rules', () => {
  it('keep their order whatever the order of the quantities', () => {
    const forward = { dampingIndexMin: 0.9, residualRatio: 0.001, inputVoltageMax: 36 };
    const backward = { inputVoltageMax: 36, residualRatio: 0.001, dampingIndexMin: 0.9 };
    const ids = evaluateRules(shippedDeck.rules, forward).map((outcome) => outcome.id);
    expect(ids).toEqual(['stability', 'reset-residual', 'high-input']);
    expect(evaluateRules(shippedDeck.rules, backward)).toEqual(evaluateRules(shippedDeck.rules, forward));
  });

  it('have nothing to say of a design without figures', () => {
    expect(evaluateRules(shippedDeck.rules, {})).toEqual([]);
  });
});
