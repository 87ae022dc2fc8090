import { dimensions } from './dimensions.ts';
import { codedValue } from './iec60062.ts';
import { decimalValue, type Literal, parseLiteral } from './Literal.ts';
import { magnitudeFault, notANumber, unitFault, zeroFault } from './magnitudeFaults.ts';
import { parseUnit, type Unit } from './units.ts';
import { type Reading, read, refuse } from './ValueFault.ts';
import { isWithinBounds, type ValueForm, wanted } from './ValueForm.ts';

export interface Magnitude {
  /** SI, never negative. */
  readonly value: number;
  readonly negative: boolean;
  /** From the tolerance letter of a value code, or null. */
  readonly toleranceRatio: number | null;
}

/**
 * One value without its tolerance.
 * @param unitOfRange unit text that a bare number takes from the other end (`8 to 36 V`), or empty
 */
export function readMagnitude(text: string, unitOfRange: string, form: ValueForm): Reading<Magnitude> {
  const literal = parseLiteral(text);
  if (literal === null) return readCode(text, form) ?? notANumber(text, form);
  const unitText = literal.unit === '' ? unitOfRange : literal.unit;
  const unit = unitText === '' ? bareUnit(form) : parseUnit(unitText);
  if (unit === null) return readCode(text, form) ?? unitFault(text, literal, form);
  if (!fitsDimension(unit, form)) return wrongDimension(text, unit, form);
  const value = decimalValue(literal.digits, unit.places);
  if (!Number.isFinite(value)) return refuse('not-finite', wanted(form), text, 'write a finite value');
  return bounded(text, { value, negative: literal.negative, toleranceRatio: null }, literal, form);
}

/** A bare number has a meaning only where the dimension has no unit. */
function bareUnit({ dimension }: ValueForm): Unit | null {
  return dimension === 'ratio' || dimension === 'number' ? { symbol: '', places: 0 } : null;
}

function fitsDimension(unit: Unit, { dimension }: ValueForm): boolean {
  return unit.symbol === dimensions[dimension].symbol || (unit.symbol === '' && dimension === 'ratio');
}

function wrongDimension(text: string, unit: Unit, form: ValueForm): Reading<never> {
  const { noun, unit: si } = dimensions[form.dimension];
  const known = Object.values(dimensions).find((dimension) => dimension.symbol === unit.symbol);
  const is = known?.noun ?? (unit.symbol === 'W' ? 'a power' : 'something else');
  const remedy = si === '' ? 'write it without that unit' : `give ${noun} in ${si}`;
  return refuse('wrong-dimension', wanted(form), text, `${remedy}; this is ${is}`);
}

/** A value code where one is meant; null where the text is none. */
function readCode(text: string, form: ValueForm): Reading<Magnitude> | null {
  const kind = form.dimension === 'gain' ? 'resistance' : form.dimension;
  if (kind !== 'resistance' && kind !== 'capacitance') return null;
  const code = text.replace(/^[+-]/, '');
  const coded = codedValue(code, kind);
  if (coded === null) return miscasedCode(text, code, kind);
  if (kind === 'capacitance' && code.endsWith('F')) {
    const plain = code.slice(0, -1);
    const expected = 'a code whose last letter can only be a tolerance';
    return refuse('code-ambiguous', expected, text, `write ${plain}, or ${plain} ± 1 %`);
  }
  return bounded(text, { ...coded, negative: text.startsWith('-') }, null, form);
}

/** `4N7`: the letters of capacitance are small, those of resistance `R k M G`. */
function miscasedCode(text: string, code: string, kind: 'resistance' | 'capacitance'): Reading<never> | null {
  const other = kind === 'capacitance' ? code.toLowerCase() : code.toUpperCase();
  if (codedValue(other, kind) === null || !/^(\d+[A-Za-z]\d+|[A-Za-z]\d+|\d+[PNUR])$/i.test(code))
    return null;
  return refuse('unit-case', 'a value code in the right case', text, `write ${other}`);
}

function bounded(
  text: string,
  magnitude: Magnitude,
  literal: Literal | null,
  form: ValueForm,
): Reading<Magnitude> {
  if (magnitude.value === 0) return form.zero === true ? read(magnitude) : zeroFault(text, form);
  return isWithinBounds(magnitude.value, form) ? read(magnitude) : magnitudeFault(text, literal, form);
}
