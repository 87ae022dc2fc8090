/**
 * A value with its tolerance, in SI base units.
 *
 * `low ≤ nominal ≤ high`; an exact value has all three equal.
 */
export interface Quantity {
  readonly nominal: number;
  readonly low: number;
  readonly high: number;
}

/** A value (`from` equals `to`) or a range whose ends may each carry a tolerance. */
export interface Span {
  readonly from: Quantity;
  readonly to: Quantity;
}

/** A closed interval, in SI base units. */
export interface Interval {
  readonly low: number;
  readonly high: number;
}

export function exactly(value: number): Quantity {
  return { nominal: value, low: value, high: value };
}

export function spanOf(from: Quantity, to: Quantity = from): Span {
  return { from, to };
}

/** The widest interval that a range with tolerances at its ends can reach. */
export function outerInterval(span: Span): Interval {
  return { low: span.from.low, high: span.to.high };
}
