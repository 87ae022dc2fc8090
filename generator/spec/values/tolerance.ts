import type { Quantity } from '../../base/Quantity.ts';
import { type DimensionName, dimensions } from './dimensions.ts';
import { decimalValue, parseLiteral } from './Literal.ts';
import type { ToleranceText } from './splitRange.ts';
import { parseUnit } from './units.ts';
import { type Reading, read, refuse } from './ValueFault.ts';

/** One side of a tolerance: a share of the value, or a distance in SI units. */
export type Deviation = { readonly ratio: number } | { readonly distance: number };

export interface Tolerance {
  readonly up: Deviation;
  readonly down: Deviation;
}

export const exactTolerance: Tolerance = { up: { ratio: 0 }, down: { ratio: 0 } };

/** `± 20 %`, `± 0.5 V`, `+10 % -20 %`; in `+10/-20 %` both take the unit of the second. */
export function readTolerance(text: ToleranceText, name: DimensionName): Reading<Tolerance> {
  const unit = parseLiteral(text.down)?.unit ?? '';
  const up = readDeviation(text.up, unit, name);
  if (!up.ok) return up;
  const down = readDeviation(text.down, unit, name);
  return down.ok ? read({ up: up.value, down: down.value }) : down;
}

function readDeviation(text: string, inheritedUnit: string, name: DimensionName): Reading<Deviation> {
  const { unit: si, symbol, noun } = dimensions[name];
  const expected = si === '' ? 'a tolerance such as ± 5 %' : `a tolerance such as ± 5 %, or ${noun} in ${si}`;
  const literal = parseLiteral(text);
  if (literal === null || /^[+-]/.test(text)) {
    return refuse('tolerance-form', expected, text, 'write ± 5 %, or +10 % -20 %');
  }
  const unitText = literal.unit === '' ? inheritedUnit : literal.unit;
  if (unitText === '' && name === 'number') return read({ distance: decimalValue(literal.digits, 0) });
  if (unitText === '')
    return refuse('unit-missing', expected, text, `write ± ${literal.digits} %, or give the unit`);
  const unit = parseUnit(unitText);
  if (unit?.symbol === '%') return read({ ratio: decimalValue(literal.digits, unit.places) });
  if (unit?.symbol === symbol) return read({ distance: decimalValue(literal.digits, unit.places) });
  return refuse(
    'tolerance-form',
    expected,
    text,
    `write ± ${literal.digits} %, or a distance in the value's own unit`,
  );
}

/**
 * The interval about a nominal value ≥ 0.
 *
 * Bounds are tidied to 14 digits, so that 10 µH ± 20 % begins at 8 µH and not at 8.000000000000001.
 */
export function applyTolerance(nominal: number, { up, down }: Tolerance): Quantity {
  return {
    nominal,
    low: tidy('ratio' in down ? nominal * (1 - down.ratio) : nominal - down.distance),
    high: tidy('ratio' in up ? nominal * (1 + up.ratio) : nominal + up.distance),
  };
}

/** A tolerance as wide as the value says nothing about it, and a bound at zero breaks every equation. */
export function tooWide(nominal: number, { up, down }: Tolerance): boolean {
  return [up, down].some((side) =>
    'ratio' in side ? side.ratio >= 1 : side.distance > 0 && side.distance >= nominal,
  );
}

/** To 14 significant digits. */
export function tidy(value: number): number {
  return Number(value.toPrecision(14));
}
