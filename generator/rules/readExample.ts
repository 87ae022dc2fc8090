import { nearest } from '../base/nearest.ts';
import { dimensionOfQuantity, typeOf } from './checkDimensions.ts';
import { dimensionInWords, sameDimension } from './Dimension.ts';
import { type Expression, type ExpressionFault, quantitiesIn } from './Expression.ts';
import { numberOf } from './evaluateExpression.ts';
import { parseExpression } from './parseExpression.ts';
import { isQuantityName, quantities } from './quantities.ts';

/**
 * Reads the quantities of an example: `signalAtTripMin = 25 mV; signalFloor = 20 mV`.
 *
 * `none` in place of a value says that the figure does not exist.
 * @returns SI values by name, or every fault with its offset
 */
export function readExample(text: string): ReadonlyMap<string, number | null> | readonly ExpressionFault[] {
  const values = new Map<string, number | null>();
  const faults: ExpressionFault[] = [];
  let offset = 0;
  for (const piece of text.split(';')) {
    if (piece.trim() !== '') readAssignment(piece, offset, values, faults);
    offset += piece.length + 1;
  }
  return faults.length === 0 ? values : faults;
}

function readAssignment(
  piece: string,
  offset: number,
  values: Map<string, number | null>,
  faults: ExpressionFault[],
): void {
  const equals = piece.indexOf('=');
  const name = piece.slice(0, Math.max(0, equals)).trim();
  const start = offset + piece.search(/\S/);
  const add = (code: string, expected: string, received: string, fix: string) =>
    faults.push({ code, offset: start, expected, received, fix });
  if (equals < 0) {
    add('example-form', 'quantity = value', piece.trim().slice(0, 40), 'separate several with semicolons');
  } else if (!isQuantityName(name)) {
    const near = nearest(name, Object.keys(quantities));
    const fix = near === null ? 'name a quantity of the design' : `did you mean ${near}?`;
    add('unknown-quantity', 'a quantity of the design', name, fix);
  } else if (values.has(name)) {
    add('example-form', 'each quantity once', `${name} twice`, 'remove one');
  } else if (piece.slice(equals + 1).trim() === 'none') {
    values.set(name, null);
  } else {
    const value = constantOf(piece.slice(equals + 1), name);
    if (typeof value === 'number') values.set(name, value);
    else for (const each of value) faults.push({ ...each, offset: offset + equals + 1 + each.offset });
  }
}

/** A value in the unit of its quantity, in SI. */
function constantOf(text: string, name: string): number | readonly ExpressionFault[] {
  const parsed = parseExpression(text);
  if (!('kind' in parsed)) return parsed;
  const wanted = dimensionOfQuantity(name);
  const type = typeOf(parsed);
  if (Array.isArray(type)) return type;
  const fits = type !== 'truth' && isConstant(parsed) && sameDimension(type as typeof wanted, wanted);
  if (fits) return numberOf(parsed, {});
  const expected = `a value: ${dimensionInWords(wanted)}`;
  const fix = 'write the value with its unit';
  return [{ code: 'dimension-mismatch', offset: 0, expected, received: text.trim(), fix }];
}

function isConstant(expression: Expression): boolean {
  return quantitiesIn(expression).length === 0;
}
