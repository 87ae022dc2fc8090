import type { Expression, FunctionName } from './Expression.ts';
import type { Scope } from './RuleDeck.ts';

/** The closed list of functions; SI plain numbers in and out, NaN where there is no real result. */
const functions: Readonly<Record<FunctionName, (...values: number[]) => number>> = {
  abs: Math.abs,
  exp: Math.exp,
  log: Math.log,
  log10: Math.log10,
  max: Math.max,
  min: Math.min,
  sqrt: Math.sqrt,
};

/** Value of a numeric expression in SI; an unknown quantity is NaN, so that nothing built on it holds. */
export function numberOf(expression: Expression, scope: Scope): number {
  switch (expression.kind) {
    case 'number':
      return expression.value;
    case 'quantity':
      return scope[expression.name] ?? Number.NaN;
    case 'negation':
      return -numberOf(expression.of, scope);
    case 'call':
      return functions[expression.name](...expression.of.map((argument) => numberOf(argument, scope)));
    case 'arithmetic': {
      const left = numberOf(expression.left, scope);
      const right = numberOf(expression.right, scope);
      switch (expression.operator) {
        case '+':
          return left + right;
        case '-':
          return left - right;
        case '*':
          return left * right;
        case '/':
          return left / right;
        case '^':
          return left ** right;
      }
    }
  }
  throw new TypeError(`a ${expression.kind} is not a number`);
}

/** Truth of a condition. */
export function truthOf(expression: Expression, scope: Scope): boolean {
  switch (expression.kind) {
    case 'not':
      return !truthOf(expression.of, scope);
    case 'logic':
      return expression.operator === 'and'
        ? truthOf(expression.left, scope) && truthOf(expression.right, scope)
        : truthOf(expression.left, scope) || truthOf(expression.right, scope);
    case 'comparison': {
      const left = numberOf(expression.left, scope);
      const right = numberOf(expression.right, scope);
      switch (expression.operator) {
        case '<=':
          return left <= right;
        case '>=':
          return left >= right;
        case '<':
          return left < right;
        case '>':
          return left > right;
      }
    }
  }
  throw new TypeError(`a ${expression.kind} is not a condition`);
}
