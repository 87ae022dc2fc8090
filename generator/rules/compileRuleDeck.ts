import type { Outcome } from '../base/Problem.ts';
import { success } from '../base/Problem.ts';
import { expressionSource } from './expressionSource.ts';
import type { CheckedRule } from './readRule.ts';
import { readRuleDeck } from './readRuleDeck.ts';

/**
 * Compiles a rule deck into the source of an ES module whose default export is its array of rules.
 *
 * Build only: the module needs neither the XML nor the expression library at run time.
 * @param text the XML
 * @param name file name for messages
 */
export function compileRuleDeck(text: string, name: string): Outcome<string> {
  const deck = readRuleDeck(text, name);
  if (!deck.ok) return deck;
  return success(`export default [\n${deck.value.rules.map(ruleSource).join(',\n')},\n];\n`);
}

function ruleSource({ start: _start, comparison, condition, ...texts }: CheckedRule): string {
  const applies = condition === null ? 'true' : expressionSource(condition);
  const functions = {
    comparison: JSON.stringify(comparison.operator),
    measured: `(q) => ${expressionSource(comparison.left)}`,
    limit: `(q) => ${expressionSource(comparison.right)}`,
    applies: `(q) => ${applies}`,
  };
  const entries = [
    ...Object.entries(texts).map(([key, value]) => `    ${key}: ${JSON.stringify(value)}`),
    ...Object.entries(functions).map(([key, source]) => `    ${key}: ${source}`),
  ];
  return `  {\n${entries.join(',\n')},\n  }`;
}
