import { describe, expect, it } from 'vitest';
import { readRuleDeck } from '../../../generator/rules/readRuleDeck.ts';
import { deckOf, ruleText } from './deckText.ts';

function problemsOf(text: string) {
  const deck = readRuleDeck(text, 'own.xml');
  return deck.ok ? [] : deck.problems;
}

function brief(text: string) {
  return problemsOf(text).map(({ code, key, received, fix }) => ({ code, key, received, fix }));
}

describe('the deck reader refuses', () => {
  it('an unknown element, with the nearest', () => {
    expect(brief(deckOf(ruleText({ more: '<requirment>x</requirment>' })))).toEqual([
      {
        code: 'unknown-element',
        key: 'requirment',
        received: 'requirment',
        fix: 'did you mean requirement?',
      },
    ]);
  });

  it('an unknown attribute, with the nearest, where it stands', () => {
    const text = deckOf(ruleText()).replace('severity="error"', 'severity="error"\n   severty="note"');
    const [problem] = problemsOf(text);
    expect(problem).toMatchObject({ code: 'unknown-attribute', fix: 'did you mean severity?' });
    expect(problem?.place).toEqual({ path: 'own.xml', line: 3, column: 4 });
  });

  it('an attribute name inside a value is not taken for the attribute', () => {
    const text = deckOf(ruleText()).replace('severity="error"', 'severity=" bad=1 " bad="1"');
    const unknown = problemsOf(text).find(({ code }) => code === 'unknown-attribute');
    expect(unknown?.place?.column).toBe('<rule id="own-rule" severity=" bad=1 " '.length + 1);
  });

  it('another root', () => {
    expect(brief('<rules version="1"/>').map(({ code }) => code)).toEqual(['unknown-element']);
  });

  it.each([
    ['no version', '<ruleDeck>', 'none'],
    ['a later version', '<ruleDeck version="2">', '2'],
  ])('%s', (_, opening, received) => {
    const text = deckOf(ruleText()).replace('<ruleDeck version="1">', opening);
    expect(brief(text)).toEqual([expect.objectContaining({ code: 'deck-version', received })]);
  });

  it('a deck without rules', () => {
    expect(brief('<ruleDeck version="1"></ruleDeck>').map(({ code }) => code)).toEqual(['deck-empty']);
  });

  it('an id twice', () => {
    expect(brief(deckOf(ruleText(), ruleText()))).toEqual([
      expect.objectContaining({ code: 'rule-id-repeated', received: 'own-rule' }),
    ]);
  });

  it.each(['Signal', 'a b', '-a', 'a--b', '1a', '', 'x'.repeat(65), '=1+1'])('the id %j', (id) => {
    expect(brief(deckOf(ruleText({ id })))).toEqual([expect.objectContaining({ code: 'rule-id' })]);
  });

  it('an unknown severity, with the nearest', () => {
    expect(brief(deckOf(ruleText({ severity: 'eror' })))).toEqual([
      expect.objectContaining({ code: 'unknown-value', fix: 'did you mean error?' }),
    ]);
  });

  it.each(['requirement', 'whatToDo', 'reason', 'source'])('a rule without %s', (part) => {
    expect(brief(deckOf(ruleText({ [part]: null })))).toEqual([
      expect.objectContaining({ code: 'missing-element', key: `own-rule.${part}` }),
    ]);
  });

  it('a part twice', () => {
    expect(brief(deckOf(ruleText({ more: '<reason>Again.</reason>' })))).toEqual([
      expect.objectContaining({ code: 'element-repeated', key: 'own-rule.reason' }),
    ]);
  });

  it.each([
    ['nothing', '  '],
    ['a page of text', 'x '.repeat(400)],
    ['an element', 'It <b>rings</b>.'],
  ])('%s as reason', (_, reason) => {
    expect(brief(deckOf(ruleText({ reason })))).toEqual([
      expect.objectContaining({ code: 'deck-text', key: 'own-rule.reason' }),
    ]);
  });

  it('text between the elements', () => {
    expect(brief(deckOf(ruleText(), 'stray'))).toEqual([
      expect.objectContaining({ code: 'deck-text', received: 'stray' }),
    ]);
  });

  it.each([
    ['dampingIndexMin', 'a number alone'],
    ['dampingIndexMin > 0.5 and dampingIndexMax > 1', 'two comparisons'],
    ['0.5 &lt; dampingIndexMin', 'limit and measured exchanged'],
    ['1 &lt; 2', 'no quantity at all'],
  ])('the requirement %s: %s', (requirement) => {
    expect(brief(deckOf(ruleText({ requirement })))).toEqual([
      expect.objectContaining({ code: 'requirement-form', key: 'own-rule.requirement' }),
    ]);
  });

  it('a condition that is a number', () => {
    expect(brief(deckOf(ruleText({ when: 'supplyVoltage' })))).toEqual([
      expect.objectContaining({ code: 'condition-form', key: 'own-rule.when' }),
    ]);
  });

  it.each([
    ['dampingIndexMin 0.6', 'example-form'],
    ['dampingIndexMin = 0.6; dampingIndexMin = 0.7', 'example-form'],
    ['dampingIndxMin = 0.6', 'unknown-quantity'],
    ['dampingIndexMin = 0.6; __proto__ = 1', 'unknown-quantity'],
    ['dampingIndexMin = 0.6 V', 'dimension-mismatch'],
    ['dampingIndexMin = dampingIndexMax', 'dimension-mismatch'],
    ['dampingIndexMin = 0.6 > 0.5', 'dimension-mismatch'],
    ['dampingIndexMin = import(1)', 'expression-not-allowed'],
  ])('the example %s', (example, code) => {
    const more = `<example outcome="passes">${example.replace('<', '&lt;')}</example>`;
    expect(brief(deckOf(ruleText({ more })))).toEqual([expect.objectContaining({ code })]);
  });

  it('everything at once, each where it stands', () => {
    const text = deckOf(
      ruleText({ id: 'first', requirement: 'signalAtTripMin >= resetTime', severity: 'fatal' }),
      ruleText({ id: 'second', requirement: 'supplyVoltage &lt;=\n     foo', source: null }),
    );
    expect(problemsOf(text).map(({ code, place }) => [code, place?.line, place?.column])).toEqual([
      ['unknown-value', 2, 18],
      ['dimension-mismatch', 3, 16],
      ['missing-element', 8, 1],
      ['unknown-quantity', 10, 6],
    ]);
  });
});
