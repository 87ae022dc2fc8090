import type { Dimension } from './Dimension.ts';
import type { Comparison } from './RuleDeck.ts';

/** Functions a rule may call; all of plain numbers, and pure. */
export const functionNames = ['abs', 'exp', 'log', 'log10', 'max', 'min', 'sqrt'] as const;
export type FunctionName = (typeof functionNames)[number];

export type Arithmetic = '+' | '-' | '*' | '/' | '^';

/**
 * What is left of an expression once the gate has let it through: a closed, plain tree.
 *
 * Evaluator and code generator know these eight shapes only, so whatever the parser of the gate may learn
 * in a later version can reach neither.
 */
export type Expression =
  | { readonly kind: 'number'; readonly value: number; readonly dimension: Dimension }
  | { readonly kind: 'quantity'; readonly name: string }
  | { readonly kind: 'negation'; readonly of: Expression }
  | {
      readonly kind: 'arithmetic';
      readonly operator: Arithmetic;
      readonly left: Expression;
      readonly right: Expression;
    }
  | { readonly kind: 'call'; readonly name: FunctionName; readonly of: readonly Expression[] }
  | ComparisonExpression
  | {
      readonly kind: 'logic';
      readonly operator: 'and' | 'or';
      readonly left: Expression;
      readonly right: Expression;
    }
  | { readonly kind: 'not'; readonly of: Expression };

export interface ComparisonExpression {
  readonly kind: 'comparison';
  readonly operator: Comparison;
  readonly left: Expression;
  readonly right: Expression;
}

/** What is wrong with an expression, and where in its text. */
export interface ExpressionFault {
  readonly code: string;
  /** Zero-based index into the text. */
  readonly offset: number;
  readonly expected: string;
  readonly received: string;
  readonly fix: string;
}

export function operandsOf(expression: Expression): readonly Expression[] {
  switch (expression.kind) {
    case 'number':
    case 'quantity':
      return [];
    case 'negation':
    case 'not':
      return [expression.of];
    case 'call':
      return expression.of;
    default:
      return [expression.left, expression.right];
  }
}

/** Names of the quantities in an expression, each once, as they come. */
export function quantitiesIn(expression: Expression): readonly string[] {
  if (expression.kind === 'quantity') return [expression.name];
  return [...new Set(operandsOf(expression).flatMap(quantitiesIn))];
}
