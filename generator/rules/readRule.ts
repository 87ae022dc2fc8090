import { nearest } from '../base/nearest.ts';
import type { Severity } from '../base/Problem.ts';
import { typeOf } from './checkDimensions.ts';
import type { DeckFaults, ElementText } from './DeckFaults.ts';
import { type Dimension, unitSymbol } from './Dimension.ts';
import {
  exampleOutcomes,
  idPattern,
  longestId,
  longestText,
  requiredParts,
  severities,
} from './deckFormat.ts';
import { type ComparisonExpression, type Expression, quantitiesIn } from './Expression.ts';
import { parseExpression } from './parseExpression.ts';
import { quantities } from './quantities.ts';
import type { ExampleOutcome, RuleExample } from './RuleDeck.ts';
import { readExample } from './readExample.ts';
import type { XmlElement } from './readXml.ts';

/** A rule whose texts and expressions have passed every check, not yet turned into functions. */
export interface CheckedRule {
  readonly id: string;
  readonly severity: Severity;
  readonly requirement: string;
  readonly when: string | null;
  readonly whatToDo: string;
  readonly reason: string;
  readonly source: string;
  readonly unit: string;
  readonly uses: readonly string[];
  readonly comparison: ComparisonExpression;
  readonly condition: Expression | null;
  readonly examples: readonly RuleExample[];
  /** Index of the element, for complaints about the rule as a whole. */
  readonly start: number;
}

/** Reads one `rule` element; null where something is wrong, all of it then in `faults`. */
export function readRule(element: XmlElement, faults: DeckFaults): CheckedRule | null {
  const id = readId(element, faults);
  const key = id ?? 'rule';
  const severity = readChoice(element, 'severity', severities, key, faults);
  const parts = readParts(element, key, faults);
  const requirement = parts.get('requirement');
  const comparison = requirement === undefined ? null : readComparison(requirement, key, faults);
  const when = parts.get('when');
  const condition = when === undefined ? null : readCondition(when, key, faults);
  const sentence = (part: string) => sentenceOf(parts.get(part), `${key}.${part}`, faults);
  const texts = { whatToDo: sentence('whatToDo'), reason: sentence('reason'), source: sentence('source') };
  const examples = element.children
    .filter((child) => child.name === 'example')
    .map((child) => readOneExample(child, key, faults));
  if (id === null || severity === null || comparison === null || requirement === undefined) return null;
  if (texts.whatToDo === null || texts.reason === null || texts.source === null) return null;
  if ((when !== undefined && condition === null) || examples.includes(null)) return null;
  const named = new Set([
    ...quantitiesIn(comparison),
    ...(condition === null ? [] : quantitiesIn(condition)),
  ]);
  return {
    id,
    severity,
    requirement: collapse(requirement.text),
    when: when === undefined ? null : collapse(when.text),
    whatToDo: texts.whatToDo,
    reason: texts.reason,
    source: texts.source,
    unit: unitSymbol(typeOf(comparison.left) as Dimension),
    uses: Object.keys(quantities).filter((name) => named.has(name)),
    comparison,
    condition,
    examples: examples.filter((example) => example !== null),
    start: element.start,
  };
}

function collapse(text: string): string {
  return text.replace(/\s+/g, ' ').trim();
}

function readId(element: XmlElement, faults: DeckFaults): string | null {
  const id = element.attributes.get('id');
  const fix = 'name it after what it asks for: signal-floor';
  const expected = `an id of small letters, figures and hyphens, at most ${longestId}`;
  if (id === undefined) {
    return faults.add(element.start, 'rule', { code: 'missing-attribute', expected, received: 'none', fix });
  }
  if (idPattern.test(id) && id.length <= longestId) return id;
  const at = faults.attributeAt(element, 'id');
  return faults.add(at, 'rule.id', { code: 'rule-id', expected, received: id.slice(0, 80), fix });
}

function readChoice<T extends string>(
  element: XmlElement,
  attribute: string,
  choices: readonly T[],
  key: string,
  faults: DeckFaults,
): T | null {
  const value = element.attributes.get(attribute);
  const chosen = choices.find((choice) => choice === value);
  if (chosen !== undefined) return chosen;
  const near = value === undefined ? null : nearest(value, choices);
  return faults.add(faults.attributeAt(element, attribute), `${key}.${attribute}`, {
    code: value === undefined ? 'missing-attribute' : 'unknown-value',
    expected: `${attribute}: ${choices.join(', ')}`,
    received: value === undefined ? 'none' : value.slice(0, 80),
    fix: near === null ? 'choose one of them' : `did you mean ${near}?`,
  });
}

/** The parts of a rule that are there once; a missing or second one is a fault. */
function readParts(element: XmlElement, key: string, faults: DeckFaults): ReadonlyMap<string, ElementText> {
  const parts = new Map<string, ElementText>();
  const seen = new Set<string>();
  for (const child of element.children) {
    if (child.name === 'example') continue;
    if (seen.has(child.name)) {
      const complaint = { code: 'element-repeated', expected: `one ${child.name}`, received: 'another' };
      faults.add(child.start, `${key}.${child.name}`, { ...complaint, fix: 'keep one' });
      continue;
    }
    seen.add(child.name);
    const text = faults.textOf(child, `${key}.${child.name}`);
    if (text !== null) parts.set(child.name, text);
  }
  for (const part of requiredParts.filter((name) => !seen.has(name))) {
    const complaint = { code: 'missing-element', expected: part, received: 'none', fix: `add <${part}>` };
    faults.add(element.start, `${key}.${part}`, complaint);
  }
  return parts;
}

function sentenceOf(part: ElementText | undefined, key: string, faults: DeckFaults): string | null {
  if (part === undefined) return null;
  const text = collapse(part.text);
  if (text.length > 0 && text.length <= longestText) return text;
  const received = text === '' ? 'nothing' : `${text.length} characters`;
  const complaint = { code: 'deck-text', expected: `1 to ${longestText} characters`, received };
  return faults.add(part.element.start, key, { ...complaint, fix: 'say it in a sentence or two' });
}

/** A single comparison, so that a measured value, a limit and their unit can be reported. */
function readComparison(part: ElementText, rule: string, faults: DeckFaults): ComparisonExpression | null {
  const key = `${rule}.requirement`;
  const expression = checked(part, key, faults);
  if (expression === null) return null;
  const complain = (expected: string, received: string, fix: string) =>
    faults.addExpression(part, key, [{ code: 'requirement-form', offset: 0, expected, received, fix }]);
  if (expression.kind !== 'comparison') {
    const fix = 'write measured <= limit; conditions go into <when>';
    return complain('a single comparison', collapse(part.text), fix);
  }
  if (quantitiesIn(expression.left).length > 0) return expression;
  const fix = 'put what is measured on the left and the limit on the right';
  return complain('a quantity of the design on the left', collapse(part.text), fix);
}

function readCondition(part: ElementText, rule: string, faults: DeckFaults): Expression | null {
  const key = `${rule}.when`;
  const expression = checked(part, key, faults);
  if (expression === null || typeOf(expression) === 'truth') return expression;
  const complaint = {
    code: 'condition-form',
    offset: 0,
    expected: 'a comparison',
    received: collapse(part.text),
  };
  return faults.addExpression(part, key, [{ ...complaint, fix: 'write when the rule applies: a > b' }]);
}

/** Through the gate and the dimension check. */
function checked(part: ElementText, key: string, faults: DeckFaults): Expression | null {
  const parsed = parseExpression(part.text);
  if (!('kind' in parsed)) return faults.addExpression(part, key, parsed);
  const type = typeOf(parsed);
  return Array.isArray(type) ? faults.addExpression(part, key, type) : parsed;
}

function readOneExample(element: XmlElement, rule: string, faults: DeckFaults): RuleExample | null {
  const key = `${rule}.example`;
  const outcome: ExampleOutcome | null = readChoice(element, 'outcome', exampleOutcomes, key, faults);
  const part = faults.textOf(element, key);
  if (part === null) return null;
  const values = readExample(part.text);
  if (!(values instanceof Map)) {
    return faults.addExpression(part, key, values as Exclude<typeof values, ReadonlyMap<string, unknown>>);
  }
  return outcome === null ? null : { outcome, quantities: Object.fromEntries(values) };
}
