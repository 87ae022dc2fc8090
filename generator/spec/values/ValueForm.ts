import { type DimensionName, dimensions } from './dimensions.ts';
import { decimalValue } from './Literal.ts';
import { parseUnit } from './units.ts';

/** What a value may be. */
export interface ValueForm {
  readonly dimension: DimensionName;
  readonly range?: boolean;
  readonly tolerance?: boolean;
  readonly zero?: boolean;
  /** A minus is allowed and dropped: an inverting output. */
  readonly negative?: boolean;
  /** Narrower or wider than the dimension's own bounds, SI. */
  readonly bounds?: readonly [number, number];
  /** What to show as wanted; left out: the dimension's own example. */
  readonly example?: string;
}

export function exampleOf({ dimension, example }: ValueForm): string {
  return example ?? dimensions[dimension].example;
}

/** `a voltage, such as 12 V` */
export function wanted(form: ValueForm): string {
  const { noun } = dimensions[form.dimension];
  const unit = form.dimension === 'number' ? ' without a unit' : '';
  return `${noun}${unit}, such as ${exampleOf(form)}`;
}

export function isWithinBounds(value: number, form: ValueForm): boolean {
  const [least, most] = boundsOf(form);
  return value >= least && value <= most;
}

export function boundsOf(form: ValueForm): readonly [number, number] {
  const { least, most } = dimensions[form.dimension];
  return form.bounds ?? [least, most];
}

/** Whether digits with that unit would be a sane value, for suggestions. */
export function wouldFit(digits: string, unitText: string, form: ValueForm): boolean {
  const unit = parseUnit(unitText);
  if (unit === null || unit.symbol !== dimensions[form.dimension].symbol) return false;
  return isWithinBounds(decimalValue(digits, unit.places), form);
}

/** The unit that a bare number most likely lacks: the customary one, or SI where only that gives a sane value. */
export function likelyUnit(digits: string, form: ValueForm): string {
  const { symbol } = dimensions[form.dimension];
  const customary = /^[\d.]+ ?([A-Za-z%/]*)/.exec(exampleOf(form))?.[1] ?? '';
  if (form.dimension === 'gain') return customary;
  return !wouldFit(digits, customary, form) && wouldFit(digits, symbol, form) ? symbol : customary;
}
