import { expect, it } from 'vitest';
import type { Problem } from '../../generator/base/Problem.ts';
import { readRuleDeck } from '../../generator/rules/readRuleDeck.ts';
import { deckOf, type RuleParts, ruleText } from '../unit/rules/deckText.ts';

/** One fault in a deck that is sound otherwise, for every kind of fault in a rule. */
const faultyRules: readonly RuleParts[] = [
  { id: 'Own Rule' },
  { severity: 'warn' },
  { requirement: null },
  { whatToDo: null },
  { reason: '' },
  { reason: 'x'.repeat(601) },
  { reason: 'It <b>rings</b>.' },
  { reason: 'It rings &nbsp; loudly.' },
  { source: null },
  { more: '<reason>Again.</reason>' },
  { more: '<requirment>x</requirment>' },
  { requirement: 'dampingIndexMin' },
  { requirement: 'dampingIndexMin > 0.5 and dampingIndexMax &lt; 2' },
  { requirement: '0.5 &lt; dampingIndexMin' },
  { requirement: 'dampingIndxMin > 0.5' },
  { requirement: 'flux > 0.5' },
  { requirement: 'signalAtTripMin >= chargingCurrentLow' },
  { requirement: 'signalAtTripMin >= 0' },
  { requirement: 'signalAtTripMin + resetTime >= 1 V' },
  { requirement: 'log(supplyVoltage) >= 1' },
  { requirement: 'dampingIndexMin == 1' },
  { requirement: '0.5 &lt; dampingIndexMin &lt; 1.5' },
  { requirement: 'not dampingIndexMin > 1' },
  { requirement: 'dampingIndexMin ^ 99 > 1' },
  { requirement: 'supplyVoltage ^ dampingIndexMin > 1 V' },
  { requirement: 'max(dampingIndexMin) > 1' },
  { requirement: 'sin(dampingIndexMin) > 1' },
  { requirement: 'import("fs") > 1' },
  { requirement: 'dampingIndexMin[1] > 1' },
  { requirement: 'f(x) = x' },
  { requirement: 'dampingIndexMin.constructor > 1' },
  { requirement: 'dampingIndexMin > 1e400' },
  { requirement: 'dampingIndexMin > (1' },
  { requirement: `dampingIndexMin > ${'('.repeat(40)}1${')'.repeat(40)}` },
  { requirement: `dampingIndexMin > ${'1'.repeat(400)}` },
  { requirement: '' },
  { when: 'supplyVoltage' },
  { when: 'supplyVoltage > 3 A' },
  { more: '<example outcome="holds">dampingIndexMin = 0.6</example>' },
  { more: '<example outcome="passes">dampingIndexMin = 0.4</example>' },
  { more: '<example outcome="passes">dampingIndexMin 0.6</example>' },
  { more: '<example outcome="passes">dampingIndexMin = 0.6 V</example>' },
  { more: '<example outcome="passes">dampingMin = 0.6</example>' },
  { more: '<example outcome="passes">dampingIndexMin = 0.6; dampingIndexMin = 0.6</example>' },
];

/** The same for the deck as a whole. */
const faultyDecks: readonly string[] = [
  '',
  'rules: []',
  '<ruleDeck version="1">',
  '<ruleDeck version="1"></ruleDeck>',
  '<ruleDeck version="2"/>',
  '<rules/>',
  '<!DOCTYPE ruleDeck [<!ENTITY x "y">]><ruleDeck version="1"/>',
  '<?php ?><ruleDeck version="1"/>',
  '<ruleDeck version="1"/><ruleDeck version="1"/>',
  '<ruleDeck version="1" vesion="1"/>',
  '<ruleDeck version="1"><rule __proto__="1"/></ruleDeck>',
  '<ruleDeck version="1"><rule/></ruleDeck>',
  '<a><a><a><a><a><a><a><a><a><a/></a></a></a></a></a></a></a></a></a>',
  deckOf(ruleText({ requirement: 'supplyVoltage < 5 V' })),
  deckOf(ruleText(), ruleText()),
  deckOf(ruleText(), 'stray'),
];

function described(text: string): string {
  const deck = readRuleDeck(text, 'own.xml');
  return deck.ok ? '  accepted' : deck.problems.map(problemLines).join('\n');
}

function problemLines({ code, key, place, expected, received, fix }: Problem): string {
  const where = `${place?.path}:${place?.line}:${place?.column}`;
  const lines = [`received ${short(received)}`, `expected ${expected}`, `fix      ${fix}`];
  return [`  ${where} ${code} ${key ?? ''}`.trimEnd(), ...lines.map((line) => `    ${line}`)].join('\n');
}

function short(text: string): string {
  return text.length > 100 ? `${text.slice(0, 100)}…` : text;
}

it('every fault of a rule deck has one message that says where, what and how to mend it', async () => {
  const cases = [
    ...faultyRules.map((parts) => [JSON.stringify(parts), deckOf(ruleText(parts))] as const),
    ...faultyDecks.map((text) => [JSON.stringify(text), text] as const),
  ];
  const page = cases.map(([title, text]) => `${short(title)}\n${described(text)}\n`).join('\n');
  expect(page).not.toContain('accepted');
  await expect(page).toMatchFileSnapshot('rule-messages.txt');
});
