import type { Quantity, Span } from '../../base/Quantity.ts';
import { shiftDecimal } from '../../base/shiftDecimal.ts';
import { type DimensionName, dimensions } from './dimensions.ts';
import { applyTolerance, tidy } from './tolerance.ts';
import { prefixFor, valueText } from './valueText.ts';

/** A value with its tolerance as the specification writes it; it reads back to the same three numbers. */
export function writeQuantity(quantity: Quantity, name: DimensionName): string {
  return `${valueText(quantity.nominal, name)}${toleranceText(quantity, name)}`;
}

/** A value or a range; a tolerance that both ends share is written once, at the end. */
export function writeSpan({ from, to }: Span, name: DimensionName): string {
  if (from.nominal === to.nominal && from.low === to.low && from.high === to.high)
    return writeQuantity(from, name);
  const [first, last] = [toleranceText(from, name), toleranceText(to, name)];
  if (first === last) return `${valueText(from.nominal, name)} to ${writeQuantity(to, name)}`;
  // An end without a tolerance would take that of the other.
  const own = first === '' ? ' ± 0 %' : first;
  return `${valueText(from.nominal, name)}${own} to ${writeQuantity(to, name)}`;
}

function toleranceText({ nominal, low, high }: Quantity, name: DimensionName): string {
  if (low === nominal && high === nominal) return '';
  return sharesText(nominal, low, high) ?? distancesText(nominal, low, high, name);
}

/** In per cent, where up to six digits of it give the very bounds. */
function sharesText(nominal: number, low: number, high: number): string | null {
  if (nominal === 0) return null;
  const [up, down] = [high / nominal - 1, 1 - low / nominal].map((ratio) =>
    Number((100 * ratio).toPrecision(6)),
  );
  const tolerance = { up: { ratio: shiftDecimal(up!, -2) }, down: { ratio: shiftDecimal(down!, -2) } };
  const applied = applyTolerance(nominal, tolerance);
  if (applied.low !== low || applied.high !== high) return null;
  return up === down ? ` ± ${up} %` : ` +${up} % -${down} %`;
}

function distancesText(nominal: number, low: number, high: number, name: DimensionName): string {
  const { prefix, places } = prefixFor(nominal, name);
  const { unit } = dimensions[name].written;
  const [up, down] = [high - nominal, nominal - low].map((distance) => shiftDecimal(tidy(distance), -places));
  const suffix = unit === '' ? '' : ` ${prefix}${unit}`;
  return up === down ? ` ± ${up}${suffix}` : ` +${up}${suffix} -${down}${suffix}`;
}
