import { readFileSync } from 'node:fs';
import fc from 'fast-check';
import { evaluate, unit } from 'mathjs';
import { describe, expect, it } from 'vitest';
import { compileRuleDeck } from '../../../generator/rules/compileRuleDeck.ts';
import { evaluateRules } from '../../../generator/rules/evaluateRules.ts';
import { loadUserDeck } from '../../../generator/rules/loadUserDeck.ts';
import { type DesignQuantities, quantities } from '../../../generator/rules/quantities.ts';
import type { Rule } from '../../../generator/rules/RuleDeck.ts';
import { shippedDeck } from '../../../generator/rules/shippedDeck.ts';
import { deckOf, ruleText } from './deckText.ts';

const shippedText = readFileSync(new URL('../../../rules/ramp.xml', import.meta.url), 'utf8');

/** Everything an expression may do, in one deck. */
const everyShape = deckOf(
  ruleText({ id: 'sum', requirement: 'supplyVoltage - rampHeadroom + 20 mV > -rampAmplitudeMax' }),
  ruleText({ id: 'product', requirement: 'chargingCurrentLow / timingCapacitance * switchingPeriod > 1 V' }),
  ruleText({ id: 'power', requirement: '(supplyVoltage ^ 2 / dividerResistance) ^ 0.5 > (3 W) ^ 0.5' }),
  ruleText({ id: 'plain-power', requirement: 'maximumDuty ^ realisedGain &lt; -2 ^ 2 + 5' }),
  ruleText({
    id: 'functions',
    requirement: 'sqrt(abs(cycleRatioMin)) + log(1 + maximumDuty) &lt; exp(gainExcess)',
  }),
  ruleText({ id: 'logarithm', requirement: 'log10(realisedGain) &lt;= 10 %' }),
  ruleText({
    id: 'extremes',
    requirement: 'max(signalFloor, 5 mV, residualVoltage) >= min(signalFloor, 2 V)',
  }),
  ruleText({
    id: 'condition',
    requirement: 'dampingIndexMin >= dampingIndexGoal',
    when: 'supplyVoltage > 3 V and not (maximumDuty >= 0.9) or resetTime &lt; 200 ns and gainExcess &lt;= 5 %',
  }),
);

const positive = fc.double({ min: 1e-12, max: 1e3, noNaN: true });
const names = Object.keys(quantities);
const scopes: fc.Arbitrary<DesignQuantities> = fc
  .array(fc.oneof({ weight: 30, arbitrary: positive }, fc.constant(null)), {
    minLength: names.length,
    maxLength: names.length,
  })
  .map((values) => Object.fromEntries(names.map((name, i) => [name, values[i]])));

async function interpreted(text: string): Promise<readonly Rule[]> {
  const deck = await loadUserDeck(text, 'ramp.xml');
  if (!deck.ok) throw new Error(JSON.stringify(deck.problems));
  return deck.value.rules;
}

async function compiled(text: string): Promise<readonly Rule[]> {
  const source = compileRuleDeck(text, 'own.xml');
  if (!source.ok) throw new Error(JSON.stringify(source.problems));
  return (await import(`data:text/javascript,${encodeURIComponent(source.value)}`)).default;
}

/** One side of a comparison as the expression library itself computes it, units and all, in SI. */
function byLibrary(side: string, scope: DesignQuantities): number {
  const withUnits = Object.entries(scope).flatMap(([name, value]) => {
    const { unit: symbol } = quantities[name as keyof typeof quantities];
    if (value === null || value === undefined) return [];
    return [[name, symbol === '1' ? value : unit(value, symbol.toLowerCase() === 'ohm' ? 'ohm' : symbol)]];
  });
  const result: unknown = evaluate(side.replace(/Ohm/g, 'ohm'), Object.fromEntries(withUnits));
  if (typeof result === 'number') return result;
  const { value } = result as { value?: unknown };
  return typeof value === 'number' ? value : Number.NaN;
}

const options = { seed: 20260403, numRuns: 500 };

describe('compiled and interpreted rules are equal over random designs', () => {
  it('for the shipped deck, to the last bit', async () => {
    const rules = await interpreted(shippedText);
    fc.assert(
      fc.property(scopes, (scope) => {
        expect(evaluateRules(rules, scope)).toEqual(evaluateRules(shippedDeck.rules, scope));
      }),
      options,
    );
  });

  it('for every shape of expression, to the last bit', async () => {
    const [walked, generated] = [await interpreted(everyShape), await compiled(everyShape)];
    let judged = 0;
    fc.assert(
      fc.property(scopes, (scope) => {
        const outcomes = evaluateRules(walked, scope);
        expect(evaluateRules(generated, scope)).toEqual(outcomes);
        judged += outcomes.length;
      }),
      options,
    );
    expect(judged).toBeGreaterThan(options.numRuns);
  });

  it('and to what the expression library computes with units, to its rounding', async () => {
    const rules = [...shippedDeck.rules, ...(await compiled(everyShape))];
    fc.assert(
      fc.property(scopes, (scope) => {
        for (const { id, measured, limit } of evaluateRules(rules, scope)) {
          const { requirement, comparison } = rules.find((rule) => rule.id === id)!;
          const [left, right] = requirement.split(` ${comparison} `) as [string, string];
          expectNear(measured, byLibrary(left, scope));
          expectNear(limit, byLibrary(right, scope));
        }
      }),
      { seed: 20260404, numRuns: 60 },
    );
  });
});

function expectNear(ours: number | null, theirs: number): void {
  if (ours === null) expect(Number.isFinite(theirs)).toBe(false);
  else expect(Math.abs(ours - theirs)).toBeLessThanOrEqual(1e-9 * Math.max(1e-12, Math.abs(theirs)));
}

describe('compiled decks carry texts as texts', () => {
  it('whatever they hold', async () => {
    const reason = `\`\${process.exit()}\` "; import("fs"); //  </script> \\ \u2028 ' */`;
    const [rule] = await compiled(deckOf(ruleText({ reason: `<![CDATA[${reason}]]>` })));
    expect(rule?.reason).toBe(reason.replace(/\s+/g, ' '));
  });
});
