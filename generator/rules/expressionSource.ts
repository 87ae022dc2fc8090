import type { Expression } from './Expression.ts';

/**
 * JavaScript of an expression that the gate let through; the quantities are properties of `q`.
 *
 * Every name written comes from a closed table and every number from `String(number)`, so no text of a deck
 * ever reaches the program as code. Fully parenthesised: JavaScript's own precedence plays no part.
 */
export function expressionSource(expression: Expression): string {
  switch (expression.kind) {
    case 'number':
      return `(${String(expression.value)})`;
    case 'quantity':
      return `(q.${expression.name} ?? NaN)`;
    case 'negation':
      return `(-${expressionSource(expression.of)})`;
    case 'not':
      return `(!${expressionSource(expression.of)})`;
    case 'call':
      return `Math.${expression.name}(${expression.of.map(expressionSource).join(', ')})`;
    case 'arithmetic': {
      const operator = expression.operator === '^' ? '**' : expression.operator;
      return `(${expressionSource(expression.left)} ${operator} ${expressionSource(expression.right)})`;
    }
    case 'logic': {
      const operator = expression.operator === 'and' ? '&&' : '||';
      return `(${expressionSource(expression.left)} ${operator} ${expressionSource(expression.right)})`;
    }
    case 'comparison':
      return `(${expressionSource(expression.left)} ${expression.operator} ${expressionSource(expression.right)})`;
  }
}
