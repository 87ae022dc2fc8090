import {
  type Dimension,
  dimensionInWords,
  dimensionless,
  sameDimension,
  timesPower,
  unitScale,
} from './Dimension.ts';
import { type Expression, type ExpressionFault, quantitiesIn } from './Expression.ts';
import { numberOf } from './evaluateExpression.ts';
import { type QuantityName, quantities } from './quantities.ts';

/** A number of some dimension, or the truth of a condition. */
export type ExpressionType = Dimension | 'truth';

/** Powers beyond this mean a slip, and would leave the range of numbers. */
const greatestPower = 8;

/**
 * Type of an expression, every subexpression checked.
 * @returns the type, or the faults: sums and comparisons of unlike dimensions, powers and logarithms of
 *   anything but plain numbers, conditions where a number is wanted and the reverse
 */
export function typeOf(expression: Expression): ExpressionType | readonly ExpressionFault[] {
  const faults: ExpressionFault[] = [];
  const type = infer(expression, faults);
  return type === null || faults.length > 0 ? faults : type;
}

export function dimensionOfQuantity(name: string): Dimension {
  const { unit } = quantities[name as QuantityName];
  return unit === '1' ? dimensionless : unitScale(unit)!.dimension;
}

type Faults = ExpressionFault[];

function infer(expression: Expression, faults: Faults): ExpressionType | null {
  switch (expression.kind) {
    case 'number':
      return expression.dimension;
    case 'quantity':
      return dimensionOfQuantity(expression.name);
    case 'negation':
      return numeric(expression.of, '-', faults);
    case 'not':
      return condition(expression.of, 'not', faults);
    case 'call':
      return callType(expression, faults);
    case 'arithmetic':
      return arithmeticType(expression, faults);
    case 'comparison': {
      const compared = alike([expression.left, expression.right], expression.operator, faults);
      return compared === null ? null : 'truth';
    }
    case 'logic': {
      const left = condition(expression.left, expression.operator, faults);
      const right = condition(expression.right, expression.operator, faults);
      return left === null || right === null ? null : 'truth';
    }
  }
}

function numeric(operand: Expression, operator: string, faults: Faults): Dimension | null {
  const type = infer(operand, faults);
  if (type !== 'truth') return type;
  return complain(faults, 'expression-type', `a number beside ${operator}`, 'a condition', bracketsFix);
}

function condition(operand: Expression, operator: string, faults: Faults): 'truth' | null {
  const type = infer(operand, faults);
  if (type === 'truth' || type === null) return type;
  const received = dimensionInWords(type);
  return complain(faults, 'expression-type', `a comparison beside ${operator}`, received, bracketsFix);
}

const bracketsFix = 'put the comparison in brackets: not (a <= b)';

function alike(operands: readonly Expression[], operator: string, faults: Faults): Dimension | null {
  const types = operands.map((operand) => numeric(operand, operator, faults));
  const [first, ...others] = types;
  if (first === null || first === undefined || others.includes(null)) return null;
  const odd = others.find((other) => other !== null && !sameDimension(first, other));
  if (odd === undefined || odd === null) return first;
  const received = `${dimensionInWords(first)} ${operator} ${dimensionInWords(odd)}`;
  const fix = 'give both sides the same unit; a bare number has none';
  return complain(
    faults,
    'dimension-mismatch',
    `the same dimension on both sides of ${operator}`,
    received,
    fix,
  );
}

function callType(expression: Expression & { kind: 'call' }, faults: Faults): Dimension | null {
  const { name, of } = expression;
  const argument = alike(of, name, faults);
  if (argument === null) return null;
  if (name === 'min' || name === 'max' || name === 'abs') return argument;
  if (name === 'sqrt') return timesPower(dimensionless, argument, 0.5);
  return plain(argument, `an argument of ${name} without unit`, faults);
}

function arithmeticType(expression: Expression & { kind: 'arithmetic' }, faults: Faults): Dimension | null {
  const { operator, left, right } = expression;
  if (operator === '+' || operator === '-') return alike([left, right], operator, faults);
  const leftType = numeric(left, operator, faults);
  const rightType = numeric(right, operator, faults);
  if (leftType === null || rightType === null) return null;
  if (operator === '*') return timesPower(leftType, rightType, 1);
  if (operator === '/') return timesPower(leftType, rightType, -1);
  if (plain(rightType, 'an exponent without unit', faults) === null) return null;
  return powerType(leftType, right, faults);
}

/** An exponent of something with a unit must be known now, or the dimension would depend on the design. */
function powerType(base: Dimension, exponent: Expression, faults: Faults): Dimension | null {
  const isConstant = quantitiesIn(exponent).length === 0;
  const power = isConstant ? numberOf(exponent, {}) : null;
  if (power !== null && !(Math.abs(power) <= greatestPower)) {
    const expected = `an exponent between -${greatestPower} and ${greatestPower}`;
    return complain(faults, 'expression-exponent', expected, String(power), 'write a smaller power');
  }
  if (sameDimension(base, dimensionless)) return dimensionless;
  if (power !== null) return timesPower(dimensionless, base, power);
  const received = `a power of ${dimensionInWords(base)}`;
  return complain(faults, 'expression-exponent', 'a number as exponent', received, 'divide by a unit first');
}

function plain(dimension: Dimension, expected: string, faults: Faults): Dimension | null {
  if (sameDimension(dimension, dimensionless)) return dimension;
  const fix = 'divide by a quantity of the same unit first';
  return complain(faults, 'dimension-mismatch', expected, dimensionInWords(dimension), fix);
}

function complain(faults: Faults, code: string, expected: string, received: string, fix: string): null {
  faults.push({ code, offset: 0, expected, received, fix });
  return null;
}
